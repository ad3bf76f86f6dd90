import { z } from 'zod';
import { database } from '@/db/client';
import {
  findLiveClientLink,
  recordClientLinkOpened,
  type ClientLink,
} from '@/db/queries/client-links';
import { findNotebook, type Notebook } from '@/db/queries/notebooks';
import { findLatestRevision, findRevisionEntry, type RevisionEntry } from '@/db/queries/revisions';
import { Failure, can, type Action } from '@/lib/access';
import {
  LIMITS,
  countAgainst,
  hashOf,
  readWorkshopSettings,
  takeBack,
  verifyPassword,
} from '@/lib/accounts';
import { isPass, makePass } from './link-tokens';
import { isExpired } from './links';
import { openRevision, tagOf } from './revisions';
import type { ClientView, OpenRevision } from './types';

const TOKEN = /^[A-Za-z0-9_-]{43}$/;

/** What the browser of a link's holder sends along: the pass of an earlier right passphrase. */
type Pass = string | undefined;

/**
 * What the holder of a link meets: an issued revision, or why there is none to be read. Only what is
 * frozen is read; nothing is evaluated, and no session is looked at.
 * @throws Failure `not-found` for an unknown and for a revoked link, alike
 */
export async function readByToken(token: string, pass: Pass): Promise<ClientView> {
  const { link, notebook } = await holderOf(token, 'client.read');
  const linkId = link.id;
  if (link.expiresAt !== null && isExpired(link)) {
    return { kind: 'expired', linkId, since: link.expiresAt.toISOString() };
  }
  if (!isOpened(link, pass)) return { kind: 'passphrase', linkId };
  const shown = await shownBy(link);
  if (shown === null) {
    const { titleBlock } = readWorkshopSettings(notebook.workshopSettings);
    const legalOwner = titleBlock.legalOwner || notebook.workshop.name;
    return { kind: 'nothing-issued', linkId, title: notebook.title, legalOwner };
  }
  const open = await openRevision(database(), notebook, ...shown);
  return { kind: 'revision', linkId, open };
}

/** Counts that a page was opened through the link; nothing of who opened it is kept. */
export async function countOpening(linkId: string): Promise<void> {
  await recordClientLinkOpened(database(), linkId);
}

/** A revision to be exported, read only when the client has not got it already. */
export interface ClientExport {
  tag: string;
  read: () => Promise<OpenRevision>;
}

/**
 * The same for an export, which is no opening.
 * @throws Failure `not-found`, `link-expired`, `passphrase-needed`, `nothing-issued`
 */
export async function exportByToken(token: string, pass: Pass): Promise<ClientExport> {
  const { link, notebook } = await holderOf(token, 'client.export');
  if (isExpired(link)) {
    throw new Failure('link-expired', 'This link has expired; ask whoever gave it to you.');
  }
  if (!isOpened(link, pass)) {
    throw new Failure(
      'passphrase-needed',
      'Open the page of this link and give its passphrase first.',
    );
  }
  const shown = await shownBy(link);
  if (shown === null) {
    throw new Failure('nothing-issued', 'Nothing has been issued for this link yet.');
  }
  return { tag: tagOf(...shown), read: () => openRevision(database(), notebook, ...shown) };
}

export const PassphraseForm = z.object({ passphrase: z.string().max(200).default('') });

/**
 * Tries a passphrase, so many times and no more.
 * @returns the pass for the browser, or null when it is not the one, or when the link asks for none
 * @throws Failure `not-found`, `too-many`
 */
export async function tryPassphrase(
  token: string,
  passphrase: string,
  address: string,
): Promise<string | null> {
  const { link } = await holderOf(token, 'client.read');
  const byAddress = await countAgainst(LIMITS.linkPassphraseAddress, `${link.id} ${address}`);
  const byLink = await countAgainst(LIMITS.linkPassphrase, link.id);
  if (isExpired(link) || link.passphraseHash === null) return null;
  if (!(await verifyPassword(link.passphraseHash, passphrase.normalize('NFC')))) return null;
  await takeBack(byAddress);
  await takeBack(byLink);
  return makePass(link);
}

const isOpened = (link: ClientLink, pass: Pass): boolean =>
  link.passphraseHash === null || isPass(link, pass);

/** The revision that a link shows and the newest one; null while nothing is issued. */
async function shownBy(
  link: ClientLink,
): Promise<[shown: RevisionEntry, newest: RevisionEntry] | null> {
  const newest = await findLatestRevision(database(), link.notebookId);
  if (newest === null) return null;
  if (link.revision === null) return [newest, newest];
  const fixed = await findRevisionEntry(database(), link.notebookId, { ordinal: link.revision });
  return fixed === null ? null : [fixed, newest];
}

async function holderOf(
  token: string,
  action: Action,
): Promise<{ link: ClientLink; notebook: Notebook }> {
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
  return { link, notebook };
}
