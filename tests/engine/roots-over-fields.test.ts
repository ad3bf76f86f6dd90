import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createEngine, type Engine, type Num, type Outcome } from '../../lib/engine/index';

const valueOf = <T>(outcome: Outcome<T>): T => {
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return outcome.value;
};

type Make = (e: Engine) => Num;
const whole =
  (n: number): Make =>
  (e) =>
    e.integer(n);
const root2: Make = (e) => e.sqrt(e.integer(2));
const root3: Make = (e) => e.sqrt(e.integer(3));
const cube2: Make = (e) => e.realRoot(e.integer(2), 3);
const cosine =
  (k: bigint, n: bigint): Make =>
  (e) =>
    e.cosTurn(k, n);
const minus =
  (make: Make): Make =>
  (e) =>
    e.neg(make(e));

const plain = fc.integer({ min: -5, max: 5 }).map(whole);
const irrational = fc.constantFrom(
  root2,
  minus(root3),
  cube2,
  cosine(1n, 7n),
  minus(cosine(1n, 9n)),
);
/** Two coefficients of which one is rational: the engine's own products of the root then keep to its degrees. */
const pairs = fc.oneof(fc.tuple(plain, irrational), fc.tuple(irrational, plain));

describe('the root of a polynomial with algebraic coefficients', () => {
  it('put back into it gives exactly 0', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 3 }), pairs, (n, [b, c]) => {
        const e = createEngine({ steps: 1_000_000_000, degree: 300 });
        const outcome = e.attempt(() => {
          const zeros = Array.from({ length: n - 2 }, () => e.integer(0));
          const x = e.nearestRootOf(
            [e.integer(1), ...zeros, b(e), c(e)],
            e.add(e.rational(13n, 7n), e.mul(e.i, e.rational(1n, 3n))),
          );
          // x·(xⁿ⁻¹ + b) is −c.
          const other = e.mul(x, e.add(e.pow(x, BigInt(n - 1)), b(e)));
          expect(e.equal(other, e.neg(c(e)))).toBe(true);
        });
        expect(outcome.kind === 'value' ? '' : outcome.message).toBe('');
      }),
      { numRuns: 25 },
    );
  });

  it.each<[string, Make[], Make, string, string | null, string]>([
    // Roots and polynomials by PARI/GP 2.15.2 (polroots, algdep and polresultant).
    [
      'x³ − √2·x + √3',
      [whole(1), whole(0), minus(root2), root3],
      whole(-1),
      '-1.5836433446252639593',
      null,
      '1 0 0 0 -4 0 -6 0 4 0 -12 0 9',
    ],
    [
      'x⁵ + √2·x + √3',
      [whole(1), whole(0), whole(0), whole(0), root2, root3],
      whole(-1),
      '-0.87076197436715272401',
      null,
      '1 0 0 0 0 0 0 0 -4 0 -6 0 0 0 0 0 4 0 -12 0 9',
    ],
    [
      'x³ − cos(2π/7)·x + cos(4π/7)',
      [whole(1), whole(0), minus(cosine(1n, 7n)), cosine(2n, 7n)],
      whole(1),
      '0.92898874181094161685',
      null,
      '8 0 4 -4 -4 -6 -5 3 4 1',
    ],
    [
      'x² − ∛2·x + 1/3',
      [whole(1), minus(cube2), (e) => e.rational(1n, 3n)],
      whole(1),
      '0.88198617772650694215',
      null,
      '27 0 27 -54 9 0 1',
    ],
    [
      'x⁴ + i·x + √2',
      [whole(1), whole(0), whole(0), (e) => e.i, root2],
      whole(1),
      '0.96654876780683732033',
      '-0.78458767216772462803',
      '1 0 0 0 0 0 2 0 -4 0 0 0 1 0 4 0 4',
    ],
    [
      'x³ − sin(π/11)',
      [whole(1), whole(0), whole(0), (e) => e.neg(e.sinTurn(1n, 22n))],
      whole(1),
      '0.65555984754380049418',
      null,
      '1024 0 0 0 0 0 -2816 0 0 0 0 0 2816 0 0 0 0 0 -1232 0 0 0 0 0 220 0 0 0 0 0 -11',
    ],
  ])('is as outside programs have it: %s', (_, polynomial, near, re, im, coefficients) => {
    const e = createEngine();
    const x = valueOf(
      e.attempt(() =>
        e.nearestRootOf(
          polynomial.map((make) => make(e)),
          near(e),
        ),
      ),
    );
    expect(valueOf(e.attempt(() => e.decimal(x, 20)))).toMatchObject({ re, im });
    expect(e.minimalPolynomial(x).join(' ')).toBe(coefficients);
  });

  it('is found among repeated roots, and comes back as a square root where it is one', () => {
    const e = createEngine();
    const text = e.attempt(() => {
      // (x − √2)²·(x − ∛3)
      const [a, b] = [e.sqrt(e.integer(2)), e.realRoot(e.integer(3), 3)];
      const twice = e.mul(e.integer(2), a);
      return e.write(
        e.nearestRootOf(
          [
            e.integer(1),
            e.neg(e.add(twice, b)),
            e.add(e.integer(2), e.mul(twice, b)),
            e.mul(e.integer(-2), b),
          ],
          e.rational(7n, 5n),
        ),
      ).text;
    });
    expect(valueOf(text)).toBe('sqrt(2)');
  });

  it('is refused by name at a tie and beyond the largest degree', () => {
    const e = createEngine();
    const one = e.integer(1);
    const zeros = (n: number): Num[] => Array.from({ length: n }, () => e.integer(0));
    expect(
      e.attempt(() => e.nearestRootOf([one, e.integer(0), cube2(e)], e.integer(0))),
    ).toMatchObject({ kind: 'outside-domain', code: 'domain' });
    expect(
      e.attempt(() => e.nearestRootOf([one, ...zeros(62), e.cosTurn(1n, 23n), one], e.integer(0))),
    ).toMatchObject({ kind: 'over-limit', code: 'limit-size', limit: 'degree' });
  });
});
