import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { endSession, listSessions, signOutEverywhere, workshopsOf } from '@/lib/accounts';
import { deviceOf } from '@/lib/accounts/device';
import { SESSION_SECONDS, beginSession, personOfSession } from '@/lib/accounts/sessions';
import { newPerson } from './support/person';

afterAll(closeDatabase);

const longAgo = (id: string, seconds: number) =>
  database()('sessions')
    .where({ id })
    .update({ seen_at: new Date(Date.now() - seconds * 1000) });

describe('a session', () => {
  it('speaks of its person until it is ended, and of nobody afterwards', async () => {
    const person = await newPerson();
    const id = await beginSession(person.id, 'Firefox on Linux');
    expect(await personOfSession(id)).toEqual(person);
    await endSession(person, id);
    expect(await personOfSession(id)).toBeNull();
    await expect(endSession(person, id)).rejects.toMatchObject({ code: 'not-found' });
  });

  it('is not made of an id that nobody was given', async () => {
    for (const id of ['', 'x', randomUUID()]) expect(await personOfSession(id)).toBeNull();
  });

  it('is ended by its own person alone', async () => {
    const [person, other] = [await newPerson(), await newPerson()];
    const id = await beginSession(person.id, 'Firefox on Linux');
    await expect(endSession(other, id)).rejects.toMatchObject({ code: 'not-found' });
    expect(await personOfSession(id)).toEqual(person);
  });

  it('ends with all others when the person signs out everywhere, and a new one is good', async () => {
    const person = await newPerson();
    const before = await Promise.all([beginSession(person.id, 'A'), beginSession(person.id, 'B')]);
    await signOutEverywhere(person);
    for (const id of before) expect(await personOfSession(id)).toBeNull();
    expect(await personOfSession(await beginSession(person.id, 'A'))).toEqual(person);
  });

  it('is listed last used first, with the one that asks marked, and no address', async () => {
    const person = await newPerson();
    const old = await beginSession(person.id, 'Safari on an iPad');
    const mine = await beginSession(person.id, 'Firefox on Linux');
    await longAgo(old, 3600);
    const lines = await listSessions(person, mine);
    expect(lines.map(({ id, device, current }) => [id, device, current])).toEqual([
      [mine, 'Firefox on Linux', true],
      [old, 'Safari on an iPad', false],
    ]);
    const columns = Object.keys(
      (await database()('sessions').where({ id: mine }).first()) as object,
    );
    expect(columns.sort()).toEqual(['begun_at', 'device', 'id', 'seen_at', 'user_id']);
  });

  it('writes down when it was seen, but not at every request', async () => {
    const person = await newPerson();
    const id = await beginSession(person.id, 'Firefox on Linux');
    const seen = async () => (await listSessions(person, id))[0]?.seenAt;
    await longAgo(id, 120);
    const first = await seen();
    await personOfSession(id);
    expect(await seen()).toBe(first);
    await longAgo(id, 600);
    await personOfSession(id);
    expect(Date.now() - Date.parse((await seen()) ?? '')).toBeLessThan(60_000);
  });

  it('is dropped once its cookie is over', async () => {
    const person = await newPerson();
    const id = await beginSession(person.id, 'Firefox on Linux');
    await longAgo(id, SESSION_SECONDS + 60);
    await beginSession(person.id, 'Firefox on Linux');
    expect(await personOfSession(id)).toBeNull();
  });

  it('stands in the record of the workshop when it begins and when it ends', async () => {
    const person = await newPerson();
    const [workshop] = await workshopsOf(person);
    await endSession(person, await beginSession(person.id, 'Firefox on Linux'));
    const lines: unknown = await database()('activity')
      .where({ workshop_id: workshop?.id, subject: 'Firefox on Linux' })
      .orderBy('number')
      .select('deed', 'actor_id');
    expect(lines).toEqual([
      { deed: 'session.begun', actor_id: person.id },
      { deed: 'session.ended', actor_id: person.id },
    ]);
  });
});

describe('a device', () => {
  // User agent strings of current browsers, from memory.
  it.each([
    [
      'Mozilla/5.0 (Windows NT 10.0; Win64; x64; rv:140.0) Gecko/20100101 Firefox/140.0',
      'Firefox on Windows',
    ],
    [
      'Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0.0.0 Safari/537.36',
      'Chrome on Linux',
    ],
    [
      'Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0.0.0 Safari/537.36 Edg/140.0.0.0',
      'Edge on Windows',
    ],
    [
      'Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/18.0 Mobile/15E148 Safari/604.1',
      'Safari on an iPhone',
    ],
    [
      'Mozilla/5.0 (Macintosh; Intel Mac OS X 10_15_7) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/18.0 Safari/605.1.15',
      'Safari on a Mac',
    ],
    [
      'Mozilla/5.0 (Linux; Android 14; SM-X200) AppleWebKit/537.36 (KHTML, like Gecko) SamsungBrowser/27.0 Chrome/125.0.0.0 Safari/537.36',
      'Samsung Internet on Android',
    ],
    ['curl/8.0', 'A browser'],
    [null, 'A browser'],
    ['<script>alert(1)</script> Firefox/1', 'Firefox'],
  ])('of %s is called %s', (agent, words) => {
    expect(deviceOf(agent)).toBe(words);
  });
});
