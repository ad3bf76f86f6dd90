/**
 * Joining two towers when their values meet.
 *
 * The generators of both are put in order (by depth, then age) and taken one by one; each is either proven independent of
 * those before it, or found to be a number of the field they make, by which it is replaced. Roots of distinct coprime
 * squarefree integers need no proof. Results are kept for each pair of towers.
 */

import { OverLimit } from './limits';
import { characterOfInteger, character, homOf, PATIENCE } from './residues';
import {
  integerEl,
  inverseEl,
  isRationalEl,
  mulEl,
  numerator,
  rootOf,
  scaleEl,
  substitute,
} from './element';
import { rootInField } from './root-in-field';
import { splitSquare } from './integers';
import { normOf, rootOfInteger, sqrtReal } from './real-root';
import { before, type El, type Field, type Gen, type Placing, type Tower } from './tower';
import { signEl } from './enclosure';

interface Joined {
  t: Tower;
  left: Placing;
  right: Placing;
}

/** The smallest known tower that holds the values of both, and how each is written in it. */
export function join(a: Tower, b: Tower): Joined {
  a.joins ??= new Map();
  let j = a.joins.get(b.id);
  if (j === undefined) {
    j = makeJoin(a, b);
    a.joins.set(b.id, j);
  }
  return j;
}

function makeJoin(a: Tower, b: Tower): Joined {
  const inB = a.positionsIn(b);
  if (inB !== null) {
    return {
      t: b,
      left: { positions: inB, images: null },
      right: { positions: null, images: null },
    };
  }
  const inA = b.positionsIn(a);
  if (inA !== null) {
    return {
      t: a,
      left: { positions: null, images: null },
      right: { positions: inA, images: null },
    };
  }
  const all = merge(a.gens, b.gens);
  const built = build(a.field, all);
  return { t: built.t, left: placing(a, built), right: placing(b, built) };
}

interface Built {
  t: Tower;
  images: Map<number, El>;
}

function placing(t: Tower, built: Built): Placing {
  const positions = t.positionsIn(built.t);
  if (positions !== null) return { positions, images: null };
  return {
    positions: null,
    images: t.gens.map((g) => built.images.get(g.id) ?? rootOf(g)),
  };
}

function merge(a: readonly Gen[], b: readonly Gen[]): Gen[] {
  const out = [...a];
  for (const g of b) if (!out.includes(g)) out.push(g);
  return out.sort((x, y) => (before(x, y) ? -1 : 1));
}

/** Builds an independent tower that contains all the given generators, some of them perhaps as combinations of others. */
function build(f: Field, wanted: readonly Gen[]): Built {
  let gens = [...wanted];
  const forced = new Map<number, El>();
  for (let round = 0; round < 40; round++) {
    f.budget.charge(200);
    const images = new Map<number, El>(forced);
    let t = f.base;
    let extra: Gen[] | null = null;
    for (const g of gens) {
      if (images.has(g.id)) continue;
      if (g.parts !== null) {
        const image = g.parts.map((n) => rootOfInteger(f, n)).reduce((x, y) => mulEl(x, y));
        images.set(g.id, image);
        forced.set(g.id, image);
        extra = image.t.gens.filter((h) => !gens.includes(h));
        if (extra.length > 0) break;
        continue;
      }
      const known = t.children.get(g.id);
      if (known !== undefined || g.int !== 0) {
        t = known ?? t.child(g);
        continue;
      }
      const moved = g.rad.t.gens.some((h) => images.has(h.id));
      const image = moved ? sqrtReal(resolve(g.rad, images)) : dependence(t, g);
      if (image === null) {
        t = t.child(g);
        f.budget.within('towerHeight', t.nested);
        continue;
      }
      extra = image.t.gens.filter((h) => t.position(h) < 0 && !gens.includes(h));
      images.set(g.id, image);
      forced.set(g.id, image);
      if (extra.length > 0 || image.t.positionsIn(t) === null) {
        extra = [...extra, ...image.t.gens.filter((h) => !gens.includes(h))];
        break;
      }
    }
    if (extra === null || extra.length === 0) {
      const missing = [...images.values()].some((e) => e.t.positionsIn(t) === null);
      if (!missing) return { t, images };
      for (const [id, e] of images) {
        if (e.t.positionsIn(t) === null) forced.set(id, resolve(e, images));
      }
      if (extra === null) extra = [];
      for (const e of forced.values())
        for (const h of e.t.gens) if (!gens.includes(h)) extra.push(h);
    }
    gens = merge(gens, [...new Set(extra)]);
  }
  throw new OverLimit('steps', f.budget.limits.steps, f.budget.limits.steps + 1);
}

function resolve(x: El, images: Map<number, El>): El {
  return substitute(
    x,
    x.t.gens.map((g) => images.get(g.id) ?? rootOf(g)),
  );
}

/**
 * Null when √d, the nested generator g, is proven independent of the tower t (which holds d); otherwise the
 * number of t, or of t with one more root √r of an integer, that it is.
 *
 * The r to try divide the norms of the radicands at hand (a prime that divides none of them is unramified in all and cannot
 * help). Residues give linear equations over GF(2) for the exponents of r; when they have no solution, independence is
 * proven, and a solution is verified by an exact root.
 */
