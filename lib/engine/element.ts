/**
 * Real elements: addition, multiplication, inversion across towers.
 *
 * Every element that leaves this module is in lowest terms and trimmed: its tower has no generator that it
 * does not need. So an element is zero when it is the rational 0, and rational when its tower is the base.
 */

import * as Z from './int';
import type { Int } from './int';
import { bitLength } from './integers';
import { addList, invertList, moveMask, mulList, reduceList, scaleList, zeros } from './dense';
import {
  DENSE_ALWAYS,
  DENSE_MAX,
  type El,
  type Field,
  type Gen,
  type Placing,
  type Tower,
} from './tower';
import { join } from './join';
import { OutsideDomain } from './limits';

export function integerEl(f: Field, n: Int): El {
  return { t: f.base, c: [n], m: null, den: 1 };
}

/** n/d in lowest terms; d not zero. */
export function rationalEl(f: Field, n: Int, d: Int): El {
  if (d === 1) return { t: f.base, c: [n], m: null, den: 1 };
  const g = Z.gcd(n, d);
  const s = d < 0 ? Z.neg(g) : g;
  return { t: f.base, c: [Z.quotient(n, s)], m: null, den: Z.quotient(d, s) };
}

export function isZeroEl(a: El): boolean {
  return a.t.k === 0 && a.c[0] === 0;
}

export function isRationalEl(a: El): boolean {
  return a.t.k === 0;
}

/** Numerator of a rational element. */
export function numerator(a: El): Int {
  return a.c[0] as Int;
}

/** Checks sizes, reduces, trims. `c` is dense in t. */
export function finish(t: Tower, c: Int[], den: Int): El {
  let used = 0;
  let big = 0;
  let count = 0;
  for (let i = 0; i < c.length; i++) {
    const x = c[i] as Int;
    if (x === 0) continue;
    used |= i;
    count++;
    if (typeof x === 'bigint') big = Math.max(big, Z.words(x));
  }
  t.field.budget.charge(10 + 2 * c.length * (1 + big));
  if (big > 600 || typeof den === 'bigint' || count > 1000) checkSize(t.field, c, big, den, count);
  let tower = t;
  let list = c;
  const full = (1 << t.k) - 1;
  if (used !== full) {
    const mask = t.smallClosure(used);
    if (mask !== full) {
      const s = t.smallSubset(mask);
      const index = s.t.spread(t, s.kept);
      list = new Array<Int>(index.length);
      for (let i = 0; i < index.length; i++) list[i] = c[index[i] as number] as Int;
      tower = s.t;
    }
  }
  const r = reduceList(list, den);
  const out: El = { t: tower, c: r.c, m: null, den: r.den };
  return listsAll(tower, count) ? out : toSparse(out);
}

/** Whether an element with so many terms lists all its coordinates. Depends on the value alone, so equal values look alike. */
function listsAll(t: Tower, count: number): boolean {
  return t.k <= DENSE_ALWAYS || (t.k <= DENSE_MAX && count * 8 >= 1 << t.k);
}

function checkSize(f: Field, c: readonly Int[], big: number, den: Int, count: number): void {
  f.budget.within('terms', count);
  if (typeof den === 'bigint')
    f.budget.within('integerBits', Z.words(den) > 600 ? bitLength(den) : 0);
  if (big > 600) {
    for (const x of c)
      if (typeof x === 'bigint' && Z.words(x) > 600) f.budget.within('integerBits', bitLength(x));
  }
}

