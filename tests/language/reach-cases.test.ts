import { describe, expect, it } from 'vitest';
import { evaluateExpression } from '@/lib/language/index';
import reference from '../reference/language-reach-cases.json';

interface Case {
  id: string;
  kind: string;
  expression: string;
  rhs?: string;
  equal?: boolean;
  zero?: boolean;
  value?: string | null;
  imaginary?: string;
  degree?: number | null;
  constructible?: boolean;
  galoisGroup?: string;
  minimalPolynomial?: string[] | null;
}

const cases = reference.cases as Case[];
const DIGITS = 60;

const numberOf = (expression: string) => {
  const result = evaluateExpression(expression, { digits: DIGITS });
  if (result.kind !== 'number') throw new Error(`${expression} is no number: ${result.kind}`);
  return result;
};

/** Agreement to 57 significant digits, decided exactly: the reference is cut, not rounded, at its end. */
const agrees = (ours: string, theirs: string): void => {
  const plain = (text: string): string => `(${text.replace(/e([+-]?\d+)$/, '*10^($1)')})`;
  const near = `abs(${plain(ours)} - ${plain(theirs)}) <= abs(${plain(theirs)}) * 10^-57`;
  expect(evaluateExpression(near)).toMatchObject({ kind: 'truth', truth: { value: true } });
};

describe('values and verdicts against Calcium, SymPy and PARI/GP', () => {
  it.each(cases.filter(({ kind }) => kind === 'value' || kind === 'verdict'))(
    '$id $expression',
    ({ expression, value, imaginary, degree, constructible, minimalPolynomial }) => {
      const result = numberOf(expression);
      if (typeof value === 'string') agrees(result.decimal.re, value);
      if (imaginary !== undefined) agrees(result.decimal.im ?? '0', imaginary);
      if (typeof degree === 'number') expect(result.degree).toBe(degree);
      if (Array.isArray(minimalPolynomial))
        expect(result.minimalPolynomial).toEqual(minimalPolynomial);
      if (constructible !== undefined) {
        expect(result.reach.straightedgeAndCompass).toBe(constructible);
        expect(result.tower === null).toBe(!constructible);
      }
    },
  );

  it.each(cases.filter(({ kind }) => kind === 'equality'))(
    '$id $expression',
    ({ expression, rhs, equal, constructible, degree }) => {
      expect(evaluateExpression(`(${expression}) == (${rhs})`)).toMatchObject({
        kind: 'truth',
        truth: { value: equal },
      });
      const result = numberOf(expression);
      if (typeof degree === 'number') expect(result.degree).toBe(degree);
      if (constructible !== undefined) {
        expect(result.reach.straightedgeAndCompass).toBe(constructible);
      }
    },
  );

  it.each(cases.filter(({ kind }) => kind === 'zero'))(
    '$id $expression',
    ({ expression, zero }) => {
      expect(evaluateExpression(`(${expression}) == 0`)).toMatchObject({
        kind: 'truth',
        truth: { value: zero },
      });
    },
  );

  it.each(cases.filter(({ kind }) => kind === 'error'))('$id $expression', ({ expression }) => {
    expect(evaluateExpression(expression)).toMatchObject({
      kind: 'error',
      error: { code: 'division-by-zero' },
    });
  });
});
