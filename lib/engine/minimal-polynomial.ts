/**
 * Degree and minimal polynomial.
 *
 * A number of which all roots are roots of integers has degree 2^r, r the rank over GF(2) of the sets of primes under its
 * roots. In general the characteristic polynomial χ of multiplication by x is worked out modulo word-size primes:
 * the traces of the powers of x from the matrix of x, then Newton's identities. If χ modulo one prime has no
 * repeated factor, the degree is the full one: proven. Otherwise the candidate for the minimal polynomial is checked by
 * putting x into it exactly, and is irreducible because its number of distinct roots divides that of χ, a power of it.
 * The coefficients are put together by the Chinese remainder theorem up to a proven bound on the conjugates.
 */

import { residue, small, type Int } from './int';
import { bigGcd, bitLength, isqrt } from './integers';
import { addEl, isRationalEl, isZeroEl, mulEl, numerator, rationalEl, toDense, toSparse } from './element';
import { join } from './join';
import { place } from './element';
import { radicandOf } from './dense';
import { powMod } from './residues';
import { OverLimit } from './limits';
import type { El, Field, Gen, Tower } from './tower';

/** A complex number by its real and imaginary parts. */
export interface Cx {
  re: El;
  im: El;
}

/** Degree over the rationals. `degree` where a nested value lies in a field above the limit. */
export function degreeOf(x: Cx): number {
  const flat = rankDegree(x);
  if (flat !== null) return flat;
  return solve(x, false).degree;
}

/** Coefficients from the highest power down, primitive, leading one positive. */
export function minimalPolynomialOf(x: Cx): bigint[] {
  if (isRationalEl(x.re) && isZeroEl(x.im)) {
    return [BigInt(x.re.den), -BigInt(numerator(x.re))];
  }
  const rank = rankDegree(x);
  const f = x.re.t.field;
  if (rank !== null) f.budget.within('degree', rank);
  const s = solve(x, true);
  return clear(s.poly as bigint[], s.den);
}

/** From the monic polynomial of den·x to the primitive one of x. */
function clear(monic: bigint[], den: bigint): bigint[] {
  const n = monic.length - 1;
  let power = 1n;
  const out = new Array<bigint>(n + 1);
  for (let j = n; j >= 0; j--) {
    out[j] = (monic[j] as bigint) * power;
    power *= den;
  }
  // out[j] carries den^(n−j), so that f(den·X) is read with X^(n−j) in place j.
  let g = 0n;
  for (const c of out) {
    g = bigGcd(g, c < 0n ? -c : c);
    if (g === 1n) break;
  }
  return out.map((c) => c / g);
}

/** 2^rank for numbers built from roots of integers (and i) alone; null when a nested root is involved. */
function rankDegree(x: Cx): number | null {
  if (!x.re.t.flat || !x.im.t.flat) return null;
  const rows: bigint[] = [];
  const place = new Map<number, bigint>();
  const take = (e: El, extra: bigint): void => {
    if (isZeroEl(e)) return;
    const s = toSparse(e);
    for (const m of s.m as readonly bigint[]) {
      let v = extra;
      for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n) {
        if (!(rest & 1n)) continue;
        const id = (e.t.gens[i] as Gen).id;
        let bit = place.get(id);
        if (bit === undefined) place.set(id, (bit = 2n << BigInt(place.size)));
        v ^= bit;
      }
      for (const r of rows) {
        const w = v ^ r;
        if (w < v) v = w;
      }
      if (v !== 0n) rows.push(v);
    }
  };
  take(x.re, 0n);
  take(x.im, 1n);
  return 2 ** rows.length;
}

interface Solved {
  degree: number;
  /** Monic minimal polynomial of den·x, when asked for. */
  poly: bigint[] | null;
  den: bigint;
}

/** The algebra in which x is multiplied: coordinates of den·x over the tower, with i on top when x is not real. */
interface Setting {
  t: Tower;
  c: readonly Int[];
  imaginary: boolean;
  n: number;
  den: bigint;
}

function settingOf(x: Cx): Setting {
  const f = x.re.t.field;
  const j = join(x.re.t, x.im.t);
  const imaginary = !isZeroEl(x.im);
  const n = 2 ** (j.t.k + (imaginary ? 1 : 0));
  f.budget.within('degree', n);
  const re = toDense(place(x.re, j.t, j.left));
  const im = toDense(place(x.im, j.t, j.right));
  const a = BigInt(re.den);
  const b = BigInt(im.den);
  const den = imaginary ? (a / bigGcd(a, b)) * b : a;
  const scale = (e: El): Int[] => e.c.map((v) => (v === 0 ? 0 : small(BigInt(v) * (den / BigInt(e.den)))));
  return { t: j.t, c: imaginary ? [...scale(re), ...scale(im)] : scale(re), imaginary, n, den };
}

