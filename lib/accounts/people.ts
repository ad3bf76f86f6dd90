import { z } from 'zod';
import { database } from '@/db/client';
import { findUserByEmail, normaliseEmail, renameUser } from '@/db/queries/users';
import { listWorkshopsOf } from '@/db/queries/workshops';
import { Failure } from '@/lib/access';
import { oneLine } from './fields';
import { recordForAccount } from './happenings';
import { LIMITS, countAgainst, forget, takeBack } from './limits';
import { PASSWORD_LENGTH, verifyPassword } from './passwords';
import { findWaiting } from './sign-up';
import type { MemberWorkshop, Person } from './types';

/** Where an attempt to sign in comes from. */
export interface Whence {
  address: string;
  /** Browser and system in words, as `deviceOf` gives them. */
  device: string;
}

/**
 * The person with this e-mail address and password, or null. Attempts are counted per address and
 * per e-mail before the password is looked at; an unknown e-mail takes as long as a wrong password.
 * @throws Failure `too-many`; `unconfirmed` for whoever knows the password of a sign-up that waits
 */
export async function signIn(
  credentials: { email: string; password: string },
  { address, device }: Whence,
): Promise<Person | null> {
  const email = normaliseEmail(credentials.email.slice(0, 254));
  const fromAddress = await countAgainst(LIMITS.signInAddress, address);
  await countAgainst(LIMITS.signInEmail, email);
  const user = await findUserByEmail(database(), email);
  const password = credentials.password.slice(0, PASSWORD_LENGTH.max + 1);
  const matches = await verifyPassword(user?.passwordHash ?? null, password);
  const waiting = user === null ? await findWaiting(email, password) : null;
  if ((user === null || !matches) && waiting === null) {
    if (user !== null) await noteRefusal(user.id, device);
    return null;
  }
  // The address keeps its other hits: an own account must not wash an attacker's address clean.
  await takeBack(fromAddress);
  await forget(LIMITS.signInEmail, email);
  if (user !== null) return { id: user.id, name: user.name, email: user.email };
  throw new Failure(
    'unconfirmed',
    'This e-mail address is not confirmed yet: open the link in the letter that was sent to it.',
  );
}

async function noteRefusal(accountId: string, device: string): Promise<void> {
  await recordForAccount(database(), {
    deed: 'session.refused',
    accountId,
    by: null,
    subject: device,
    details: { account: accountId },
  });
}

export const NameChange = z.strictObject({ name: oneLine('The name', 120) });

export async function changeName(person: Person, name: string): Promise<void> {
  await renameUser(database(), person.id, name);
}

export async function workshopsOf(person: Person): Promise<MemberWorkshop[]> {
  const workshops = await listWorkshopsOf(database(), person.id);
  return workshops.map(({ id, name, role }) => ({ id, name, admin: role === 'admin' }));
}
