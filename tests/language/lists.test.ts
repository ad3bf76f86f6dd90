import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluateCells, evaluateExpression } from '@/lib/language/index';
import { LANGUAGE_LIMITS } from '@/lib/language/limits';
import { fewValues as values } from './arbitraries';

function holds(...lines: string[]): boolean {
  const results = evaluateCells([{ id: 'a', source: lines.join('\n') }], { digits: 5 })[0]?.results;
  const last = results?.at(-1);
  if (last?.kind !== 'truth') throw new Error(`${lines.join(' | ')}: ${JSON.stringify(results)}`);
  return last.truth.value;
}

function errorOf(source: string) {
  const results = evaluateCells([{ id: 'a', source }], { digits: 5 })[0]?.results;
  const last = results?.at(-1);
  const line = source.split('\n').at(-1) ?? '';
  return last?.kind === 'error'
    ? `${last.error.code} at ${line.slice(last.error.from, last.error.to)}: ${last.error.message}`
    : last?.kind;
}

const lists = fc.array(values, { minLength: 1, maxLength: 4 });
const pairs = lists.chain((a) =>
  fc.tuple(fc.constant(a), fc.array(values, { minLength: a.length, maxLength: a.length })),
);
const written = (items: readonly string[]) => `[${items.join(', ')}]`;
const RUNS = { numRuns: 10 };

