import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findUser } from '@/db/queries/users';
import { changeName, signIn, workshopsOf } from '@/lib/accounts';
import { PASSWORD as password, newPerson } from './support/person';

afterAll(closeDatabase);

const whence = (address: string = randomUUID()) => ({ address, device: 'Firefox on Linux' });
const nobody = () => `${randomUUID()}@oldacre.example`;

describe('signing in', () => {
  it('finds the person by address and password together', async () => {
    const person = await newPerson();
    const { email } = person;
    expect(await signIn({ email: email.toUpperCase(), password }, whence())).toEqual(person);
    expect(await signIn({ email, password: `${password}!` }, whence())).toBeNull();
    expect(await signIn({ email: nobody(), password }, whence())).toBeNull();
  });

  it('finds nobody by an empty password, who signs in through another service only', async () => {
    const { email } = await newPerson('Maren Oldacre', { password: false });
    for (const sent of ['', password]) {
      expect(await signIn({ email, password: sent }, whence())).toBeNull();
    }
  });

  it('bounds what it reads of over-long input and finds nobody by it', async () => {
    const long = { email: 'x'.repeat(1_000_000), password: 'y'.repeat(1_000_000) };
    expect(await signIn(long, whence())).toBeNull();
  });

  it('limits an address that tries many people, though it knows one password', async () => {
    const address = randomUUID();
    const { email } = await newPerson();
    let refused: unknown = null;
    for (let attempt = 0; attempt < 80 && refused === null; attempt += 1) {
      const tried = attempt % 7 === 0 ? email : nobody();
      await signIn({ email: tried, password }, whence(address)).catch((error: unknown) => {
        refused = error;
      });
    }
    expect(refused).toMatchObject({ code: 'too-many' });
  });

  it('puts a refusal into the record of the workshop, without name and address', async () => {
    const person = await newPerson();
    await signIn({ email: person.email, password: 'a wrong one' }, whence());
    const [workshop] = await workshopsOf(person);
    const [line]: Record<string, unknown>[] = await database()('activity').where({
      workshop_id: workshop?.id,
      deed: 'session.refused',
    });
    expect(line).toMatchObject({ actor_id: null, subject: 'Firefox on Linux' });
    expect(JSON.stringify(line)).not.toContain(person.email);
    expect(JSON.stringify(line)).not.toContain(person.name);
  });
});

describe('the name', () => {
  it('is changed by the person', async () => {
    const person = await newPerson();
    await changeName(person, 'Maren Oldacre-Finch');
    expect((await findUser(database(), person.id))?.name).toBe('Maren Oldacre-Finch');
  });
});
