/**
 * Expressions of non-real numbers that keep roots of non-real numbers.
 *
 * As for real numbers (form.ts), over the field F(i): x = y₀ + Σ y_S with y_S² in F(i), so that √(1+i) is written as
 * such rather than by its real and imaginary parts.
 */

import { mulCx, type Cx } from './complex';
import { finishSparse, isZeroEl, place, toSparse } from './element';
import { signEl } from './enclosure';
import { addSums, formOf, pullOutOfSum, timesI, type Sum } from './form';
import type { Int } from './int';
import { join } from './join';
import type { El, Tower } from './tower';

/** The expression of x with complex roots; for a real x the usual one. */
export function complexForm(x: Cx): Sum {
  if (isZeroEl(x.im)) return formOf(x.re);
  const j = join(x.re.t, x.im.t);
  if (isZeroEl(x.re) || j.t.depth < 2) return addSums([formOf(x.re), timesI(formOf(x.im))]);
  const re = byDeepest(place(x.re, j.t, j.left), j.t);
  const im = byDeepest(place(x.im, j.t, j.right), j.t);
  const zero = x.re.t.field.zero;
  const masks = [...new Set([...re.keys(), ...im.keys()])].sort((a, b) => (a < b ? -1 : 1));
  return addSums(
    masks.map((m) => {
      const y: Cx = { re: re.get(m) ?? zero, im: im.get(m) ?? zero };
      return m === 0n || isZeroEl(y.im) || isZeroEl(y.re) ? complexForm(y) : rootForm(y);
    }),
  );
}

/** The parts of an element by the set of deepest roots they contain. */
function byDeepest(e: El, t: Tower): Map<bigint, El> {
  let deepest = 0n;
  t.gens.forEach((g, i) => {
    if (g.depth === t.depth) deepest |= 1n << BigInt(i);
  });
  const groups = new Map<bigint, Map<bigint, Int>>();
  const s = toSparse(e);
  (s.m as readonly bigint[]).forEach((m, i) => {
    let group = groups.get(m & deepest);
    if (group === undefined) groups.set(m & deepest, (group = new Map<bigint, Int>()));
    group.set(m, s.c[i] as Int);
  });
  return new Map([...groups].map(([m, group]) => [m, finishSparse(t, group, e.den)]));
}

/** ±√(y²) with integers pulled out; y is neither real nor purely imaginary. */
function rootForm(y: Cx): Sum {
  const square = complexForm(mulCx(y, y));
  // √(N/d) = √(N·d)/d
  const whole: Sum = {
    ...square,
    den: 1n,
    terms: square.terms.map((t) => ({ ...t, coef: t.coef * square.den })),
  };
  const { scale, inner } = pullOutOfSum(whole);
  const sign = signEl(y.re) > 0 ? 1n : -1n;
  return addSums([
    {
      terms: [{ coef: sign * scale, roots: [inner], imaginary: false }],
      den: square.den,
      depth: inner.depth + 1,
    },
  ]);
}
