/** Bounds of π. */

const known = new Map<number, { low: bigint; high: bigint }>();

/**
 * π between low/2^bits and high/2^bits with high - low = 2, by Machin's formula π = 16 arctan(1/5) - 4 arctan(1/239)
 * (1706) in integers with guard bits. Each truncated division errs by less than one unit and the series alternates, so
 * the guard bits cover the whole error. Cost: bits/4 divisions by small integers; the last few answers are kept.
 */
export function boundsOfPi(bits: number): { low: bigint; high: bigint } {
  const before = known.get(bits);
  if (before !== undefined) return before;
  const guard = BigInt(16 + Math.ceil(Math.log2(bits + 2)));
  const one = 1n << (BigInt(bits) + guard);
  const scaled = 16n * arctanOfInverse(5n, one) - 4n * arctanOfInverse(239n, one);
  const middle = scaled >> guard;
  const bounds = { low: middle - 1n, high: middle + 1n };
  if (known.size > 16) known.clear();
  known.set(bits, bounds);
  return bounds;
}

function arctanOfInverse(x: bigint, one: bigint): bigint {
  let power = one / x;
  let sum = power;
  for (let k = 3n, sign = -1n; power !== 0n; k += 2n, sign = -sign) {
    power /= x * x;
    sum += (sign * power) / k;
  }
  return sum;
}
