import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Database } from '../client';

export interface Notebook {
  id: string;
  workshop: { id: string; name: string };
  /** The workshop's settings, as stored; the service checks their shape. */
  workshopSettings: unknown;
  title: string;
  /** Number of the newest version; 0 only before the first one is in. */
  head: number;
  /** Its own entries for the title block, as stored. */
  titleBlock: unknown;
  archivedAt: Date | null;
  createdAt: Date;
  changedAt: Date;
}

interface NotebookRow {
  id: string;
  workshop_id: string;
  workshop_name: string;
  workshop_defaults: string;
  title_block: string;
  title: string;
  head: number;
  archived_at: Date | null;
  created_at: Date;
  changed_at: Date;
}

const toNotebook = (row: NotebookRow): Notebook => ({
  id: row.id,
  workshop: { id: row.workshop_id, name: row.workshop_name },
  workshopSettings: JSON.parse(row.workshop_defaults) as unknown,
  titleBlock: JSON.parse(row.title_block) as unknown,
  title: row.title,
  head: row.head,
  archivedAt: row.archived_at,
  createdAt: row.created_at,
  changedAt: row.changed_at,
});

const withWorkshop = (db: Database) =>
  db('notebooks')
    .join('workshops', 'workshops.id', 'notebooks.workshop_id')
    .select(
      'notebooks.*',
      'workshops.name as workshop_name',
      'workshops.defaults as workshop_defaults',
    );

/** Adds a notebook without versions and returns the new id. */
export async function insertNotebook(
  db: Database,
  notebook: { workshopId: string; title: string },
): Promise<string> {
  const id = randomUUID();
  await db('notebooks').insert({ id, workshop_id: notebook.workshopId, title: notebook.title });
  return id;
}

export async function findNotebook(db: Database, id: string): Promise<Notebook | null> {
  const row = (await withWorkshop(db).where('notebooks.id', id).first()) as NotebookRow | undefined;
  return row === undefined ? null : toNotebook(row);
}

export type NotebookRole = 'owner' | 'editor' | 'viewer';

/** One line of a person's table of notebooks. */
export interface NotebookEntry extends Notebook {
  role: NotebookRole;
  /** Name of whoever saved the newest version, and when; null while there is none. */
  savedBy: string | null;
  savedAt: Date | null;
}

interface EntryRow extends NotebookRow {
  role: NotebookRole;
  saved_by: string | null;
  saved_at: Date | null;
}

/** The notebooks in which a person has a role, last changed first. */
export async function listNotebooksOf(
  db: Database,
  userId: string,
  { archived }: { archived: boolean },
): Promise<NotebookEntry[]> {
  const query = withWorkshop(db)
    .join('notebook_roles', 'notebook_roles.notebook_id', 'notebooks.id')
    .leftJoin('versions', function () {
      this.on('versions.notebook_id', 'notebooks.id').andOn('versions.number', 'notebooks.head');
    })
    .leftJoin('users', 'users.id', 'versions.author_id')
    .where('notebook_roles.user_id', userId)
    .select('notebook_roles.role', 'users.name as saved_by', 'versions.saved_at')
    .orderBy([{ column: 'notebooks.changed_at', order: 'desc' }, 'notebooks.id']);
  const rows = (await (archived
    ? query.whereNotNull('notebooks.archived_at')
    : query.whereNull('notebooks.archived_at'))) as EntryRow[];
  return rows.map((row) => ({
    ...toNotebook(row),
    role: row.role,
    savedBy: row.saved_by,
    savedAt: row.saved_at,
  }));
}

/**
 * The notebook's head, read and held until the transaction ends, so that of two saves at once the
 * second sees what the first one stored. Null when there is no such notebook.
 */
export async function lockHead(trx: Knex.Transaction, id: string): Promise<number | null> {
  const row = await trx<NotebookRow>('notebooks').where({ id }).forUpdate().first('head');
  return row?.head ?? null;
}

export async function renameNotebook(db: Database, id: string, title: string): Promise<void> {
  await db('notebooks')
    .where({ id })
    .update({ title, changed_at: db.raw('current_timestamp(3)') });
}

export async function setArchived(db: Database, id: string, archived: boolean): Promise<void> {
  const now = db.raw('current_timestamp(3)');
  await db('notebooks')
    .where({ id })
    .update({ archived_at: archived ? now : null, changed_at: now });
}

/** Stores a notebook's own entries for the title block in place of those before. */
export async function putTitleBlock(db: Database, id: string, entries: object): Promise<void> {
  await db('notebooks')
    .where({ id })
    .update({ title_block: JSON.stringify(entries), changed_at: db.raw('current_timestamp(3)') });
}
