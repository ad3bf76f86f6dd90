import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Database } from '../client';

export interface User {
  id: string;
  email: string;
  name: string;
  /** Null for somebody who signs in through another service only, and for one who has left. */
  passwordHash: string | null;
  createdAt: Date;
}

interface UserRow {
  id: string;
  email: string;
  name: string;
  /** Empty where there is none. */
  password_hash: string;
  created_at: Date;
}

const toUser = (row: UserRow): User => ({
  id: row.id,
  email: row.email,
  name: row.name,
  passwordHash: row.password_hash === '' ? null : row.password_hash,
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
  user: { email: string; name: string; passwordHash: string | null },
): Promise<string> {
  const id = randomUUID();
  await db('users').insert({
    id,
    email: normaliseEmail(user.email),
    name: user.name,
    password_hash: user.passwordHash ?? '',
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

/** The same, held until the transaction ends. */
export async function lockUser(trx: Knex.Transaction, id: string): Promise<User | null> {
  const row = await trx<UserRow>('users').where({ id }).forUpdate().first();
  return row === undefined ? null : toUser(row);
}

/** Whether there is anybody at all; held, so that of two at once only one finds nobody. */
export async function isAnybodyThere(trx: Knex.Transaction): Promise<boolean> {
  const row: unknown = await trx('users').forUpdate().first('id');
  return row !== undefined;
}

/** Stores a new password hash. Sessions are the caller's to end. */
export async function changePasswordHash(
  db: Database,
  id: string,
  passwordHash: string,
): Promise<void> {
  await db('users').where({ id }).update({ password_hash: passwordHash });
}

export async function renameUser(db: Database, id: string, name: string): Promise<void> {
  await db('users').where({ id }).update({ name });
}

/** What is said in place of the name of somebody who has left. */
const FORMER = 'former member';

/**
 * Takes from a person's row all that says who it was. The row itself stays, because versions and
 * client links name it as their author. The address is one that no mail can reach and nobody can have.
 */
export async function makeUserAnonymous(db: Database, id: string): Promise<void> {
  await db('users')
    .where({ id })
    .update({ email: `${id}@left.invalid`, name: FORMER, password_hash: '' });
}
