/**
 * A quick proof that a number made of roots of integers has no root among such numbers.
 *
 * Let x lie in a field M of roots of integers and p be a prime at which M splits. If x = r·μ² with rational r and μ in M,
 * then all images of x modulo p (one for each choice of signs of the roots) have the quadratic character of r. So two images of
 * different character prove that no rational multiple of x is a square in M, nor in any larger field of roots of integers.
 * With many roots no word-size prime splits; then p is looked for among the numbers 1 + 8t·∏ q, at which every root √q exists by
 * quadratic reciprocity.
 */

import type { Int } from './int';
import { bigGcd, isProbablePrime } from './integers';
import { character, homOf, PATIENCE } from './residues';
import type { El } from './tower';

/** Most roots for which word-size primes are tried. */
const WORD_PRIMES = 7;

/** Below this, the primality test of integers.ts is a proof. */
const PROVEN = 10n ** 24n;

/** True proves that no rational multiple of x (of a flat tower) is a square in any field of roots of integers. */
export function isSeparated(x: El): boolean {
  return x.t.k <= WORD_PRIMES ? byWordPrimes(x) : byLargePrime(x);
}

function byWordPrimes(x: El): boolean {
  const effort = { left: PATIENCE };
  const seen = new Map<number, number>();
  for (let j = 0; j < 24; j++) {
    const h = homOf(x.t, j, effort);
    if (h === null) return false;
    x.t.field.budget.charge(x.c.length + 5);
    const c = character(x, x.t, h);
    if (c === 0) continue;
    const other = seen.get(h.p);
    if (other === undefined) seen.set(h.p, c);
    else if (other !== c) return true;
  }
  return false;
}

function byLargePrime(x: El): boolean {
  const f = x.t.field;
  const radicands = x.t.gens.map((g) => BigInt(g.int));
  const step = 8n * radicands.reduce((a, b) => a * b, 1n);
  if (step > 1n << 2000n || x.m === null) return false;
  if (!radicands.every((q) => q < PROVEN && isProbablePrime(q))) return false;
  let p = step + 1n;
  for (let tries = 0; !isProbablePrime(p); p += step, tries++) {
    f.budget.charge(2000);
    if (tries > 3000) return false;
  }
  if (!isProvenPrime(p, [2n, ...radicands.filter((q) => q !== 2n)])) return false;
  f.budget.charge(2000 * radicands.length);
  const roots: bigint[] = [];
  for (const q of radicands) {
    const r = squareRootModulo(q, p);
    if (r === null) return false;
    roots.push(r);
  }
  let first: boolean | null = null;
  for (let pattern = 0; pattern < 24; pattern++) {
    // The signs of the roots in this image: a fixed scattering of the pattern over the positions.
    const image = imageModulo(
      x,
      roots.map((r, i) => (((pattern * (2 * i + 1)) >> (i % 5)) & 1 ? p - r : r)),
      p,
    );
    if (image === 0n) continue;
    const isResidue = powModulo(image, (p - 1n) / 2n, p) === 1n;
    if (first === null) first = isResidue;
    else if (first !== isResidue) return true;
  }
  return false;
}

/**
 * Proves p prime from primes whose product F divides p − 1 and exceeds √p: for each q an a with a^(p−1) = 1 and
 * a^((p−1)/q) − 1 prime to p (Pocklington 1914).
 */
function isProvenPrime(p: bigint, primes: readonly bigint[]): boolean {
  const product = primes.reduce((a, b) => a * b, 1n);
  if (product * product <= p) return false;
  return primes.every((q) => {
    for (let a = 2n; a < 60n; a++) {
      if (powModulo(a, p - 1n, p) !== 1n) return false;
      if (bigGcd(powModulo(a, (p - 1n) / q, p) - 1n, p) === 1n) return true;
    }
    return false;
  });
}

function imageModulo(x: El, roots: readonly bigint[], p: bigint): bigint {
  let sum = 0n;
  (x.m as readonly bigint[]).forEach((m, j) => {
    let v = BigInt(x.c[j] as Int);
    for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n)
      if (rest & 1n) v = (v * (roots[i] as bigint)) % p;
    sum += v;
  });
  const v = (sum * BigInt(x.den)) % p;
  return v < 0n ? v + p : v;
}

function powModulo(b: bigint, e: bigint, p: bigint): bigint {
  let r = 1n;
  let x = b % p;
  for (let k = e; k > 0n; k >>= 1n) {
    if (k & 1n) r = (r * x) % p;
    x = (x * x) % p;
  }
  return r;
}

/** A root of a modulo p (Tonelli 1891, Shanks 1973), or null. */
function squareRootModulo(a: bigint, p: bigint): bigint | null {
  let q = p - 1n;
  let s = 0;
  while ((q & 1n) === 0n) {
    q >>= 1n;
    s++;
  }
  let z = 2n;
  while (z < 500n && powModulo(z, (p - 1n) / 2n, p) === 1n) z++;
  let m = s;
  let c = powModulo(z, q, p);
  let t = powModulo(a, q, p);
  let r = powModulo(a, (q + 1n) / 2n, p);
  while (t !== 1n) {
    let i = 0;
    for (let u = t; u !== 1n; i++) {
      if (i === m) return null;
      u = (u * u) % p;
    }
    const b = powModulo(c, 1n << BigInt(m - i - 1), p);
    m = i;
    c = (b * b) % p;
    t = (t * c) % p;
    r = (r * b) % p;
  }
  return (r * r - a) % p === 0n ? r : null;
}
