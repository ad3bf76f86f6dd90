import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface ClientLink {
  id: string;
  notebookId: string;
  label: string | null;
  createdBy: { id: string; name: string };
  createdAt: Date;
  revokedAt: Date | null;
  openedCount: number;
  lastOpenedAt: Date | null;
}

interface ClientLinkRow {
  id: string;
  notebook_id: string;
  label: string | null;
  created_by: string;
  creator_name: string;
  created_at: Date;
  revoked_at: Date | null;
  opened_count: number;
  last_opened_at: Date | null;
}

const toClientLink = (row: ClientLinkRow): ClientLink => ({
  id: row.id,
  notebookId: row.notebook_id,
  label: row.label,
  createdBy: { id: row.created_by, name: row.creator_name },
  createdAt: row.created_at,
  revokedAt: row.revoked_at,
  openedCount: row.opened_count,
  lastOpenedAt: row.last_opened_at,
});

const withCreator = (db: Database) =>
  db('client_links')
    .join('users', 'users.id', 'client_links.created_by')
    .select('client_links.*', 'users.name as creator_name');

/**
 * Stores a link by the SHA-256 of its token, in hexadecimal, and returns the new id. The token
 * itself is never stored.
 */
export async function insertClientLink(
  db: Database,
  link: { notebookId: string; tokenHash: string; label: string | null; createdBy: string },
): Promise<string> {
  const id = randomUUID();
  await db('client_links').insert({
    id,
    notebook_id: link.notebookId,
    token_hash: link.tokenHash,
    label: link.label,
    created_by: link.createdBy,
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

/** The link with this token hash, unless it was revoked. */
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

/** Counts one opening of a link. */
export async function recordClientLinkOpened(db: Database, id: string): Promise<void> {
  await db('client_links')
    .where({ id })
    .update({
      opened_count: db.raw('opened_count + 1'),
      last_opened_at: db.raw('current_timestamp(3)'),
    });
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
