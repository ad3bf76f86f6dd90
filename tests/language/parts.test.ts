import { describe, expect, it } from 'vitest';
import { terminatingDecimal } from '@/lib/language/decimals';
import { orderByDependence } from '@/lib/language/graph';
import { ACTIONS } from '@/lib/language/functions/index';
import { FUNCTIONS } from '@/lib/language/names';
import { boundsOfPi } from '@/lib/engine/pi';
import { noticesOf } from '@/lib/language/notices';
import { readLine } from '@/lib/language/read';
import { readStep } from '@/lib/language/settings';
import { typesetMark, typesetStatement } from '@/lib/language/typeset';
import { findNearest } from '@/lib/language/words';

const range = (from: number, to: number) =>
  Array.from({ length: to - from + 1 }, (_, index) => from + index);

describe('π', () => {
  it('lies between bounds that the digits of its first sixty places confirm', () => {
    // 60 places from memory; OEIS A000796.
    const digits = 314159265358979323846264338327950288419716939937510582097494n;
    const { low, high } = boundsOfPi(180);
    expect((low * 10n ** 59n) >> 180n).toBeLessThanOrEqual(digits);
    expect((high * 10n ** 59n) >> 180n).toBeGreaterThanOrEqual(digits);
    expect(high - low).toBe(2n);
  });

  it('bounds of more bits lie within those of fewer', () => {
    for (const bits of [8, 64, 500, 3000]) {
      const [wide, narrow] = [boundsOfPi(bits), boundsOfPi(bits + 40)];
      expect(narrow.low >> 40n).toBeGreaterThanOrEqual(wide.low);
      expect(narrow.high).toBeLessThanOrEqual(wide.high << 40n);
    }
  });
});

describe('the order of evaluation', () => {
  it('puts what is read first and names cycles apart from what only leads to them', () => {
    const { order, cycles } = orderByDependence([[1], [2], [1], [0], []]);
    expect(order.indexOf(1)).toBeLessThan(order.indexOf(0));
    expect(order.indexOf(0)).toBeLessThan(order.indexOf(3));
    expect([...cycles.keys()].sort()).toEqual([1, 2]);
  });

  it('takes a chain of a hundred thousand without recursion', () => {
    const { order, cycles } = orderByDependence(
      range(0, 99_999).map((index) => (index === 99_999 ? [] : [index + 1])),
    );
    expect(order[0]).toBe(99_999);
    expect(cycles.size).toBe(0);
  });
});

describe('decimals that end', () => {
  it.each([
    [1n, 2n, '0.5'],
    [-1n, 8n, '-0.125'],
    [1000n, 1n, '1000'],
    [7n, 250n, '0.028'],
    [0n, 7n, '0'],
    [6n, 3n, '2'],
    [1n, 3n, null],
    [5n, 14n, null],
  ])('%s/%s', (n, d, text) => expect(terminatingDecimal(n, d)).toBe(text));
});

describe('cutting steps', () => {
  it.each([
    ['0.5 mm', { n: 1n, d: 2n }],
    ['1/64 in', { n: 127n, d: 320n }],
    ['1 cm', { n: 10n, d: 1n }],
    ['2 ft', { n: 3048n, d: 5n }],
  ])('%s', (text, step) => expect(readStep(text)).toEqual({ kind: 'step', step }));

  it.each([
    '',
    '0.5',
    '0 mm',
    '1/0 mm',
    '-1 mm',
    '1 deg',
    '1 mm^2',
    'R',
    'R = 1 mm',
    '1 mm + 1 mm',
    'x'.repeat(200),
  ])('refuses %s', (text) => {
    expect(readStep(text).kind).toBe('problem');
  });
});

describe('names', () => {
  it('every function of the table has an action, root, each and solve apart, whose arguments are not all values', () => {
    const names = FUNCTIONS.map(({ name }) => name);
    expect(names.filter((name) => !ACTIONS.has(name))).toEqual(['root', 'solve', 'each']);
  });

  it.each([
    ['sqtr', 'sqrt'],
    ['SQRT', 'sqrt'],
    ['pich', 'pitch'],
    ['sagita', 'sagitta'],
    ['zz', null],
    ['quoin', null],
  ])('nearest to %s', (name, nearest) => expect(findNearest(name, ['pitch', 'R'])).toBe(nearest));
});

describe('typesetting', () => {
  it.each([
    ['R', 'R'],
    ['R_1', 'R_{1}'],
    ['R1', 'R_{1}'],
    ['pitch', '\\mathrm{pitch}'],
    ['pitch_in', '\\mathrm{pitch}_{\\mathrm{in}}'],
    ['alpha', '\\alpha'],
    ['alpha_2', '\\alpha_{2}'],
    ['α', '{\\alpha}'],
    ['Σ', '{\\Sigma}'],
    ['R_a_1', 'R_{a,1}'],
    ['R_', 'R'],
    ['é', '\\acute{e}'],
  ])('mark %s', (mark, tex) => expect(typesetMark(mark)).toBe(tex));

  it.each([
    ['1/2 R', '\\frac{1}{2}\\,R'],
    ['2πR', '2\\pi\\,R'],
    ['1200 mm', '1200\\,\\mathrm{mm}'],
    ['30°', '30^{\\circ}'],
    ['√(2+√3)', '\\sqrt{2+\\sqrt{3}}'],
    ['(a+b)/(c-d)', '\\frac{a+b}{c-d}'],
    ['2*-3', '2\\cdot \\left(-3\\right)'],
    ['a <= b', 'a \\le b'],
    ['sin(x)^2', '{\\left(\\sin\\left(x\\right)\\right)}^{2}'],
  ])('line %s', (source, tex) => {
    const reading = readLine(source);
    expect(reading.kind === 'statement' && typesetStatement(reading.statement)).toBe(tex);
  });
});

describe('notices of readings that may surprise', () => {
  const noticed = (source: string) => {
    const reading = readLine(source);
    return reading.kind === 'statement'
      ? noticesOf(reading.statement, source).map(({ message, from, to }) => [
          source.slice(from, to),
          message,
        ])
      : null;
  };

  it.each(['2 R', '1/2', 'R/2 + s', '3/4 in', 'R / 25 mm', 'turn/34', '(1/2) R', '√2 R'])(
    'none for %s',
    (source) => expect(noticed(source)).toEqual([]),
  );

  it('a divisor followed by a factor', () => {
    expect(noticed('1/2R')).toEqual([
      [
        '2R',
        '`/ 2 R` divides by `2` and then multiplies by `R`; to divide by both write `/ (2 R)`.',
      ],
    ]);
  });

  it('a number over a quantity', () => {
    expect(noticed('sqrt(2)/2 mm')?.[0]?.[0]).toBe('2 mm');
  });

  it('a root with an exponent', () => {
    expect(noticed('√2²')?.[0]?.[0]).toBe('√2²');
  });
});