describe('laws of lists', () => {
  it.each(['+', '-', '*'])('%s works item by item on two lists of one count', (operator) => {
    fc.assert(
      fc.property(pairs, ([a, b]) => {
        const items = a.map((item, index) => `${item} ${operator} ${b[index] ?? ''}`);
        expect(holds(`${written(a)} ${operator} ${written(b)} == ${written(items)}`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('a single value goes with every item, on either side', () => {
    fc.assert(
      fc.property(lists, values, (items, value) => {
        expect(holds(`${value} - ${written(items)} == -(${written(items)} - ${value})`)).toBe(true);
        expect(holds(`${value} * ${written(items)} == ${written(items)} * ${value}`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('a function of one value works item by item, and so do a root and a power', () => {
    fc.assert(
      fc.property(lists, (items) => {
        const squares = written(items.map((item) => `${item}^2`));
        expect(holds(`${written(items)}^2 == ${squares}`)).toBe(true);
        expect(holds(`sqrt(${squares}) == abs(${written(items)})`)).toBe(true);
        expect(holds(`√${squares} == ${written(items.map((item) => `√(${item}^2)`))}`)).toBe(true);
      }),
      { numRuns: 10 },
    );
  });

  it('each item is found by its number, and all of them in order make the list again', () => {
    fc.assert(
      fc.property(lists, (items) => {
        const count = items.length;
        items.forEach((item, index) => {
          expect(holds(`L = ${written(items)}`, `L[${index + 1}] == ${item}`)).toBe(true);
        });
        expect(holds(`L = ${written(items)}`, `each(k, 1, count(L), L[k]) == L`)).toBe(true);
        expect(holds(`count(${written(items)}) == ${count}`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('the sum is that of the items, and least and greatest are among them', () => {
    fc.assert(
      fc.property(lists, (items) => {
        expect(holds(`sum(${written(items)}) == ${items.join(' + ')}`)).toBe(true);
        expect(holds(`min(${written(items)}) == min(${items.join(', ')})`)).toBe(true);
        expect(holds(`max(${written(items)}) == max(${items.join(', ')})`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('two lists are equal exactly when they have one count and equal items', () => {
    fc.assert(
      fc.property(pairs, ([a, b]) => {
        const equal = a.every((item, index) => holds(`${item} == ${b[index] ?? ''}`));
        expect(holds(`${written(a)} == ${written(b)}`)).toBe(equal);
        expect(holds(`${written(a)} != ${written(b)}`)).toBe(!equal);
        expect(holds(`${written(a)} == ${written([...a, '1'])}`)).toBe(false);
      }),
      { numRuns: 15 },
    );
  });

  it('the exact text parses back to the same list, units and lists inside included', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc
            .tuple(values, fc.constantFrom('mm', 'in^2', 'deg', ''))
            .map(([value, unit]) => (unit === 'deg' ? `${value} * turn` : `${value} ${unit}`)),
          { minLength: 1, maxLength: 3 },
        ),
        fc.constantFrom('mm', 'in', 'ft'),
        (items, unit) => {
          const source = `[${items.join(', ')}, [${items[0] ?? ''}]]`;
          const result = evaluateExpression(source, { digits: 5, unit });
          if (result.kind !== 'list') throw new Error(JSON.stringify(result));
          expect(holds(`${source} == ${result.exact.text}`)).toBe(true);
        },
      ),
      RUNS,
    );
  });

  it('each item is given as it would be on a line of its own', () => {
    const list = evaluateExpression('[sqrt(2) mm, turn/17, [1/3]]', { step: '0.5 mm' });
    if (list.kind !== 'list') throw new Error(list.kind);
    const [length, angle, inner] = list.items;
    for (const [item, source] of [
      [length, 'sqrt(2) mm'],
      [angle, 'turn/17'],
      [inner, '[1/3]'],
    ] as const) {
      expect(evaluateExpression(source, { step: '0.5 mm' })).toMatchObject(item ?? {});
    }
  });
});

describe('what a list refuses, at its place', () => {
  it.each([
    [
      'L = [1, 2, 3]\nL[4]',
      'domain at 4: There is no item 4; the list has 3 items, numbered from 1.',
    ],
    ['L = [1]\nL[0]', 'domain at 0: There is no item 0; the list has 1 item.'],
    [
      'L = [1]\nL[1/2]',
      'domain at 1/2: The number of an item is a whole number, and this is none.',
    ],
    [
      'L = [1]\nL[1 mm]',
      'unit-mismatch at 1 mm: The number of an item is a whole number without a unit, and this is a length.',
    ],
    [
      'R = 3\nR[1]',
      'unit-mismatch at R: Only a list has items that are told by number, and this is a plain number.',
    ],
    [
      '[1, 2] + [1, 2, 3]',
      'domain at [1, 2] + [1, 2, 3]: Lists are worked on item by item and need one count; here are a list of 2 items and a list of 3 items.',
    ],
    [
      '[1, 2] < [3, 4]',
      'domain at [1, 2] < [3, 4]: Lists have no order, so `<` does not hold between them; `==` or `!=` was expected.',
    ],
    [
      '[1] == 1',
      'unit-mismatch at [1] == 1: The left side is a list of 1 item and the right side is a plain number; only values of one kind can be compared.',
    ],
    [
      'sum([1 mm, 2])',
      'unit-mismatch at sum([1 mm, 2]): The left side is a length and the right side is a plain number; a sum needs two values of one kind (a length needs its unit, as in `12 mm`).',
    ],
    [
      'count(3 mm)',
      'unit-mismatch at count(3 mm): count needs a list such as `[2 mm, 3 mm]`, and this is a length.',
    ],
    [
      'standin([2, 3], 0.1)',
      'unit-mismatch at standin([2, 3], 0.1): A single value was expected, and this is a list of 2 items.',
    ],
    [
      'each(k, 3, 1, k)',
      'domain at each(k, 3, 1, k): `each` counts upwards, and 1 is below 3; a list is never empty.',
    ],
    [
      'each(k, 1/2, 1, k)',
      'domain at each(k, 1/2, 1, k): The first count of `each` is a whole number, and this is none.',
    ],
    [
      '[1, 1/0]',
      'division-by-zero at 0: The divisor is exactly 0; a value other than 0 was expected.',
    ],
  ])('%s', (source, error) => {
    expect(errorOf(source)).toBe(error);
  });

  it('names the limit on items, for a counter and for lists of lists alike', () => {
    const most = LANGUAGE_LIMITS.listItems;
    const limit = (size: number | bigint) =>
      `The list would have ${size} items; the limit is ${most}.`;
    expect(errorOf(`count(each(k, 1, ${most}, k))`)).toBe('number');
    expect(errorOf(`each(k, 1, ${most + 1}, k)`)).toContain(limit(most + 1));
    expect(errorOf(`each(k, 1, 10^30, k)`)).toContain(limit(10n ** 30n));
    expect(errorOf('each(k, 1, 100, each(n, 1, 11, k n))')).toContain(limit(1100));
    expect(errorOf('a = [1, 2]\nb = [a, a]\nc = [b, b]\nd = [c, c, c]')).toBe('list');
    expect(errorOf(`${'['.repeat(9)}1${']'.repeat(9)}`)).toContain(
      'nested 9 deep here; the limit is 8',
    );
  });
});
