/**
 * Arithmetic on dense coordinate lists: 2^k integers, one for each product of generators.
 *
 * Lists are split at the top generator s, s² = d: (a + b·s)(a′ + b′·s) by three products of half the size and one by d
 * (Karatsuba and Ofman 1962); where few coordinates are not zero, or all radicands are integers, the products are taken
 * one by one with a table of radicand products.
 */

import { add, mul, neg, sub, words, type Int } from './int';
import * as Z from './int';
import type { Gen, Tower } from './tower';
import { DENSE_MAX } from './tower';

export function zeros(n: number): Int[] {
  const out = new Array<Int>(n);
  for (let i = 0; i < n; i++) out[i] = 0;
  return out;
}

export function isZeroList(a: readonly Int[]): boolean {
  for (let i = 0; i < a.length; i++) if (a[i] !== 0) return false;
  return true;
}

export function addList(a: readonly Int[], b: readonly Int[]): Int[] {
  const out = new Array<Int>(a.length);
  for (let i = 0; i < a.length; i++) out[i] = add(a[i] as Int, b[i] as Int);
  return out;
}

export function subList(a: readonly Int[], b: readonly Int[]): Int[] {
  const out = new Array<Int>(a.length);
  for (let i = 0; i < a.length; i++) out[i] = sub(a[i] as Int, b[i] as Int);
  return out;
}

export function negList(a: readonly Int[]): Int[] {
  const out = new Array<Int>(a.length);
  for (let i = 0; i < a.length; i++) out[i] = neg(a[i] as Int);
  return out;
}

export function scaleList(a: readonly Int[], f: Int): Int[] {
  if (f === 1) return a.slice();
  const out = new Array<Int>(a.length);
  for (let i = 0; i < a.length; i++) out[i] = mul(a[i] as Int, f);
  return out;
}

function countNonZero(a: readonly Int[]): number {
  let n = 0;
  for (let i = 0; i < a.length; i++) if (a[i] !== 0) n++;
  return n;
}

/** Radicand of the top generator in the coordinates of the tower below it. */
export function radicandOf(t: Tower): Int[] {
  if (t.radicand === null) {
    const g = t.top as Gen;
    const below = t.parent as Tower;
    const out = zeros(1 << below.k);
    if (g.int !== 0) out[0] = g.int;
    else {
      const rad = g.rad;
      const positions = rad.t.positionsIn(below) as number[];
      if (rad.m === null) {
        const s = rad.t.spread(below, positions);
        for (let i = 0; i < rad.c.length; i++) out[s[i] as number] = rad.c[i] as Int;
      } else {
        for (let j = 0; j < rad.m.length; j++) {
          out[Number(moveMask(rad.m[j] as bigint, positions))] = rad.c[j] as Int;
        }
      }
    }
    t.radicand = out;
  }
  return t.radicand;
}

/** A mask with its bits carried to other positions. */
export function moveMask(mask: bigint, positions: readonly number[]): bigint {
  let out = 0n;
  for (let i = 0, rest = mask; rest !== 0n; i++, rest >>= 1n) {
    if (rest & 1n) out |= 1n << BigInt(positions[i] as number);
  }
  return out;
}

/** Product of two coordinate lists of the tower t. */
export function mulList(t: Tower, a: readonly Int[], b: readonly Int[]): Int[] {
  const k = t.k;
  if (k === 0) return [mul(a[0] as Int, b[0] as Int)];
  if (k > DENSE_MAX) throw new RangeError('dense product of too many generators');
  if (t.flat) {
    const na = countNonZero(a);
    const nb = countNonZero(b);
    if (k <= 3 || na * nb <= 2 * 3 ** k) return mulFlat(t, a, b);
  }
  const half = 1 << (k - 1);
  const below = t.parent as Tower;
  const a0 = a.slice(0, half);
  const a1 = a.slice(half);
  const b0 = b.slice(0, half);
  const b1 = b.slice(half);
  const flatA = isZeroList(a1);
  const flatB = isZeroList(b1);
  if (flatA && flatB) return mulList(below, a0, b0).concat(zeros(half));
  if (flatA) return mulList(below, a0, b0).concat(mulList(below, a0, b1));
  if (flatB) return mulList(below, a0, b0).concat(mulList(below, a1, b0));
  const high = mulList(below, a1, b1);
  if (isZeroList(a0) && isZeroList(b0)) return mulTop(t, high).concat(zeros(half));
  const low = mulList(below, a0, b0);
  const mid = mulList(below, addList(a0, a1), addList(b0, b1));
  return addList(low, mulTop(t, high)).concat(subList(subList(mid, low), high));
}

