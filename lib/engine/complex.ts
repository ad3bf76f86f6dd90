/**
 * Complex numbers as pairs of real elements.
 *
 * All generators are positive real roots, so conjugation, real part and absolute value are a matter of coordinates. The root of
 * a + bi is √((m + a)/2) ± i·√((m − a)/2) with m = √(a² + b²).
 */

import {
  addEl,
  equalEl,
  integerEl,
  inverseEl,
  isRationalEl,
  isZeroEl,
  mulEl,
  negEl,
  scaleEl,
  subEl,
} from './element';
import { signEl } from './enclosure';
import { OutsideDomain } from './limits';
import { sqrtReal } from './real-root';
import type { El, Field } from './tower';
import * as Z from './int';
import { bitLength } from './integers';

/** A complex number by its real and imaginary parts. */
export interface Cx {
  readonly re: El;
  readonly im: El;
}

export function real(re: El): Cx {
  return { re, im: re.t.field.zero };
}

export function isRealCx(a: Cx): boolean {
  return isZeroEl(a.im);
}

export function isZeroCx(a: Cx): boolean {
  return isZeroEl(a.re) && isZeroEl(a.im);
}

export function addCx(a: Cx, b: Cx): Cx {
  if (isRealCx(a) && isRealCx(b)) return real(addEl(a.re, b.re));
  return { re: addEl(a.re, b.re), im: addEl(a.im, b.im) };
}

export function negCx(a: Cx): Cx {
  if (isRealCx(a)) return real(negEl(a.re));
  return { re: negEl(a.re), im: negEl(a.im) };
}

export function subCx(a: Cx, b: Cx): Cx {
  if (isRealCx(a) && isRealCx(b)) return real(subEl(a.re, b.re));
  return { re: subEl(a.re, b.re), im: subEl(a.im, b.im) };
}

export function mulCx(a: Cx, b: Cx): Cx {
  if (isRealCx(a))
    return isRealCx(b) ? real(mulEl(a.re, b.re)) : { re: mulEl(a.re, b.re), im: mulEl(a.re, b.im) };
  if (isRealCx(b)) return { re: mulEl(a.re, b.re), im: mulEl(a.im, b.re) };
  return {
    re: subEl(mulEl(a.re, b.re), mulEl(a.im, b.im)),
    im: addEl(mulEl(a.re, b.im), mulEl(a.im, b.re)),
  };
}

export function inverseCx(a: Cx): Cx {
  if (isRealCx(a)) return real(inverseEl(a.re));
  const n = inverseEl(addEl(mulEl(a.re, a.re), mulEl(a.im, a.im)));
  return { re: mulEl(a.re, n), im: negEl(mulEl(a.im, n)) };
}

export function conjCx(a: Cx): Cx {
  return { re: a.re, im: negEl(a.im) };
}

/** The principal root. */
export function sqrtCx(a: Cx): Cx {
  const f = a.re.t.field;
  const zero = f.zero;
  if (isRealCx(a)) {
    return signEl(a.re) < 0 ? { re: zero, im: sqrtReal(negEl(a.re)) } : real(sqrtReal(a.re));
  }
  const m = absCx(a);
  if (isZeroEl(a.re)) {
    const h = sqrtReal(scaleEl(m, 1, 2));
    return { re: h, im: signEl(a.im) < 0 ? negEl(h) : h };
  }
  const re = sqrtReal(scaleEl(addEl(m, a.re), 1, 2));
  return { re, im: mulEl(scaleEl(a.im, 1, 2), inverseEl(re)) };
}

export function absCx(a: Cx): El {
  if (isRealCx(a)) return signEl(a.re) < 0 ? negEl(a.re) : a.re;
  if (isZeroEl(a.re)) return signEl(a.im) < 0 ? negEl(a.im) : a.im;
  return sqrtReal(addEl(mulEl(a.re, a.re), mulEl(a.im, a.im)));
}

/** aⁿ by squaring. The size of a rational power is checked before it is worked out. */
export function powCx(f: Field, a: Cx, n: bigint): Cx {
  const one = real(integerEl(f, 1));
  if (n === 0n) return one;
  if (isZeroCx(a)) {
    if (n < 0n) throw new OutsideDomain('division-by-zero', '0 has no negative powers.');
    return a;
  }
  if (n < 0n) return powCx(f, inverseCx(a), -n);
  if (isRealCx(a) && isRationalEl(a.re)) {
    const bits = Math.max(bitLength(BigInt(a.re.c[0] as Z.Int)), bitLength(BigInt(a.re.den)));
    if (bits > 1) f.budget.within('integerBits', (bits - 1) * Number(n));
    const top = BigInt(a.re.c[0] as Z.Int);
    const e = bits > 1 ? n : n & 1n;
    return real({ ...a.re, c: [Z.small(top ** e)], den: Z.small(BigInt(a.re.den) ** e) });
  }
  let out: Cx | null = null;
  let x = a;
  for (let k = n; ; k >>= 1n) {
    f.budget.charge(1000);
    if (k & 1n) out = out === null ? x : mulCx(out, x);
    if (k === 1n) return out as Cx;
    x = mulCx(x, x);
  }
}

export function equalCx(a: Cx, b: Cx): boolean {
  return equalEl(a.re, b.re) && equalEl(a.im, b.im);
}
