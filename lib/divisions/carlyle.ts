import { settledDecimal, type Enclosure } from './decimals';

/**
 * The Carlyle circle of x² − s·x + p = 0: the circle on the diameter from (0, 1) to (s, p). It meets the x-axis in the
 * roots (DeTemple 1991). Centre (s/2, (p + 1)/2), radius √(s² + (p − 1)²)/2.
 */
export interface CarlyleCircle {
  centre: { x: string; y: string };
  radius: string;
}

/** A number in units of 2^−bits that is off by at most `error` of them. */
export interface Fixed {
  value: bigint;
  error: bigint;
}

/** Centre and radius as decimals, from enclosures of s and p at any precision; exact ones have the error 0. */
export function carlyleCircle(
  coefficients: (bits: number) => { sum: Fixed; product: Fixed },
  digits: number,
): CarlyleCircle {
  const at = (make: (sum: Fixed, product: Fixed, one: bigint) => [bigint, bigint]) =>
    settledDecimal((bits): Enclosure => {
      const { sum, product } = coefficients(bits);
      const one = 1n << BigInt(bits);
      const [low, high] = make(sum, product, one);
      return { low, high, scale: 2n * one };
    }, digits);
  return {
    centre: {
      x: at((sum) => [sum.value - sum.error, sum.value + sum.error]),
      y: at((_, product, one) => [
        product.value + one - product.error,
        product.value + one + product.error,
      ]),
    },
    radius: at((sum, product, one) => {
      const across = product.value - one;
      const length = floorSqrt(sum.value * sum.value + across * across);
      // The length of a vector changes by no more than its coordinates do together.
      const error = sum.error + product.error;
      return [length - error, length + 1n + error];
    }),
  };
}

/** ⌊√n⌋ by Newton's method from above. */
export function floorSqrt(n: bigint): bigint {
  if (n < 2n) return n;
  let x = 1n << BigInt((n.toString(16).length * 4 + 1) >> 1);
  for (;;) {
    const y = (x + n / x) >> 1n;
    if (y >= x) return x;
    x = y;
  }
}
