import { randomBytes } from 'node:crypto';
import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { closePool, evaluate, forgetOutcomes, storeOutcomesIn } from '@/lib/evaluation/index';
import { ensureBundles } from '@/lib/evaluation/bundles.mjs';
import type { Outcome } from '@/lib/language/index';
import { databaseStore } from '@/lib/evaluation/database-store';

afterAll(async () => {
  await closePool();
  await closeDatabase();
});

const newKey = () => randomBytes(32).toString('hex');
const countAnswers = async (): Promise<number> =>
  Number((await database()('evaluation_cache').count({ count: '*' }))[0]?.count);

/** Something to be kept; the store does not look into it. */
const outcome = (text: string): Outcome => ({
  kind: 'missing',
  typeset: text,
  name: 'π·√2',
  use: 'mark',
  at: { from: 0, to: 1 },
});

/** Waits for what is written behind the answer. */
async function untilStored(count: number): Promise<void> {
  for (let tries = 0; tries < 200 && (await countAnswers()) < count; tries += 1)
    await new Promise((resolve) => setTimeout(resolve, 20));
  expect(await countAnswers()).toBe(count);
}

describe('outcomes kept in MariaDB', () => {
  const store = databaseStore();

  test('come back as they were written, and those that were not are left out', async () => {
    const [one, two, none] = [newKey(), newKey(), newKey()];
    await store.write(new Map([one, two].map((name) => [name, outcome(name)])));
    const read = await store.read([one, none, two]);
    expect(read).toEqual(new Map([one, two].map((name) => [name, outcome(name)])));
  });

  test('many are read and written in few statements', async () => {
    const names = Array.from({ length: 1_200 }, newKey);
    await store.write(new Map(names.map((name) => [name, outcome('x'.repeat(2_000))])));
    expect((await store.read(names)).size).toBe(names.length);
  });

  test('the first one stays when two instances write the same name', async () => {
    const name = newKey();
    const both = [outcome('1'), outcome('1')].map((each) => store.write(new Map([[name, each]])));
    await Promise.all(both);
    expect((await store.read([name])).get(name)).toEqual(outcome('1'));
  });

  test('those that are too old are dropped, now and then, when others are written', async () => {
    const [old, fresh] = [newKey(), newKey()];
    const other = databaseStore();
    await store.write(new Map([[old, outcome('1')]]));
    const past = new Date(Date.now() - 40 * 24 * 60 * 60 * 1000);
    await database()('evaluation_cache').where('cache_key', old).update({ created_at: past });
    await other.write(new Map([[fresh, outcome('1')]]));
    expect([...(await store.read([old, fresh])).keys()]).toEqual([fresh]);
  });

  test('a line is stored once and found by another instance that has it not in memory', async () => {
    await ensureBundles();
    storeOutcomesIn(store);
    const expression = `sqrt(2) + ${randomBytes(8).readBigUInt64BE()}`;
    const before = await countAnswers();
    const first = await evaluate({ id: 1, expression });
    await untilStored(before + 1);
    // A fresh memory in front of the same store, as another instance has it.
    forgetOutcomes();
    expect(await evaluate({ id: 1, expression })).toEqual(first);
    expect(await countAnswers()).toBe(before + 1);
  });

  test('an evaluation answers although its store is out of reach', async () => {
    const unreachable = () => Promise.reject(new Error('no database'));
    storeOutcomesIn({ read: unreachable, write: unreachable });
    expect(await evaluate({ expression: '2 + 3' })).toMatchObject({
      result: { exact: { text: '5' } },
    });
  });
});
