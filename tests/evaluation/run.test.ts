import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { EVALUATION_LIMITS, type EvaluationLimits as Limits } from '@/lib/evaluation/limits';
import { Pool } from '@/lib/evaluation/pool';
import { runWork } from '@/lib/evaluation/run';

/** Real processes and the real pool; only the program in the children is one that misbehaves on request. */
const pool = new Pool(2, fileURLToPath(new URL('./hostile-child.mjs', import.meta.url)));
afterAll(() => pool.close());

const SETTINGS = { digits: 30, unit: 'mm', step: null, rounding: 'half-even' } as const;

/** What became of each line: the code of the stand-in's results, or `none`. */
const fates = (...lines: string[]) => fatesWithin(MUCH_TIME, lines);

/** So that what comes out does not depend on how busy the machine is. */
const MUCH_TIME: Limits = {
  ...EVALUATION_LIMITS,
  lineTime: 400,
  requestTime: 30_000,
  longestRequestTime: 60_000,
};

/** A small memory and much time, so that memory is what runs out however slow the machine is. */
const LITTLE_MEMORY: Limits = {
  ...EVALUATION_LIMITS,
  childMemory: 90,
  lineTime: 15_000,
  requestTime: 60_000,
};

async function fatesWithin(limits: Limits, lines: string[]): Promise<string[]> {
  await pool.enter();
  try {
    const tasks = lines.map((source, index) => ({
      source,
      value: `value ${index}`,
      reads: [],
      functions: [],
      settings: 0,
    }));
    const { fates } = await runWork(pool, { tasks, settings: [SETTINGS], keep: true }, limits);
    return lines.map((_, index) => {
      const fate = fates.get(index);
      if (fate === undefined) return 'none';
      return fate.kind === 'refused'
        ? fate.refusal.code
        : (fate.outcome as unknown as { code: string }).code;
    });
  } finally {
    pool.leave();
  }
}

describe('a line that brings its child down', () => {
  it.each([
    ['an endless loop', 'hang', 'limit-time'],
    ['an exit', 'exit', 'fault'],
    ['a mistake in the program', 'throw', 'fault'],
    ['endless recursion', 'deep', 'limit-size'],
  ])('%s: it is named, and the lines before and after it answer', async (_, action, code) => {
    const [before, bad, after] = await fates('fine', action, 'fine');
    expect(before).toBe('fine');
    expect(bad).toMatch(code);
    expect(after).toBe('fine');
  });

  it.each([
    ['ever more objects', 'objects'],
    ['ever larger integers', 'bigints'],
    ['arrays with large backing stores', 'array'],
    ['an ever larger map', 'map'],
    ['bytes outside the heap', 'bytes'],
  ])('%s: memory is named', async (_, action) => {
    expect(await fatesWithin(LITTLE_MEMORY, ['fine', action, 'fine'])).toEqual([
      'fine',
      'limit-memory',
      'fine',
    ]);
  });

  it('is the only one refused when it had its value already, and keeps that value', async () => {
    expect(await fates('hang late', 'fine')).toEqual(['brief limit-time', 'fine']);
  });

  it('leaves time for others when several lines never end', async () => {
    expect(await fates('fine', 'hang', 'hang', 'fine')).toEqual([
      'fine',
      'limit-time',
      'limit-time',
      'fine',
    ]);
  });

  it('ends with the time of the request when no line ever ends, and says what it has', async () => {
    const limits: Limits = { ...MUCH_TIME, requestTime: 1_500, requestTimePerLine: 1 };
    const all = await fatesWithin(limits, ['fine', ...Array<string>(40).fill('hang')]);
    expect(all[0]).toBe('fine');
    expect(all.at(-1)).toBe('none');
  });
});

describe('the pool', () => {
  it('serves many at once, good beside bad, and is well afterwards', async () => {
    const answers = await Promise.all(
      Array.from({ length: 9 }, (_, index) => fates(index % 3 === 0 ? 'exit' : 'fine', 'fine')),
    );
    expect(answers).toEqual(
      Array.from({ length: 9 }, (_, index) => [index % 3 === 0 ? 'fault' : 'fine', 'fine']),
    );
    expect(await fates('fine')).toEqual(['fine']);
  });

  it('refuses work once it is closed', async () => {
    const other = new Pool(2, 'no-such-program.mjs');
    await other.close();
    await expect(other.enter()).rejects.toThrow('closed');
  });
});
