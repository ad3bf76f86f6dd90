import { randomBytes } from 'node:crypto';
import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { closePool, evaluate, storeAnswersIn } from '@/lib/evaluation/index';
import { ensureBundles } from '@/lib/evaluation/bundles.mjs';
import { databaseStore } from '@/lib/evaluation/database-store';

afterAll(async () => {
  await closePool();
  await closeDatabase();
});

const newKey = () => randomBytes(32).toString('hex');
const countAnswers = async (): Promise<number> =>
  Number((await database()('evaluation_cache').count({ count: '*' }))[0]?.count);

describe('answers kept in MariaDB', () => {
  const store = databaseStore();

  test('come back as they were written, and null where nothing was', async () => {
    const key = newKey();
    const answer = JSON.stringify({ result: { text: 'π·√2', digits: ['1', null, true] } });
    expect(await store.read(key)).toBeNull();
    await store.write(key, answer);
    expect(JSON.parse((await store.read(key)) ?? '')).toEqual(JSON.parse(answer));
  });

  test('the first answer stays when two instances write the same key', async () => {
    const key = newKey();
    await Promise.all([store.write(key, '{"result":1}'), store.write(key, '{"result":1}')]);
    expect(await store.read(key)).toBe('{"result":1}');
  });

  test('an evaluation is stored once and found by another process that has it not in memory', async () => {
    await ensureBundles();
    storeAnswersIn(store);
    const expression = `sqrt(2) + ${randomBytes(8).readBigUInt64BE()}`;
    const before = await countAnswers();
    const first = await evaluate({ id: 1, expression });
    expect(await countAnswers()).toBe(before + 1);
    // A fresh memory in front of the same store, as another instance has it.
    storeAnswersIn(store);
    expect(await evaluate({ id: 1, expression })).toEqual(first);
    expect(await countAnswers()).toBe(before + 1);
  });

  test('an evaluation answers although its store is out of reach', async () => {
    const unreachable = () => Promise.reject(new Error('no database'));
    storeAnswersIn({ read: unreachable, write: unreachable });
    expect(await evaluate({ expression: '2 + 3' })).toMatchObject({
      result: { exact: { text: '5' } },
    });
  });
});
