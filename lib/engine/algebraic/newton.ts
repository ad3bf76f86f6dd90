/**
 * Isolation and refinement of one root by the interval Newton operator N(B) = m − f(m)/f′(B), m the middle of B
 * (Moore 1966; for complex boxes by the mean value theorem along segments, as boxes are convex). If N(B) lies in
 * the interior of B then B holds exactly one root, a simple one, and it lies in N(B).
 */
import { derivativeOf, type IntegerPoly } from '../polynomials/integer-poly';
import {
  conjugateBox,
  evaluateBox,
  hullBox,
  invertBox,
  isInside,
  meetBox,
  middleBox,
  multiplyBox,
  rescaleBox,
  subtractBox,
  widenBox,
  widthOf,
  type Box,
} from './box';

/** N(B) at precision P, or null where f′ may vanish on B. */
export function newtonStep(f: IntegerPoly, slope: IntegerPoly, box: Box, P: number): Box | null {
  const inverse = invertBox(evaluateBox(slope, box, P), P);
  if (inverse === null) return null;
  const middle = middleBox(box);
  return subtractBox(middle, multiplyBox(evaluateBox(f, middle, P), inverse, P));
}

/**
 * A box around `box` with exactly one root of f in it, or null where this precision does not prove it.
 * If a box that is its own mirror image in the real axis is proven, the root is real and the result is flat.
 */
export function isolate(f: IntegerPoly, box: Box, P: number): Box | null {
  const slope = derivativeOf(f);
  const wide = widenBox(box, 1n << BigInt(P >> 2));
  const isNearAxis = wide.im.low <= 0n && wide.im.high >= 0n;
  const tried = isNearAxis ? hullBox(wide, conjugateBox(wide)) : wide;
  const next = newtonStep(f, slope, tried, P);
  if (next === null || !isInside(next, tried)) return null;
  const met = meetBox(next, tried);
  return isNearAxis ? { re: met.re, im: { low: 0n, high: 0n } } : met;
}

/** Refines an isolating box until it is at most `units`/2^P wide. Quadratic convergence. */
export function refine(
  f: IntegerPoly,
  start: Box,
  startPrecision: number,
  P: number,
  charge: (work: number) => void,
): Box {
  const slope = derivativeOf(f);
  let box = start;
  let precision = startPrecision;
  const goal = P + 8;
  for (;;) {
    // Each pass about doubles the digits known; the working precision keeps ahead of it.
    const width = widthOf(box);
    const known = precision - (width === 0n ? 0 : width.toString(2).length);
    if (known >= P) return rescaleBox(box, precision, P);
    const next = Math.min(goal, Math.max(2 * known + 32, precision)) + 32 + 2 * f.length;
    const working = Math.max(next, precision);
    charge(f.length * (8 + (working >> 5)));
    const scaled = rescaleBox(box, precision, working);
    const step = newtonStep(f, slope, scaled, working);
    if (step === null) throw new RangeError('an isolating box lost its root');
    box = meetBox(step, scaled);
    precision = working;
    if (widthOf(box) * 2n > widthOf(scaled)) {
      // Rounding stands in the way: coefficients are large; take more bits.
      precision = working * 2;
      box = rescaleBox(box, working, precision);
    }
  }
}
