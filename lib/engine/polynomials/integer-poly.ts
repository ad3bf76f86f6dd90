/**
 * Polynomials over the integers, as arrays of BigInt with the constant term first.
 *
 * Every array handed out is normal: no leading zero coefficient, the zero polynomial is `[]`.
 * Products use Kronecker's substitution (Kronecker 1882; see von zur Gathen & Gerhard, Modern Computer
 * Algebra, §8.4): both factors are packed into one big integer each, so that the whole product is one
 * BigInt multiplication, which is asymptotically fast and has no inner loop of ours.
 */
import { bigGcd, bitLength } from '../integers';

export type IntegerPoly = readonly bigint[];

export const degreeOf = (f: IntegerPoly): number => f.length - 1;

export const leadingOf = (f: IntegerPoly): bigint => f[f.length - 1] ?? 0n;

/** Drops leading zeros. Works on a copy only where there is something to drop. */
export function trim(f: IntegerPoly): IntegerPoly {
  let length = f.length;
  while (length > 0 && f[length - 1] === 0n) length--;
  return length === f.length ? f : f.slice(0, length);
}

const absolute = (n: bigint): bigint => (n < 0n ? -n : n);

/** Greatest common divisor, never negative; gcd(0, 0) = 0. */
export const gcdOf = (a: bigint, b: bigint): bigint => bigGcd(absolute(a), absolute(b));

export const maxBits = (f: IntegerPoly): number =>
  f.reduce((most, c) => Math.max(most, bitLength(c)), 0);

export const isEqual = (f: IntegerPoly, g: IntegerPoly): boolean =>
  f.length === g.length && f.every((c, k) => c === g[k]);

export function addPoly(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  const sum: bigint[] = [];
  for (let k = 0; k < Math.max(f.length, g.length); k++) sum.push((f[k] ?? 0n) + (g[k] ?? 0n));
  return trim(sum);
}

export function subtractPoly(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  const difference: bigint[] = [];
  for (let k = 0; k < Math.max(f.length, g.length); k++) {
    difference.push((f[k] ?? 0n) - (g[k] ?? 0n));
  }
  return trim(difference);
}

export const scalePoly = (f: IntegerPoly, by: bigint): IntegerPoly =>
  by === 0n ? [] : f.map((c) => c * by);

/** Packs f into f(2^width); signs are handled by ordinary integer addition. */
function pack(f: IntegerPoly, width: bigint): bigint {
  const packHalf = (from: number, to: number): bigint => {
    if (to - from === 1) return f[from] as bigint;
    const middle = (from + to) >> 1;
    return packHalf(from, middle) + (packHalf(middle, to) << (width * BigInt(middle - from)));
  };
  return packHalf(0, f.length);
}

/** Reads `count` signed digits to the base 2^width back out of a packed value. */
function unpack(packed: bigint, width: number, count: number): bigint[] {
  const digits: bigint[] = [];
  const read = (value: bigint, digitsHere: number): void => {
    if (digitsHere === 1) {
      digits.push(value);
      return;
    }
    const lower = digitsHere >> 1;
    const bits = width * lower;
    // The lower part is the signed residue, so that its own digits come out signed as well.
    const low = BigInt.asIntN(bits, value);
    read(low, lower);
    read((value - low) >> BigInt(bits), digitsHere - lower);
  };
  read(packed, count);
  return digits;
}

export function multiplyPoly(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  if (f.length === 0 || g.length === 0) return [];
  if (f.length === 1) return scalePoly(g, f[0] as bigint);
  if (g.length === 1) return scalePoly(f, g[0] as bigint);
  const terms = Math.min(f.length, g.length);
  const width = maxBits(f) + maxBits(g) + bitLength(BigInt(terms)) + 2;
  const packed = pack(f, BigInt(width)) * pack(g, BigInt(width));
  return trim(unpack(packed, width, f.length + g.length - 1));
}

export const derivativeOf = (f: IntegerPoly): IntegerPoly =>
  trim(f.slice(1).map((c, k) => c * BigInt(k + 1)));

/** f at an integer, by Horner's rule. */
export function evaluateAt(f: IntegerPoly, x: bigint): bigint {
  let value = 0n;
  for (let k = f.length - 1; k >= 0; k--) value = value * x + (f[k] as bigint);
  return value;
}

/** Greatest common divisor of the coefficients, with the sign of the leading one; 0 for the zero polynomial. */
export function contentOf(f: IntegerPoly): bigint {
  let content = 0n;
  for (const c of f) {
    content = gcdOf(content, c);
    if (content === 1n) break;
  }
  return leadingOf(f) < 0n ? -content : content;
}

/** f divided by its content: primitive, leading coefficient positive. */
export function primitivePart(f: IntegerPoly): IntegerPoly {
  const content = contentOf(f);
  return content === 0n || content === 1n ? f : f.map((c) => c / content);
}

/**
 * f / g where g divides f over the integers, else null.
 * Cost: deg g · (deg f − deg g) products; it stops at the first coefficient that does not divide.
 */
export function divideExactly(f: IntegerPoly, g: IntegerPoly): IntegerPoly | null {
  if (g.length === 0) throw new RangeError('division by the zero polynomial');
  if (f.length === 0) return [];
  if (f.length < g.length) return null;
  const rest = [...f];
  const lead = leadingOf(g);
  const quotient = new Array<bigint>(f.length - g.length + 1).fill(0n);
  for (let k = quotient.length - 1; k >= 0; k--) {
    const top = rest[k + g.length - 1] as bigint;
    if (top === 0n) continue;
    if (top % lead !== 0n) return null;
    const q = top / lead;
    quotient[k] = q;
    for (let j = 0; j < g.length; j++) rest[k + j] = (rest[k + j] as bigint) - q * (g[j] as bigint);
  }
  return rest.some((c) => c !== 0n) ? null : trim(quotient);
}

/** The remainder of f divided by a monic g. */
export function restByMonic(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  const n = degreeOf(g);
  if (f.length <= n) return f;
  const rest = [...f];
  for (let k = rest.length - 1; k >= n; k--) {
    const q = rest[k] as bigint;
    if (q === 0n) continue;
    for (let j = 0; j < n; j++) {
      const c = g[j] as bigint;
      if (c !== 0n) rest[k - n + j] = (rest[k - n + j] as bigint) - q * c;
    }
  }
  return trim(rest.slice(0, n));
}

/** Square of the Euclidean norm of the coefficients. */
export const normSquared = (f: IntegerPoly): bigint => f.reduce((sum, c) => sum + c * c, 0n);

/** Least integer whose square is at least n ≥ 0 (Newton's iteration on integers). */
export function ceilingRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let x = 1n << BigInt((bitLength(n) + 1) >> 1);
  for (;;) {
    const next = (x + n / x) >> 1n;
    if (next >= x) break;
    x = next;
  }
  return x * x === n ? x : x + 1n;
}
