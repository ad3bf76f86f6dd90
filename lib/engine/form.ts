/**
 * From coordinates to an expression that a reader knows.
 *
 * Let F be the field of the roots of smaller nesting in the tower of x. Then x = y₀ + Σ y_S, one y_S for each set S of
 * deepest roots, and each y_S² lies in F. That splitting does not depend on which generators stand for the tower, so
 * y_S = ±√(y_S²), with integers pulled out, writes equal values alike. Roots of integers are the case F = Q.
 */

import * as Z from './int';
import type { Int } from './int';
import { splitSquare } from './integers';
import { finishSparse, mulEl, toSparse } from './element';
import { conjugatePair } from './conjugate-pair';
import { signEl } from './enclosure';
import { keyOf } from './real-root';
import type { El, Gen, Tower } from './tower';

/** coef · ∏ roots · i^imaginary. Each root is that of a sum with integer coefficients. */
export interface Term {
  coef: bigint;
  /** Radicands of the roots; at most two. */
  roots: Sum[];
  imaginary: boolean;
}

/** Terms over a common denominator > 0. */
export interface Sum {
  terms: Term[];
  den: bigint;
  /** Deepest nesting. */
  depth: number;
}

/** An integer as a sum. */
export function integerSum(n: bigint): Sum {
  return { terms: n === 0n ? [] : [{ coef: n, roots: [], imaginary: false }], den: 1n, depth: 0 };
}

/** The parts of x by sets of deepest roots: the part in F, and each other part. */
export function splitDeepest(x: El): { low: El; parts: El[] } {
  const t = x.t;
  const deep = t.depth;
  let mask = 0n;
  t.gens.forEach((g, i) => {
    if (g.depth === deep) mask |= 1n << BigInt(i);
  });
  const groups = new Map<bigint, Map<bigint, Int>>();
  const s = toSparse(x);
  (s.m as readonly bigint[]).forEach((m, j) => {
    const key = m & mask;
    let group = groups.get(key);
    if (group === undefined) groups.set(key, (group = new Map<bigint, Int>()));
    group.set(m, s.c[j] as Int);
  });
  const low = finishSparse(t, groups.get(0n) ?? new Map<bigint, Int>(), x.den);
  const keys = [...groups.keys()].filter((k) => k !== 0n).sort((a, b) => (a < b ? -1 : 1));
  return { low, parts: keys.map((k) => finishSparse(t, groups.get(k) as Map<bigint, Int>, x.den)) };
}

/**
 * How a root over a quadratic field Q(√m) is written: as one root, or by a root √(r(m + b√m)) and its conjugate where
 * m = b² + c² allows.
 */
export type Manner = 'single' | 'conjugates';

/** The expression of a real element. */
export function formOf(x: El, manner: Manner = 'single'): Sum {
  const f = x.t.field;
  let cache = f.caches.get(`forms/${manner}`) as Map<string, Sum> | undefined;
  if (cache === undefined) f.caches.set(`forms/${manner}`, (cache = new Map()));
  const key = keyOf(x);
  let out = cache.get(key);
  if (out === undefined) {
    out = makeForm(x, manner);
    cache.set(key, out);
  }
  return out;
}

function makeForm(x: El, manner: Manner): Sum {
  const t = x.t;
  if (t.k === 0) {
    const s = integerSum(BigInt(x.c[0] as Int));
    return { ...s, den: s.terms.length === 0 ? 1n : BigInt(x.den) };
  }
  if (t.depth === 1) {
    const s = toSparse(x);
    const terms = (s.m as readonly bigint[]).map((m, j): Term => {
      const r = radicandOfMask(t, m);
      return {
        coef: BigInt(s.c[j] as Int),
        roots: r === 1n ? [] : [integerSum(r)],
        imaginary: false,
      };
    });
    return arrange(terms, BigInt(x.den));
  }
  const { low, parts } = splitDeepest(x);
  return addSums([formOf(low, manner), ...parts.map((y) => formOfPart(y, manner))]);
}

function radicandOfMask(t: Tower, m: bigint): bigint {
  let r = 1n;
  for (let i = 0, rest = m; rest !== 0n; i++, rest >>= 1n) {
    if (rest & 1n) r *= BigInt((t.gens[i] as Gen).int);
  }
  return r;
}

/** ±√(y²) with integers pulled out. */
function formOfPart(y: El, manner: Manner): Sum {
  if (manner === 'conjugates' && y.t.depth === 2) {
    const pair = conjugatePair(y);
    if (pair !== null) return addSums(pair.parts.map((p) => scaledRoot(p.factor, p.radicand)));
  }
  return singleRoot(y, manner);
}

/** √s = scale·√inner: a square that divides every coefficient as written, though not every coordinate. */
export function pullOutOfSum(s: Sum): { scale: bigint; inner: Sum } {
  let g = 0n;
  for (const t of s.terms) g = gcd(g, t.coef < 0n ? -t.coef : t.coef);
  if (g < 4n || s.den !== 1n) return { scale: 1n, inner: s };
  const scale = splitSquare(g, 2000).square;
  const terms = s.terms.map((t) => ({ ...t, coef: t.coef / (scale * scale) }));
  return { scale, inner: { ...s, terms } };
}

/** factor·√radicand for a rational factor. */
function scaledRoot(factor: El, radicand: El): Sum {
  const inner = formOf(radicand);
  return {
    terms: [{ coef: BigInt(factor.c[0] as Int), roots: [inner], imaginary: false }],
    den: BigInt(factor.den),
    depth: inner.depth + 1,
  };
}

