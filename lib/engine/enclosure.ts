/**
 * Enclosures: integers low ≤ x·2^P ≤ high, rounded outwards.
 *
 * Only for numbers already known not to be zero (or whose rationality is known): the precision is then doubled until the
 * enclosure decides. Nothing here uses floating point.
 */

import { isqrt } from './integers';
import type { Int } from './int';
import type { El, Field, Gen } from './tower';
import { isRationalEl, isZeroEl, numerator } from './element';

export interface Enclosure {
  low: bigint;
  high: bigint;
}

/** Steps of one product of P bits, as Karatsuba's method takes them. */
function cost(P: number): number {
  return Math.ceil((P / 64) ** 1.58 / 8);
}

/** ⌈n/2^P⌉. */
function shiftUp(n: bigint, P: bigint): bigint {
  return -(-n >> P);
}

function divUp(n: bigint, d: bigint): bigint {
  return -floorDiv(-n, d);
}

/** ⌊n/d⌋ for d > 0. */
export function floorDiv(n: bigint, d: bigint): bigint {
  const q = n / d;
  return n < 0n && q * d !== n ? q - 1n : q;
}

function cacheOf(f: Field): Map<number, Map<number, Enclosure>> {
  let c = f.caches.get('enclosures') as Map<number, Map<number, Enclosure>> | undefined;
  if (c === undefined) f.caches.set('enclosures', (c = new Map()));
  return c;
}

/** Enclosure of a generator at precision P. */
export function encloseRoot(f: Field, g: Gen, P: number): Enclosure {
  const cache = cacheOf(f);
  let byPrecision = cache.get(g.id);
  if (byPrecision === undefined) cache.set(g.id, (byPrecision = new Map<number, Enclosure>()));
  let e = byPrecision.get(P);
  if (e === undefined) {
    f.budget.charge(20 + cost(P));
    const p = BigInt(P);
    if (g.int !== 0) {
      const low = isqrt(BigInt(g.int) << (2n * p));
      e = { low, high: low + 1n };
    } else {
      const d = enclose(g.rad, P);
      const low = d.low > 0n ? isqrt(d.low << p) : 0n;
      e = { low, high: isqrt(d.high << p) + 1n };
    }
    byPrecision.set(P, e);
  }
  return e;
}

/** Enclosure of x at precision P. Cost: one product of P bits for each coordinate and generator. */
export function enclose(x: El, P: number): Enclosure {
  const p = BigInt(P);
  const f = x.t.field;
  const k = x.t.k;
  f.budget.charge(x.c.length * (2 + cost(P)));
  let low: bigint;
  let high: bigint;
  if (k === 0) {
    low = high = BigInt(numerator(x)) << p;
  } else if (x.m === null) {
    let n = x.c.length;
    const lows = new Array<bigint>(n);
    const highs = new Array<bigint>(n);
    for (let i = 0; i < n; i++) {
      const c = x.c[i] as Int;
      lows[i] = highs[i] = c === 0 ? 0n : BigInt(c) << p;
    }
    for (let j = k - 1; j >= 0; j--) {
      n >>= 1;
      const s = encloseRoot(f, x.t.gens[j] as Gen, P);
      for (let i = 0; i < n; i++) {
        const l = lows[n + i] as bigint;
        const h = highs[n + i] as bigint;
        if (l === 0n && h === 0n) continue;
        lows[i] = (lows[i] as bigint) + ((l * (l < 0n ? s.high : s.low)) >> p);
        highs[i] = (highs[i] as bigint) + shiftUp(h * (h < 0n ? s.low : s.high), p);
      }
    }
    low = lows[0] as bigint;
    high = highs[0] as bigint;
  } else {
    low = high = 0n;
    for (let j = 0; j < x.m.length; j++) {
      let l = BigInt(x.c[j] as Int) << p;
      let h = l;
      for (let i = 0, rest = x.m[j] as bigint; rest !== 0n; i++, rest >>= 1n) {
        if (!(rest & 1n)) continue;
        const s = encloseRoot(f, x.t.gens[i] as Gen, P);
        l = (l * (l < 0n ? s.high : s.low)) >> p;
        h = shiftUp(h * (h < 0n ? s.low : s.high), p);
      }
      low += l;
      high += h;
    }
  }
  if (x.den === 1) return { low, high };
  const d = BigInt(x.den);
  return { low: floorDiv(low, d), high: divUp(high, d) };
}

/** Sign, exact. Cost: the precision needed is at most the size of the norm; in practice one or two passes. */
export function signEl(x: El): -1 | 0 | 1 {
  if (isZeroEl(x)) return 0;
  if (isRationalEl(x)) return numerator(x) < 0 ? -1 : 1;
  for (let P = 64; ; P *= 2) {
    const e = enclose({ ...x, den: 1 }, P);
    if (e.low > 0n) return 1;
    if (e.high < 0n) return -1;
  }
}

/** ⌊x⌋ of a real element. */
export function floorEl(x: El): bigint {
  if (isRationalEl(x)) return floorDiv(BigInt(numerator(x)), BigInt(x.den));
  for (let P = 64; ; P *= 2) {
    const e = enclose(x, P);
    const l = e.low >> BigInt(P);
    if (l === e.high >> BigInt(P)) return l;
  }
}
