/**
 * Gaussian periods of a Fermat prime p (Gauss 1801, art. 343–366). With the primitive root g, the period η(k, j) is the
 * sum of ζ^(g^(j + 2^k·m)) over m = 0 … (p−1)/2^k − 1, where ζ = e^(2πi/p), k is its level and 0 ≤ j < 2^k.
 * η(0, 0) = −1, and at the last real level, `lastLevel`, η = 2cos(2π·g^j/p).
 */

import { cosineTable } from './fixed-point';

/** The Fermat primes that are known (OEIS A019434). */
export type FermatPrime = 3 | 5 | 17 | 257 | 65537;

export interface Period {
  level: number;
  index: number;
}

export function isFermatPrime(n: number): n is FermatPrime {
  return n === 3 || n === 5 || n === 17 || n === 257 || n === 65537;
}

/** The least primitive root: 3 generates the units modulo every Fermat prime but 3 itself. */
export function primitiveRoot(p: FermatPrime): 2 | 3 {
  return p === 3 ? 2 : 3;
}

/** The level whose periods are 2cos(2πk/p): log₂(p − 1) − 1. */
export function lastLevel(p: FermatPrime): number {
  return Math.log2(p - 1) - 1;
}

/** g⁰, g¹ … g^(p−2) modulo p. */
export function powersOfRoot(p: FermatPrime): Int32Array {
  const powers = new Int32Array(p - 1);
  const g = primitiveRoot(p);
  for (let i = 0, x = 1; i < p - 1; i++, x = (x * g) % p) powers[i] = x;
  return powers;
}

/** η(k+1, 0)·η(k+1, 2^k) = constant + Σ coefficients[i]·η(k, i). */
export interface PeriodProduct {
  constant: number;
  coefficients: Int32Array;
}

/**
 * The product of the two periods that η(k, 0) splits into, for 0 ≤ k < lastLevel, by exact counting: with H the units
 * that are 2^(k+1)-th powers, the product is the sum over h in H of the period that 1 + g^(2^k)·h lies in (all of H taken once
 * for each h, by factoring out the first exponent). Shifting every index by j gives the product below η(k, j).
 * Cost: (p−1)/2^(k+1) look-ups.
 */
export function siblingProduct(p: FermatPrime, k: number): PeriodProduct {
  const powers = powersOfRoot(p);
  const exponents = new Int32Array(p);
  powers.forEach((x, i) => (exponents[x] = i));
  const half = 1 << k;
  const classes = new Int32Array(2 * half);
  let constant = 0;
  for (let i = half; i < p - 1; i += 2 * half) {
    const sum = (1 + at(powers, i)) % p;
    if (sum === 0) constant += (p - 1) / (2 * half);
    else
      classes[at(exponents, sum) % (2 * half)] = at(classes, at(exponents, sum) % (2 * half)) + 1;
  }
  // Exchanging the siblings leaves the product alone, so both halves of `classes` agree and η(k+1, ·) pair into η(k, ·).
  return { constant, coefficients: classes.slice(0, half) };
}

/** Values of all real periods: `of` gives an integer in units of 2^−bits; `error(level)` bounds how far it is off. */
export interface PeriodValues {
  bits: number;
  of(period: Period): bigint;
  error(level: number): bigint;
}

/**
 * Periods of every real level in fixed point: twice the cosines, then sums of two from level to level upwards.
 * Yields between slices. Cost: (p−1)/2 products of `bits` bits and as many sums; space twice that many integers.
 */
export function* periodValues(p: FermatPrime, bits: number): Generator<void, PeriodValues, void> {
  const last = lastLevel(p);
  const cosines = yield* cosineTable(p, (p - 1) / 2, bits);
  const powers = powersOfRoot(p);
  let row: bigint[] = [];
  for (let j = 0; j < 1 << last; j++) {
    const x = at(powers, j);
    row.push(2n * (cosines[Math.min(x, p - x)] as bigint));
  }
  const rows = [row];
  for (let level = last; level > 0; level--) {
    const half = row.length / 2;
    const below = row;
    row = below.slice(0, half).map((value, i) => value + (below[half + i] as bigint));
    rows.unshift(row);
    yield;
  }
  return {
    bits,
    of: ({ level, index }) => rows[level]?.[index] ?? missing(level, index),
    error: (level) => BigInt((p - 1) / 2 ** level),
  };
}

function missing(level: number, index: number): never {
  throw new RangeError(`There is no real period (${level}, ${index}).`);
}

function at(numbers: Int32Array, index: number): number {
  return numbers[index] as number;
}
