/**
 * The smallest tower that shows a value.
 *
 * Inside the engine all roots of integers are written with prime radicands. A value may need only some products of them
 * (√6 without √2 and √3): here the sets of primes that occur are brought to a basis over GF(2), smallest radicands first, and
 * everything is rewritten in that. Where the field that the value generates is still smaller than its tower, the value
 * is evaluated again from its own expression, which often names the smaller field.
 */

import * as Z from './int';
import type { Int } from './int';
import { isqrt } from './integers';
import {
  addEl,
  finishSparse,
  integerEl,
  isZeroEl,
  mulEl,
  place,
  scaleEl,
  toSparse,
} from './element';
import { formOf, type Sum } from './form';
import { join } from './join';
import type { Cx } from './complex';
import { degreeOf } from './minimal-polynomial';
import { sqrtReal } from './real-root';
import { Field, type El, type Gen, type Tower } from './tower';

/** A complex number with both parts written in one tower. */
export interface Presented {
  t: Tower;
  re: El;
  im: El;
}

/** Both parts in the coordinates of their common tower (not trimmed); an imaginary part 0 stays a rational. */
export function together(x: Cx): Presented {
  const j = join(x.re.t, x.im.t);
  return {
    t: j.t,
    re: place(x.re, j.t, j.left),
    im: isZeroEl(x.im) ? x.im : place(x.im, j.t, j.right),
  };
}

/** Whether each root of an integer stands alone in some coordinate, so that no smaller set of roots will do. */
function needsAll(x: Presented, flat: number): boolean {
  for (let i = 0; i < flat; i++) {
    const alone = (e: El): boolean => {
      const at = e.t === x.t ? i : e.t.position(x.t.gens[i] as Gen);
      if (at < 0) return false;
      return e.m === null ? e.c[1 << at] !== 0 : e.m.includes(1n << BigInt(at));
    };
    if (!alone(x.re) && !alone(x.im) && !x.t.gens.some((g) => g.int === 0 && alone(g.rad)))
      return false;
  }
  return true;
}

/** As `rebase` where only the degree counts: the order of the roots is left as it is when all are needed. */
export function compact(x: Presented): Presented {
  const flat = x.t.k - x.t.nested;
  return needsAll(x, flat) ? x : rebase(x);
}

/** The same value with as few roots of integers as its coordinates allow. The new tower belongs to a field of its own, good for arithmetic only. */
export function rebase(x: Presented): Presented {
  const t = x.t;
  const flat = t.gens.filter((g) => g.int !== 0).length;
  const flatMask = (1n << BigInt(flat)) - 1n;
  const masks = new Set<bigint>();
  const take = (e: El): void => {
    if (isZeroEl(e)) return;
    for (const m of toSparse(e).m as readonly bigint[]) if (m & flatMask) masks.add(m & flatMask);
  };
  take(x.re);
  take(x.im);
  const radicands = t.gens.slice(flat).map((g) => inTower(g.rad, t));
  radicands.forEach(take);
  const sorted = [...masks]
    .map((m) => ({ m, n: product(t, m) }))
    .sort((a, b) => (a.n < b.n ? -1 : 1));
  const basis: { m: bigint; n: bigint }[] = [];
  const reduced: { v: bigint; set: bigint }[] = [];
  for (const s of sorted) {
    const r = express(s.m, reduced);
    if (r.v !== 0n) {
      reduced.push({ v: r.v, set: r.set | (1n << BigInt(basis.length)) });
      basis.push(s);
      reduced.sort((a, b) => (a.v > b.v ? -1 : 1));
    }
  }
  if (basis.length === flat && basis.every((b, i) => b.m === 1n << BigInt(i))) return x;
  const field = new Field(t.field.budget, Z.mul);
  let tower = field.base;
  for (const b of basis)
    tower = tower.child(field.addGen(1, Z.small(b.n), integerEl(field, Z.small(b.n))));
  const size = BigInt(basis.length);
  const move = (e: El, target: Tower): El => {
    const table = new Map<bigint, Int>();
    const s = toSparse(e);
    // √m = (∏ of basis roots)/c, so a coordinate of √m is divided by c; one denominator for all.
    const parts = (s.m as readonly bigint[]).map((mask, j) => {
      const set = express(mask & flatMask, reduced).set;
      let n = 1n;
      basis.forEach((b, i) => {
        if ((set >> BigInt(i)) & 1n) n *= b.n;
      });
      const c = isqrt(n / product(t, mask & flatMask));
      return { mask: set | ((mask >> BigInt(flat)) << size), c, value: s.c[j] as Int };
    });
    let common = 1n;
    for (const p of parts) common = (common / BigInt(Z.gcd(Z.small(common), Z.small(p.c)))) * p.c;
    for (const p of parts) table.set(p.mask, Z.mul(p.value, Z.small(common / p.c)));
    return spreadOut(target, table, Z.mul(s.den, Z.small(common)));
  };
  for (const [i, r] of radicands.entries()) {
    const moved = move(r, tower);
    const trimmed = finishSparse(
      tower,
      new Map((toSparse(moved).m as bigint[]).map((m, j) => [m, toSparse(moved).c[j] as Int])),
      moved.den,
    );
    if (trimmed.den !== 1) return x;
    tower = tower.child(field.addGen((t.gens[flat + i] as Gen).depth, 0, trimmed));
  }
  return {
    t: tower,
    re: move(x.re, tower),
    im: isZeroEl(x.im) ? integerEl(field, 0) : move(x.im, tower),
  };
}

