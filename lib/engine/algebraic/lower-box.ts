/** Enclosures of the generators of a chain of subfields, each from the one above it. */
import type { Budget } from '../limits';
import { derivativeOf, type IntegerPoly } from '../polynomials/integer-poly';
import type { Integral } from '../subfields/integral';
import type { Subfield } from '../subfields/subfield';
import { addBox, areApart, evaluateBox, invertBox, multiplyBox, pointBox, type Box } from './box';
import { isolatedRoots, refinedBox, type Isolated } from './near';
import { boxOf, fraction } from './operations';

/** Boxes over 2^P that shrink to a number as P grows; null where a precision does not suffice. */
export type BoxAt = (P: number) => Box | null;

/** Boxes of (scale·α − shift)/divisor. */
export function integralBox({ scale, shift, divisor }: Integral, box: (P: number) => Box): BoxAt {
  return (P) => {
    const moved = addBox(multiplyBox(box(P), pointBox(scale, P), P), pointBox(-shift, P));
    return multiplyBox(moved, boxOf(fraction(1n, divisor), P), P);
  };
}

/** Boxes of θ = theta(α)/f′(α) from those of α; null where a precision does not suffice. */
export function lowerBox(
  { polynomial, theta }: Pick<Subfield, 'polynomial' | 'theta'>,
  box: BoxAt,
): BoxAt {
  const slope = derivativeOf(polynomial);
  return (P) => {
    const at = box(P);
    const inverse = at && invertBox(evaluateBox(slope, at, P), P);
    return at && inverse && multiplyBox(evaluateBox(theta, at, P), inverse, P);
  };
}

const isReal = ({ box }: Isolated): boolean => box.im.low === 0n && box.im.high === 0n;

/** The one among all roots of a polynomial that the boxes close in on; they must close in on one. */
function rootAt(roots: readonly Isolated[], at: BoxAt, budget: Budget): Isolated {
  let left = roots;
  for (let P = 64; ; P *= 2) {
    const box = at(P);
    if (box !== null) left = left.filter((root) => !areApart(refinedBox(root, P, budget), box));
    const [only, ...others] = left;
    if (only === undefined) throw new RangeError('the boxes lie at none of the roots');
    if (others.length === 0) return only;
  }
}

/**
 * How many real roots of f lie over the same root of the lower field's polynomial as the one that `box` closes in on, and whether
 * that lower root is real. With `field` null the lower field is that of the rationals.
 */
export function countFibre(
  f: IntegerPoly,
  field: Subfield | null,
  box: BoxAt,
  budget: Budget,
): { real: number; isLowerReal: boolean } {
  const real = isolatedRoots(f, budget).filter(isReal);
  if (field === null) return { real: real.length, isLowerReal: true };
  const below = isolatedRoots(field.lower, budget);
  const own = rootAt(below, lowerBox(field, box), budget);
  const fibre = real.filter((root) => {
    const at: BoxAt = (P) => refinedBox(root, P, budget);
    return rootAt(below, lowerBox(field, at), budget) === own;
  });
  return { real: fibre.length, isLowerReal: isReal(own) };
}
