import { isqrt } from '../engine/integers';
import { boundsOfPi } from '../engine/pi';
import { type Interval, type IntervalArithmetic, ceilDiv, floorDiv } from './interval';

/**
 * π, sine and arcsine of intervals, in integers with a bound on every remainder.
 * Sources of the series: Taylor's series of the sine; the binomial series of the arcsine
 * (Abramowitz and Stegun 4.3.65 and 4.4.40, from memory).
 */

/** π to the bits of the arithmetic. */
export function enclosePi(arithmetic: IntervalArithmetic): Interval {
  return boundsOfPi(Number(arithmetic.shift));
}

/** sin of an angle in radians: at the middle of the interval, which the sine leaves by no more than half its width. */
export function encloseSine(arithmetic: IntervalArithmetic, angle: Interval): Interval {
  const pi = enclosePi(arithmetic);
  const turns = floorDiv(angle.low + angle.high + 2n * pi.low, 4n * pi.low);
  const reduced = arithmetic.subtract(angle, arithmetic.scale(pi, 2n * turns));
  const middle = (reduced.low + reduced.high) >> 1n;
  const square = (middle * middle) >> arithmetic.shift;
  let [term, sum, rounding] = [middle, middle, 1n];
  // The terms fall from the fourth on, as the angle is at most 4, and alternate: the rest is below the last one.
  for (let k = 2n; k < 8n || term > 2n || term < -2n; k += 2n) {
    term = -((term * square) >> arithmetic.shift) / (k * (k + 1n));
    sum += term;
    rounding += 8n;
  }
  const spread = ((reduced.high - reduced.low) >> 1n) + 1n + rounding;
  return clamp({ low: sum - spread, high: sum + spread }, arithmetic.one);
}

function clamp({ low, high }: Interval, one: bigint): Interval {
  return { low: low < -one ? -one : low, high: high > one ? one : high };
}

/** arcsin of an interval that meets 0 … 1; what lies outside counts as 0 or 1. */
export function encloseArcsine(arithmetic: IntervalArithmetic, sine: Interval): Interval {
  const inside = (x: bigint): bigint => (x < 0n ? 0n : x > arithmetic.one ? arithmetic.one : x);
  return {
    low: arcsineOf(arithmetic, inside(sine.low)).low,
    high: arcsineOf(arithmetic, inside(sine.high)).high,
  };
}

/** Above √½ by arcsin x = π/2 - arcsin √(1 - x²), so that the series falls by half at each term. */
function arcsineOf(arithmetic: IntervalArithmetic, x: bigint): Interval {
  const { one } = arithmetic;
  if (2n * x * x <= one * one) return arcsineSeries(arithmetic, x);
  const rest = one * one - x * x;
  const root = isqrt(rest);
  const pi = enclosePi(arithmetic);
  return {
    low: (pi.low >> 1n) - arcsineSeries(arithmetic, root + 1n).high,
    high: ceilDiv(pi.high, 2n) - arcsineSeries(arithmetic, root).low,
  };
}

/**
 * Σ (2k)!/(4^k k!²) x^(2k+1)/(2k+1), x² ≤ 1/2. All terms are positive: rounding all of them down gives a lower bound,
 * rounding all up and adding the rest an upper one. The rest after a term t is at most t·x²/(1 - x²), below 2t.
 */
function arcsineSeries(arithmetic: IntervalArithmetic, x: bigint): Interval {
  const { shift, one } = arithmetic;
  const [squareLow, squareHigh] = [(x * x) >> shift, ceilDiv(x * x, one)];
  let [termLow, termHigh, low, high] = [x, x, x, x];
  for (let k = 1n; termHigh > 2n; k += 1n) {
    termLow = (((termLow * squareLow) >> shift) * (2n * k - 1n)) / (2n * k);
    termHigh = ceilDiv(ceilDiv(termHigh * squareHigh, one) * (2n * k - 1n), 2n * k);
    low += termLow / (2n * k + 1n);
    high += ceilDiv(termHigh, 2n * k + 1n);
  }
  return { low, high: high + 2n * termHigh + 1n };
}
