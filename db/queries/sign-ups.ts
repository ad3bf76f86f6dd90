import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Database } from '../client';
import { normaliseEmail } from './users';

export interface SignUpRow {
  id: string;
  email: string;
  name: string;
  workshop: string;
  passwordHash: string;
  madeAt: Date;
}

interface Row {
  id: string;
  email: string;
  name: string;
  workshop: string;
  password_hash: string;
  made_at: Date;
}

const toSignUp = (row: Row): SignUpRow => ({
  id: row.id,
  email: row.email,
  name: row.name,
  workshop: row.workshop,
  passwordHash: row.password_hash,
  madeAt: row.made_at,
});

/** Adds a sign-up that waits to be confirmed. */
export async function insertSignUp(
  db: Database,
  signUp: Omit<SignUpRow, 'id' | 'madeAt'> & { tokenHash: string; expiresAt: Date },
): Promise<void> {
  await db('sign_ups').insert({
    id: randomUUID(),
    token_hash: signUp.tokenHash,
    email: normaliseEmail(signUp.email),
    name: signUp.name,
    workshop: signUp.workshop,
    password_hash: signUp.passwordHash,
    expires_at: signUp.expiresAt,
  });
}

/** Sign-ups of an address that can still be confirmed, newest first. */
export async function listSignUps(db: Database, email: string): Promise<SignUpRow[]> {
  const rows = (await db('sign_ups')
    .where({ email: normaliseEmail(email) })
    .where('expires_at', '>', db.fn.now(3))
    .orderBy([{ column: 'made_at', order: 'desc' }, 'id'])) as Row[];
  return rows.map(toSignUp);
}

/** The sign-up with this token, unless its time is over. */
export async function findSignUp(db: Database, tokenHash: string): Promise<SignUpRow | null> {
  const row = (await db('sign_ups')
    .where({ token_hash: tokenHash })
    .where('expires_at', '>', db.fn.now(3))
    .first()) as Row | undefined;
  return row === undefined ? null : toSignUp(row);
}

/** The same, held until the transaction ends, so that a token is used once. */
export async function lockSignUp(
  trx: Knex.Transaction,
  tokenHash: string,
): Promise<SignUpRow | null> {
  const row = (await trx('sign_ups')
    .where({ token_hash: tokenHash })
    .where('expires_at', '>', trx.fn.now(3))
    .forUpdate()
    .first()) as Row | undefined;
  return row === undefined ? null : toSignUp(row);
}

/** Gives a sign-up a new token in place of the one before, which is worth nothing from then on. */
export async function renewSignUp(
  db: Database,
  id: string,
  token: { tokenHash: string; expiresAt: Date },
): Promise<void> {
  await db('sign_ups')
    .where({ id })
    .update({ token_hash: token.tokenHash, expires_at: token.expiresAt });
}

/** Drops all sign-ups of an address. */
export async function deleteSignUps(db: Database, email: string): Promise<void> {
  await db('sign_ups')
    .where({ email: normaliseEmail(email) })
    .delete();
}

export async function deleteSignUp(db: Database, id: string): Promise<void> {
  await db('sign_ups').where({ id }).delete();
}

/** Drops sign-ups whose time is over. */
export async function pruneSignUps(db: Database): Promise<void> {
  await db('sign_ups').where('expires_at', '<=', db.fn.now(3)).delete();
}
