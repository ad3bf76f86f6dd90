/**
 * Roots over one real quadratic field, written with a root and its conjugate.
 *
 * Let y² = A + B√m with A² − m·B² = m·q² (the cyclic quartic case). For m = b² + c² and a suitable integer r the roots
 * √δ, √δ′ with δ = r(m + b√m), δ′ = r(m − b√m) lie in the field of y and are a basis of the multiples of y by
 * the quadratic field, so y = p√δ + q√δ′ with rational p, q. So √(170+38√17) = √(34−2√17) + 2√(34+2√17), which is how
 * Gauss wrote the seventeenth part of the circle.
 */

import * as Z from './int';
import { exactRoot, splitSquare } from './integers';
import {
  inverseEl,
  integerEl,
  isRationalEl,
  mulEl,
  numerator,
  rootOfTop,
  scaleEl,
  subEl,
  addEl,
  splitTop,
} from './element';
import { signEl } from './enclosure';
import { rootInField } from './root-in-field';
import type { El, Gen, Tower } from './tower';

/** y as rational multiples of two conjugate roots. */
export interface ConjugatePair {
  parts: { factor: El; radicand: El }[];
}

/** That splitting of y, which lies in a tower {m, √(…)} of degree four, with the least b; null when there is none. */
export function conjugatePair(y: El): ConjugatePair | null {
  const square = mulEl(y, y);
  const t = square.t;
  if (t.k !== 1 || !t.flat) return null;
  const m = BigInt((t.gens[0] as Gen).int);
  const { low, high } = splitTop(square);
  const norm = subEl(mulEl(low, low), scaleEl(mulEl(high, high), Z.small(m)));
  // norm = m·q² ⇔ m·norm is a square
  const mq = rationalRootOf(scaleEl(norm, Z.small(m)));
  if (mq === null || m > 10_000n) return null;
  for (let b = 1n; b * b < m; b++) {
    const c = exactRoot(m - b * b);
    if (c === null || c === 0n) continue;
    const pair = splitBy(y, square, t, m, b, c);
    if (pair !== null) return pair;
  }
  return null;
}

function squarefree(n: bigint): bigint {
  return splitSquare(n, 2000).factors.reduce((p, q) => p * q, 1n);
}

function rationalRootOf(x: El): El | null {
  return isRationalEl(x) ? rootInField(x, x.t.field.base) : null;
}

function splitBy(
  y: El,
  square: El,
  t: Tower,
  m: bigint,
  b: bigint,
  c: bigint,
): ConjugatePair | null {
  const f = t.field;
  const root = rootOfTop(t);
  const base = addEl(integerEl(f, Z.small(m)), scaleEl(root, Z.small(b)));
  // square·base is a rational r times a square: r from the norm, as in denesting.
  const z = mulEl(square, base);
  const parts = isRationalEl(z) ? { low: z, high: integerEl(f, 0) } : splitTop(z);
  const n = rationalRootOf(
    subEl(mulEl(parts.low, parts.low), scaleEl(mulEl(parts.high, parts.high), Z.small(m))),
  );
  if (n === null) return null;
  const larger = signEl(n) < 0 ? subEl(parts.low, n) : addEl(parts.low, n);
  if (signEl(larger) <= 0) return null;
  // r and r·m name the same class; the smaller is wanted.
  const w = scaleEl(larger, 2);
  const first = squarefree(BigInt(numerator(w)) * BigInt(w.den));
  const second = squarefree(first * m);
  const candidates = first < second ? [first, second] : [second, first];
  for (const r of candidates) {
    const delta = scaleEl(base, Z.small(r));
    const ratio = rootInField(mulEl(square, inverseEl(delta)), t);
    if (ratio === null) continue;
    // y = (u + v√m)·√δ, and √m·√δ = c·√δ′ + b·√δ.
    const signed = signEl(ratio) === signEl(y) ? ratio : scaleEl(ratio, -1);
    const { low: u, high: v } = isRationalEl(signed)
      ? { low: signed, high: integerEl(f, 0) }
      : splitTop(signed);
    const conjugate = scaleEl(
      subEl(integerEl(f, Z.small(m)), scaleEl(root, Z.small(b))),
      Z.small(r),
    );
    return {
      parts: [
        { factor: addEl(u, scaleEl(v, Z.small(b))), radicand: delta },
        { factor: scaleEl(v, Z.small(c)), radicand: conjugate },
      ].filter((part) => numerator(part.factor) !== 0),
    };
  }
  return null;
}
