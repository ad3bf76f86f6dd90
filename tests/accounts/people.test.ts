import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findUser } from '@/db/queries/users';
import { SignUp, signIn, signOutEverywhere, signUp, workshopsOf } from '@/lib/accounts';
import { personOfSession } from '@/lib/accounts/people';

afterAll(closeDatabase);

const password = 'trammel and straightedge';
const newAccount = () => ({
  name: 'Maren Oldacre',
  email: `maren.${randomUUID()}@oldacre.example`,
  password,
  workshop: 'Oldacre Joinery',
});

describe('signing up', () => {
  it('makes the person admin of a new workshop', async () => {
    const person = await signUp(newAccount(), randomUUID());
    expect(await workshopsOf(person)).toEqual([
      { id: expect.any(String) as string, name: 'Oldacre Joinery', admin: true },
    ]);
  });

  it('stores no password', async () => {
    const person = await signUp(newAccount(), randomUUID());
    expect(JSON.stringify(await findUser(database(), person.id))).not.toContain(password);
  });

  it('makes neither person nor workshop when the address is taken', async () => {
    const account = { ...newAccount(), workshop: `Twice ${randomUUID()}` };
    await signUp(account, randomUUID());
    const again = signUp({ ...account, name: 'Other' }, randomUUID());
    await expect(again).rejects.toMatchObject({ code: 'email-taken' });
    const rows: unknown[] = await database()('workshops').where({ name: account.workshop });
    expect(rows).toHaveLength(1);
  });

  it('lets one of two with the same address through when they come at once', async () => {
    const account = newAccount();
    const answers = await Promise.allSettled([
      signUp(account, randomUUID()),
      signUp(account, randomUUID()),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });

  it('reads the address without blanks and case', () => {
    const read = SignUp.parse({ ...newAccount(), email: '  Maren@Oldacre.EXAMPLE ' });
    expect(read.email).toBe('maren@oldacre.example');
  });
});

describe('signing in', () => {
  it('finds the person by address and password together', async () => {
    const account = newAccount();
    const person = await signUp(account, randomUUID());
    const found = await signIn({ email: account.email.toUpperCase(), password }, randomUUID());
    expect(found).toMatchObject({ id: person.id, name: 'Maren Oldacre' });
    expect(
      await signIn({ email: account.email, password: `${password}!` }, randomUUID()),
    ).toBeNull();
    expect(await signIn({ email: newAccount().email, password }, randomUUID())).toBeNull();
  });

  it('bounds what it reads of over-long input and finds nobody by it', async () => {
    const long = { email: 'x'.repeat(1_000_000), password: 'y'.repeat(1_000_000) };
    expect(await signIn(long, randomUUID())).toBeNull();
  });

  it('limits an address that tries many people, though it knows one password', async () => {
    const address = randomUUID();
    const account = newAccount();
    await signUp(account, randomUUID());
    let refused: unknown = null;
    for (let attempt = 0; attempt < 80 && refused === null; attempt += 1) {
      const email = attempt % 7 === 0 ? account.email : newAccount().email;
      await signIn({ email, password }, address).catch((error: unknown) => {
        refused = error;
      });
    }
    expect(refused).toMatchObject({ code: 'too-many' });
  });
});

describe('a session', () => {
  it('ends for good when the person signs out everywhere', async () => {
    const account = newAccount();
    const person = await signUp(account, randomUUID());
    const before = await signIn({ email: account.email, password }, randomUUID());
    const version = before?.tokenVersion ?? -1;
    expect(await personOfSession(person.id, version)).toEqual(person);
    await signOutEverywhere(person);
    expect(await personOfSession(person.id, version)).toBeNull();
    const after = await signIn({ email: account.email, password }, randomUUID());
    expect(await personOfSession(person.id, after?.tokenVersion ?? -1)).toEqual(person);
    expect(await personOfSession(person.id, version + 2)).toBeNull();
  });
});
