import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import type { Database } from '../client';

/** A version without its content, as the list shows it. */
export interface VersionEntry {
  number: number;
  author: { id: string; name: string };
  savedAt: Date;
  note: string | null;
  restoredFrom: number | null;
  /** The version with which it was brought together, being made on an older one. */
  mergedWith: number | null;
  /** Saved by the sheet after a pause, not kept by hand. */
  byItself: boolean;
}

export interface Version extends VersionEntry {
  /** As stored; the service checks its shape. */
  content: unknown;
  contentHash: string;
}

interface EntryRow {
  number: number;
  author_id: string;
  author_name: string;
  saved_at: Date;
  note: string | null;
  restored_from: number | null;
  merged_with: number | null;
  by_itself: number;
}

interface VersionRow extends EntryRow {
  content: string;
  content_hash: string;
}

const entryColumns = [
  'versions.number',
  'versions.author_id',
  'users.name as author_name',
  'versions.saved_at',
  'versions.note',
  'versions.restored_from',
  'versions.merged_with',
  'versions.by_itself',
];

const toEntry = (row: EntryRow): VersionEntry => ({
  number: row.number,
  author: { id: row.author_id, name: row.author_name },
  savedAt: row.saved_at,
  note: row.note,
  restoredFrom: row.restored_from,
  mergedWith: row.merged_with,
  byItself: row.by_itself !== 0,
});

const ofNotebook = (db: Database, notebookId: string) =>
  db('versions')
    .join('users', 'users.id', 'versions.author_id')
    .where('versions.notebook_id', notebookId);

/** The versions of a notebook, newest first: all, or so many of those below a number. */
export async function listVersions(
  db: Database,
  notebookId: string,
  { below, limit }: { below?: number; limit?: number } = {},
): Promise<VersionEntry[]> {
  const query = ofNotebook(db, notebookId).orderBy('versions.number', 'desc');
  if (below !== undefined) void query.where('versions.number', '<', below);
  if (limit !== undefined) void query.limit(limit);
  const rows = await query.select<EntryRow[]>(entryColumns);
  return rows.map(toEntry);
}

/** The names of those who saved versions after one number, up to another; each once. */
export async function listAuthorsBetween(
  db: Database,
  notebookId: string,
  after: number,
  upTo: number,
): Promise<{ id: string; name: string }[]> {
  return ofNotebook(db, notebookId)
    .where('versions.number', '>', after)
    .where('versions.number', '<=', upTo)
    .distinct('users.id', 'users.name')
    .orderBy(['users.name', 'users.id']);
}

export async function findVersion(
  db: Database,
  notebookId: string,
  number: number,
): Promise<Version | null> {
  const row = await ofNotebook(db, notebookId)
    .where('versions.number', number)
    .first<VersionRow | undefined>([...entryColumns, 'versions.content', 'versions.content_hash']);
  if (row === undefined) return null;
  const content = JSON.parse(row.content) as unknown;
  return { ...toEntry(row), content, contentHash: row.content_hash };
}

export interface NewVersion {
  notebookId: string;
  number: number;
  authorId: string;
  content: unknown;
  note?: string | null;
  restoredFrom?: number | null;
  mergedWith?: number | null;
  byItself?: boolean;
  /** Now when left out. */
  savedAt?: Date;
}

/**
 * Stores a version and makes it the notebook's head. The caller has read the head with `lockHead`
 * in the same transaction; `number` is one more than it.
 * @throws what `isDuplicate` recognises when the number is taken after all
 */
export async function insertVersion(trx: Knex.Transaction, version: NewVersion): Promise<Date> {
  const savedAt = version.savedAt ?? new Date();
  const content = JSON.stringify(version.content);
  await trx('versions').insert({
    notebook_id: version.notebookId,
    number: version.number,
    author_id: version.authorId,
    saved_at: savedAt,
    note: version.note ?? null,
    restored_from: version.restoredFrom ?? null,
    merged_with: version.mergedWith ?? null,
    by_itself: version.byItself ?? false,
    content,
    content_hash: createHash('sha256').update(content).digest('hex'),
  });
  await trx('notebooks')
    .where({ id: version.notebookId })
    .update({ head: version.number, changed_at: savedAt });
  return savedAt;
}

/** Makes a version that was saved by itself one that was kept by hand. What it holds stays as it is. */
export async function keepByHand(
  trx: Knex.Transaction,
  notebookId: string,
  number: number,
  note: string | null,
): Promise<void> {
  await trx('versions').where({ notebook_id: notebookId, number }).update({ by_itself: false, note });
}
