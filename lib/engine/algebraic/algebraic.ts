/**
 * Algebraic numbers in general, real or complex: an irreducible integer polynomial and a way to enclose one of
 * its roots as closely as asked. Two of them are told apart by their polynomials or by disjoint boxes, and
 * proven equal when one box with a single root holds both; no decision rests on a decimal.
 */
import type { Budget } from '../limits';
import { factorOverIntegers } from '../polynomials/factor';
import { degreeOf, isEqual, maxBits, type IntegerPoly } from '../polynomials/integer-poly';
import { areApart, evaluateBox, holdsZero, hullBox, type Box } from './box';
import { isolate, refine } from './newton';

export interface Fraction {
  readonly n: bigint;
  /** Positive. */
  readonly d: bigint;
}

/** What is known of a number besides its polynomial. */
export interface Origin {
  /** n when the number lies in the field of the division of a turn into n parts and generates as much as its cosine. */
  readonly division?: bigint;
}

export class Algebraic {
  private precision = 0;
  private known: Box | null = null;

  /**
   * `poly` is irreducible, primitive, of degree at least 2, leading coefficient positive; `enclose` gives boxes of one
   * of its roots that shrink to it. `isReal` is exact.
   */
  constructor(
    readonly poly: IntegerPoly,
    readonly isReal: boolean,
    private readonly enclose: (P: number) => Box,
    readonly origin: Origin = {},
  ) {}

  get degree(): number {
    return degreeOf(this.poly);
  }

  /** A box of the number over 2^P, a few units wide. */
  box(P: number): Box {
    if (this.known === null || this.precision !== P) {
      this.known = this.enclose(P);
      this.precision = P;
    }
    return this.known;
  }
}

/** Boxes of an isolated root, each refined from the best one before. */
export function refining(
  poly: IntegerPoly,
  box: Box,
  precision: number,
  budget: Budget,
): (P: number) => Box {
  const charge = (work: number): void => budget.charge(work);
  let best = { box, precision };
  const made = new Map<number, Box>();
  return (P) => {
    let found = made.get(P);
    if (found === undefined) {
      found = refine(poly, best.box, best.precision, P, charge);
      if (P > best.precision) best = { box: found, precision: P };
      made.set(P, found);
    }
    return found;
  };
}

export type Root = Algebraic | Fraction;

export const isFraction = (a: Root): a is Fraction => !(a instanceof Algebraic);

/**
 * The number among the roots of the given irreducible polynomials that the boxes close in on. `enclose` may answer
 * null where a precision does not suffice. One and only one of the polynomials vanishes there; the precision is
 * doubled until the others are excluded and one root is isolated, which happens because they have no root in common.
 */
export function identify(
  candidates: readonly IntegerPoly[],
  enclose: (P: number) => Box | null,
  budget: Budget,
): Root {
  let left = candidates;
  for (let P = 64 + Math.max(...candidates.map(maxBits)); ; P *= 2) {
    budget.charge(candidates.length * (P >> 3));
    const box = enclose(P);
    if (box === null) continue;
    left = left.filter((f) => {
      budget.charge(f.length * (P >> 5));
      return holdsZero(evaluateBox(f, box, P));
    });
    const [only, ...others] = left;
    if (only === undefined)
      throw new RangeError('none of the polynomials has the number as a root');
    if (others.length > 0) continue;
    if (degreeOf(only) === 1) return { n: -(only[0] as bigint), d: only[1] as bigint };
    const isolated = isolate(only, box, P);
    if (isolated === null) continue;
    const isReal = isolated.im.low === 0n && isolated.im.high === 0n;
    const straddles = isolated.im.low <= 0n && isolated.im.high >= 0n;
    // A box that touches the axis without being flat may still hold a real root.
    if (!isReal && straddles) continue;
    return new Algebraic(only, isReal, refining(only, isolated, P, budget));
  }
}

/** `identify` among the irreducible factors of one polynomial. */
export function identifyRoot(
  f: IntegerPoly,
  enclose: (P: number) => Box | null,
  budget: Budget,
): Root {
  const factors = factorOverIntegers(f, (work) => budget.charge(work)).map(({ poly }) => poly);
  return identify(factors, enclose, budget);
}

/** Whether two numbers are equal. */
export function isSame(a: Algebraic, b: Algebraic, budget: Budget): boolean {
  if (a === b) return true;
  if (!isEqual(a.poly, b.poly) || a.isReal !== b.isReal) return false;
  for (let P = 64 + maxBits(a.poly); ; P *= 2) {
    budget.charge(a.poly.length * (P >> 4));
    const [x, y] = [a.box(P), b.box(P)];
    if (areApart(x, y)) return false;
    if (isolate(a.poly, hullBox(x, y), P) !== null) return true;
  }
}
