/**
 * Square roots of positive real elements.
 *
 * In this order: the square part is pulled out; a root in the field itself is looked for; then one of lower nesting, by the norm
 * (Borodin, Fagin, Hopcroft and Tompa 1985; Landau 1992); then one that a known root of the same square class gives; only then
 * a new generator is adjoined, whose radicand is thereby proven not to be a square.
 */

import * as Z from './int';
import type { Int } from './int';
import { bigGcd, SMALL_PRIMES, splitSquare } from './integers';
import {
  addEl,
  integerEl,
  inverseEl,
  isRationalEl,
  isZeroEl,
  mulEl,
  negEl,
  numerator,
  rationalEl,
  rootOf,
  rootOfTop,
  scaleEl,
  splitTop,
  subEl,
} from './element';
import { signEl } from './enclosure';
import { characters } from './residues';
import { isSeparated } from './separation';
import { rootInField } from './root-in-field';
import type { El, Field, Gen, Tower } from './tower';

/** √n for a positive integer: the roots of its squarefree factors, each a generator. */
export function rootOfInteger(f: Field, n: Int): El {
  if (typeof n === 'number' && n < SMALL && f.unsplit.length === 0) return rootOfSmall(f, n);
  const split = splitSquare(BigInt(n));
  let scale = split.square;
  let out = integerEl(f, 1);
  const careful = !split.complete || f.unsplit.length > 0;
  const exponents = careful
    ? refine(f, split.factors)
    : new Map(split.factors.map((p): [bigint, number] => [p, 1]));
  for (const [p, e] of exponents) {
    if (e > 1) scale *= p ** BigInt(e >> 1);
    if (e & 1) out = mulEl(out, rootOf(integerGen(f, Z.small(p), split.complete)));
  }
  return scaleEl(out, Z.small(scale));
}

/** Trial division by the table of small primes is complete below this. */
const SMALL = 4096 * 4096;

function rootOfSmall(f: Field, n: number): El {
  let rest = n;
  let scale = 1;
  let out: El | null = null;
  const take = (p: number): void => {
    const root = rootOf(integerGen(f, p, true));
    out = out === null ? root : mulEl(out, root);
  };
  for (const p of SMALL_PRIMES) {
    if (p * p > rest) break;
    while (rest % (p * p) === 0) {
      rest /= p * p;
      scale *= p;
    }
    if (rest % p === 0) {
      rest /= p;
      take(p);
    }
  }
  if (rest > 1) take(rest);
  return out === null ? integerEl(f, scale) : scaleEl(out, scale);
}

function integerGen(f: Field, n: Int, prime: boolean): Gen {
  let g = f.integerRoots.get(n);
  if (g === undefined) {
    g = f.addGen(1, n, integerEl(f, n));
    f.integerRoots.set(n, g);
    if (!prime) f.unsplit.push(g);
  }
  return g;
}

/**
 * Splits factors against the integers in use, so that all radicands stay coprime (factor refinement; Bach, Driscoll and
 * Shallit 1993). An older radicand that splits is marked, and its root is replaced where it is met.
 */
function refine(f: Field, factors: readonly bigint[]): Map<bigint, number> {
  const out = new Map<bigint, number>();
  const todo = [...factors];
  while (todo.length > 0) {
    const p = todo.pop() as bigint;
    if (p === 1n) continue;
    let g = 1n;
    for (const n of [...[...f.integerRoots.keys()].map(BigInt), ...out.keys()]) {
      if (n === p) continue;
      g = bigGcd(n, p);
      if (g === 1n) continue;
      const old = f.integerRoots.get(Z.small(n));
      if (g !== n && old !== undefined) {
        f.integerRoots.delete(Z.small(n));
        old.parts = [g, n / g];
      }
      if (g !== n && out.has(n)) {
        const e = out.get(n) as number;
        out.delete(n);
        for (let i = 0; i < e; i++) todo.push(g, n / g);
      }
      break;
    }
    if (g === 1n || g === p) out.set(p, (out.get(p) ?? 0) + 1);
    else todo.push(g, p / g);
  }
  return out;
}

/** √x for a real x > 0, positive. */
export function sqrtReal(x: El): El {
  const f = x.t.field;
  if (isZeroEl(x)) return x;
  const cache = f.rootCache;
  const key = x.t.k === 0 && x.den === 1 ? numerator(x) : keyOf(x);
  let r = cache.get(key);
  if (r === undefined) {
    r = x.t.k === 0 ? findRoot(x) : positive(findRoot(x));
    cache.set(key, r);
  }
  return r;
}

export function keyOf(x: El): string {
  return `${x.t.id}/${x.den}/${x.c.join()}${x.m === null ? '' : `/${x.m.join()}`}`;
}

function positive(r: El): El {
  return signEl(r) < 0 ? negEl(r) : r;
}

/** x = scale²·y with y integral and its content squarefree. */
function pullOut(x: El): { scale: El; y: El } {
  const f = x.t.field;
  let g: Int = 0;
  for (const c of x.c) if (c !== 0) g = Z.gcd(g, c);
  // x = (g·P)/den = g·den·P/den².
  const split = splitSquare(BigInt(Z.mul(g, x.den)), 2000);
  const rest = split.factors.reduce((a, b) => a * b, 1n);
  const scale = rationalEl(f, Z.small(split.square), x.den);
  return {
    scale,
    y: { t: x.t, c: x.c.map((c) => Z.mul(Z.quotient(c, g), Z.small(rest))), m: x.m, den: 1 },
  };
}

