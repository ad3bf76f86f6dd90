import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  findClientLink,
  insertClientLink,
  listClientLinkOpenings,
  listClientLinks,
  revokeClientLink,
  setClientLinkPassphrase,
  type ClientLink,
} from '@/db/queries/client-links';
import type { Notebook } from '@/db/queries/notebooks';
import { findRevisionEntry, listRevisions } from '@/db/queries/revisions';
import { Failure } from '@/lib/access';
import { EmailAddress, hashOf, hashPassword, isId, oneLine, type Person } from '@/lib/accounts';
import { record, type Deed } from '@/lib/activity';
import { holdFor, openFor } from './guard';
import { isLetter } from './letters';
import { addressOfLink, addressOfToken, tokenOf } from './link-tokens';
import type { ClientLinkDetails, ClientLinkLine, NewClientLink } from './types';

const LIVE_LINKS = 50;
const OPENINGS_SHOWN = 50;
const DAY_MS = 24 * 3600 * 1000;

const Passphrase = z
  .string({ error: 'The passphrase is missing.' })
  .min(8, { error: 'The passphrase has fewer than 8 characters.' })
  .max(200, { error: 'The passphrase is longer than 200 characters.' })
  .transform((text) => text.normalize('NFC'));

export const LinkRequest = z.strictObject({
  label: oneLine('The label', 120).nullish(),
  /** Letter of the one revision that it shows; the latest issued when left out. */
  revision: z.string().refine(isLetter, { error: 'A revision is named by its letter.' }).nullish(),
  /** The last day on which it opens, in UTC. */
  lastDay: z.iso.date({ error: 'The last day is written as 2026-12-31.' }).nullish(),
  passphrase: Passphrase.nullish(),
  clientName: oneLine('The name', 120).nullish(),
  clientEmail: EmailAddress.nullish(),
});
export type LinkRequest = z.infer<typeof LinkRequest>;

/** A new passphrase, or null for none. */
export const LinkChange = z.strictObject({ passphrase: Passphrase.nullable() });
export type LinkChange = z.infer<typeof LinkChange>;

/** The notebook's client links, revoked ones too, newest first; never a token. */
export async function listLinks(person: Person, id: string): Promise<ClientLinkLine[]> {
  await openFor(person, 'links.list', id);
  const db = database();
  const letters = new Map(
    (await listRevisions(db, id)).map(({ ordinal, letter }) => [ordinal, letter]),
  );
  return (await listClientLinks(db, id)).map((link) => ({
    id: link.id,
    label: link.label,
    madeAt: link.createdAt.toISOString(),
    madeBy: link.createdBy.name,
    revokedAt: link.revokedAt?.toISOString() ?? null,
    revision: link.revision === null ? null : (letters.get(link.revision) ?? null),
    expiresAt: link.expiresAt?.toISOString() ?? null,
    expired: isExpired(link),
    hasPassphrase: link.passphraseHash !== null,
    clientName: link.clientName,
    clientEmail: link.clientEmail,
    opened: link.openedCount,
    lastOpenedAt: link.lastOpenedAt?.toISOString() ?? null,
  }));
}

export const isExpired = ({ expiresAt }: Pick<ClientLink, 'expiresAt'>): boolean =>
  expiresAt !== null && expiresAt.getTime() <= Date.now();

/** The address of one link and when it was opened. @throws Failure `not-found` */
export async function readLink(
  person: Person,
  id: string,
  linkId: string,
): Promise<ClientLinkDetails> {
  await openFor(person, 'links.list', id);
  const link = isId(linkId) ? await findClientLink(database(), id, linkId) : null;
  if (link === null) throw noSuchLink();
  const openings = await listClientLinkOpenings(database(), link.id, OPENINGS_SHOWN);
  return {
    url: link.revokedAt === null ? addressOfLink(link) : null,
    openings: openings.map((at) => at.toISOString()),
  };
}

/**
 * Makes a read-only link to the latest revision or to one of them.
 * @throws Failure `limit-reached` above 50 live links; `invalid` for a revision the notebook has not,
 *   or a last day that is over
 */
export async function createLink(
  person: Person,
  id: string,
  request: LinkRequest,
): Promise<NewClientLink> {
  const expiresAt = request.lastDay ? endOf(request.lastDay) : null;
  await openFor(person, 'links.change', id);
  const passphraseHash = request.passphrase ? await hashPassword(request.passphrase) : null;
  const linkId = randomUUID();
  const token = tokenOf(linkId);
  await inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'links.change', id);
    const live = (await listClientLinks(trx, id)).filter((link) => link.revokedAt === null);
    if (live.length >= LIVE_LINKS) {
      throw new Failure(
        'limit-reached',
        `This notebook has ${live.length} client links in use; revoke one first.`,
      );
    }
    await insertClientLink(trx, {
      id: linkId,
      notebookId: id,
      tokenHash: hashOf(token),
      label: request.label ?? null,
      createdBy: person.id,
      revision: await ordinalOf(trx, id, request.revision ?? null),
      expiresAt,
      passphraseHash,
      clientName: request.clientName ?? null,
      clientEmail: request.clientEmail ?? null,
    });
    await recordLink(trx, 'link.made', person, notebook, linkId);
  });
  return { id: linkId, token, url: addressOfToken(token) };
}

/**
 * Gives a link another passphrase, or none; whoever got in with the one before is asked anew.
 * @throws Failure `not-found`
 */
export async function changeLink(
  person: Person,
  id: string,
  linkId: string,
  { passphrase }: LinkChange,
): Promise<void> {
  await openFor(person, 'links.change', id);
  const hash = passphrase === null ? null : await hashPassword(passphrase);
  await inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'links.change', id);
    const isChanged = isId(linkId) && (await setClientLinkPassphrase(trx, id, linkId, hash));
    if (!isChanged) throw noSuchLink();
    await recordLink(trx, 'link.changed', person, notebook, linkId);
  });
}

/** Ends a link at once: its holder's next request finds nothing. @throws Failure `not-found` */
export async function revokeLink(person: Person, id: string, linkId: string): Promise<void> {
  await inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'links.change', id);
    if (!isId(linkId) || !(await revokeClientLink(trx, id, linkId))) throw noSuchLink();
    await recordLink(trx, 'link.revoked', person, notebook, linkId);
  });
}

const noSuchLink = () =>
  new Failure('not-found', 'This notebook has no such client link, or it is revoked already.');

/** A link opens to the end of its last day. */
function endOf(day: string): Date {
  const end = new Date(Date.parse(day) + DAY_MS);
  if (end.getTime() > Date.now()) return end;
  const message = `The last day, ${day}, is over already.`;
  throw new Failure('invalid', message, { fields: [{ field: 'lastDay', message }] });
}

async function ordinalOf(
  trx: Knex.Transaction,
  id: string,
  letter: string | null,
): Promise<number | null> {
  if (letter === null) return null;
  const entry = await findRevisionEntry(trx, id, { letter });
  if (entry !== null) return entry.ordinal;
  const message = `This notebook has no revision ${letter}.`;
  throw new Failure('invalid', message, { fields: [{ field: 'revision', message }] });
}

function recordLink(
  trx: Knex.Transaction,
  deed: Deed,
  person: Person,
  notebook: Notebook,
  linkId: string,
): Promise<void> {
  return record(trx, {
    deed,
    by: person.id,
    workshopId: notebook.workshop.id,
    notebookId: notebook.id,
    subject: notebook.title,
    details: { link: linkId },
  });
}
