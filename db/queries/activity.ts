import type { Database } from '../client';

export interface NewActivity {
  workshopId: string | null;
  notebookId: string | null;
  actorId: string | null;
  deed: string;
  subject: string;
  details: object;
}

/** Adds one line to the record; there is no way to change or remove one. */
export async function insertActivity(db: Database, line: NewActivity): Promise<void> {
  await db('activity').insert({
    workshop_id: line.workshopId,
    notebook_id: line.notebookId,
    actor_id: line.actorId,
    deed: line.deed,
    subject: line.subject,
    details: JSON.stringify(line.details),
  });
}

export interface ActivityLine {
  number: number;
  at: Date;
  notebookId: string | null;
  actor: { id: string; name: string } | null;
  deed: string;
  subject: string;
  details: Record<string, string | number | boolean | null>;
}

export interface ActivityFilter {
  actorId?: string | undefined;
  deeds?: readonly string[] | undefined;
  /** From this moment on. */
  from?: Date | undefined;
  /** Before this moment. */
  until?: Date | undefined;
  /** Older than the line of this number. */
  before?: number | undefined;
}

interface LineRow {
  number: number;
  at: Date;
  notebook_id: string | null;
  actor_id: string | null;
  actor_name: string | null;
  deed: string;
  subject: string;
  details: string;
}

/** The lines about a workshop and its notebooks, newest first; names are those of now. */
export async function listActivity(
  db: Database,
  workshopId: string,
  { actorId, deeds, from, until, before }: ActivityFilter,
  most: number,
): Promise<ActivityLine[]> {
  const query = db('activity')
    .leftJoin('users', 'users.id', 'activity.actor_id')
    .where('activity.workshop_id', workshopId)
    .orderBy('activity.number', 'desc')
    .limit(most)
    .select('activity.*', 'users.name as actor_name');
  if (actorId !== undefined) void query.where('activity.actor_id', actorId);
  if (deeds !== undefined) void query.whereIn('activity.deed', [...deeds]);
  if (from !== undefined) void query.where('activity.at', '>=', from);
  if (until !== undefined) void query.where('activity.at', '<', until);
  if (before !== undefined) void query.where('activity.number', '<', before);
  const rows = (await query) as LineRow[];
  return rows.map((row) => ({
    number: Number(row.number),
    at: row.at,
    notebookId: row.notebook_id,
    actor:
      row.actor_id === null ? null : { id: row.actor_id, name: row.actor_name ?? 'somebody gone' },
    deed: row.deed,
    subject: row.subject,
    details: JSON.parse(row.details) as ActivityLine['details'],
  }));
}

/** Everybody who did something that is on a workshop's record, by name. */
export async function listActors(
  db: Database,
  workshopId: string,
): Promise<{ id: string; name: string }[]> {
  const people: { id: string; name: string }[] = await db('users')
    .whereIn(
      'id',
      db('activity').where({ workshop_id: workshopId }).whereNotNull('actor_id').select('actor_id'),
    )
    .orderBy(['name', 'id'])
    .select('id', 'name');
  return people;
}

/** The names that these people have now, by their ids. */
export async function findNames(
  db: Database,
  ids: readonly string[],
): Promise<Map<string, string>> {
  const rows: { id: string; name: string }[] = await db('users')
    .whereIn('id', [...ids])
    .select('id', 'name');
  return new Map(rows.map(({ id, name }) => [id, name]));
}
