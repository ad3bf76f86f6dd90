import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  findLiveClientLink,
  insertClientLink,
  listClientLinks,
  recordClientLinkOpened,
  revokeClientLink,
} from '@/db/queries/client-links';
import { findNotebook } from '@/db/queries/notebooks';
import { Failure, can, type Action } from '@/lib/access';
import { hashOf, isId, newSecret, oneLine, type Person } from '@/lib/accounts';
import { env } from '@/lib/env';
import { holdFor, openFor } from './guard';
import type { ClientLinkLine, ClientView, NewClientLink } from './types';
import { contentOf, getVersion } from './versions';

const LIVE_LINKS = 50;
const TOKEN = /^[A-Za-z0-9_-]{43}$/;

export const LinkRequest = z.strictObject({ label: oneLine('The label', 120).nullish() });
export type LinkRequest = z.infer<typeof LinkRequest>;

/** The notebook's client links, revoked ones too, newest first; never a token. */
export async function listLinks(person: Person, id: string): Promise<ClientLinkLine[]> {
  await openFor(person, 'links.list', id);
  return (await listClientLinks(database(), id)).map((link) => ({
    id: link.id,
    label: link.label,
    madeAt: link.createdAt.toISOString(),
    madeBy: link.createdBy.name,
    revokedAt: link.revokedAt?.toISOString() ?? null,
    opened: link.openedCount,
    lastOpenedAt: link.lastOpenedAt?.toISOString() ?? null,
  }));
}

/**
 * Makes a read-only link. The answer is the only place where its token ever appears.
 * @throws Failure `limit-reached` above 50 live links
 */
export async function createLink(
  person: Person,
  id: string,
  { label }: LinkRequest,
): Promise<NewClientLink> {
  const token = newSecret();
  const linkId = await inTransaction(async (trx) => {
    await holdFor(trx, person, 'links.change', id);
    const live = (await listClientLinks(trx, id)).filter((link) => link.revokedAt === null);
    if (live.length >= LIVE_LINKS) {
      throw new Failure(
        'limit-reached',
        `This notebook has ${live.length} client links in use; revoke one first.`,
      );
    }
    return insertClientLink(trx, {
      notebookId: id,
      tokenHash: hashOf(token),
      label: label ?? null,
      createdBy: person.id,
    });
  });
  const url = new URL(`/client/${token}`, env().NEXTAUTH_URL).href;
  return { id: linkId, token, url };
}

/** Ends a link at once: its holder's next request finds nothing. @throws Failure `not-found` */
export async function revokeLink(person: Person, id: string, linkId: string): Promise<void> {
  await openFor(person, 'links.change', id);
  if (isId(linkId) && (await revokeClientLink(database(), id, linkId))) return;
  throw new Failure(
    'not-found',
    'This notebook has no such client link, or it is revoked already.',
  );
}

/**
 * What the holder of a link reads: the newest version. The opening is counted.
 * @throws Failure `not-found` for an unknown and for a revoked link, alike
 */
export async function readByToken(token: string): Promise<ClientView> {
  const { linkId, view } = await viewFor(token, 'client.read');
  await recordClientLinkOpened(database(), linkId);
  return view;
}

/** The same for an export, which is no opening. @throws Failure `not-found` */
export async function readByTokenForExport(token: string): Promise<ClientView> {
  return (await viewFor(token, 'client.export')).view;
}

async function viewFor(
  token: string,
  action: Action,
): Promise<{ linkId: string; view: ClientView }> {
  const db = database();
  const link = TOKEN.test(token) ? await findLiveClientLink(db, hashOf(token)) : null;
  const notebook = link === null ? null : await findNotebook(db, link.notebookId);
  const guarded = notebook === null ? null : { id: notebook.id, roles: new Map() };
  const actor = { kind: 'link', notebookId: link?.notebookId ?? '' } as const;
  if (link === null || notebook === null || !can(actor, action, guarded)) {
    throw new Failure(
      'not-found',
      'This link is not valid: it was revoked, or its address is incomplete.',
    );
  }
  const version = await getVersion(db, notebook.id, notebook.head);
  const view = {
    notebook: { id: notebook.id, title: notebook.title, workshop: notebook.workshop.name },
    version: { number: version.number, savedAt: version.savedAt.toISOString() },
    content: contentOf(version),
  };
  return { linkId: link.id, view };
}
