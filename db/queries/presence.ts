import type { Database } from '../client';

/** One person on one notebook, as last heard of. */
export interface Presence {
  person: { id: string; name: string };
  seenAt: Date;
  cell: string | null;
  seenVersion: number;
}

interface PresenceRow {
  user_id: string;
  name: string;
  seen_at: Date;
  cell_id: string | null;
  seen_version: number;
}

const toPresence = (row: PresenceRow): Presence => ({
  person: { id: row.user_id, name: row.name },
  seenAt: row.seen_at,
  cell: row.cell_id,
  seenVersion: row.seen_version,
});

const COLUMNS = [
  'presence.user_id',
  'users.name',
  'presence.seen_at',
  'presence.cell_id',
  'presence.seen_version',
];

/**
 * Who was heard of since a moment and still has a role there, and the asking person whenever that was; by name.
 */
export async function listPresent(
  db: Database,
  notebookId: string,
  since: Date,
  asking: string,
): Promise<Presence[]> {
  const rows = await db('presence')
    .join('users', 'users.id', 'presence.user_id')
    .join('notebook_roles', function () {
      this.on('notebook_roles.notebook_id', 'presence.notebook_id').andOn(
        'notebook_roles.user_id',
        'presence.user_id',
      );
    })
    .where('presence.notebook_id', notebookId)
    .where((either) => {
      void either.where('presence.seen_at', '>=', since).orWhere('presence.user_id', asking);
    })
    .orderBy(['users.name', 'users.id'])
    .select<PresenceRow[]>(COLUMNS);
  return rows.map(toPresence);
}

export async function findPresence(
  db: Database,
  notebookId: string,
  userId: string,
): Promise<Presence | null> {
  const row = await db('presence')
    .join('users', 'users.id', 'presence.user_id')
    .where({ 'presence.notebook_id': notebookId, 'presence.user_id': userId })
    .first<PresenceRow | undefined>(COLUMNS);
  return row === undefined ? null : toPresence(row);
}

/** Notes that a person is here. The version seen never goes back. */
export async function putPresence(
  db: Database,
  presence: {
    notebookId: string;
    userId: string;
    at: Date;
    cell: string | null;
    seenVersion: number;
  },
): Promise<void> {
  await db('presence')
    .insert({
      notebook_id: presence.notebookId,
      user_id: presence.userId,
      seen_at: presence.at,
      cell_id: presence.cell,
      seen_version: presence.seenVersion,
    })
    .onConflict(['notebook_id', 'user_id'])
    .merge({
      seen_at: presence.at,
      cell_id: presence.cell,
      seen_version: db.raw('greatest(seen_version, values(seen_version))'),
    });
}
