import { existsSync, readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { EvaluateRequest, closePool, evaluate } from '@/lib/evaluation/index';
import { ensureBundles } from '@/lib/evaluation/bundles.mjs';
import type { Result } from '@/lib/language/index';

beforeAll(async () => {
  await ensureBundles();
});
afterAll(closePool);

/** Refused by nothing before the arithmetic starts, and far beyond any time: a value with some 57 000 coordinates. */
const ENDLESS = `(${Array.from({ length: 15 }, (_, index) => `sqrt(1+sqrt(${index + 2}))`).join('+')})^99`;

async function cells(...sources: string[]): Promise<Result[][]> {
  const answer = await evaluate({
    cells: sources.map((source, index) => ({ id: String(index), source })),
  });
  if (answer.cells === undefined) throw new Error('The answer has no cells.');
  return answer.cells.map(({ results }) => results);
}

const summary = (results: Result[]) =>
  results.map((result) =>
    result.kind === 'error'
      ? result.error.code
      : result.kind === 'number'
        ? result.exact.text
        : result.kind,
  );

describe('evaluate', () => {
  it('answers an expression with its id', async () => {
    const answer = await evaluate({ id: 'x', expression: 'sqrt(5+2*sqrt(6))' });
    expect(answer).toMatchObject({
      schema: 1,
      id: 'x',
      result: { kind: 'number', exact: { text: 'sqrt(2)+sqrt(3)' }, degree: 4 },
    });
  });

  it('answers cells in the order of the page, whatever order their marks need', async () => {
    const [first, second] = await cells('s = 2 R\n\n# remark\nR == 3', 'R = 3');
    expect(summary(first ?? [])).toEqual(['6', 'truth']);
    expect(first?.map(({ line }) => line)).toEqual([1, 4]);
    expect(summary(second ?? [])).toEqual(['3']);
  });

  it('answers a blank expression with a syntax error', async () => {
    expect(await evaluate({ expression: '  # nothing' })).toMatchObject({
      result: { kind: 'error', error: { code: 'syntax' } },
    });
  });

  it('gives the same answer again from the store, under another id', async () => {
    const first = await evaluate({ id: 1, expression: 'sqrt(2)^5' });
    const second = await evaluate({ id: 2, expression: 'sqrt(2)^5' });
    expect(second).toEqual({ ...first, id: 2 });
  });

  it('tells settings apart in the store', async () => {
    const request = { expression: '1/3' };
    const long = await evaluate({ ...request, settings: { digits: 5 } });
    const short = await evaluate({ ...request, settings: { digits: 2 } });
    expect(
      [long.result, short.result].map((result) => result?.kind === 'number' && result.decimal.re),
    ).toEqual(['0.33333', '0.33']);
  });
});

describe('hostile lines', () => {
  it('stops a line that goes on for ever, answers the others and what does not depend on it, and recovers', async () => {
    const [results] = await cells(`a = 2\nb = ${ENDLESS}\nc = b + 1\nd = sqrt(8)\ne = a + 3`);
    expect(summary(results ?? [])).toEqual([
      '2',
      'limit-time',
      'depends-on-error',
      '2*sqrt(2)',
      '5',
    ]);
    expect(summary((await cells('1 + 1'))[0] ?? [])).toEqual(['2']);
  });
});

describe('the settings of a cell', () => {
  it('belong to the question: other settings of one cell never get the answer to the old ones', async () => {
    const ask = async (settings?: { digits?: number; unit?: 'cm' | 'in' }) => {
      const cells = [
        { id: 'a', source: 'R = 254 mm' },
        { id: 'b', source: 'R/3', ...(settings ? { settings } : {}) },
      ];
      const answer = await evaluate({ cells, settings: { digits: 4 } });
      return answer.cells?.map(({ results: [result] }) =>
        result?.kind === 'number' ? `${result.decimal.re} ${result.unit}` : '',
      );
    };
    expect(await ask()).toEqual(['254 mm', '84.67 mm']);
    expect(await ask({ digits: 2 })).toEqual(['254 mm', '85 mm']);
    expect(await ask({ unit: 'cm' })).toEqual(['254 mm', '8.467 cm']);
    expect(await ask({ unit: 'in' })).toEqual(['254 mm', '3.333 in']);
    expect(await ask()).toEqual(['254 mm', '84.67 mm']);
  });
});

describe('requests that cannot be read', () => {
  it.each([
    ['neither form', {}],
    ['both forms', { expression: '1', cells: [] }],
    ['an unknown field', { expression: '1', extra: 1 }],
    ['a wrong type', { expression: 1 }],
    ['no digits', { expression: '1', settings: { digits: 0 } }],
    ['parts of digits', { expression: '1', settings: { digits: 1.5 } }],
    ['a foreign unit', { expression: '1', settings: { unit: 'furlong' } }],
    ['a step without a unit', { expression: '1', settings: { step: '0.5' } }],
    ['a step of nothing', { expression: '1', settings: { step: '0 mm' } }],
    ['a step of an angle', { expression: '1', settings: { step: '1 deg' } }],
    ['too long a source', { expression: '1'.repeat(200_001) }],
    [
      'a cell with a foreign unit',
      { cells: [{ id: 'a', source: '1', settings: { unit: 'ell' } }] },
    ],
    ['a list', []],
    ['nothing', null],
  ])('refuses %s', (_, request) => {
    expect(EvaluateRequest.safeParse(request).success).toBe(false);
  });

  it('accepts all settings of the schema', () => {
    const settings = { digits: 10, unit: 'in', step: '1/64 in', rounding: 'half-up' };
    expect(EvaluateRequest.parse({ expression: '1', settings }).settings).toEqual(settings);
  });
});

describe('the bundle', () => {
  it('is there after it has been asked for and does not reach the database', async () => {
    const { child } = await ensureBundles();
    expect(existsSync(child ?? '')).toBe(true);
    expect(readFileSync(child ?? '', 'utf8')).not.toMatch(/node_modules\/(knex|mysql2)\//);
  });
});
