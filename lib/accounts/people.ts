import { z } from 'zod';
import { database, inTransaction, isDuplicate } from '@/db/client';
import {
  endSessions,
  findUser,
  findUserByEmail,
  insertUser,
  normaliseEmail,
} from '@/db/queries/users';
import { insertMembership, insertWorkshop, listWorkshopsOf } from '@/db/queries/workshops';
import { Failure } from '@/lib/access';
import { LIMITS, countAgainst, forget, takeBack } from './limits';
import { PASSWORD_LENGTH, hashPassword, verifyPassword } from './passwords';
import type { MemberWorkshop, Person } from './types';

/** A one-line name: trimmed, not empty, without control characters and lone surrogates. */
export const oneLine = (what: string, max: number) =>
  z
    .string({ error: `${what} is missing.` })
    .trim()
    .min(1, { error: `${what} is empty.` })
    .max(max, { error: `${what} is longer than ${max} characters.` })
    .regex(/^[^\p{Cc}\p{Cs}]*$/u, { error: `${what} contains characters that cannot be printed.` });

export const EmailAddress = z
  .string({ error: 'The e-mail address is missing.' })
  .trim()
  .max(254, { error: 'The e-mail address is longer than 254 characters.' })
  .pipe(z.email({ error: 'This is not an e-mail address; it should look like name@example.org.' }))
  .transform(normaliseEmail);

export const Password = z
  .string({ error: 'The password is missing.' })
  .min(PASSWORD_LENGTH.min, {
    error: `The password has fewer than ${PASSWORD_LENGTH.min} characters.`,
  })
  .max(PASSWORD_LENGTH.max, {
    error: `The password has more than ${PASSWORD_LENGTH.max} characters.`,
  });

export const SignUp = z.strictObject({
  name: oneLine('The name', 120),
  email: EmailAddress,
  password: Password,
  workshop: oneLine('The name of the workshop', 120),
});
export type SignUp = z.infer<typeof SignUp>;

/**
 * Makes an account and its workshop, of which the person is the admin.
 * @param address where the request came from; new accounts are limited per address
 * @throws Failure `email-taken`, `too-many`
 */
export async function signUp(input: SignUp, address: string): Promise<Person> {
  await countAgainst(LIMITS.signUp, address);
  const { name, email, workshop } = input;
  const passwordHash = await hashPassword(input.password);
  try {
    const id = await inTransaction(async (trx) => {
      const userId = await insertUser(trx, { email, name, passwordHash });
      const workshopId = await insertWorkshop(trx, { name: workshop });
      await insertMembership(trx, workshopId, userId, 'admin');
      return userId;
    });
    return { id, name, email };
  } catch (error) {
    if (!isDuplicate(error)) throw error;
    throw new Failure('email-taken', 'There is already an account with this e-mail address.', {
      fields: [
        { field: 'email', message: 'There is already an account with this e-mail address.' },
      ],
    });
  }
}

/** A person together with the number that every valid session of theirs carries. */
export interface SignedIn extends Person {
  tokenVersion: number;
}

/**
 * The person with this e-mail address and password, or null. Attempts are counted per address and
 * per e-mail before the password is looked at; an unknown e-mail takes as long as a wrong password.
 * @throws Failure `too-many`
 */
export async function signIn(
  credentials: { email: string; password: string },
  address: string,
): Promise<SignedIn | null> {
  const email = normaliseEmail(credentials.email.slice(0, 254));
  const fromAddress = await countAgainst(LIMITS.signInAddress, address);
  await countAgainst(LIMITS.signInEmail, email);
  const user = await findUserByEmail(database(), email);
  const password = credentials.password.slice(0, PASSWORD_LENGTH.max + 1);
  if (!(await verifyPassword(user?.passwordHash ?? null, password)) || user === null) return null;
  // The address keeps its other hits: an own account must not wash an attacker's address clean.
  await takeBack(fromAddress);
  await forget(LIMITS.signInEmail, email);
  return { id: user.id, name: user.name, email: user.email, tokenVersion: user.tokenVersion };
}

/** The person a session speaks of, unless the account is gone or its sessions were ended since. */
export async function personOfSession(id: string, tokenVersion: number): Promise<Person | null> {
  const user = await findUser(database(), id);
  if (user === null || user.tokenVersion !== tokenVersion) return null;
  return { id: user.id, name: user.name, email: user.email };
}

/** Ends every session of the person, on all devices, this one included. */
export async function signOutEverywhere(person: Person): Promise<void> {
  await endSessions(database(), person.id);
}

export async function workshopsOf(person: Person): Promise<MemberWorkshop[]> {
  const workshops = await listWorkshopsOf(database(), person.id);
  return workshops.map(({ id, name, role }) => ({ id, name, admin: role === 'admin' }));
}
