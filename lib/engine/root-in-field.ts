/**
 * Is x a square in the field of a tower, and of what?
 *
 * Residues prove most non-squares at once. Otherwise the tower is descended with the norm: for x = a + b·s, s² = d, b ≠ 0,
 *   x = (u + v·s)²  ⇔  u² + d·v² = a and 2uv = b,
 * so u² is a root of X² − aX + d·b²/4, that is (a ± n)/2 with n² = a² − d·b²: x is a square exactly when the norm has a root n
 * in the field below and one of (a ± n)/2 is a square there (the product of the two is d times a square, so when one is d
 * times a square the other is a square). For b = 0, x is a square exactly when a or a·d is one below.
 * The descent ends in the rationals, where integer square roots decide. It is complete: null is a proof.
 */

import * as Z from './int';
import { exactRoot } from './integers';
import {
  addEl,
  inverseEl,
  isZeroEl,
  mulEl,
  numerator,
  rationalEl,
  rootOf,
  rootOfTop,
  scaleEl,
  splitTop,
  subEl,
} from './element';
import { maybeSquare } from './residues';
import { isSeparated } from './separation';
import type { El, Gen, Tower } from './tower';

/** A root of x in the field of t (either one), or null when there is none. x lies in t. */
export function rootInField(x: El, t: Tower): El | null {
  if (isZeroEl(x)) return x;
  if (x.t.k === 0) {
    const r = rationalRoot(x, t);
    if (r !== null || t.flat) return r;
  }
  if (x.t.flat && t.flat && x.t.k > 4 && isSeparated(x)) return null;
  if (t.k > 2 || !t.flat) {
    if (!maybeSquare(x, t, 4 + 2 * t.k)) return null;
  }
  const below = t.parent as Tower;
  const top = t.top as Gen;
  if (x.t.position(top) < 0) {
    const r = rootInField(x, below);
    if (r !== null) return r;
    const q = rootInField(mulEl(x, top.rad), below);
    return q === null ? null : mulEl(mulEl(q, inverseEl(top.rad)), rootOfTop(t));
  }
  const { low, high } = splitTop(x);
  const norm = subEl(mulEl(low, low), mulEl(mulEl(high, high), top.rad));
  const n = rootInField(norm, below);
  if (n === null) return null;
  for (const half of [scaleEl(addEl(low, n), 1, 2), scaleEl(subEl(low, n), 1, 2)]) {
    const u = rootInField(half, below);
    if (u === null || isZeroEl(u)) continue;
    const v = mulEl(scaleEl(high, 1, 2), inverseEl(u));
    return addEl(u, mulEl(v, rootOfTop(t)));
  }
  return null;
}

/** Root of a rational in the multiquadratic part of t: strip the radicands that divide it an odd number of times, then an integer root decides. */
function rationalRoot(x: El, t: Tower): El | null {
  const n = numerator(x);
  if (n < 0) return null;
  let v = BigInt(Z.mul(n, x.den));
  let root: El | null = null;
  let scale = 1n;
  for (let i = 0; i < t.k; i++) {
    const g = t.gens[i] as Gen;
    if (g.int === 0) break;
    const q = BigInt(g.int);
    let odd = false;
    while (v % q === 0n) {
      v /= q;
      odd = !odd;
      if (!odd) scale *= q;
    }
    if (!odd) continue;
    const e = rootOf(g);
    root = root === null ? e : mulEl(root, e);
  }
  const r = exactRoot(v);
  if (r === null) return null;
  const size = rationalEl(t.field, Z.small(r * scale), x.den);
  return root === null ? size : mulEl(size, root);
}