function solve(x: Cx, wantPoly: boolean): Solved {
  const s = settingOf(x);
  const f = s.t.field;
  const primes = new PrimeStream();
  let degree = 0;
  let first: { p: number; sums: number[] } | null = null;
  // Degree: one prime where χ is squarefree settles it; else the number of distinct roots is a lower bound.
  for (let tries = 0; tries < 3 && degree < s.n; tries++) {
    const p = primes.next();
    const sums = traces(s, p, s.n);
    const chi = newton(sums, s.n, p);
    const d = s.n - gcdDegree(chi, derivative(chi, p), p);
    if (d >= degree) {
      degree = d;
      first ??= { p, sums };
    }
  }
  while (s.n % degree !== 0) degree++;
  for (; degree <= s.n; degree *= 2) {
    if (degree === s.n && !wantPoly) return { degree, poly: null, den: s.den };
    const poly = combine(s, degree, f);
    if (degree === s.n || vanishes(x, poly, s.den)) return { degree, poly, den: s.den };
  }
  throw new OverLimit('degree', f.budget.limits.degree, degree);
}

/** Puts den·x into a polynomial, exactly. */
function vanishes(x: Cx, poly: bigint[], den: bigint): boolean {
  const f = x.re.t.field;
  const d = rationalEl(f, small(den), 1);
  const re = mulEl(x.re, d);
  const im = mulEl(x.im, d);
  const minusIm = mulEl(im, rationalEl(f, -1, 1));
  let u = rationalEl(f, 0, 1);
  let v = rationalEl(f, 0, 1);
  for (const c of poly) {
    const nu = addEl(addEl(mulEl(u, re), mulEl(v, minusIm)), rationalEl(f, small(c), 1));
    v = addEl(mulEl(u, im), mulEl(v, re));
    u = nu;
  }
  return isZeroEl(u) && isZeroEl(v);
}

/** The monic polynomial of the given degree whose power sums are (degree/n) times the traces, by CRT up to a proven bound. */
function combine(s: Setting, degree: number, f: Field): bigint[] {
  const bits = boundBits(s, degree);
  f.budget.within('integerBits', bits);
  const primes = new PrimeStream();
  let modulus = 1n;
  let value: bigint[] = new Array<bigint>(degree + 1).fill(0n);
  while (bitLength(modulus) < bits + 2) {
    const p = primes.next();
    const ratio = powMod(s.n / degree, p - 2, p, 1 / p);
    const sums = traces(s, p, degree).map((v) => (v * ratio) % p);
    const coeffs = newton(sums, degree, p);
    const big = BigInt(p);
    const inverse = BigInt(powMod(Number(modulus % big), p - 2, p, 1 / p));
    value = value.map((v, j) => {
      const r = (BigInt(coeffs[j] as number) - (v % big)) * inverse;
      const m = ((r % big) + big) % big;
      return v + modulus * m;
    });
    modulus *= big;
  }
  return value.map((v) => (v > modulus >> 1n ? v - modulus : v));
}

/** Bits enough for every coefficient: (1 + B)^degree, where B bounds every conjugate of den·x. */
function boundBits(s: Setting, degree: number): number {
  const P = 16n;
  const houses: bigint[] = [];
  const house = (t: Tower, c: readonly Int[], size: bigint[]): bigint => {
    let total = 0n;
    for (let i = 0; i < c.length; i++) {
      if (c[i] === 0) continue;
      let v = BigInt(c[i] as Int) << P;
      if (v < 0n) v = -v;
      for (let j = 0; j < t.k; j++) if ((i >> j) & 1) v = (v * (size[j] as bigint)) >> P;
      total += v + 1n;
    }
    return total;
  };
  let t: Tower = s.t.field.base;
  for (const g of s.t.gens) {
    const below = t;
    t = t.child(g);
    houses.push(isqrt(house(below, radicandOf(t), houses) << P) + 1n);
  }
  const half = s.imaginary ? s.c.length / 2 : s.c.length;
  let b = house(s.t, s.c.slice(0, half), houses);
  if (s.imaginary) b += house(s.t, s.c.slice(half), houses);
  const scaled = (1n << P) + b + 1n;
  // log2 of the bound, rounded up in sixteenths by squaring four times.
  const sixteenths = bitLength(scaled ** 16n);
  return Math.ceil((degree * (sixteenths - 16 * Number(P) + 1)) / 16) + 2;
}

/** Primes just below 2²³: sums of 128 products of residues stay exact in a double. */
class PrimeStream {
  private at = 2 ** 23;
  next(): number {
    for (;;) {
      this.at -= 1;
      if (isPrime(this.at)) return this.at;
    }
  }
}

const known = new Map<number, boolean>();

