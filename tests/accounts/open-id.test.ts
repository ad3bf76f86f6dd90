import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findUserByEmail } from '@/db/queries/users';
import { workshopsOf } from '@/lib/accounts';
import { personOfClaims, type Claims } from '@/lib/accounts/open-id';
import { newPerson } from './support/person';

afterAll(closeDatabase);

const settings = {
  issuer: 'https://id.example/',
  clientId: 'surdwork',
  clientSecret: 'secret',
  name: 'Quarry House',
};

const claims = (more: Claims = {}): Claims => ({
  iss: 'https://id.example',
  sub: randomUUID(),
  email: `${randomUUID()}@oldacre.example`,
  email_verified: true,
  name: 'Maren Oldacre',
  ...more,
});

describe('claims', () => {
  it('mean one person for good, also when they come twice at the same moment', async () => {
    const given = claims();
    const ids = await Promise.all([
      personOfClaims(given, settings),
      personOfClaims(given, settings),
      personOfClaims(given, settings),
    ]);
    expect(new Set(ids).size).toBe(1);
    const user = await findUserByEmail(database(), String(given.email));
    expect(user).toMatchObject({ id: ids[0], name: 'Maren Oldacre', passwordHash: null });
    expect(await workshopsOf({ id: ids[0], name: '', email: '' })).toHaveLength(1);
  });

  it('of one subject at two issuers mean two people', async () => {
    const sub = randomUUID();
    const other = { ...settings, issuer: 'https://other.example' };
    const one = await personOfClaims(claims({ sub }), settings);
    const two = await personOfClaims(claims({ sub, iss: 'https://other.example' }), other);
    expect(one).not.toBe(two);
  });

  it('without a name that can be shown are called by the address', async () => {
    const email = `${randomUUID()}@oldacre.example`;
    await personOfClaims(claims({ email, name: '\n' }), settings);
    const user = await findUserByEmail(database(), email);
    expect(user?.name).toBe(email.slice(0, email.indexOf('@')));
  });

  it.each([
    ['another issuer', { iss: 'https://evil.example' }],
    ['no issuer', { iss: undefined }],
    ['no subject', { sub: undefined }],
    ['an empty subject', { sub: '' }],
    ['a subject of more than 255 characters', { sub: 'x'.repeat(256) }],
    ['no address', { email: undefined }],
    ['something that is no address', { email: 'maren' }],
    ['an address that is not verified', { email_verified: false }],
    ['an address verified by a number', { email_verified: 1 }],
  ])('with %s open nothing', async (_, more) => {
    const known = await newPerson();
    const given = claims({ email: known.email, ...more });
    await expect(personOfClaims(given, settings)).rejects.toMatchObject({ code: 'forbidden' });
    expect(await database()('identities').where({ user_id: known.id })).toEqual([]);
  });
});
