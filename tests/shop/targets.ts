import { createEngine } from '@/lib/engine/index';
import type { Fraction, Interval, Target } from '@/lib/shop/index';

/**
 * Targets for tests, made by another road than the program's own: sides of regular polygons from the polynomial of
 * 2cos(2π/n), whose root is bracketed by bisection in integers, so that no series and no π is in them.
 */

/** Coefficients of the minimal polynomial of 2cos(2π/n), highest power first (OEIS A187360, from memory). */
const POLYNOMIALS: Readonly<Record<number, readonly bigint[]>> = {
  7: [1n, 1n, -2n, -1n],
  9: [1n, 0n, -3n, 1n],
  11: [1n, 1n, -4n, -3n, 3n, 1n],
  13: [1n, 1n, -5n, -4n, 6n, 3n, -1n],
};

function squareRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let [low, high] = [0n, 1n << BigInt((n.toString(2).length >> 1) + 1)];
  while (high - low > 1n) {
    const middle = (low + high) >> 1n;
    if (middle * middle <= n) low = middle;
    else high = middle;
  }
  return low;
}

/** The largest root, which lies between 3/2 and 2 and is the only one there: bits of it below and above. */
function doubleCosine(n: number, bits: number): Interval {
  const polynomial = POLYNOMIALS[n];
  if (polynomial === undefined) throw new Error(`No polynomial for ${n} parts.`);
  const shift = BigInt(bits);
  const at = (x: bigint): bigint => {
    let [value, scale] = [0n, 1n];
    for (const coefficient of polynomial) {
      value = value * x + coefficient * scale;
      scale <<= shift;
    }
    return value;
  };
  // n = 7 has its root at 1.247, the others above 1.5; the next root below is under 1.2 throughout.
  let [low, high] = [(6n << shift) / 5n, 2n << shift];
  while (high - low > 1n) {
    const middle = (low + high) >> 1n;
    if (at(middle) <= 0n) low = middle;
    else high = middle;
  }
  return { low, high };
}

/** Side of the regular n-gon in a circle of radius R, an integer: R√(2 - 2cos(2π/n)). */
export function sideTarget(n: number, R: bigint): Target {
  return {
    enclose(bits) {
      const guard = 32;
      const { low, high } = doubleCosine(n, 2 * (bits + guard));
      const two = 2n << BigInt(2 * (bits + guard));
      const least = R * squareRoot(two - high);
      const most = R * (squareRoot(two - low) + 1n);
      return { low: least >> BigInt(guard), high: (most >> BigInt(guard)) + 1n };
    },
  };
}

/** An exact fraction as a target. */
export function exactTarget({ n, d }: Fraction): Target {
  return {
    enclose: (bits) => {
      const low = (n << BigInt(bits)) / d;
      return { low, high: low * d === n << BigInt(bits) ? low : low + 1n };
    },
  };
}

/** A multiple k/n of a turn as chord 2R sin(πk/n) where the engine has it, by its floor. */
export function reachableChord(k: bigint, n: bigint, R: bigint): Target {
  const engine = createEngine();
  const chord = engine.mul(engine.integer(2n * R), engine.sinTurn(k, 2n * n));
  return {
    enclose(bits) {
      const low = engine.floor(engine.mul(chord, engine.integer(1n << BigInt(bits))));
      return { low, high: low + 1n };
    },
  };
}

/** π to 200 places behind the point (OEIS A000796). */
export const PI_DIGITS =
  '3.14159265358979323846264338327950288419716939937510582097494459230781640628620899862803482534211706798214808651328230664709384460955058223172535940812848111745028410270193852110555964462294895493038196';

/** A decimal string as an exact fraction. */
export function fractionOf(decimal: string): Fraction {
  const [plain = '', power = '0'] = decimal.split('e');
  const [whole = '', rest = ''] = plain.split('.');
  const places = rest.length - Number(power);
  const digits = BigInt(whole + rest);
  return places >= 0
    ? { n: digits, d: 10n ** BigInt(places) }
    : { n: digits * 10n ** BigInt(-places), d: 1n };
}

/** a < b, a = b, a > b of fractions as -1, 0, 1. */
export function compareFractions(a: Fraction, b: Fraction): number {
  const difference = a.n * b.d - b.n * a.d;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

/** The middle of an interval in `bits` binary places, rounded to so many decimal places. */
export function show({ low, high }: Interval, bits: number, places: number): string {
  const middle = low + high;
  const size = middle < 0n ? -middle : middle;
  const scaled = (size * 10n ** BigInt(places) + (1n << BigInt(bits))) >> BigInt(bits + 1);
  const digits = scaled.toString().padStart(places + 1, '0');
  const sign = middle < 0n ? '-' : '';
  return `${sign}${digits.slice(0, -places)}.${digits.slice(-places)}`;
}

/** The same to as many places as a known decimal has. */
export const showLike = (interval: Interval, bits: number, known: string): string =>
  show(interval, bits, (known.split('.')[1] ?? '').length);
