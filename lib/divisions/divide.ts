import { cosineDegree, factorise, type PrimePower } from './numbers';
import { measure, type Measures } from './measures';
import { isFermatPrime, type FermatPrime } from './periods';
import { decideDivision, type DivisionReach } from './reach';
import { DivisionError, readParts, readRadius, type DivisionFault, type Radius } from './request';

/** The division of the circle into equal parts. */
export interface Division {
  parts: number;
  /** Prime factors, ascending; none for 1. */
  factors: readonly PrimePower[];
  /** The Fermat primes that divide it once. */
  fermatPrimes: readonly FermatPrime[];
  reach: DivisionReach;
  /** Degree of cos(2π/n) over the rationals. */
  degree: number;
}

/** A division with the sizes of its polygon; those are null without a radius, and for one or two parts. */
export interface DividedCircle extends Division {
  radius: Radius | null;
  measures: Measures | null;
}

export type DivisionOutcome =
  | { kind: 'value'; value: DividedCircle }
  | { kind: 'outside-domain'; code: DivisionFault; message: string };

/**
 * Divides the circle into n equal parts: which tools reach it and why (Gauss 1801 and Wantzel 1837; with an angle trisector
 * Gleason 1988), the degree of cos(2π/n), and for a radius the sizes of the polygon.
 * Accepts n from 1 to 10⁶, as a number or as typed, and a radius as typed (see `readRadius`). Anything else is an
 * outcome of its own with a code and a sentence that says what to give. Cost: microseconds; sizes see `measure`.
 */
export function divide(n: number | bigint | string, radius?: string): DivisionOutcome {
  try {
    const division = decide(readParts(n));
    const given = radius === undefined ? null : readRadius(radius);
    const measures = given === null || division.parts < 3 ? null : measure(division.parts, given);
    return { kind: 'value', value: { ...division, radius: given, measures } };
  } catch (error) {
    if (!(error instanceof DivisionError)) throw error;
    return { kind: 'outside-domain', code: error.code, message: error.message };
  }
}

function decide(parts: number): Division {
  const factors = factorise(parts);
  return {
    parts,
    factors,
    fermatPrimes: factors.flatMap(({ prime, exponent }) =>
      exponent === 1 && isFermatPrime(prime) ? [prime] : [],
    ),
    reach: decideDivision(BigInt(parts)),
    degree: cosineDegree(parts, factors),
  };
}