/** Square of a coordinate list: two products of half the size instead of three. */
export function squareList(t: Tower, a: readonly Int[]): Int[] {
  const k = t.k;
  if (k <= 2) return mulList(t, a, a);
  const half = 1 << (k - 1);
  const below = t.parent as Tower;
  const a0 = a.slice(0, half);
  const a1 = a.slice(half);
  if (isZeroList(a1)) return squareList(below, a0).concat(zeros(half));
  if (isZeroList(a0)) return mulTop(t, squareList(below, a1)).concat(zeros(half));
  const cross = mulList(below, a0, a1);
  return addList(squareList(below, a0), mulTop(t, squareList(below, a1))).concat(
    addList(cross, cross),
  );
}

/** a² − d·b² for a + b·s, in the tower below t. */
export function normList(t: Tower, a: readonly Int[], b: readonly Int[]): Int[] {
  const below = t.parent as Tower;
  return subList(squareList(below, a), mulTop(t, squareList(below, b)));
}

/** d·a, where d is the radicand of the top generator. */
export function mulTop(t: Tower, a: readonly Int[]): Int[] {
  const g = t.top as Gen;
  if (g.int !== 0) return scaleList(a, g.int);
  return mulList(t.parent as Tower, radicandOf(t), a);
}

function mulFlat(t: Tower, a: readonly Int[], b: readonly Int[]): Int[] {
  const n = a.length;
  const out = zeros(n);
  let work = 0;
  let wa = 1;
  let wb = 1;
  for (let i = 0; i < n; i++) {
    const x = a[i] as Int;
    if (x === 0) continue;
    if (typeof x === 'bigint') wa = Math.max(wa, words(x));
    for (let j = 0; j < n; j++) {
      const y = b[j] as Int;
      if (y === 0) continue;
      if (wb === 1 && typeof y === 'bigint') wb = words(y);
      let z = mul(x, y);
      if (i & j) z = mul(z, t.product(i & j));
      out[i ^ j] = add(out[i ^ j] as Int, z);
      work++;
    }
  }
  // Products of long integers cost about w^1.58 (Karatsuba) word products, a sixteenth of a step each.
  const w = Math.sqrt(wa * wb);
  t.field.budget.charge(n + work * (1 + (w > 2 ? w ** 1.58 / 16 : 0)));
  return out;
}

/** 1/a as a coordinate list over a denominator; a must not be zero. By norms, top generator first. */
export function invertList(t: Tower, a: readonly Int[]): { c: Int[]; den: Int } {
  if (t.k === 0) {
    const x = a[0] as Int;
    return x < 0 ? { c: [-1], den: neg(x) } : { c: [1], den: x };
  }
  const half = 1 << (t.k - 1);
  const below = t.parent as Tower;
  const a0 = a.slice(0, half);
  const a1 = a.slice(half);
  if (isZeroList(a1)) {
    const inv = invertList(below, a0);
    return { c: inv.c.concat(zeros(half)), den: inv.den };
  }
  const inv = invertList(below, normList(t, a0, a1));
  return reduceList(mulList(below, a0, inv.c).concat(negList(mulList(below, a1, inv.c))), inv.den);
}

/** Lowest terms: divides out the common factor of all coordinates and the denominator. */
export function reduceList(c: Int[], den: Int): { c: Int[]; den: Int } {
  if (den === 1) return { c, den };
  let g: Int = den;
  for (let i = 0; i < c.length && g !== 1; i++) {
    if (c[i] !== 0) g = Z.gcd(g, c[i] as Int);
  }
  if (g === 1) return { c, den };
  return { c: c.map((x) => (x === 0 ? 0 : Z.quotient(x, g))), den: Z.quotient(den, g) };
}

/** 1/d for the radicand d of the top generator of t. */
export function inverseRadicandOf(t: Tower): { c: Int[]; den: Int } {
  t.inverseRadicand ??= invertList(t.parent as Tower, radicandOf(t));
  return t.inverseRadicand;
}
