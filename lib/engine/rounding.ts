/** Rounding to whole numbers, exactly. */

import { floorEl, signEl } from './enclosure';
import { isRationalEl, numerator, subEl } from './element';
import * as Z from './int';
import type { El } from './tower';
import type { Multiple, Rounding } from './types';

/** The whole number that x rounds to, and the side it lies on. Ties exist for rationals only and are seen exactly. */
export function roundTo(x: El, rounding: Rounding): Multiple {
  const below = floorEl(x);
  if (isRationalEl(x) && x.den === 1) return { multiple: below, direction: 'exact' };
  if (rounding === 'down') return { multiple: below, direction: 'down' };
  if (rounding === 'up') return { multiple: below + 1n, direction: 'up' };
  const side = compareWithHalf(x, below);
  const up = side > 0 || (side === 0 && (rounding === 'half-up' || (below & 1n) === 1n));
  return up ? { multiple: below + 1n, direction: 'up' } : { multiple: below, direction: 'down' };
}

/** Sign of x − below − 1/2. */
function compareWithHalf(x: El, below: bigint): number {
  if (isRationalEl(x)) {
    const d = BigInt(x.den);
    const twice = 2n * (BigInt(numerator(x)) - below * d);
    return twice < d ? -1 : twice > d ? 1 : 0;
  }
  const half: El = { t: x.t.field.base, c: [Z.small(2n * below + 1n)], m: null, den: 2 };
  return signEl(subEl(x, half));
}
