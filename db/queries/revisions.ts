import type { Database } from '../client';

/** An issued revision without what is frozen in it, as lists show it. */
export interface RevisionEntry {
  notebookId: string;
  /** 1 is revision A. */
  ordinal: number;
  letter: string;
  version: number;
  purpose: string;
  note: string | null;
  issuedBy: string;
  issuedAt: Date;
  checkedBy: string | null;
  engine: string;
  contentHash: string;
  frozenHash: string;
}

export interface Revision extends RevisionEntry {
  /** As they were frozen; the service knows their shape. */
  titleBlock: unknown;
  results: unknown;
}

interface EntryRow {
  notebook_id: string;
  ordinal: number;
  letter: string;
  version: number;
  purpose: string;
  note: string | null;
  issued_by_name: string;
  issued_at: Date;
  checked_by_name: string | null;
  engine: string;
  content_hash: string;
  frozen_hash: string;
}

interface RevisionRow extends EntryRow {
  title_block: string;
  results: string;
}

const ENTRY = [
  'notebook_id',
  'ordinal',
  'letter',
  'version',
  'purpose',
  'note',
  'issued_by_name',
  'issued_at',
  'checked_by_name',
  'engine',
  'content_hash',
  'frozen_hash',
] as const;

const toEntry = (row: EntryRow): RevisionEntry => ({
  notebookId: row.notebook_id,
  ordinal: row.ordinal,
  letter: row.letter,
  version: row.version,
  purpose: row.purpose,
  note: row.note,
  issuedBy: row.issued_by_name,
  issuedAt: row.issued_at,
  checkedBy: row.checked_by_name,
  engine: row.engine,
  contentHash: row.content_hash,
  frozenHash: row.frozen_hash,
});

/** All revisions of a notebook, newest first. */
export async function listRevisions(db: Database, notebookId: string): Promise<RevisionEntry[]> {
  const rows = await db<EntryRow>('revisions')
    .where({ notebook_id: notebookId })
    .orderBy('ordinal', 'desc')
    .select(...ENTRY);
  return rows.map(toEntry);
}

/** The newest revision without what is frozen in it, or null while nothing is issued. */
export async function findLatestRevision(
  db: Database,
  notebookId: string,
): Promise<RevisionEntry | null> {
  const row = await db<EntryRow>('revisions')
    .where({ notebook_id: notebookId })
    .orderBy('ordinal', 'desc')
    .first(...ENTRY);
  return row === undefined ? null : toEntry(row);
}

/** One revision without what is frozen in it. */
export async function findRevisionEntry(
  db: Database,
  notebookId: string,
  by: { letter: string } | { ordinal: number },
): Promise<RevisionEntry | null> {
  const row = await db<EntryRow>('revisions')
    .where({ notebook_id: notebookId, ...by })
    .first(...ENTRY);
  return row === undefined ? null : toEntry(row);
}

/** One revision with all that is frozen in it. */
export async function findRevision(
  db: Database,
  notebookId: string,
  ordinal: number,
): Promise<Revision | null> {
  const row = await db<RevisionRow>('revisions')
    .where({ notebook_id: notebookId, ordinal })
    .first();
  if (row === undefined) return null;
  return {
    ...toEntry(row),
    titleBlock: JSON.parse(row.title_block) as unknown,
    results: JSON.parse(row.results) as unknown,
  };
}

export interface NewRevision {
  notebookId: string;
  ordinal: number;
  letter: string;
  version: number;
  purpose: string;
  note: string | null;
  issuedBy: { id: string; name: string };
  issuedAt: Date;
  checkedBy: { id: string; name: string } | null;
  engine: string;
  contentHash: string;
  titleBlock: unknown;
  results: unknown;
  frozenHash: string;
}

/**
 * Adds a revision for good. The caller holds the notebook, so that the ordinal is the next one.
 * @throws what `isDuplicate` recognises when the ordinal is taken after all
 */
export async function insertRevision(db: Database, revision: NewRevision): Promise<void> {
  await db('revisions').insert({
    notebook_id: revision.notebookId,
    ordinal: revision.ordinal,
    letter: revision.letter,
    version: revision.version,
    purpose: revision.purpose,
    note: revision.note,
    issued_by: revision.issuedBy.id,
    issued_by_name: revision.issuedBy.name,
    issued_at: revision.issuedAt,
    checked_by: revision.checkedBy?.id ?? null,
    checked_by_name: revision.checkedBy?.name ?? null,
    engine: revision.engine,
    content_hash: revision.contentHash,
    title_block: JSON.stringify(revision.titleBlock),
    results: JSON.stringify(revision.results),
    frozen_hash: revision.frozenHash,
  });
}
