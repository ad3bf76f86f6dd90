import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface User {
  id: string;
  email: string;
  name: string;
  passwordHash: string;
  /** Part of every session of the person; a session with an older one is over. */
  tokenVersion: number;
  createdAt: Date;
}

interface UserRow {
  id: string;
  email: string;
  name: string;
  password_hash: string;
  token_version: number;
  created_at: Date;
}

const toUser = (row: UserRow): User => ({
  id: row.id,
  email: row.email,
  name: row.name,
  passwordHash: row.password_hash,
  tokenVersion: row.token_version,
  createdAt: row.created_at,
});

/** The one written form of an address, so that case and stray blanks never make a second person. */
export function normaliseEmail(email: string): string {
  return email.trim().normalize('NFC').toLowerCase();
}

/**
 * Adds a person and returns the new id.
 * @throws what `isDuplicate` recognises when the address is taken
 */
export async function insertUser(
  db: Database,
  user: { email: string; name: string; passwordHash: string },
): Promise<string> {
  const id = randomUUID();
  await db('users').insert({
    id,
    email: normaliseEmail(user.email),
    name: user.name,
    password_hash: user.passwordHash,
  });
  return id;
}

export async function findUserByEmail(db: Database, email: string): Promise<User | null> {
  const row = await db<UserRow>('users')
    .where({ email: normaliseEmail(email) })
    .first();
  return row === undefined ? null : toUser(row);
}

export async function findUser(db: Database, id: string): Promise<User | null> {
  const row = await db<UserRow>('users').where({ id }).first();
  return row === undefined ? null : toUser(row);
}

/** Stores a new password hash and ends every session the person has. */
export async function changePassword(
  db: Database,
  id: string,
  passwordHash: string,
): Promise<void> {
  await db<UserRow>('users')
    .where({ id })
    .update({ password_hash: passwordHash, token_version: db.raw('token_version + 1') });
}

/** Ends every session the person has. */
export async function endSessions(db: Database, id: string): Promise<void> {
  await db<UserRow>('users').where({ id }).increment('token_version', 1);
}
