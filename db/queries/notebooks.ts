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
  /** Since when it is a template of its workshop; null while it is none. */
  templateSince: Date | null;
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
  template_since: Date | null;
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
  templateSince: row.template_since,
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

/** Adds a notebook without versions and returns the new id; a copy says which version of which notebook it is of. */
export async function insertNotebook(
  db: Database,
  notebook: { workshopId: string; title: string; origin?: { id: string; version: number } },
): Promise<string> {
  const id = randomUUID();
  await db('notebooks').insert({
    id,
    workshop_id: notebook.workshopId,
    title: notebook.title,
    origin_id: notebook.origin?.id ?? null,
    origin_version: notebook.origin?.version ?? null,
  });
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

export interface NotebookFilter {
  archived: boolean;
  workshopId?: string | undefined;
  role?: NotebookRole | undefined;
  /** By default the last changed first; by title otherwise. */
  sort?: 'changed' | 'title';
  limit?: number;
  offset?: number;
}

const heldBy = (db: Database, userId: string, { archived, workshopId, role }: NotebookFilter) => {
  const query = withWorkshop(db)
    .join('notebook_roles', 'notebook_roles.notebook_id', 'notebooks.id')
    .where('notebook_roles.user_id', userId);
  if (workshopId !== undefined) query.where('notebooks.workshop_id', workshopId);
  if (role !== undefined) query.where('notebook_roles.role', role);
  return archived
    ? query.whereNotNull('notebooks.archived_at')
    : query.whereNull('notebooks.archived_at');
};

/** The notebooks in which a person has a role, as the filter has them. */
export async function listNotebooksOf(
  db: Database,
  userId: string,
  filter: NotebookFilter,
): Promise<NotebookEntry[]> {
  const query = heldBy(db, userId, filter)
    .leftJoin('versions', function () {
      this.on('versions.notebook_id', 'notebooks.id').andOn('versions.number', 'notebooks.head');
    })
    .leftJoin('users', 'users.id', 'versions.author_id')
    .select('notebook_roles.role', 'users.name as saved_by', 'versions.saved_at')
    .orderBy(
      filter.sort === 'title'
        ? ['notebooks.title', 'notebooks.id']
        : [{ column: 'notebooks.changed_at', order: 'desc' }, 'notebooks.id'],
    );
  if (filter.limit !== undefined) query.limit(filter.limit);
  if (filter.offset !== undefined) query.offset(filter.offset);
  const rows = (await query) as EntryRow[];
  return rows.map((row) => ({
    ...toNotebook(row),
    role: row.role,
    savedBy: row.saved_by,
    savedAt: row.saved_at,
  }));
}

/** How many the filter has altogether. */
export async function countNotebooksOf(
  db: Database,
  userId: string,
  filter: NotebookFilter,
): Promise<number> {
  const query = heldBy(db, userId, filter).clearSelect().count({ n: '*' });
  const [row] = (await query) as unknown as { n: number }[];
  return Number(row?.n ?? 0);
}

/** The workshops of all notebooks in which a person has a role, by name; the person need not belong to them. */
export async function listNotebookWorkshopsOf(
  db: Database,
  userId: string,
): Promise<{ id: string; name: string }[]> {
  return db('notebooks')
    .join('notebook_roles', 'notebook_roles.notebook_id', 'notebooks.id')
    .join('workshops', 'workshops.id', 'notebooks.workshop_id')
    .where('notebook_roles.user_id', userId)
    .distinct<{ id: string; name: string }[]>('workshops.id', 'workshops.name')
    .orderBy(['workshops.name', 'workshops.id']);
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

/** Puts a notebook into another workshop, where it is no template. */
export async function moveNotebook(db: Database, id: string, workshopId: string): Promise<void> {
  await db('notebooks')
    .where({ id })
    .update({
      workshop_id: workshopId,
      template_since: null,
      changed_at: db.raw('current_timestamp(3)'),
    });
}
