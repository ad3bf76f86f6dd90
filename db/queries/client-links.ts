import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface ClientLink {
  id: string;
  notebookId: string;
  tokenHash: string;
  label: string | null;
  createdBy: { id: string; name: string };
  createdAt: Date;
  revokedAt: Date | null;
  /** Ordinal of the one revision it shows; null for the latest issued. */
  revision: number | null;
  expiresAt: Date | null;
  passphraseHash: string | null;
  clientName: string | null;
  clientEmail: string | null;
  openedCount: number;
  lastOpenedAt: Date | null;
}

interface ClientLinkRow {
  id: string;
  notebook_id: string;
  token_hash: string;
  label: string | null;
  created_by: string;
  creator_name: string;
  created_at: Date;
  revoked_at: Date | null;
  revision: number | null;
  expires_at: Date | null;
  passphrase_hash: string | null;
  client_name: string | null;
  client_email: string | null;
  opened_count: number;
  last_opened_at: Date | null;
}

const toClientLink = (row: ClientLinkRow): ClientLink => ({
  id: row.id,
  notebookId: row.notebook_id,
  tokenHash: row.token_hash,
  label: row.label,
  createdBy: { id: row.created_by, name: row.creator_name },
  createdAt: row.created_at,
  revokedAt: row.revoked_at,
  revision: row.revision,
  expiresAt: row.expires_at,
  passphraseHash: row.passphrase_hash,
  clientName: row.client_name,
  clientEmail: row.client_email,
  openedCount: row.opened_count,
  lastOpenedAt: row.last_opened_at,
});

const withCreator = (db: Database) =>
  db('client_links')
    .join('users', 'users.id', 'client_links.created_by')
    .select('client_links.*', 'users.name as creator_name');

export interface NewClientLink {
  /** Made by the caller, who derives the token from it; a new one when left out. */
  id?: string;
  notebookId: string;
  tokenHash: string;
  label: string | null;
  createdBy: string;
  revision?: number | null;
  expiresAt?: Date | null;
  passphraseHash?: string | null;
  clientName?: string | null;
  clientEmail?: string | null;
}

/**
 * Stores a link by the SHA-256 of its token, in hexadecimal, and returns its id. The token itself is
 * never stored.
 */
export async function insertClientLink(db: Database, link: NewClientLink): Promise<string> {
  const id = link.id ?? randomUUID();
  await db('client_links').insert({
    id,
    notebook_id: link.notebookId,
    token_hash: link.tokenHash,
    label: link.label,
    created_by: link.createdBy,
    revision: link.revision ?? null,
    expires_at: link.expiresAt ?? null,
    passphrase_hash: link.passphraseHash ?? null,
    client_name: link.clientName ?? null,
    client_email: link.clientEmail ?? null,
  });
  return id;
}

/** The links of a notebook, revoked ones too, newest first. */
export async function listClientLinks(db: Database, notebookId: string): Promise<ClientLink[]> {
  const rows = (await withCreator(db)
    .where('client_links.notebook_id', notebookId)
    .orderBy([
      { column: 'client_links.created_at', order: 'desc' },
      'client_links.id',
    ])) as ClientLinkRow[];
  return rows.map(toClientLink);
}

/** A link of this notebook, revoked or not. */
export async function findClientLink(
  db: Database,
  notebookId: string,
  id: string,
): Promise<ClientLink | null> {
  const row = (await withCreator(db)
    .where({ 'client_links.notebook_id': notebookId, 'client_links.id': id })
    .first()) as ClientLinkRow | undefined;
  return row === undefined ? null : toClientLink(row);
}

/** The link with this token hash, unless it was revoked; its time may be over. */
export async function findLiveClientLink(
  db: Database,
  tokenHash: string,
): Promise<ClientLink | null> {
  const row = (await withCreator(db)
    .where('client_links.token_hash', tokenHash)
    .whereNull('client_links.revoked_at')
    .first()) as ClientLinkRow | undefined;
  return row === undefined ? null : toClientLink(row);
}

/** Changes the passphrase of a live link; null takes it away. False when there is no such live link. */
export async function setClientLinkPassphrase(
  db: Database,
  notebookId: string,
  id: string,
  passphraseHash: string | null,
): Promise<boolean> {
  const changed = await db('client_links')
    .where({ id, notebook_id: notebookId, revoked_at: null })
    .update({ passphrase_hash: passphraseHash });
  return changed > 0;
}

/** Of so many last openings the time is kept; all of them are counted. */
const OPENINGS_KEPT = 200;

/** Counts one opening of a link and keeps its time, and nothing else of it. */
export async function recordClientLinkOpened(db: Database, id: string): Promise<void> {
  await db('client_link_openings').insert({ link_id: id });
  await db('client_links')
    .where({ id })
    .update({
      opened_count: db.raw('opened_count + 1'),
      last_opened_at: db.raw('current_timestamp(3)'),
    });
  const oldest: { number: number | string } | undefined = await db('client_link_openings')
    .where({ link_id: id })
    .orderBy('number', 'desc')
    .offset(OPENINGS_KEPT)
    .first('number');
  if (oldest === undefined) return;
  await db('client_link_openings')
    .where({ link_id: id })
    .where('number', '<=', oldest.number)
    .delete();
}

/** The times at which a link was last opened, newest first. */
export async function listClientLinkOpenings(
  db: Database,
  linkId: string,
  most: number,
): Promise<Date[]> {
  const rows: { opened_at: Date }[] = await db('client_link_openings')
    .where({ link_id: linkId })
    .orderBy('number', 'desc')
    .limit(most)
    .select('opened_at');
  return rows.map((row) => row.opened_at);
}

/** Ends a link of the notebook at once; false when it has no such live link. */
export async function revokeClientLink(
  db: Database,
  notebookId: string,
  id: string,
): Promise<boolean> {
  const ended = await db('client_links')
    .where({ id, notebook_id: notebookId, revoked_at: null })
    .update({ revoked_at: db.raw('current_timestamp(3)') });
  return ended > 0;
}
