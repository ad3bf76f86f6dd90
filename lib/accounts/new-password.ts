import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  deletePasswordResets,
  findPasswordReset,
  insertPasswordReset,
  lockPasswordReset,
} from '@/db/queries/password-resets';
import { deleteSessionsOf } from '@/db/queries/sessions';
import { changePasswordHash, findUser, findUserByEmail, lockUser } from '@/db/queries/users';
import { Failure } from '@/lib/access';
import { queueLetter } from '@/lib/mail';
import { inNoLessThan } from './even-time';
import { EmailAddress, Password } from './fields';
import { recordForAccount } from './happenings';
import { newPasswordLetter, passwordChangedLetter } from './letters';
import { LIMITS, countAgainst, forget } from './limits';
import { hashPassword, verifyPassword } from './passwords';
import { hashOf, isSecret, newSecret } from './secrets';
import type { Person } from './types';

const RESET_MS = 3600 * 1000;

export const Forgotten = z.strictObject({ email: EmailAddress });

/**
 * Sends a link to choose a new password, if the address has an account; answers the same way and
 * after the same time if it has none.
 * @throws Failure `too-many`
 */
export async function forgotPassword(email: string, address: string): Promise<void> {
  await countAgainst(LIMITS.forgotAddress, address);
  await countAgainst(LIMITS.forgotEmail, email);
  await inNoLessThan(300, async () => {
    const user = await findUserByEmail(database(), email);
    if (user === null) return;
    const token = newSecret();
    await inTransaction(async (trx) => {
      const expiresAt = new Date(Date.now() + RESET_MS);
      await insertPasswordReset(trx, { tokenHash: hashOf(token), userId: user.id, expiresAt });
      await queueLetter(trx, newPasswordLetter(user, token));
      await recordForAccount(trx, {
        deed: 'password.forgotten',
        accountId: user.id,
        by: null,
        details: { account: user.id },
      });
    });
  });
}

/** Whether a link to a new password is still good, for the page that asks. */
export async function isResetLink(token: string): Promise<boolean> {
  return isSecret(token) && (await findPasswordReset(database(), hashOf(token))) !== null;
}

export const Reset = z.strictObject({
  token: z.string({ error: 'The link is missing.' }),
  password: Password,
});
export type Reset = z.infer<typeof Reset>;

/**
 * Stores the new password of whoever holds the link, and ends every session. The link works once, and
 * other links of the person are over then.
 * @throws Failure `link-over`, `too-many`
 */
export async function resetPassword(input: Reset, address: string): Promise<void> {
  const known = await isResetLink(input.token);
  const passwordHash = known ? await hashPassword(input.password) : null;
  const email =
    passwordHash === null
      ? null
      : await inTransaction(async (trx) => {
          const userId = await lockPasswordReset(trx, hashOf(input.token));
          return userId === null ? null : storeNew(trx, userId, passwordHash, null);
        });
  if (email === null) {
    await countAgainst(LIMITS.badToken, address);
    throw new Failure(
      'link-over',
      'This link is not valid: it was used, its hour is over, or its address is incomplete.',
    );
  }
  // Whoever forgot the password has tried too often, as like as not.
  await forget(LIMITS.signInEmail, email);
}

export const PasswordChange = z.strictObject({
  current: z.string({ error: 'The present password is missing.' }).max(1000),
  password: Password,
});
export type PasswordChange = z.infer<typeof PasswordChange>;

/**
 * Stores a new password for somebody who knows the old one. All other sessions of the person end.
 * @param session the session that asks, which stays
 * @throws Failure `invalid` with the field `current`, `too-many`
 */
export async function changePassword(
  person: Person,
  session: string | null,
  { current, password }: PasswordChange,
): Promise<void> {
  await demandPassword(person, current, 'current');
  const passwordHash = await hashPassword(password);
  await inTransaction((trx) => storeNew(trx, person.id, passwordHash, session));
}

/** @throws Failure `invalid` with the field named, `too-many` */
export async function demandPassword(
  person: Person,
  sent: string,
  field: 'current' | 'password',
): Promise<void> {
  await countAgainst(LIMITS.password, person.id);
  const user = await findUser(database(), person.id);
  if (await verifyPassword(user?.passwordHash ?? null, sent)) {
    await forget(LIMITS.password, person.id);
    return;
  }
  const message =
    user?.passwordHash === null
      ? 'Your account has no password yet; sign out and choose “Forgotten your password?” to get one.'
      : 'This is not your present password.';
  throw new Failure('invalid', message, { fields: [{ field, message }] });
}

async function storeNew(
  trx: Knex.Transaction,
  userId: string,
  passwordHash: string,
  kept: string | null,
): Promise<string> {
  const user = await lockUser(trx, userId);
  if (user === null) throw new Error('A person vanished while the password was being changed.');
  await changePasswordHash(trx, userId, passwordHash);
  await deletePasswordResets(trx, userId);
  await deleteSessionsOf(trx, userId, kept);
  await queueLetter(trx, passwordChangedLetter(user));
  await recordForAccount(trx, { deed: 'password.changed', accountId: userId, by: userId });
  return user.email;
}