/** As `finish`, from a table mask → coordinate. */
export function finishSparse(t: Tower, table: Map<bigint, Int>, den: Int): El {
  let used = 0n;
  const masks: bigint[] = [];
  let big = 0;
  for (const [mask, x] of table) {
    if (x === 0) continue;
    used |= mask;
    masks.push(mask);
    if (typeof x === 'bigint') big = Math.max(big, Z.words(x));
  }
  const f = t.field;
  f.budget.charge(20 + masks.length * (10 + big));
  masks.sort((x, y) => (x < y ? -1 : 1));
  const values = masks.map((mask) => table.get(mask) as Int);
  checkSize(f, values, big, den, masks.length);
  const closed = t.closure(used);
  let tower = t;
  let moved = masks;
  if (closed !== (1n << BigInt(t.k)) - 1n) {
    const s = t.subset(closed);
    tower = s.t;
    const back = new Array<number>(t.k).fill(0);
    s.kept.forEach((p, i) => (back[p] = i));
    moved = masks.map((mask) => moveMask(mask, back));
  }
  const r = reduceList(values, den);
  const out: El = { t: tower, c: r.c, m: moved, den: r.den };
  if (listsAll(tower, masks.length)) return toDense(out);
  return out;
}

export function toDense(a: El): El {
  if (a.m === null) return a;
  const c = zeros(1 << a.t.k);
  for (let j = 0; j < a.m.length; j++) c[Number(a.m[j])] = a.c[j] as Int;
  return { t: a.t, c, m: null, den: a.den };
}

export function toSparse(a: El): El {
  if (a.m !== null) return a;
  const m: bigint[] = [];
  const c: Int[] = [];
  for (let i = 0; i < a.c.length; i++) {
    if (a.c[i] === 0) continue;
    m.push(BigInt(i));
    c.push(a.c[i] as Int);
  }
  return { t: a.t, c, m, den: a.den };
}

/** The same number in the coordinates of another tower: not trimmed there, so for use inside operations only. */
export function place(a: El, target: Tower, how: Placing): El {
  if (a.t === target) return a;
  if (how.images !== null) {
    const b = substitute(a, how.images);
    const positions = b.t.positionsIn(target);
    if (positions === null) throw new Error('an image lies outside the joined tower');
    return place(b, target, { positions, images: null });
  }
  const positions = how.positions as readonly number[];
  if (
    a.m === null &&
    (target.k <= DENSE_ALWAYS || (target.k <= DENSE_MAX && a.c.length * 8 >= 1 << target.k))
  ) {
    const s = a.t.spread(target, positions);
    const c = zeros(1 << target.k);
    for (let i = 0; i < s.length; i++) c[s[i] as number] = a.c[i] as Int;
    return { t: target, c, m: null, den: a.den };
  }
  const from = toSparse(a);
  const old = from.m as readonly bigint[];
  const plain = positions.every((p, i) => p === i);
  const moved = plain ? old.slice() : old.map((mask) => moveMask(mask, positions));
  return { t: target, c: from.c, m: moved, den: a.den };
}

/** The element with each generator replaced by an image. */
export function substitute(a: El, images: readonly El[]): El {
  const f = a.t.field;
  const s = toSparse(a);
  let sum = integerEl(f, 0);
  const masks = s.m as readonly bigint[];
  for (let j = 0; j < masks.length; j++) {
    let term = rationalEl(f, s.c[j] as Int, a.den);
    for (let i = 0, rest = masks[j] as bigint; rest !== 0n; i++, rest >>= 1n) {
      if (rest & 1n) term = mulEl(term, images[i] as El);
    }
    sum = addEl(sum, term);
  }
  return sum;
}

function together(a: El, b: El): [El, El] {
  if (a.t === b.t) return [a, b];
  const j = join(a.t, b.t);
  return [place(a, j.t, j.left), place(b, j.t, j.right)];
}

/** How many coordinates are not zero. */
export function countTerms(a: El): number {
  if (a.m !== null) return a.m.length;
  let n = 0;
  for (const x of a.c) if (x !== 0) n++;
  return n;
}

export function negEl(a: El): El {
  return { t: a.t, c: a.c.map(Z.neg), m: a.m, den: a.den };
}

