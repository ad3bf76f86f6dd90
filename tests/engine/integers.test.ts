import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as Z from '../../lib/engine/int';
import {
  bitLength,
  exactRoot,
  isProbablePrime,
  isqrt,
  splitSquare,
} from '../../lib/engine/integers';
import { mulMod, powMod, wordPrime } from '../../lib/engine/residues';

const big = fc.oneof(
  fc.bigInt({ min: -(1n << 54n), max: 1n << 54n }),
  fc.bigInt({ min: -(1n << 200n), max: 1n << 200n }),
  fc.constantFrom(
    0n,
    1n,
    -1n,
    9007199254740991n,
    9007199254740992n,
    -9007199254740991n,
    -9007199254740992n,
  ),
);
const natural = fc.bigInt({ min: 0n, max: 1n << 4000n });

describe('hybrid integers', () => {
  it('add, subtract, multiply and divide as bigints do, in canonical form', () => {
    fc.assert(
      fc.property(big, big, (a, b) => {
        const [x, y] = [Z.small(a), Z.small(b)];
        expect(Z.add(x, y)).toBe(Z.small(a + b));
        expect(Z.sub(x, y)).toBe(Z.small(a - b));
        expect(BigInt(Z.mul(x, y))).toBe(a * b);
        expect(typeof Z.mul(x, y)).toBe(typeof Z.small(a * b));
        if (b !== 0n) {
          expect(BigInt(Z.quotient(Z.mul(x, y), y))).toBe(a);
          expect(Z.divides(y, Z.mul(x, y))).toBe(true);
        }
        expect(BigInt(Z.neg(x))).toBe(-a);
        expect(Z.residue(x, 8388593, 8388593n)).toBe(
          Number(((a % 8388593n) + 8388593n) % 8388593n),
        );
      }),
    );
  });

  it('have the greatest common divisor of bigints', () => {
    const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? (a < 0n ? -a : a) : gcd(b, a % b));
    fc.assert(
      fc.property(big, big, big, (a, b, c) => {
        expect(BigInt(Z.gcd(Z.small(a * c), Z.small(b * c)))).toBe(gcd(a * c, b * c));
      }),
    );
  });
});

describe('whole numbers', () => {
  it('integer roots are the floor of the root', () => {
    fc.assert(
      fc.property(natural, (n) => {
        const r = isqrt(n);
        expect(r * r <= n && n < (r + 1n) * (r + 1n)).toBe(true);
        expect(exactRoot(n * n)).toBe(n);
        expect(exactRoot(n * n + 1n)).toBe(n === 0n ? 1n : null);
      }),
    );
    expect(() => isqrt(-1n)).toThrow(RangeError);
    expect(exactRoot(-4n)).toBeNull();
  });

  it('bit lengths bound the number', () => {
    fc.assert(
      fc.property(natural, (n) => {
        const b = BigInt(bitLength(n));
        expect(n < 1n << b && (n === 0n || n >= 1n << (b - 1n))).toBe(true);
      }),
    );
  });

  it('the square part is split off and the factors multiply back', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 1n, max: 10n ** 12n }),
        fc.bigInt({ min: 1n, max: 10n ** 5n }),
        (n, s) => {
          const split = splitSquare(n * s * s);
          const rest = split.factors.reduce((a, b) => a * b, 1n);
          expect(split.square * split.square * rest).toBe(n * s * s);
          expect(new Set(split.factors).size).toBe(split.factors.length);
          if (split.complete) expect(split.factors.every(isProbablePrime)).toBe(true);
          expect(exactRoot(rest) === null || rest === 1n).toBe(true);
        },
      ),
    );
  });

  it('finds the square of a large prime beside another, and knows when it cannot split', () => {
    const p = 2n ** 61n - 1n;
    expect(splitSquare(p * p * 6n)).toEqual({ square: p, factors: [2n, 3n], complete: true });
    const hard = (2n ** 107n - 1n) * (2n ** 127n - 1n);
    expect(splitSquare(hard)).toEqual({ square: 1n, factors: [hard], complete: false });
  });
});

describe('residues', () => {
  it('products modulo word primes are exact', () => {
    fc.assert(
      fc.property(fc.nat({ max: 2000 }), fc.nat(), fc.nat(), (j, a, b) => {
        const p = wordPrime(j);
        const [x, y] = [a % p, b % p];
        expect(mulMod(x, y, p, 1 / p)).toBe(Number((BigInt(x) * BigInt(y)) % BigInt(p)));
        if (x !== 0) expect(powMod(x, p - 1, p, 1 / p)).toBe(1);
      }),
    );
  });

  it('word primes descend from 2^26 and are prime', () => {
    for (let j = 0; j < 200; j++) {
      expect(isProbablePrime(BigInt(wordPrime(j)))).toBe(true);
      expect(wordPrime(j + 1)).toBeLessThan(wordPrime(j));
    }
    expect(wordPrime(0)).toBe(67108859);
  });
});
