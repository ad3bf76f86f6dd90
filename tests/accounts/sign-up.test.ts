import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findUser, findUserByEmail } from '@/db/queries/users';
import {
  SignUp,
  confirmSignUp,
  sendConfirmationAgain,
  signIn,
  signUp,
  signUpOf,
  workshopsOf,
} from '@/lib/accounts';
import { newestLink } from '../setup/letters';
import { PASSWORD as password, newPerson } from './support/person';

afterAll(closeDatabase);

const whence = () => ({ address: randomUUID(), device: 'Firefox on Linux' });
const newAccount = () => ({
  name: 'Maren Oldacre',
  email: `maren.${randomUUID()}@oldacre.example`,
  password,
  workshop: 'Oldacre Joinery',
});

const CONFIRM = 'Confirm your e-mail address';

async function tokenFor(email: string): Promise<string> {
  const link = new URL(await newestLink(database(), email, CONFIRM));
  expect(link.pathname).toMatch(/^\/confirm\/[A-Za-z0-9_-]{43}$/);
  return link.pathname.slice('/confirm/'.length);
}

const deedsOf = async (personId: string) =>
  (await database()('activity')
    .where({ actor_id: personId })
    .orderBy('number')
    .pluck('deed')) as unknown;

describe('signing up', () => {
  it('makes nobody until the address is confirmed, and then the admin of a new workshop', async () => {
    const account = newAccount();
    expect(await signUp(account, randomUUID())).toEqual({ email: account.email, confirmed: false });
    expect(await findUserByEmail(database(), account.email)).toBeNull();
    const token = await tokenFor(account.email);
    expect(await signUpOf(token)).toEqual({
      name: account.name,
      email: account.email,
      workshop: account.workshop,
    });
    const person = await confirmSignUp(token, randomUUID());
    expect(person).toMatchObject({ name: account.name, email: account.email });
    expect(await workshopsOf(person)).toEqual([
      { id: expect.any(String) as string, name: 'Oldacre Joinery', admin: true },
    ]);
    expect(await deedsOf(person.id)).toEqual(['account.made', 'account.confirmed']);
  });

  it('stores neither the password nor the token', async () => {
    const account = newAccount();
    await signUp(account, randomUUID());
    const waiting: unknown = await database()('sign_ups').where({ email: account.email });
    const token = await tokenFor(account.email);
    const person = await confirmSignUp(token, randomUUID());
    const stored = JSON.stringify([waiting, await findUser(database(), person.id)]);
    expect(stored).not.toContain(password);
    expect(stored).not.toContain(token);
  });

  it('says of an address that has an account what it says of any other, and writes to its owner', async () => {
    const known = await newPerson();
    const account = { ...newAccount(), email: known.email, workshop: `Twice ${randomUUID()}` };
    const fresh = newAccount();
    const [answer, other] = [
      await signUp(account, randomUUID()),
      await signUp(fresh, randomUUID()),
    ];
    expect({ ...answer, email: '' }).toEqual({ ...other, email: '' });
    const link = await newestLink(database(), known.email, 'You have an account already');
    expect(new URL(link).pathname).toBe('/sign-in');
    expect(await database()('sign_ups').where({ email: known.email })).toEqual([]);
    expect(await database()('workshops').where({ name: account.workshop })).toEqual([]);
  });

  it('reads the address without blanks and case', () => {
    const read = SignUp.parse({ ...newAccount(), email: '  Maren@Oldacre.EXAMPLE ' });
    expect(read.email).toBe('maren@oldacre.example');
  });

  it('sends no more than six letters an hour to one address, from wherever they are asked for', async () => {
    const account = newAccount();
    for (let time = 0; time < 6; time += 1) await signUp(account, randomUUID());
    await expect(signUp(account, randomUUID())).rejects.toMatchObject({ code: 'too-many' });
    const again = sendConfirmationAgain({ email: account.email, password }, randomUUID());
    await expect(again).rejects.toMatchObject({ code: 'too-many' });
  });
});

describe('confirming', () => {
  it('works once, also when the link is used twice at the same moment', async () => {
    const account = newAccount();
    await signUp(account, randomUUID());
    const token = await tokenFor(account.email);
    const answers = await Promise.allSettled([
      confirmSignUp(token, randomUUID()),
      confirmSignUp(token, randomUUID()),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    await expect(confirmSignUp(token, randomUUID())).rejects.toMatchObject({ code: 'link-over' });
    expect(await signUpOf(token)).toBeNull();
  });

  it('is over after its 24 hours', async () => {
    const account = newAccount();
    await signUp(account, randomUUID());
    const token = await tokenFor(account.email);
    const row: { expires_at: Date } = await database()('sign_ups')
      .where({ email: account.email })
      .first('expires_at');
    const hours = (row.expires_at.getTime() - Date.now()) / 3_600_000;
    expect(hours).toBeGreaterThan(23.9);
    expect(hours).toBeLessThanOrEqual(24);
    await database()('sign_ups')
      .where({ email: account.email })
      .update({ expires_at: new Date(Date.now() - 1000) });
    expect(await signUpOf(token)).toBeNull();
    await expect(confirmSignUp(token, randomUUID())).rejects.toMatchObject({ code: 'link-over' });
    expect(await findUserByEmail(database(), account.email)).toBeNull();
  });

  it.each(['', 'x', 'A'.repeat(43), 'A'.repeat(100_000), '../../etc'])(
    'refuses what is no link of ours: %#',
    async (token) => {
      await expect(confirmSignUp(token, randomUUID())).rejects.toMatchObject({ code: 'link-over' });
    },
  );

  it('gives the account the password of the sign-up whose link was used, not of another one', async () => {
    const account = newAccount();
    await signUp({ ...account, password: 'the password of an impostor' }, randomUUID());
    await signUp(account, randomUUID());
    await confirmSignUp(await tokenFor(account.email), randomUUID());
    const { email } = account;
    expect(await signIn({ email, password }, whence())).toMatchObject({ email });
    const other = { email, password: 'the password of an impostor' };
    expect(await signIn(other, whence())).toBeNull();
    expect(await database()('sign_ups').where({ email })).toEqual([]);
  });

  it('can be asked for again by whoever knows the password, and the first link is over then', async () => {
    const account = newAccount();
    const { email } = account;
    await signUp(account, randomUUID());
    const first = await tokenFor(email);
    await sendConfirmationAgain({ email, password: 'not the password' }, randomUUID());
    expect(await signUpOf(first)).not.toBeNull();
    await sendConfirmationAgain({ email, password }, randomUUID());
    expect(await signUpOf(first)).toBeNull();
    await sendConfirmationAgain({ email: newAccount().email, password }, randomUUID());
  });
});

describe('signing in before the confirmation', () => {
  it('is refused with its own reason for the right password, and as ever for a wrong one', async () => {
    const account = newAccount();
    const { email } = account;
    await signUp(account, randomUUID());
    await expect(signIn({ email, password }, whence())).rejects.toMatchObject({
      code: 'unconfirmed',
    });
    expect(await signIn({ email, password: 'not the password' }, whence())).toBeNull();
  });
});
