/**
 * Degree and minimal polynomial.
 *
 * A number of which all roots are roots of integers has degree 2^r, r the rank over GF(2) of the sets of primes under its
 * roots. In general the characteristic polynomial χ of x over the rationals is the norm of X − x, taken one generator at a time:
 * the norm of A + B·s is A² − d·B². It is a power of the minimal polynomial. If χ has no repeated factor modulo one
 * prime, the two are the same; otherwise the e-th root of χ is taken exactly and is shown to be squarefree in the same way.
 * All coefficients are exact throughout: degree 256 takes some tens of thousands of integer products.
 */

import * as Z from './int';
import { type Int } from './int';
import { bigGcd } from './integers';
import { isRationalEl, isZeroEl, numerator, scaleEl, toDense, toSparse } from './element';
import { relationOf } from './power-relation';
import { compact, together } from './presentation';
import { keyOf } from './real-root';
import {
  addList,
  isZeroList,
  mulList,
  mulTop,
  negList,
  scaleList,
  squareList,
  subList,
  zeros,
} from './dense';
import { powerRoot, squarefreeModulo } from './polynomial';
import { multiplyRoots } from './algebraic/composed';
import { cosinePolynomial } from './cosine-polynomial';
import type { Cx } from './complex';
import { Cosine } from './turn';
import type { El, Field, Gen, Tower } from './tower';

/** Degree over the rationals. `degree` where a nested value lies in a field above the limit. */
export function degreeOf(x: Cx): number {
  if (x instanceof Cosine && x.n > 2n) return x.degree;
  const flat = rankDegree(x);
  if (flat !== null) return flat;
  return characteristic(x).minimal.length - 1;
}

