import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { changePassword, forgotPassword, isResetLink, resetPassword, signIn } from '@/lib/accounts';
import { beginSession, personOfSession } from '@/lib/accounts/sessions';
import { newestLink } from '../setup/letters';
import { PASSWORD, newPerson } from './support/person';

afterAll(closeDatabase);

const NEW = 'a rod, a templet, a trammel';
const whence = () => ({ address: randomUUID(), device: 'Firefox on Linux' });
const lettersTo = (email: string) =>
  database()('outgoing_mail').where({ recipient: email }).pluck('subject') as Promise<string[]>;

async function tokenFor(email: string): Promise<string> {
  await forgotPassword(email, randomUUID());
  const link = new URL(await newestLink(database(), email, 'A new password'));
  expect(link.pathname).toMatch(/^\/reset\/[A-Za-z0-9_-]{43}$/);
  return link.pathname.slice('/reset/'.length);
}

describe('a forgotten password', () => {
  it('is replaced by the link in the letter, which ends every session and works once', async () => {
    const person = await newPerson();
    const { email } = person;
    const session = await beginSession(person.id, 'Firefox on Linux');
    const [first, token] = [await tokenFor(email), await tokenFor(email)];
    expect(await isResetLink(token)).toBe(true);
    await resetPassword({ token, password: NEW }, randomUUID());
    expect(await personOfSession(session)).toBeNull();
    expect(await signIn({ email, password: NEW }, whence())).toEqual(person);
    expect(await signIn({ email, password: PASSWORD }, whence())).toBeNull();
    for (const used of [token, first]) {
      expect(await isResetLink(used)).toBe(false);
      const again = resetPassword({ token: used, password: PASSWORD }, randomUUID());
      await expect(again).rejects.toMatchObject({ code: 'link-over' });
    }
    expect(await lettersTo(email)).toContain('Your password was changed');
  });

  it('is not replaced twice by one link used at the same moment', async () => {
    const { email } = await newPerson();
    const token = await tokenFor(email);
    const answers = await Promise.allSettled(
      [NEW, `${NEW}!`].map((password) => resetPassword({ token, password }, randomUUID())),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });

  it('cannot be replaced after an hour', async () => {
    const { id, email } = await newPerson();
    const token = await tokenFor(email);
    const row: { expires_at: Date } = await database()('password_resets')
      .where({ user_id: id })
      .first('expires_at');
    const minutes = (row.expires_at.getTime() - Date.now()) / 60_000;
    expect(minutes).toBeGreaterThan(59);
    expect(minutes).toBeLessThanOrEqual(60);
    await database()('password_resets')
      .where({ user_id: id })
      .update({ expires_at: new Date(Date.now() - 1000) });
    const late = resetPassword({ token, password: NEW }, randomUUID());
    await expect(late).rejects.toMatchObject({ code: 'link-over' });
    expect(await signIn({ email, password: PASSWORD }, whence())).not.toBeNull();
  });

  it('opens an address that was shut by wrong passwords', async () => {
    const { email } = await newPerson();
    for (let attempt = 0; attempt < 11; attempt += 1) {
      await signIn({ email, password: `guess ${attempt}` }, whence()).catch(() => null);
    }
    const shut = signIn({ email, password: PASSWORD }, whence());
    await expect(shut).rejects.toMatchObject({ code: 'too-many' });
    await resetPassword({ token: await tokenFor(email), password: NEW }, randomUUID());
    expect(await signIn({ email, password: NEW }, whence())).not.toBeNull();
  });

  it('brings no letter to an address without an account, and is limited for it all the same', async () => {
    const email = `${randomUUID()}@oldacre.example`;
    for (let time = 0; time < 5; time += 1) await forgotPassword(email, randomUUID());
    expect(await lettersTo(email)).toEqual([]);
    await expect(forgotPassword(email, randomUUID())).rejects.toMatchObject({ code: 'too-many' });
    const known = await newPerson();
    for (let time = 0; time < 5; time += 1) await forgotPassword(known.email, randomUUID());
    const late = forgotPassword(known.email, randomUUID());
    await expect(late).rejects.toMatchObject({ code: 'too-many' });
  });

  it('gives whoever has none a first one', async () => {
    const { email } = await newPerson('Maren Oldacre', { password: false });
    await resetPassword({ token: await tokenFor(email), password: NEW }, randomUUID());
    expect(await signIn({ email, password: NEW }, whence())).not.toBeNull();
  });

  it.each(['', 'A'.repeat(43), '../..', 'x'.repeat(10_000)])(
    'is not replaced by what is no link of ours: %#',
    async (token) => {
      const attempt = resetPassword({ token, password: NEW }, randomUUID());
      await expect(attempt).rejects.toMatchObject({ code: 'link-over' });
    },
  );
});

describe('changing the password', () => {
  it('asks for the old one, ends the other sessions and keeps this one', async () => {
    const person = await newPerson();
    const [here, there] = [await beginSession(person.id, 'A'), await beginSession(person.id, 'B')];
    await changePassword(person, here, { current: PASSWORD, password: NEW });
    expect(await personOfSession(here)).toEqual(person);
    expect(await personOfSession(there)).toBeNull();
    expect(await signIn({ email: person.email, password: NEW }, whence())).toEqual(person);
    expect(await lettersTo(person.email)).toEqual(['Your password was changed']);
  });

  it('makes links to a new one worthless', async () => {
    const person = await newPerson();
    const token = await tokenFor(person.email);
    await changePassword(person, null, { current: PASSWORD, password: NEW });
    expect(await isResetLink(token)).toBe(false);
  });

  it('changes nothing for a wrong one, and names the field', async () => {
    const person = await newPerson();
    const attempt = changePassword(person, null, { current: 'not it', password: NEW });
    await expect(attempt).rejects.toMatchObject({
      code: 'invalid',
      extra: { fields: [{ field: 'current' }] },
    });
    expect(await signIn({ email: person.email, password: PASSWORD }, whence())).toEqual(person);
  });

  it('is limited, so that a session left open is no way to guess the password', async () => {
    const person = await newPerson();
    let refused: unknown = null;
    for (let attempt = 0; attempt < 12 && refused === null; attempt += 1) {
      const current = `guess ${attempt}`;
      await changePassword(person, null, { current, password: NEW }).catch((error: unknown) => {
        if ((error as { code: string }).code === 'too-many') refused = error;
      });
    }
    expect(refused).not.toBeNull();
  });
});
