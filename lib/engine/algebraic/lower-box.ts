/** Enclosures of the generators of a chain of subfields, each from the one above it. */
import type { Budget } from '../limits';
import { degreeOf, derivativeOf, type IntegerPoly } from '../polynomials/integer-poly';
import type { Integral } from '../subfields/integral';
import type { Subfield } from '../subfields/subfield';
import { refining } from './algebraic';
import { isolateRoots } from './all-roots';
import { addBox, areApart, evaluateBox, invertBox, multiplyBox, pointBox, type Box } from './box';
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

interface Isolated {
  readonly isReal: boolean;
  readonly box: (P: number) => Box;
}

function isolated(f: IntegerPoly, budget: Budget): Isolated[] {
  const { boxes, precision } = isolateRoots(f, budget);
  return boxes.map((box) => ({
    isReal: box.im.low === 0n && box.im.high === 0n,
    box: refining(f, box, precision, budget),
  }));
}

/** The one among all roots of a polynomial that the boxes close in on; they must close in on one. */
function nearestOf(roots: readonly Isolated[], box: BoxAt): Isolated {
  let left = roots;
  for (let P = 64; ; P *= 2) {
    const at = box(P);
    if (at !== null) left = left.filter((root) => !areApart(root.box(P), at));
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
  const real = isolated(f, budget).filter(({ isReal }) => isReal);
  if (field === null || degreeOf(field.lower) === 1)
    return { real: real.length, isLowerReal: true };
  const below = isolated(field.lower, budget);
  const own = nearestOf(below, lowerBox(field, box));
  const fibre = real.filter((root) => nearestOf(below, lowerBox(field, root.box)) === own);
  return { real: fibre.length, isLowerReal: own.isReal };
}