/** Coefficients from the highest power down, primitive, leading one positive. */
export function minimalPolynomialOf(x: Cx): bigint[] {
  if (x instanceof Cosine && x.n > 2n) {
    const { degree, scale } = x;
    x.im.t.field.budget.within('degree', degree);
    x.im.t.field.budget.charge(degree * degree);
    const f = cosinePolynomial(x.n);
    return [...multiplyRoots(f.reverse(), scale.n, scale.d)].reverse();
  }
  if (isRationalEl(x.re) && isZeroEl(x.im)) {
    return [BigInt(x.re.den), -BigInt(numerator(x.re))];
  }
  const rank = rankDegree(x);
  const f = x.re.t.field;
  if (rank !== null) f.budget.within('degree', rank);
  const c = characteristic(x);
  return c.den === 1n ? c.minimal.slice() : clear(c.minimal, c.den);
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

/** The monic minimal polynomial of den·x. */
interface Characteristic {
  minimal: bigint[];
  den: bigint;
}

/** Kept per engine: degree and polynomial of a value are often asked for one after the other. */
function characteristic(x: Cx): Characteristic {
  const f = x.re.t.field;
  const cache = cacheOf(f);
  const key = `${keyOf(x.re)}|${keyOf(x.im)}`;
  let c = cache.get(key);
  if (c === undefined) {
    c = makeCharacteristic(x);
    cache.set(key, c);
  }
  return c;
}

function cacheOf(f: Field): Map<string, Characteristic> {
  let cache = f.caches.get('characteristic') as Map<string, Characteristic> | undefined;
  if (cache === undefined) f.caches.set('characteristic', (cache = new Map()));
  return cache;
}

function makeCharacteristic(x: Cx): Characteristic {
  const f = x.re.t.field;
  const imaginary = !isZeroEl(x.im);
  const shown = compact(together(x));
  const t = shown.t;
  if (2 ** (t.k + (imaginary ? 1 : 0)) > f.budget.limits.degree) return inLargeTower(x);
  const re = toDense(shown.re);
  const im = imaginary ? toDense(shown.im) : shown.im;
  const den = imaginary ? Z.mul(Z.quotient(re.den, Z.gcd(re.den, im.den)), im.den) : re.den;
  const a = scaleList(re.c, Z.quotient(den, re.den));
  const b = imaginary ? scaleList(im.c, Z.quotient(den, im.den)) : [];
  // X − x, or its norm to the real field: (X − a)² + b².
  let poly: Int[][] = [negList(a)];
  if (imaginary) poly = [addList(squareList(t, a), squareList(t, b)), scaleList(a, -2)];
  let u: Tower = t;
  for (; u.k > 1; u = u.parent as Tower) poly = normOfPolynomial(u, poly);
  const plain = u.k === 1 ? normOverRationals(u, poly) : poly.map((c) => c[0] as Int);
  const monic = [1n, ...plain.reverse().map(BigInt)];
  return { minimal: reduce(monic, f), den: BigInt(den) };
}

/** Largest number of roots in a tower in which powers are still worked out. */
const LARGE = 12;

/** The tower is above the limit, but the value may not be. */
function inLargeTower(x: Cx): Characteristic {
  const f = x.re.t.field;
  const k = together(x).t.k + (isZeroEl(x.im) ? 0 : 1);
  // Real values rarely have less than the degree of their tower; nests of complex roots often do.
  if (k > LARGE || isZeroEl(x.im)) f.budget.within('degree', 2 ** k);
  const den = Z.mul(Z.quotient(x.re.den, Z.gcd(x.re.den, x.im.den)), x.im.den);
  const y = { re: scaleEl(x.re, den), im: scaleEl(x.im, den) };
  return { minimal: relationOf(y), den: BigInt(den) };
}

/** The minimal polynomial, of which χ is a power. */
function reduce(chi: bigint[], f: Field): bigint[] {
  const n = chi.length - 1;
  for (let e = 1; e <= n; e *= 2) {
    const g = e === 1 ? chi : powerRoot(chi, e);
    if (g === null) continue;
    f.budget.charge(n * n);
    if (squarefreeModulo(g)) return g;
  }
  throw new Error('a characteristic polynomial is not a power of a squarefree one');
}

/**
 * A monic polynomial over the field of t (coefficients from the lowest power up, the leading 1 left out)
 * times its conjugate over the field below: A² − d·B² for A + B·s.
 */
function normOfPolynomial(t: Tower, poly: readonly Int[][]): Int[][] {
  const below = t.parent as Tower;
  const half = 1 << below.k;
  const m = poly.length;
  const one = zeros(half);
  one[0] = 1;
  const low = poly.map((c) => nonZero(c.slice(0, half)));
  const high = poly.map((c) => nonZero(c.slice(half)));
  const a = squarePolynomial(below, [...low, one]);
  const b = squarePolynomial(below, high);
  const out: Int[][] = [];
  for (let i = 0; i < 2 * m; i++) {
    const x = a[i] ?? null;
    const y = b[i] ?? null;
    if (y === null) out.push(x ?? zeros(half));
    else out.push(x === null ? negList(mulTop(t, y)) : subList(x, mulTop(t, y)));
  }
  return out;
}

function nonZero(c: Int[]): Int[] | null {
  return isZeroList(c) ? null : c;
}

/** Coefficients of the square; null stands for 0, as it does in half of the places of an even polynomial. */
function squarePolynomial(t: Tower, a: readonly (Int[] | null)[]): (Int[] | null)[] {
  const n = a.length;
  const out = new Array<Int[] | null>(2 * n - 1).fill(null);
  const put = (k: number, c: Int[]): void => {
    const old = out[k] ?? null;
    out[k] = old === null ? c : addList(old, c);
  };
  for (let i = 0; i < n; i++) {
    const x = a[i] ?? null;
    if (x === null) continue;
    t.field.budget.charge((n - i) * x.length * (1 + Z.words(x[0] as Int)));
    put(2 * i, squareList(t, x));
    const double = scaleList(x, 2);
    for (let j = i + 1; j < n; j++) {
      const y = a[j] ?? null;
      if (y !== null) put(i + j, mulList(t, double, y));
    }
  }
  return out;
}

/** The last step, from a quadratic field to the rationals, on plain integers. */
function normOverRationals(t: Tower, poly: readonly Int[][]): Int[] {
  const m = poly.length;
  const d = (t.top as Gen).int;
  const low = poly.map((c) => c[0] as Int);
  low.push(1);
  const high = poly.map((c) => c[1] as Int);
  t.field.budget.charge(m * m * (1 + Z.words(low[0] as Int)));
  const out: Int[] = [];
  for (let k = 0; k < 2 * m; k++) {
    const a = squareCoefficient(low, k);
    const b = squareCoefficient(high, k);
    out.push(b === 0 ? a : Z.sub(a, Z.mul(b, d)));
  }
  return out;
}

/** Coefficient k of the square of a polynomial. */
function squareCoefficient(a: readonly Int[], k: number): Int {
  let sum: Int = 0;
  for (let i = Math.max(0, k - a.length + 1); 2 * i < k; i++) {
    const x = a[i] as Int;
    const y = a[k - i] as Int;
    if (x !== 0 && y !== 0) sum = Z.add(sum, Z.mul(x, y));
  }
  if (sum !== 0) sum = Z.mul(sum, 2);
  const middle = k % 2 === 0 && k / 2 < a.length ? (a[k / 2] as Int) : 0;
  return middle === 0 ? sum : Z.add(sum, Z.mul(middle, middle));
}
