import type { Knex } from 'knex';
import type { Database } from '../client';

/** Adds a token for a new password; those whose time is over go at the same moment. */
export async function insertPasswordReset(
  db: Database,
  reset: { tokenHash: string; userId: string; expiresAt: Date },
): Promise<void> {
  await db('password_resets').where('expires_at', '<=', db.fn.now(3)).delete();
  await db('password_resets').insert({
    token_hash: reset.tokenHash,
    user_id: reset.userId,
    expires_at: reset.expiresAt,
  });
}

/** Whose token this is, unless its time is over. */
export async function findPasswordReset(db: Database, tokenHash: string): Promise<string | null> {
  const row: { user_id: string } | undefined = await db('password_resets')
    .where({ token_hash: tokenHash })
    .where('expires_at', '>', db.fn.now(3))
    .first('user_id');
  return row?.user_id ?? null;
}

/** The same, held until the transaction ends, so that a token is used once. */
export async function lockPasswordReset(
  trx: Knex.Transaction,
  tokenHash: string,
): Promise<string | null> {
  const row: { user_id: string } | undefined = await trx('password_resets')
    .where({ token_hash: tokenHash })
    .where('expires_at', '>', trx.fn.now(3))
    .forUpdate()
    .first('user_id');
  return row?.user_id ?? null;
}

/** Drops every token of a person. */
export async function deletePasswordResets(db: Database, userId: string): Promise<void> {
  await db('password_resets').where({ user_id: userId }).delete();
}
