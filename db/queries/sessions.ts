import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface Session {
  id: string;
  userId: string;
  device: string;
  begunAt: Date;
  seenAt: Date;
}

interface SessionRow {
  id: string;
  user_id: string;
  device: string;
  begun_at: Date;
  seen_at: Date;
}

const toSession = (row: SessionRow): Session => ({
  id: row.id,
  userId: row.user_id,
  device: row.device,
  begunAt: row.begun_at,
  seenAt: row.seen_at,
});

/** Begins a session and returns its id. */
export async function insertSession(
  db: Database,
  session: { userId: string; device: string },
): Promise<string> {
  const id = randomUUID();
  await db('sessions').insert({ id, user_id: session.userId, device: session.device });
  return id;
}

export interface SessionPerson {
  id: string;
  name: string;
  email: string;
  seenAt: Date;
}

/** Whose session this is; null once it was ended. */
export async function findSessionPerson(db: Database, id: string): Promise<SessionPerson | null> {
  const row: { id: string; name: string; email: string; seen_at: Date } | undefined = await db(
    'sessions',
  )
    .join('users', 'users.id', 'sessions.user_id')
    .where('sessions.id', id)
    .first('users.id', 'users.name', 'users.email', 'sessions.seen_at');
  if (row === undefined) return null;
  return { id: row.id, name: row.name, email: row.email, seenAt: row.seen_at };
}

export async function recordSessionSeen(db: Database, id: string): Promise<void> {
  await db('sessions')
    .where({ id })
    .update({ seen_at: db.raw('current_timestamp(3)') });
}

/** A person's sessions, last used first. */
export async function listSessionsOf(db: Database, userId: string): Promise<Session[]> {
  const rows = await db<SessionRow>('sessions')
    .where({ user_id: userId })
    .orderBy([{ column: 'seen_at', order: 'desc' }, 'id']);
  return rows.map(toSession);
}

/** Ends one session of a person; what it was, or null when the person has no such session. */
export async function deleteSession(
  db: Database,
  userId: string,
  id: string,
): Promise<Session | null> {
  const row = await db<SessionRow>('sessions').where({ id, user_id: userId }).first();
  const gone = await db('sessions').where({ id, user_id: userId }).delete();
  return row === undefined || gone === 0 ? null : toSession(row);
}

/** Ends every session of a person, but for one that may be kept; returns how many. */
export async function deleteSessionsOf(
  db: Database,
  userId: string,
  kept: string | null = null,
): Promise<number> {
  const all = db('sessions').where({ user_id: userId });
  return (kept === null ? all : all.whereNot({ id: kept })).delete();
}

/** Drops sessions that were not used since `before`: their cookies are over. */
export async function pruneSessions(db: Database, before: Date): Promise<void> {
  await db('sessions').where('seen_at', '<', before).delete();
}
