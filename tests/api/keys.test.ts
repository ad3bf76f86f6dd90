import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../setup/server';
import { newKey } from './support/notebook';
import { Visitor, newcomer } from './support/visitor';

let person: Visitor;
const db = openDatabase();
beforeAll(async () => {
  person = await newcomer('Maren');
});
afterAll(() => db.destroy());

const evaluateWith = (key: string, scheme = 'Bearer') =>
  new Visitor().post(
    '/api/evaluate',
    { expression: 'sqrt(5+2*sqrt(6))' },
    { authorization: `${scheme} ${key}` },
  );

describe('an API key', () => {
  it('is shown once, at its making, and stored only as a hash', async () => {
    const made = await person.post('/api/keys', { label: 'Saw', expiresInDays: 30 });
    expect(made.status).toBe(201);
    const { id, key, fragment } = made.json as { id: string; key: string; fragment: string };
    expect(key).toMatch(/^swk_[A-Za-z0-9_-]{43}$/);
    expect(key.endsWith(fragment)).toBe(true);
    const list = await person.get('/api/keys');
    expect(list.text).not.toContain(key);
    expect(list.json.keys).toMatchObject([{ id, label: 'Saw', scopes: ['evaluate'], fragment }]);
    const row = (await db('api_keys').where({ id }).first()) as Record<string, unknown>;
    expect(JSON.stringify(row)).not.toContain(key.slice(4, -6));
  });

  it('evaluates, says when it was last used, and gives the same result as a session', async () => {
    const { id, key } = await newKey(person);
    const byKey = await evaluateWith(key);
    expect(byKey.status).toBe(200);
    expect(byKey.json).toMatchObject({
      schema: 1,
      result: { kind: 'number', exact: { text: 'sqrt(2)+sqrt(3)' }, degree: 4 },
    });
    const bySession = await person.post('/api/evaluate', { expression: 'sqrt(5+2*sqrt(6))' });
    expect(bySession.json).toEqual(byKey.json);
    const keys = (await person.get('/api/keys')).json.keys as { id: string; lastUsedAt: string }[];
    expect(keys.find((line) => line.id === id)?.lastUsedAt).toMatch(/Z$/);
  });

  it.each([
    ['unknown', `swk_${'A'.repeat(43)}`],
    ['of another shape', 'swk_short'],
    ['not a key at all', 'eyJhbGciOiJkaXIifQ..x'],
    ['empty', ''],
    ['two words', 'swk_a swk_b'],
  ])('that is %s answers 401 and says how to send one', async (_what, key) => {
    const answer = await evaluateWith(key);
    expect([answer.status, answer.json.code]).toEqual([401, 'bad-key']);
    expect(answer.headers.get('www-authenticate')).toBe('Bearer');
    if (key !== '') expect(answer.text).not.toContain(key);
  });

  it('under another scheme is not taken', async () => {
    const { key } = await newKey(person);
    expect((await evaluateWith(key, 'Basic')).status).toBe(401);
    expect((await evaluateWith(key, 'bearer')).status).toBe(200);
  });

  it('that is bad is not made good by a session beside it', async () => {
    const answer = await person.post(
      '/api/evaluate',
      { expression: '1' },
      { authorization: 'Bearer swk_wrong' },
    );
    expect(answer.status).toBe(401);
  });

  it('is refused at once when it is revoked, and when its time is over', async () => {
    const [revoked, expired] = [await newKey(person), await newKey(person)];
    expect((await evaluateWith(revoked.key)).status).toBe(200);
    expect((await person.ask('DELETE', `/api/keys/${revoked.id}`)).status).toBe(204);
    expect((await evaluateWith(revoked.key)).status).toBe(401);
    expect((await person.ask('DELETE', `/api/keys/${revoked.id}`)).status).toBe(404);
    expect((await evaluateWith(expired.key)).status).toBe(200);
    await db('api_keys')
      .where({ id: expired.id })
      .update({ expires_at: new Date(Date.now() - 1000) });
    expect((await evaluateWith(expired.key)).status).toBe(401);
  });

  it('without the scope is refused', async () => {
    const { id, key } = await newKey(person);
    await db('api_keys').where({ id }).update({ scopes: '[]' });
    const answer = await evaluateWith(key);
    expect([answer.status, answer.json.code]).toEqual([403, 'forbidden']);
  });

  it('of somebody else is not revoked', async () => {
    const { id, key } = await newKey(person);
    const other = await newcomer('Other');
    expect((await other.ask('DELETE', `/api/keys/${id}`)).status).toBe(404);
    expect((await evaluateWith(key)).status).toBe(200);
  });

  it('needs no origin: it is no cookie that a browser adds by itself', async () => {
    const { key } = await newKey(person);
    const answer = await new Visitor().post(
      '/api/evaluate',
      { expression: '1' },
      { authorization: `Bearer ${key}`, origin: 'https://drawing.example' },
    );
    expect(answer.status).toBe(200);
  });

  it.each([
    ['no label', {}],
    ['no days', { label: 'x', expiresInDays: 0 }],
    ['half a day', { label: 'x', expiresInDays: 0.5 }],
    ['scopes of its own', { label: 'x', scopes: ['everything'] }],
  ])('with %s is not made', async (_what, body) => {
    const answer = await person.post('/api/keys', body);
    expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
  });

  it('is one of at most twenty in use', async () => {
    const keeper = await newcomer('Keeper');
    const made = [];
    for (let index = 0; index < 20; index += 1) made.push(await newKey(keeper));
    const over = await keeper.post('/api/keys', { label: 'One more' });
    expect([over.status, over.json.code]).toEqual([409, 'limit-reached']);
    await keeper.ask('DELETE', `/api/keys/${made[0]?.id}`);
    expect((await keeper.post('/api/keys', { label: 'In its place' })).status).toBe(201);
  });
});
