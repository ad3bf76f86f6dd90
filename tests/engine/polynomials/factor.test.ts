import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factorOverIntegers, isIrreducible } from '../../../lib/engine/polynomials/factor';
import {
  isEqual,
  leadingOf,
  multiplyPoly,
  primitivePart,
  trim,
  type IntegerPoly,
} from '../../../lib/engine/polynomials/integer-poly';

const poly = (minDegree: number, maxDegree: number): fc.Arbitrary<IntegerPoly> =>
  fc
    .array(fc.bigInt({ min: -60n, max: 60n }), { minLength: minDegree, maxLength: maxDegree })
    .chain((low) => fc.bigInt({ min: 1n, max: 9n }).map((lead) => trim([...low, lead])));

const productOf = (factors: readonly { poly: IntegerPoly; multiplicity: number }[]): IntegerPoly =>
  factors.reduce<IntegerPoly>(
    (product, factor) => {
      let power = product;
      for (let k = 0; k < factor.multiplicity; k++) power = multiplyPoly(power, factor.poly);
      return power;
    },
    [1n],
  );

/** f(x+√p)·f(x−√p): one step of Swinnerton-Dyer's polynomials, the minimal polynomials of √2+√3+√5+…. */
function adjoinRoot(f: IntegerPoly, p: bigint): IntegerPoly {
  let plain: bigint[] = [];
  let root: bigint[] = [];
  for (const c of [...f].reverse()) {
    const nextPlain = new Array<bigint>(plain.length + 1).fill(0n);
    const nextRoot = new Array<bigint>(plain.length + 1).fill(0n);
    plain.forEach((a, k) => {
      const b = root[k] ?? 0n;
      nextPlain[k + 1] = (nextPlain[k + 1] ?? 0n) + a;
      nextRoot[k + 1] = (nextRoot[k + 1] ?? 0n) + b;
      nextPlain[k] = (nextPlain[k] ?? 0n) + p * b;
      nextRoot[k] = (nextRoot[k] ?? 0n) + a;
    });
    nextPlain[0] = (nextPlain[0] ?? 0n) + c;
    plain = nextPlain;
    root = nextRoot;
  }
  const squares = multiplyPoly(plain, plain);
  const others = multiplyPoly(trim(root), trim(root));
  return trim(squares.map((c, k) => c - p * (others[k] ?? 0n)));
}

const swinnertonDyer = (primes: readonly bigint[]): IntegerPoly =>
  primes.reduce<IntegerPoly>((f, p) => adjoinRoot(f, p), [0n, 1n]);

const totient = (n: number): number => {
  let count = 0;
  for (let k = 1; k <= n; k++) {
    let [a, b] = [k, n];
    while (b !== 0) [a, b] = [b, a % b];
    if (a === 1) count++;
  }
  return count;
};

describe('factorOverIntegers', () => {
  it('multiplies back to the primitive part of its argument', () => {
    fc.assert(
      fc.property(poly(1, 7), poly(1, 5), poly(0, 3), (a, b, c) => {
        const f = multiplyPoly(multiplyPoly(a, b), c);
        const factors = factorOverIntegers(f);
        expect(isEqual(productOf(factors), primitivePart(f))).toBe(true);
        expect(factors.every(({ poly: g }) => leadingOf(g) > 0n)).toBe(true);
      }),
    );
  });

  it('returns factors that do not split again', () => {
    fc.assert(
      fc.property(poly(2, 6), poly(2, 6), (a, b) => {
        for (const { poly: g } of factorOverIntegers(multiplyPoly(a, b))) {
          expect(isIrreducible(g)).toBe(true);
        }
      }),
      { numRuns: 40 },
    );
  });

  it('finds repeated factors with their multiplicities', () => {
    const a: IntegerPoly = [-2n, 0n, 1n];
    const b: IntegerPoly = [1n, 3n];
    const f = [a, a, a, b, b].reduce<IntegerPoly>((p, g) => multiplyPoly(p, g), [7n]);
    expect(factorOverIntegers(f)).toEqual([
      { poly: b, multiplicity: 2 },
      { poly: a, multiplicity: 3 },
    ]);
  });

  it('splits xⁿ−1 into one factor of degree φ(d) for every divisor d of n', () => {
    for (const n of [12, 30, 64, 105]) {
      const f = [-1n, ...new Array<bigint>(n - 1).fill(0n), 1n];
      const divisors = Array.from({ length: n }, (_, k) => k + 1).filter((d) => n % d === 0);
      expect(factorOverIntegers(f).map(({ poly: g }) => g.length - 1)).toEqual(
        divisors.map(totient).sort((x, y) => x - y),
      );
    }
  });

  it('proves minimal polynomials of sums of square roots irreducible, degree 64 included', () => {
    const primes = [2n, 3n, 5n, 7n, 11n, 13n];
    for (let count = 1; count <= primes.length; count++) {
      expect(isIrreducible(swinnertonDyer(primes.slice(0, count)))).toBe(true);
    }
  });

  it('separates two such polynomials multiplied together', () => {
    const a = swinnertonDyer([2n, 3n, 5n]);
    const b = swinnertonDyer([2n, 3n, 7n, 11n]);
    expect(factorOverIntegers(multiplyPoly(a, b)).map((factor) => factor.poly)).toEqual([a, b]);
  });

  it('stops when the work allowed is used up', () => {
    const f = swinnertonDyer([2n, 3n, 5n, 7n, 11n]);
    let left = 10_000;
    const charge = (work: number): void => {
      left -= work;
      if (left < 0) throw new Error('spent');
    };
    expect(() => factorOverIntegers(f, charge)).toThrow('spent');
  });

  it('refuses the zero polynomial and calls constants reducible', () => {
    expect(() => factorOverIntegers([])).toThrow(RangeError);
    expect(isIrreducible([5n])).toBe(false);
  });
});