function isPrime(n: number): boolean {
  let r = known.get(n);
  if (r === undefined) {
    r = n % 2 === 1;
    for (let q = 3; r && q * q <= n; q += 2) if (n % q === 0) r = false;
    known.set(n, r);
  }
  return r;
}

/** Tr((den·x)^j) mod p for j = 1 … count, by powers of the matrix of x applied to 1. */
function traces(s: Setting, p: number, count: number): number[] {
  const n = s.n;
  const big = BigInt(p);
  const v = Float64Array.from(s.c, (c) => residue(c, p, big));
  const matrix = new Float64Array(n * n);
  const radicands: (Float64Array | number)[] = [];
  let t: Tower = s.t.field.base;
  for (const g of s.t.gens) {
    t = t.child(g);
    radicands.push(
      g.int !== 0 ? residue(g.int, p, big) : Float64Array.from(radicandOf(t), (c) => residue(c, p, big)),
    );
  }
  if (s.imaginary) radicands.push(p - 1);
  fill(matrix, n, 0, 0, v, radicands, p);
  s.t.field.budget.charge((n * n * count) / 4);
  const out: number[] = [];
  let x = v;
  for (let j = 1; ; j++) {
    out.push((n * (x[0] as number)) % p);
    if (j === count) return out;
    const y = new Float64Array(n);
    for (let r = 0; r < n; r++) {
      let sum = 0;
      const row = r * n;
      for (let c = 0; c < n; c += 64) {
        const end = c + 64 < n ? c + 64 : n;
        for (let i = c; i < end; i++) sum += (matrix[row + i] as number) * (x[i] as number);
        sum %= p;
      }
      y[r] = sum;
    }
    x = y;
  }
}

/** Writes the matrix of multiplication by v into a block of `matrix`: for a + b·s it is [[A, d·B], [B, A]]. */
function fill(
  matrix: Float64Array,
  n: number,
  row: number,
  col: number,
  v: Float64Array,
  radicands: (Float64Array | number)[],
  p: number,
): void {
  const size = v.length;
  if (size === 1) {
    matrix[row * n + col] = v[0] as number;
    return;
  }
  const half = size >> 1;
  const a = v.subarray(0, half);
  const b = v.subarray(half);
  const level = 31 - Math.clz32(half);
  fill(matrix, n, row, col, a, radicands, p);
  fill(matrix, n, row + half, col, b, radicands, p);
  for (let i = 0; i < half; i++) {
    matrix.copyWithin((row + half + i) * n + col + half, (row + i) * n + col, (row + i) * n + col + half);
  }
  const d = radicands[level] as Float64Array | number;
  const db = new Float64Array(half);
  if (typeof d === 'number') for (let i = 0; i < half; i++) db[i] = ((b[i] as number) * d) % p;
  else {
    // The block of b is already in place: its product with the vector d is d·b.
    for (let i = 0; i < half; i++) {
      let sum = 0;
      const at = (row + half + i) * n + col;
      for (let j = 0; j < half; j++) sum = (sum + (matrix[at + j] as number) * (d[j] as number)) % p;
      db[i] = sum;
    }
  }
  fill(matrix, n, row, col + half, db, radicands, p);
}

/** Monic polynomial mod p, highest power first, from its power sums (Newton's identities). */
function newton(sums: readonly number[], degree: number, p: number): number[] {
  const e = [1];
  const inv = 1 / p;
  for (let j = 1; j <= degree; j++) {
    let sum = 0;
    for (let i = 1; i <= j; i++) sum = (sum + (e[j - i] as number) * (sums[i - 1] as number)) % p;
    const c = (sum * powMod(j, p - 2, p, inv)) % p;
    e.push(c === 0 ? 0 : p - c);
  }
  return e;
}

function derivative(f: readonly number[], p: number): number[] {
  const n = f.length - 1;
  return f.slice(0, n).map((c, j) => (c * (n - j)) % p);
}

function gcdDegree(f: readonly number[], g: readonly number[], p: number): number {
  const inv = 1 / p;
  let a = strip(f);
  let b = strip(g);
  while (b.length > 0) {
    const lead = powMod(b[0] as number, p - 2, p, inv);
    const r = a.slice();
    for (let i = 0; i + b.length <= r.length; i++) {
      const q = ((r[i] as number) * lead) % p;
      if (q === 0) continue;
      for (let j = 0; j < b.length; j++) {
        r[i + j] = ((r[i + j] as number) + (p - q) * (b[j] as number)) % p;
      }
    }
    a = b;
    b = strip(r.slice(Math.max(0, r.length - b.length + 1)));
  }
  return a.length - 1;
}

function strip(f: readonly number[]): number[] {
  let i = 0;
  while (i < f.length && f[i] === 0) i++;
  return f.slice(i);
}

