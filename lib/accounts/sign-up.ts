import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction, isDuplicate } from '@/db/client';
import {
  deleteSignUp,
  deleteSignUps,
  findSignUp,
  insertSignUp,
  listSignUps,
  lockSignUp,
  pruneSignUps,
  renewSignUp,
  type SignUpRow,
} from '@/db/queries/sign-ups';
import { findUserByEmail, insertUser, isAnybodyThere } from '@/db/queries/users';
import { insertMembership, insertWorkshop } from '@/db/queries/workshops';
import { Failure } from '@/lib/access';
import { hasLocalMailbox, queueLetter } from '@/lib/mail';
import { inNoLessThan } from './even-time';
import { EmailAddress, Password, oneLine } from './fields';
import { recordForAccount } from './happenings';
import { alreadyKnownLetter, confirmationLetter } from './letters';
import { LIMITS, countAgainst } from './limits';
import { PASSWORD_LENGTH, hashPassword, verifyPassword } from './passwords';
import { hashOf, isSecret, newSecret } from './secrets';
import type { Person } from './types';

const HOUR_MS = 3600 * 1000;
const CONFIRM_MS = 24 * HOUR_MS;

/** So many sign-ups of one address may wait side by side; a further one takes the oldest's place. */
const WAITING = 3;

export const SignUp = z.strictObject({
  name: oneLine('The name', 120),
  email: EmailAddress,
  password: Password,
  workshop: oneLine('The name of the workshop', 120),
});
export type SignUp = z.infer<typeof SignUp>;

/** What everybody is told who signs up, whether the address has an account or not. */
export interface SignedUp {
  email: string;
  /** True only for the first person of a copy that keeps its mail to itself. */
  confirmed: boolean;
}

/**
 * Takes a sign-up and sends a letter to its address: a link to confirm it, or, where there is an
 * account already, word of that. The answer is the same for both, so it tells nobody who has an
 * account here.
 *
 * On a copy that only has the local mailbox the very first person is let in at once: letters could be
 * read by nobody before there is an admin.
 * @param address where the request came from; sign-ups are limited per address and per e-mail
 * @throws Failure `too-many`
 */
export async function signUp(input: SignUp, address: string): Promise<SignedUp> {
  const { name, email, workshop } = input;
  await countAgainst(LIMITS.signUp, address);
  await countAgainst(LIMITS.signUpEmail, email);
  const passwordHash = await hashPassword(input.password);
  await pruneSignUps(database());
  return inTransaction(async (trx) => {
    const known = await findUserByEmail(trx, email);
    if (known !== null) {
      await queueLetter(trx, alreadyKnownLetter({ email, name: known.name }));
      return { email, confirmed: false };
    }
    if (hasLocalMailbox() && !(await isAnybodyThere(trx))) {
      await makeAccount(trx, { name, email, passwordHash, workshop });
      return { email, confirmed: true };
    }
    const waiting = await listSignUps(trx, email);
    for (const { id } of waiting.slice(WAITING - 1)) await deleteSignUp(trx, id);
    const token = newSecret();
    await insertSignUp(trx, { name, email, passwordHash, workshop, ...stored(token) });
    await queueLetter(trx, confirmationLetter({ email, name }, workshop, token));
    return { email, confirmed: false };
  });
}

const stored = (token: string) => ({
  tokenHash: hashOf(token),
  expiresAt: new Date(Date.now() + CONFIRM_MS),
});

/** Makes a person with a confirmed address, and a workshop of which that person is the admin. */
export async function makeAccount(
  trx: Knex.Transaction,
  account: { name: string; email: string; passwordHash: string | null; workshop: string },
): Promise<string> {
  const id = await insertUser(trx, account);
  const workshopId = await insertWorkshop(trx, { name: account.workshop });
  await insertMembership(trx, workshopId, id, 'admin');
  await recordForAccount(trx, {
    deed: 'account.made',
    accountId: id,
    by: id,
    subject: account.workshop,
  });
  return id;
}

export const Confirmation = z.strictObject({ token: z.string({ error: 'The link is missing.' }) });

/** What a confirmation link is about, for the page that asks; null when it is not valid. */
export async function signUpOf(
  token: string,
): Promise<{ name: string; email: string; workshop: string } | null> {
  const found = isSecret(token) ? await findSignUp(database(), hashOf(token)) : null;
  return found === null ? null : { name: found.name, email: found.email, workshop: found.workshop };
}

/**
 * Makes the account of a sign-up. The link works once; other sign-ups of the address are over then.
 * @throws Failure `link-over`, `too-many`
 */
export async function confirmSignUp(token: string, address: string): Promise<Person> {
  const made = isSecret(token)
    ? await inTransaction(async (trx) => {
        const waiting = await lockSignUp(trx, hashOf(token));
        if (waiting === null) return null;
        await deleteSignUps(trx, waiting.email);
        // Meanwhile made another way: that account stays as it is.
        if ((await findUserByEmail(trx, waiting.email)) !== null) return null;
        const id = await makeAccount(trx, waiting);
        await recordForAccount(trx, { deed: 'account.confirmed', accountId: id, by: id });
        return { id, name: waiting.name, email: waiting.email };
      }).catch(nullIfDuplicate)
    : null;
  if (made !== null) return made;
  await countAgainst(LIMITS.badToken, address);
  throw new Failure(
    'link-over',
    'This link is not valid: it was used, its 24 hours are over, or its address is incomplete.',
  );
}

function nullIfDuplicate(error: unknown): null {
  if (isDuplicate(error)) return null;
  throw error;
}

export const SendAgain = z.strictObject({ email: EmailAddress, password: z.string() });
export type SendAgain = z.infer<typeof SendAgain>;

/**
 * Sends the link to confirm once more, to whoever knows the sign-up's password; the link before is
 * worth nothing then. Says the same whether there is such a sign-up or not.
 * @throws Failure `too-many`
 */
export async function sendConfirmationAgain(input: SendAgain, address: string): Promise<void> {
  await countAgainst(LIMITS.signUp, address);
  await countAgainst(LIMITS.signUpEmail, input.email);
  await inNoLessThan(300, async () => {
    const waiting = await findWaiting(input.email, input.password);
    if (waiting === null) return;
    const token = newSecret();
    await inTransaction(async (trx) => {
      await renewSignUp(trx, waiting.id, stored(token));
      await queueLetter(trx, confirmationLetter(waiting, waiting.workshop, token));
    });
  });
}

/** The sign-up that waits with this address and password, if there is one. */
export async function findWaiting(email: string, password: string): Promise<SignUpRow | null> {
  for (const waiting of await listSignUps(database(), email)) {
    const sent = password.slice(0, PASSWORD_LENGTH.max + 1);
    if (await verifyPassword(waiting.passwordHash, sent)) return waiting;
  }
  return null;
}