export function addEl(a: El, b: El): El {
  if (isZeroEl(a)) return b;
  if (isZeroEl(b)) return a;
  const [x, y] = together(a, b);
  let den = x.den;
  let fx: Int = 1;
  let fy: Int = 1;
  if (x.den !== y.den) {
    const g = Z.gcd(x.den, y.den);
    fx = Z.quotient(y.den, g);
    fy = Z.quotient(x.den, g);
    den = Z.mul(x.den, fx);
  }
  if (x.m === null && y.m === null) {
    if (fx === 1 && fy === 1) return finish(x.t, addList(x.c, y.c), den);
    const out = new Array<Int>(x.c.length);
    for (let i = 0; i < out.length; i++) {
      out[i] = Z.add(Z.mul(x.c[i] as Int, fx), Z.mul(y.c[i] as Int, fy));
    }
    return finish(x.t, out, den);
  }
  const p = toSparse(x);
  const q = toSparse(y);
  const table = new Map<bigint, Int>();
  (p.m as bigint[]).forEach((mask, j) => table.set(mask, Z.mul(p.c[j] as Int, fx)));
  (q.m as bigint[]).forEach((mask, j) => {
    const v = Z.mul(q.c[j] as Int, fy);
    const old = table.get(mask);
    table.set(mask, old === undefined ? v : Z.add(old, v));
  });
  return finishSparse(x.t, table, den);
}

export function subEl(a: El, b: El): El {
  return addEl(a, negEl(b));
}

/** a·n/d for integers, d > 0. */
export function scaleEl(a: El, n: Int, d: Int = 1): El {
  if (n === 0) return a.t.field.zero;
  if (n === 1 && d === 1) return a;
  const g = a.den === 1 ? 1 : Z.gcd(n, a.den);
  const num = g === 1 ? n : Z.quotient(n, g);
  const r = reduceList(scaleList(a.c, num), Z.mul(g === 1 ? a.den : Z.quotient(a.den, g), d));
  if (typeof r.c[r.c.length - 1] === 'bigint' || typeof r.den === 'bigint') {
    checkSize(a.t.field, r.c, 601, r.den, r.c.length);
  }
  return { t: a.t, c: r.c, m: a.m, den: r.den };
}

export function mulEl(a: El, b: El): El {
  if (a.t.k === 0 && b.t.k === 0 && a.den === 1 && b.den === 1) {
    const c = Z.mul(numerator(a), numerator(b));
    if (typeof c === 'number') return { t: a.t, c: [c], m: null, den: 1 };
  }
  if (a.t.k === 0) return scaleEl(b, numerator(a), a.den);
  if (b.t.k === 0) return scaleEl(a, numerator(b), b.den);
  const [x, y] = together(a, b);
  const den = Z.mul(x.den, y.den);
  const k = x.t.k;
  const dense = x.m === null && y.m === null;
  if (dense || (k <= DENSE_MAX && countTerms(x) * countTerms(y) > 1 << k)) {
    return finish(x.t, mulList(x.t, toDense(x).c, toDense(y).c), den);
  }
  return finishSparse(x.t, mulSparse(x.t, toSparse(x), toSparse(y)), den);
}

/** Term by term. Terms that share a nested generator are gathered by the set they share and expanded once for each set. */
function mulSparse(t: Tower, a: El, b: El): Map<bigint, Int> {
  const nested = nestedMask(t);
  const byShared = new Map<bigint, Map<bigint, Int>>();
  const am = a.m as readonly bigint[];
  const bm = b.m as readonly bigint[];
  t.field.budget.within('terms', Math.max(am.length, bm.length));
  for (let i = 0; i < am.length; i++) {
    t.field.budget.charge(bm.length * (5 + Z.words(a.c[i] as Int)));
    for (let j = 0; j < bm.length; j++) {
      const both = (am[i] as bigint) & (bm[j] as bigint);
      const rest = (am[i] as bigint) ^ (bm[j] as bigint);
      let v = Z.mul(a.c[i] as Int, b.c[j] as Int);
      const shared = both & nested;
      for (let s = 0, bits = both ^ shared; bits !== 0n; s++, bits >>= 1n) {
        if (bits & 1n) v = Z.mul(v, (t.gens[s] as { int: Int }).int);
      }
      let table = byShared.get(shared);
      if (table === undefined) byShared.set(shared, (table = new Map<bigint, Int>()));
      table.set(rest, Z.add(table.get(rest) ?? 0, v));
    }
  }
  const out = byShared.get(0n) ?? new Map<bigint, Int>();
  for (const [shared, table] of byShared) {
    if (shared === 0n) continue;
    let part = finishSparse(t, table, 1);
    for (let s = 0, bits = shared; bits !== 0n; s++, bits >>= 1n) {
      if (bits & 1n) part = mulEl(part, (t.gens[s] as { rad: El }).rad);
    }
    const back = toSparse(place(part, t, { positions: part.t.positionsIn(t), images: null }));
    (back.m as bigint[]).forEach((mask, j) =>
      out.set(mask, Z.add(out.get(mask) ?? 0, back.c[j] as Int)),
    );
  }
  return out;
}