function findRoot(x: El): El {
  const f = x.t.field;
  f.budget.charge(100);
  if (isRationalEl(x)) {
    const n = Z.mul(numerator(x), x.den);
    return scaleEl(rootOfInteger(f, n), 1, x.den);
  }
  const { scale, y } = pullOut(x);
  return mulEl(scale, rootOfIntegral(y));
}

function rootOfIntegral(y: El): El {
  const own = rootInField(y, y.t);
  if (own !== null) return own;
  const lower = denest(y, y.t.depth);
  if (lower !== null) return lower;
  const fourth = byFourthRoot(y);
  if (fourth !== null) return fourth;
  return classRoot(y);
}

/**
 * A root of y of nesting at most `depth`, where y itself has that depth and no root in its field; or null.
 * With y = a + b·s and n² = a² − d·b², √y = h + b·s/(2h) where h² = (a + n)/2: no deeper than h.
 */
function denest(y: El, depth: number): El | null {
  if (depth === 1 && y.t.k > 2 && isSeparated(y)) return null;
  const { low, high } = splitTop(y);
  const norm = subEl(mulEl(low, low), mulEl(mulEl(high, high), (y.t.top as Gen).rad));
  if (signEl(norm) <= 0) return null;
  const n = shallowRoot(norm, y.t.parent as Tower, depth - 1);
  if (n === null) return null;
  for (const half of [scaleEl(addEl(low, n), 1, 2), scaleEl(subEl(low, n), 1, 2)]) {
    if (signEl(half) <= 0) continue;
    const h = shallowRoot(half, half.t, depth);
    if (h === null) continue;
    const s = rootOfTop(y.t);
    return addEl(h, mulEl(scaleEl(mulEl(high, s), 1, 2), inverseEl(h)));
  }
  return null;
}

/** a² − d·b² for y = a + b·s with the top generator s. */
export function normOf(y: El): El {
  const { low, high } = splitTop(y);
  return subEl(mulEl(low, low), mulEl(mulEl(high, high), (y.t.top as Gen).rad));
}

/** A root of x > 0 that lies in the field of t, or whose nesting is at most `depth`; or null. */
function shallowRoot(x: El, t: Tower, depth: number): El | null {
  if (x.t.depth + 1 <= depth) return sqrtReal(x);
  const here = x.t.positionsIn(t) === null ? null : rootInField(x, t);
  if (here !== null) return here;
  if (isRationalEl(x) || x.t.depth > depth) return null;
  const own = rootInField(x, x.t);
  if (own !== null) return own;
  return denest(x, depth);
}

/** √(√m · z²·r) = ⁴√m · z·√r: the fourth-root form of Borodin, Fagin, Hopcroft and Tompa, over at most three roots of integers. */
function byFourthRoot(y: El): El | null {
  if (!y.t.flat || y.t.k > 3 || isMonomial(y)) return null;
  // Over one root √m the norm of y·√m is −m times that of y: it must not be negative.
  if (y.t.k === 1 && signEl(normOf(y)) > 0) return null;
  for (let mask = 1; mask < 1 << y.t.k; mask++) {
    const root = monomial(y.t, mask);
    const other = mulEl(y, root);
    const r = rootInField(other, other.t) ?? denest(other, 1);
    if (r !== null) return mulEl(r, inverseEl(sqrtReal(root)));
  }
  return null;
}

function isMonomial(y: El): boolean {
  return y.c.filter((c) => c !== 0).length === 1;
}

function monomial(t: Tower, mask: number): El {
  let out = integerEl(t.field, 1);
  for (let i = 0; i < t.k; i++) {
    if ((mask >> i) & 1) out = mulEl(out, rootOf(t.gens[i] as Gen));
  }
  return out;
}

interface ClassEntry {
  gen: Gen;
  /** Its characters; worked out when the first comparison asks. */
  seen: { bits: number; known: number } | null;
}

/** How many characters are kept with each nested generator to recognise its square class. */
const CLASS_CHARACTERS = 14;

/** √y from a generator of the same square class over the same tower, or as a new generator. */
function classRoot(y: El): El {
  const t = y.t;
  const f = t.field;
  let classes = f.caches.get(`classes/${t.id}`) as ClassEntry[] | undefined;
  if (classes === undefined) f.caches.set(`classes/${t.id}`, (classes = []));
  const mine = classes.length === 0 ? null : characters(y, t, CLASS_CHARACTERS);
  for (const e of classes) {
    e.seen ??= characters(e.gen.rad, t, CLASS_CHARACTERS);
    if (mine === null) break;
    if ((e.seen.bits ^ mine.bits) & e.seen.known & mine.known) continue;
    const r = rootInField(mulEl(y, e.gen.rad), t);
    if (r !== null) return mulEl(mulEl(r, inverseEl(e.gen.rad)), rootOf(e.gen));
  }
  f.budget.within('nesting', t.depth + 1);
  f.budget.within('towerHeight', t.nested + 1);
  const gen = f.addGen(t.depth + 1, 0, y);
  classes.push({ gen, seen: mine });
  return rootOf(gen);
}
