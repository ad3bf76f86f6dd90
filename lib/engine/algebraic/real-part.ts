/** Real parts of numbers that are not real: whether one is rational, without a polynomial of its own. */
import type { Enclosure } from '../enclosure';
import type { Budget } from '../limits';
import { isFraction, type Fraction, type Root } from './algebraic';
import { add, conjugate, equal, fraction, negate } from './operations';

/** A rational, or enclosures of an irrational number. */
export type RealPart = Fraction | ((P: number) => Enclosure);

/**
 * The real part of a number where it is rational, else null. If it is r, then ā = 2r − a, so the conjugates lie
 * symmetric to r and r is their mean; that one r is tried, exactly.
 */
export function rationalPart(a: Root, budget: Budget): Fraction | null {
  if (isFraction(a)) return a;
  if (a.isReal) return null;
  const n = a.degree;
  const r = fraction(-(a.poly[n - 1] as bigint), BigInt(n) * (a.poly[n] as bigint));
  const mirrored = add(negate(a), fraction(2n * r.n, r.d), budget);
  return equal(mirrored, conjugate(a), budget) ? r : null;
}