function dependence(t: Tower, g: Gen): El | null {
  const nestedElsewhere = t.gens.some((h) => h.int === 0 && g.rad.t.position(h) < 0);
  // At depth 2 denesting has already shown that d is no rational multiple of a square, so roots of integers change nothing.
  if (!nestedElsewhere && g.depth === 2) return null;
  const relevant = relevantPart(t, g);
  const k = relevant.t;
  const primes = relevant.outside;
  const rows: { bits: number; odd: boolean }[] = [];
  let next = 0;
  for (let attempt = 0; attempt < 4; attempt++) {
    const effort = { left: PATIENCE };
    const until = next + primes.length + 12;
    for (; next < until; next++) {
      const h = homOf(k, next, effort);
      if (h === null) break;
      const c = character(g.rad, k, h);
      if (c === 0) continue;
      let bits = 0;
      let usable = true;
      primes.forEach((q, i) => {
        const x = characterOfInteger(q, h);
        if (x === 0) usable = false;
        else if (x < 0) bits |= 1 << i;
      });
      if (usable && !addRow(rows, bits, c < 0)) return null;
    }
    const r = solution(rows, primes);
    const root = rootInField(r === 1n ? g.rad : scaleEl(g.rad, toInt(r)), k);
    if (root !== null) {
      const positive = signEl(root) < 0 ? scaleEl(root, -1) : root;
      return r === 1n ? positive : mulEl(positive, inverseEl(rootOfInteger(t.field, r)));
    }
    if (r === 1n && primes.length === 0) return null;
  }
  const plain = rootInField(g.rad, k);
  return plain === null ? null : signEl(plain) < 0 ? scaleEl(plain, -1) : plain;
}

function toInt(n: bigint): number | bigint {
  return n <= BigInt(Number.MAX_SAFE_INTEGER) ? Number(n) : n;
}

/** Adds an equation to a reduced system; false when it contradicts the others. */
function addRow(rows: { bits: number; odd: boolean }[], bits: number, odd: boolean): boolean {
  let b = bits;
  let o = odd;
  for (const row of rows) {
    if (b & lowest(row.bits)) {
      b ^= row.bits;
      o = o !== row.odd;
    }
  }
  if (b === 0) return !o;
  const pivot = lowest(b);
  for (const row of rows) {
    if (row.bits & pivot) {
      row.bits ^= b;
      row.odd = row.odd !== o;
    }
  }
  rows.push({ bits: b, odd: o });
  return true;
}

function lowest(b: number): number {
  return b & -b;
}

function solution(rows: { bits: number; odd: boolean }[], primes: readonly bigint[]): bigint {
  let r = 1n;
  for (const row of rows) {
    if (row.odd) r *= primes[31 - Math.clz32(lowest(row.bits))] as bigint;
  }
  return r;
}

/** The part of t that can matter to g, and the primes outside t that can. */
function relevantPart(t: Tower, g: Gen): { t: Tower; outside: bigint[] } {
  const nested = t.gens.filter((h) => h.int === 0);
  const sets = [g, ...nested].map(normPrimes);
  if (sets.some((s) => s === null)) return { t, outside: [] };
  const primes = new Set<bigint>([2n]);
  for (const s of sets) for (const q of s as bigint[]) primes.add(q);
  let mask = 0n;
  t.gens.forEach((h, i) => {
    if (h.int === 0 || g.rad.t.position(h) >= 0 || primes.has(BigInt(h.int)))
      mask |= 1n << BigInt(i);
  });
  const inside = new Set(t.gens.map((h) => BigInt(h.int)));
  const outside = [...primes].filter((q) => !inside.has(q)).sort((x, y) => (x < y ? -1 : 1));
  return { t: t.subset(t.closure(mask)).t, outside: outside.slice(0, 30) };
}

/** Primes that divide the absolute norm of the radicand to an odd or even power; null when the norm is too large to be worth it. */
function normPrimes(g: Gen): bigint[] | null {
  const f = g.rad.t.field;
  let cache = f.caches.get('norm-primes') as Map<number, bigint[] | null> | undefined;
  if (cache === undefined) f.caches.set('norm-primes', (cache = new Map()));
  let out = cache.get(g.id);
  if (out === undefined) {
    if (g.rad.t.k > 4) out = null;
    else {
      let n: El = g.rad;
      for (let t: Tower | null = g.rad.t; t !== null && t.k > 0; t = t.parent) {
        if (n.t.position(t.top as Gen) < 0) continue;
        n = normOf(n);
      }
      const value = BigInt(numerator(isRationalEl(n) ? n : integerEl(f, 1)));
      const split = splitSquare(value < 0n ? -value : value);
      const primes = new Set(split.factors);
      for (let s = split.square; s > 1n;) {
        const inner = splitSquare(s);
        inner.factors.forEach((q) => primes.add(q));
        s = inner.square;
      }
      out = [...primes];
    }
    cache.set(g.id, out);
  }
  return out;
}