function singleRoot(y: El, manner: Manner): Sum {
  const { coef, den, radicand } = rootOfPart(y);
  const { scale, inner } = pullOutOfSum(formOf(radicand, manner));
  const common = gcd(den, scale);
  return {
    terms: [{ coef: (coef * scale) / common, roots: [inner], imaginary: false }],
    den: den / common,
    depth: inner.depth + 1,
  };
}

/** y = coef/den·√radicand, where y² lies below the deepest roots; the radicand is integral with squarefree content. */
export function rootOfPart(y: El): { coef: bigint; den: bigint; radicand: El } {
  const square = mulEl(y, y);
  let g: Int = 0;
  for (const c of square.c) if (c !== 0) g = Z.gcd(g, c);
  const split = splitSquare(BigInt(g) * BigInt(square.den), 2000);
  const rest = split.factors.reduce((a, b) => a * b, 1n);
  const radicand: El = {
    t: square.t,
    c: square.c.map((c) => (c === 0 ? 0 : Z.mul(Z.quotient(c, g), Z.small(rest)))),
    m: square.m,
    den: 1,
  };
  const common = gcd(split.square, BigInt(square.den));
  const sign = signEl(y) < 0 ? -1n : 1n;
  return { coef: (sign * split.square) / common, den: BigInt(square.den) / common, radicand };
}

function gcd(a: bigint, b: bigint): bigint {
  return BigInt(Z.gcd(Z.small(a), Z.small(b)));
}

/** Number of digits of all integers in an expression. */
export function digitsOf(s: Sum): number {
  let n = s.den === 1n ? 0 : s.den.toString().length;
  for (const t of s.terms) {
    n += t.coef.toString().replace('-', '').length;
    for (const r of t.roots) n += digitsOf(r);
  }
  return n;
}

/** The largest integer in an expression. */
export function largestOf(s: Sum): bigint {
  let n = s.den;
  for (const t of s.terms) {
    const size = t.coef < 0n ? -t.coef : t.coef;
    if (size > n) n = size;
    for (const r of t.roots) {
      const inner = largestOf(r);
      if (inner > n) n = inner;
    }
  }
  return n;
}

/** Sum of sums over one denominator. */
export function addSums(sums: readonly Sum[]): Sum {
  let den = 1n;
  for (const s of sums) den = (den / gcd(den, s.den)) * s.den;
  const terms = sums.flatMap((s) => s.terms.map((t) => ({ ...t, coef: t.coef * (den / s.den) })));
  return arrange(terms, den);
}

/** i·s. */
export function timesI(s: Sum): Sum {
  return { ...s, terms: s.terms.map((t) => ({ ...t, imaginary: true })) };
}

/** Puts terms in order and over the least denominator. */
function arrange(terms: Term[], den: bigint): Sum {
  let g = den;
  for (const t of terms) g = gcd(g, t.coef < 0n ? -t.coef : t.coef);
  const reduced = g > 1n ? terms.map((t) => ({ ...t, coef: t.coef / g })) : terms;
  const sorted = reduced.slice().sort(compareTerms);
  const first = sorted[0];
  if (first !== undefined && first.coef < 0n && (sorted.length === 2 || first.roots.length > 0)) {
    const p = sorted.findIndex((t) => t.coef > 0n && !t.imaginary === !first.imaginary);
    if (p > 0) sorted.unshift(...sorted.splice(p, 1));
  }
  const depth = Math.max(0, ...terms.flatMap((t) => t.roots.map((r) => r.depth + 1)));
  return { terms: sorted, den: den / g, depth };
}

function compareTerms(a: Term, b: Term): number {
  if (a.imaginary !== b.imaginary) return a.imaginary ? 1 : -1;
  const x = a.roots.length === 0 ? 0 : Math.max(...a.roots.map((r) => r.depth + 1));
  const y = b.roots.length === 0 ? 0 : Math.max(...b.roots.map((r) => r.depth + 1));
  if (x !== y) return x - y;
  for (let i = 0; i < Math.min(a.roots.length, b.roots.length); i++) {
    const c = compareSums(a.roots[i] as Sum, b.roots[i] as Sum);
    if (c !== 0) return c;
  }
  return a.roots.length - b.roots.length || (a.coef < b.coef ? 1 : a.coef > b.coef ? -1 : 0);
}

/** Any fixed order that does not depend on how a value came about: fewer terms, then smaller integers. */
export function compareSums(a: Sum, b: Sum): number {
  if (a.terms.length !== b.terms.length) return a.terms.length - b.terms.length;
  if (a.den !== b.den) return a.den < b.den ? -1 : 1;
  for (let i = 0; i < a.terms.length; i++) {
    const s = a.terms[i] as Term;
    const t = b.terms[i] as Term;
    if (s.roots.length !== t.roots.length) return s.roots.length - t.roots.length;
    if (s.coef !== t.coef) {
      const u = s.coef < 0n ? -s.coef : s.coef;
      const v = t.coef < 0n ? -t.coef : t.coef;
      return u !== v ? (u < v ? -1 : 1) : s.coef < t.coef ? -1 : 1;
    }
    for (let j = 0; j < s.roots.length; j++) {
      const c = compareSums(s.roots[j] as Sum, t.roots[j] as Sum);
      if (c !== 0) return c;
    }
  }
  return 0;
}
