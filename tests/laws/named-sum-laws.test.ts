import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluateCells, type Result } from '../../lib/language/index';

const atom = fc.constantFrom(
  '2',
  '3/4',
  'sqrt(2)',
  'sqrt(5)',
  'i',
  'cbrt(2)',
  'cbrt(9)',
  'cos(2*pi/7)',
  'sin(pi/7)',
  'cos(4*pi/9)',
  'cos(pi/5)',
  '(-1)^(1/7)',
  'cbrt(1+i)',
  'root(x^3-x-1, 1)',
);
const { expression } = fc.letrec<{ expression: string }>((tie) => ({
  expression: fc.oneof(
    { maxDepth: 2, withCrossShrink: true },
    atom,
    fc
      .tuple(fc.constantFrom('+', '-', '*', '/'), tie('expression'), tie('expression'))
      .map(([operator, a, b]) => `(${a})${operator}(${b})`),
    tie('expression').map((a) => `sqrt(${a})`),
    tie('expression').map((a) => `(${a})^2`),
    tie('expression').map((a) => `conj(${a})`),
  ),
}));

/** The last line's result; limits of degree and work are met often here and say nothing about writing. */
function resultOf(...lines: string[]): Result {
  const cells = lines.map((source, index) => ({ id: `${index}`, source }));
  const results = evaluateCells(cells);
  return results[results.length - 1]?.results[0] as Result;
}

const RUNS = { numRuns: 40 };

describe('a number beyond square roots, written', () => {
  it('reads back as the same number', () => {
    fc.assert(
      fc.property(expression, (source) => {
        const result = resultOf(source);
        fc.pre(result.kind === 'number');
        const back = resultOf(result.exact.text);
        fc.pre(back.kind !== 'error' || !back.error.code.startsWith('limit'));
        expect(back, `${source} is written ${result.exact.text}`).toMatchObject({
          kind: 'number',
          degree: result.degree,
          minimalPolynomial: result.minimalPolynomial,
          decimal: { re: result.decimal.re, im: result.decimal.im },
        });
      }),
      RUNS,
    );
  });

  it('is written alike whatever was evaluated before it', () => {
    fc.assert(
      fc.property(expression, expression, (first, source) => {
        const alone = resultOf(source);
        const after = resultOf(first, source);
        expect(after).toEqual(alone);
      }),
      { numRuns: 12 },
    );
  });
});