function spreadOut(t: Tower, table: Map<bigint, Int>, den: Int): El {
  const masks = [...table.keys()].sort((a, b) => (a < b ? -1 : 1));
  const g = masks.reduce<Int>((a, m) => Z.gcd(a, table.get(m) as Int), den);
  return {
    t,
    m: masks,
    c: masks.map((m) => Z.quotient(table.get(m) as Int, g)),
    den: Z.quotient(den, g),
  };
}

function inTower(e: El, t: Tower): El {
  return place(e, t, { positions: e.t.positionsIn(t), images: null });
}

function product(t: Tower, mask: bigint): bigint {
  let n = 1n;
  for (let i = 0, rest = mask; rest !== 0n; i++, rest >>= 1n) {
    if (rest & 1n) n *= BigInt((t.gens[i] as Gen).int);
  }
  return n;
}

/** Reduces a mask by a list whose leading bits descend; `set` says which basis members were used. */
function express(
  mask: bigint,
  reduced: readonly { v: bigint; set: bigint }[],
): { v: bigint; set: bigint } {
  let v = mask;
  let set = 0n;
  for (const r of reduced) {
    if ((v ^ r.v) < v) {
      v ^= r.v;
      set ^= r.set;
    }
  }
  return { v, set };
}

/** The smallest tower found for x. Degree is asked first; only where the tower is larger is the value evaluated again. */
export function present(x: Cx): Presented {
  const own = rebase(together(x));
  const imaginary = isZeroEl(x.im) ? 1 : 2;
  if (own.t.nested === 0 || own.t.k > 5 || degreeOf(x) === imaginary * 2 ** own.t.k) return own;
  const again = rebase(together(evaluateAgain(x)));
  return again.t.k < own.t.k ? again : own;
}

/** Evaluates the value's own expression in a fresh field, where only the roots that it names exist. */
function evaluateAgain(x: Cx): Cx {
  const field = new Field(x.re.t.field.budget, Z.mul);
  return { re: evaluateForm(field, formOf(x.re)), im: evaluateForm(field, formOf(x.im)) };
}

function evaluateForm(f: Field, s: Sum): El {
  let sum = integerEl(f, 0);
  for (const t of s.terms) {
    let term = integerEl(f, Z.small(t.coef));
    for (const r of t.roots) term = mulEl(term, sqrtReal(evaluateForm(f, r)));
    sum = addEl(sum, term);
  }
  return scaleEl(sum, 1, Z.small(s.den));
}
