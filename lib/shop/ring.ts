import { encloseArcsine, enclosePi, encloseSine } from './circular';
import type { Interval, IntervalArithmetic } from './interval';

/**
 * What becomes of an opening that is stepped round a circle of n parts. Lengths are in the units of the radius; all are
 * intervals of the arithmetic in hand. For a straight run of n parts only `run` is there.
 */
export type Closing =
  | {
      readonly kind: 'ring';
      readonly parts: number;
      /** A whole turn less n steps, in degrees: above 0 when the last step falls short. */
      readonly gap: Interval;
      /** Distance from where the n-th step ends to where the first began. */
      readonly miss: Interval;
      /** The last division that n - 1 steps leave, less the true one. */
      readonly last: Interval;
      /** Stepped both ways from the first point, how far the worst point is from its true place. */
      readonly worst: Interval;
    }
  | {
      readonly kind: 'run';
      readonly parts: number;
      /** n times the error: by how much the end of the run is off. */
      readonly run: Interval;
    };

export interface Stepped {
  readonly arithmetic: IntervalArithmetic;
  readonly radius: Interval;
  /** The opening over the radius, at most 2. */
  readonly opening: Interval;
  readonly parts: number;
}

/**
 * Closing of a ring: with θ = 2 arcsin(c/2R) the angle of one step, the gap is 2π - nθ, the miss 2R sin(|gap|/2), the
 * last division 2R sin((n-1)θ/2) against 2R sin(π/n), and the worst of ⌊n/2⌋ steps 2R sin(⌊n/2⌋·|θ - 2π/n|/2).
 * Null when the opening is longer than the diameter, so that it cannot be stepped.
 */
export function closeRing({ arithmetic, radius, opening, parts }: Stepped): Closing | null {
  if (opening.high > 2n * arithmetic.one) return null;
  const n = BigInt(parts);
  const pi = enclosePi(arithmetic);
  const half = encloseArcsine(arithmetic, arithmetic.scale(opening, 1n, 2n));
  const sineOf = (angle: Interval): Interval => encloseSine(arithmetic, angle);
  const onRim = (sine: Interval): Interval =>
    arithmetic.multiply(arithmetic.scale(radius, 2n), sine);
  const halfGap = arithmetic.subtract(pi, arithmetic.scale(half, n));
  const truePart = arithmetic.scale(pi, 1n, n);
  const astray = arithmetic.scale(arithmetic.subtract(half, truePart), n / 2n);
  const last = sineOf(arithmetic.scale(half, n - 1n));
  return {
    kind: 'ring',
    parts,
    gap: arithmetic.scale(arithmetic.divide(halfGap, pi), 360n),
    miss: onRim(arithmetic.size(sineOf(halfGap))),
    last: onRim(arithmetic.subtract(last, sineOf(truePart))),
    worst: onRim(arithmetic.size(sineOf(astray))),
  };
}

/** Closing of a straight run: n times the error of one part. */
export function closeRun(arithmetic: IntervalArithmetic, error: Interval, parts: number): Closing {
  return { kind: 'run', parts, run: arithmetic.scale(error, BigInt(parts)) };
}