function nestedMask(t: Tower): bigint {
  if (t.flat) return 0n;
  let mask = 0n;
  t.gens.forEach((g, i) => {
    if (g.int === 0) mask |= 1n << BigInt(i);
  });
  return mask;
}

/** Splits a = low + high·s at the top generator s of its tower; both lie in the tower below (not trimmed there when dense). */
export function splitTop(a: El): { low: El; high: El } {
  const below = a.t.parent as Tower;
  const half = 1 << (a.t.k - 1);
  if (a.m === null) {
    return {
      low: finish(below, a.c.slice(0, half), a.den),
      high: finish(below, a.c.slice(half), a.den),
    };
  }
  const bit = 1n << BigInt(a.t.k - 1);
  const low = new Map<bigint, Int>();
  const high = new Map<bigint, Int>();
  a.m.forEach((mask, j) => {
    if (mask & bit) high.set(mask ^ bit, a.c[j] as Int);
    else low.set(mask, a.c[j] as Int);
  });
  return { low: finishSparse(below, low, a.den), high: finishSparse(below, high, a.den) };
}

/** 1/a; `division-by-zero` for the exact 0. */
export function inverseEl(a: El): El {
  if (isZeroEl(a)) throw new OutsideDomain('division-by-zero', 'The divisor is exactly 0.');
  if (a.t.k === 0) {
    const n = numerator(a);
    return n < 0
      ? { t: a.t, c: [Z.neg(a.den)], m: null, den: Z.neg(n) }
      : { t: a.t, c: [a.den], m: null, den: n };
  }
  if (a.m === null) {
    const inv = invertList(a.t, a.c);
    return finish(a.t, scaleList(inv.c, a.den), inv.den);
  }
  const { low, high } = splitTop(a);
  const top = rootOfTop(a.t);
  const norm = subEl(mulEl(low, low), mulEl(mulEl(high, high), (a.t.top as Gen).rad));
  return mulEl(subEl(low, mulEl(high, top)), inverseEl(norm));
}

/** The top generator of a tower, as an element of the smallest tower that has it. */
export function rootOfTop(t: Tower): El {
  return rootOf(t.top as Gen);
}

/** A generator as an element of the tower that it needs. */
export function rootOf(g: Gen): El {
  if (g.el === null) {
    const t = g.int !== 0 ? g.rad.t.field.base.child(g) : g.rad.t.child(g);
    g.el = finishSparse(t, new Map([[1n << BigInt(t.k - 1), 1]]), 1);
  }
  return g.el;
}

export function equalEl(a: El, b: El): boolean {
  if (a.t === b.t) {
    if (a.den !== b.den || a.c.length !== b.c.length) return false;
    for (let i = 0; i < a.c.length; i++) {
      if (a.c[i] !== b.c[i]) return false;
      if (a.m !== null && b.m !== null && a.m[i] !== b.m[i]) return false;
    }
    return (a.m === null) === (b.m === null);
  }
  return isZeroEl(subEl(a, b));
}
