import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { type Result, evaluateCells, evaluateExpression } from '@/lib/language/index';

/** The sources of the values stand in the `about` of each file. */
function reference<T>(name: string, key: string): T[] {
  const path = fileURLToPath(new URL(`../reference/${name}.json`, import.meta.url));
  return (JSON.parse(readFileSync(path, 'utf8')) as Record<string, T[]>)[key] ?? [];
}

const codeOf = (result: Result) =>
  result.kind === 'error' ? `${result.error.code}: ${result.error.message}` : result.kind;
const truthOf = (source: string) => {
  const result = evaluateExpression(source);
  return result.kind === 'truth' ? result.truth.value : codeOf(result);
};

describe('values of the trade', () => {
  const values = reference<{
    id: string;
    expression: string;
    constructible: boolean;
    digits: string;
  }>('language-trade-values', 'values');

  it.each(values.filter(({ constructible }) => constructible))(
    '$id has the digits of the outside computation',
    ({ expression, digits }) => {
      const result = evaluateExpression(expression, { digits: 20 });
      if (result.kind !== 'number') throw new Error(codeOf(result));
      const difference = evaluateExpression(
        `abs((${result.decimal.re.replace(/e([+-]\d+)/, '*10^($1)').replace('^(+', '^(')}) - (${digits.replace(/e([+-]\d+)/, '*10^($1)')})) <= abs(${digits.replace(/e([+-]\d+)/, '*10^($1)')}) * 10^-19`,
      );
      expect(difference.kind === 'truth' && difference.truth.value).toBe(true);
      expect(result.reach.straightedgeAndCompass).toBe(true);
    },
  );

  it.each(values.filter(({ constructible }) => !constructible))(
    '$id has the digits of the outside computation and is not reached',
    ({ expression, digits }) => {
      const result = evaluateExpression(expression, { digits: 20 });
      if (result.kind !== 'number') throw new Error(codeOf(result));
      expect(result.decimal.re).toBe(digits);
      expect(result.reach.straightedgeAndCompass).toBe(false);
    },
  );
});

describe('special angles', () => {
  const values = reference<{ angle: string; sin: string; cos: string; tan: string | null }>(
    'language-special-angles',
    'values',
  );

  it.each(values)('sine, cosine and tangent of $angle', ({ angle, sin, cos, tan }) => {
    expect(truthOf(`sin(${angle}) == ${sin}`)).toBe(true);
    expect(truthOf(`cos(${angle}) == ${cos}`)).toBe(true);
    if (tan !== null) {
      expect(truthOf(`tan(${angle}) == ${tan}`)).toBe(true);
      if (tan !== '0') expect(truthOf(`cot(${angle}) == 1/(${tan})`)).toBe(true);
    } else {
      expect(codeOf(evaluateExpression(`tan(${angle})`))).toMatch(/^domain/);
    }
    if (cos !== '0') expect(truthOf(`sec(${angle}) == 1/(${cos})`)).toBe(true);
    if (sin !== '0') expect(truthOf(`csc(${angle}) == 1/(${sin})`)).toBe(true);
  });

  it.each(values)(
    'the angle is found again from its sine, cosine and tangent: $angle',
    ({ angle, sin, cos, tan }) => {
      const turns = `(${angle}) / (2 pi) * turn`;
      expect(truthOf(`acos(${cos}) == ${turns}`)).toBe(true);
      expect(truthOf(`sin(asin(${sin})) == ${sin}`)).toBe(true);
      if (tan !== null) expect(truthOf(`tan(atan(${tan})) == ${tan}`)).toBe(true);
    },
  );
});

describe('nested radicals', () => {
  interface Case {
    id: string;
    kind: string;
    expression: string;
    value?: string;
    degree?: number;
    minimalPolynomial?: string[];
    rhs?: string;
    equal?: boolean;
  }
  // The heaviest degrees are the engine's own concern; here the way through the language is what counts.
  const cases = reference<Case>('engine-cases', 'cases').filter(({ degree = 0 }) => degree <= 32);

  it.each(cases.filter(({ minimalPolynomial }) => minimalPolynomial !== undefined))(
    '$id: $expression',
    ({ expression, degree, minimalPolynomial, rhs, equal }) => {
      const result = evaluateExpression(expression);
      if (result.kind !== 'number') throw new Error(codeOf(result));
      expect(result.degree).toBe(degree);
      expect(result.minimalPolynomial).toEqual(minimalPolynomial);
      if (rhs !== undefined) expect(truthOf(`${expression} == ${rhs}`)).toBe(equal);
      expect(truthOf(`${expression} == ${result.exact.text}`)).toBe(true);
    },
  );
});

/** Figures of an invented job, to 12 significant digits, computed once with 60-digit arithmetic. */
describe('a seventeen-light window', () => {
  const [cell] = evaluateCells(
    [
      {
        id: 'a',
        source:
          'R = 1500 mm\nangle_1 = turn/17\npitch = chord(R, angle_1)\nfoil = pitch/2 - 30 mm\nround_1 = 17 round(pitch, 0.5 mm) - 17 pitch\nC = cos(turn/34)\nS = sin(turn/34)\ninner = 2 (S sqrt(2050^2 - 4) - 2 C) * 1 mm\nsag = sagitta(6000 mm, 24 deg)',
      },
    ],
    { digits: 12, step: '0.5 mm' },
  );
  const figures = new Map(cell?.results.map((result) => [result.mark, result]));

  it.each([
    ['pitch', '551.24855345'],
    ['foil', '245.624276725'],
    ['round_1', '-4.22541'],
    ['inner', '749.440772113'],
    ['sag', '131.114395597'],
  ])('%s', (mark, digits) => {
    const result = figures.get(mark);
    expect(result?.kind === 'number' && result.decimal.re.slice(0, digits.length - 1)).toBe(
      digits.slice(0, -1),
    );
  });

  it('gives the cut size with the side on which it lies', () => {
    expect(figures.get('pitch')).toMatchObject({
      cut: { value: '551', step: '0.5 mm', rounding: 'half-even', direction: 'down' },
    });
  });
});
