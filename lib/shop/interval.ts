import { isqrt } from '../engine/integers';

/** The real numbers from low/2^bits to high/2^bits, for the `bits` of the arithmetic in hand. */
export interface Interval {
  readonly low: bigint;
  readonly high: bigint;
}

/** A positive or negative fraction n/d with d > 0. */
export interface Fraction {
  readonly n: bigint;
  readonly d: bigint;
}

/** ⌊n/d⌋ for d > 0. */
export function floorDiv(n: bigint, d: bigint): bigint {
  const quotient = n / d;
  return n < 0n && quotient * d !== n ? quotient - 1n : quotient;
}

/** ⌈n/d⌉ for d > 0. */
export const ceilDiv = (n: bigint, d: bigint): bigint => -floorDiv(-n, d);

const least = (values: readonly bigint[]): bigint => values.reduce((a, b) => (b < a ? b : a));
const greatest = (values: readonly bigint[]): bigint => values.reduce((a, b) => (b > a ? b : a));

/**
 * Interval arithmetic in integers with a fixed number of binary places. Every operation rounds outwards, so the true
 * result lies inside the interval that is given, whatever reals of the operands are meant. Cost of an operation: one
 * or a few products of the size of its operands.
 */
export class IntervalArithmetic {
  readonly shift: bigint;
  readonly one: bigint;
  private readonly roots = new Map<bigint, Interval>();

  constructor(readonly bits: number) {
    if (!Number.isSafeInteger(bits) || bits < 1)
      throw new RangeError('The number of bits must be a positive integer.');
    this.shift = BigInt(bits);
    this.one = 1n << this.shift;
  }

  fraction({ n, d }: Fraction): Interval {
    const scaled = n << this.shift;
    return { low: floorDiv(scaled, d), high: ceilDiv(scaled, d) };
  }

  add(a: Interval, b: Interval): Interval {
    return { low: a.low + b.low, high: a.high + b.high };
  }

  subtract(a: Interval, b: Interval): Interval {
    return { low: a.low - b.high, high: a.high - b.low };
  }

  multiply(a: Interval, b: Interval): Interval {
    if (a.low >= 0n && b.low >= 0n)
      return { low: (a.low * b.low) >> this.shift, high: -((-a.high * b.high) >> this.shift) };
    const products = [a.low * b.low, a.low * b.high, a.high * b.low, a.high * b.high];
    return { low: least(products) >> this.shift, high: -(-greatest(products) >> this.shift) };
  }

  /** a/b where b lies above 0; a RangeError otherwise. */
  divide(a: Interval, b: Interval): Interval {
    if (b.low <= 0n) throw new RangeError('An interval is divided only by one above 0.');
    return {
      low: floorDiv(a.low << this.shift, a.low >= 0n ? b.high : b.low),
      high: ceilDiv(a.high << this.shift, a.high >= 0n ? b.low : b.high),
    };
  }

  /** a·n/d. */
  scale(a: Interval, n: bigint, d = 1n): Interval {
    const [low, high] = n >= 0n ? [a.low * n, a.high * n] : [a.high * n, a.low * n];
    return { low: floorDiv(low, d), high: ceilDiv(high, d) };
  }

  /** √a; what lies below 0 counts as 0, as the number meant is known not to be negative. */
  root(a: Interval): Interval {
    const low = a.low > 0n ? isqrt(a.low << this.shift) : 0n;
    const high = a.high > 0n ? isqrt(a.high << this.shift) : 0n;
    return { low, high: high * high === a.high << this.shift ? high : high + 1n };
  }

  /** √n of an integer n ≥ 0, remembered. */
  rootOf(n: bigint): Interval {
    let root = this.roots.get(n);
    if (root === undefined)
      this.roots.set(n, (root = this.root({ low: n << this.shift, high: n << this.shift })));
    return root;
  }

  /** The distance from 0. */
  size(a: Interval): Interval {
    if (a.low >= 0n) return a;
    if (a.high <= 0n) return { low: -a.high, high: -a.low };
    return { low: 0n, high: greatest([-a.low, a.high]) };
  }
}
