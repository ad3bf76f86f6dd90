/**
 * Cosines in fixed point: integers in units of 2^−bits, each within one unit of the true value.
 * Working precision carries guard bits, so that the bounds below are proven and not hoped for.
 */

/** π within one unit. Machin 1706: π = 16 arctan(1/5) − 4 arctan(1/239). Cost: about bits/2 short divisions. */
export function piFixed(bits: number): bigint {
  const guard = 32;
  const one = 1n << BigInt(bits + guard);
  const arctan = (x: bigint) => {
    let sum = 0n;
    let sign = 1n;
    let odd = 1n;
    for (let power = one / x; power !== 0n; power /= x * x, odd += 2n, sign = -sign) {
      sum += (sign * power) / odd;
    }
    return sum;
  };
  // Each of fewer than 2^20 terms is off by less than 2, times 16: far below half a unit after the shift.
  return roundShift(16n * arctan(5n) - 4n * arctan(239n), guard);
}

/** cos and sin of k/n of a turn, each within one unit. Accepts integers k and n > 0. Cost: one Taylor series each. */
export function cosineFixed(k: bigint, n: bigint, bits: number): bigint {
  // Symmetries bring the angle to at most an eighth of a turn.
  let u = ((k % n) + n) % n;
  if (2n * u > n) u = n - u;
  if (4n * u > n) return -cosineFixed(n - 2n * u, 2n * n, bits);
  if (8n * u > n) return taylor(n - 4n * u, 4n * n, bits, 'sine');
  return taylor(u, n, bits, 'cosine');
}

export function sineFixed(k: bigint, n: bigint, bits: number): bigint {
  return cosineFixed(4n * k - n, 4n * n, bits);
}

/** The series at x = 2πk/n, 0 ≤ x ≤ π/4, so terms fall at once and each is off by less than two units of the guard. */
function taylor(k: bigint, n: bigint, bits: number, which: 'cosine' | 'sine'): bigint {
  const guard = 32;
  const scale = BigInt(bits + guard);
  const x = (2n * piFixed(bits + guard) * k) / n;
  const square = (x * x) >> scale;
  let term = which === 'cosine' ? 1n << scale : x;
  let sum = term;
  for (let i = which === 'cosine' ? 1n : 2n; term !== 0n; i += 2n) {
    term = -((term * square) >> scale) / (i * (i + 1n));
    sum += term;
  }
  return roundShift(sum, guard);
}

/**
 * cos(2πk/n) for k = 0 … last, each within one unit; yields between slices of the work, returns the table.
 * Method: c(k+1) = 2c(1)c(k) − c(k−1). An error made at step j reaches step k times at most k − j + 1 (a Chebyshev
 * polynomial of the second kind), each step makes less than 4 units of the guard, so 2(k+1)² of them bound the whole.
 */
export function* cosineTable(
  n: number,
  last: number,
  bits: number,
): Generator<void, bigint[], void> {
  const guard = 2 * Math.ceil(Math.log2(last + 2)) + 4;
  const scale = BigInt(bits + guard);
  const first = cosineFixed(1n, BigInt(n), bits + guard);
  const table = [1n << BigInt(bits)];
  let before = 1n << scale;
  let now = first;
  for (let k = 1; k <= last; k++) {
    table.push(roundShift(now, guard));
    [before, now] = [now, ((now * first) >> (scale - 1n)) - before];
    if (k % 1024 === 0) yield;
  }
  return table;
}

/** value / 2^bits to the nearest integer. */
function roundShift(value: bigint, bits: number): bigint {
  return (value + (1n << BigInt(bits - 1))) >> BigInt(bits);
}

/** Runs work that yields between its slices to its end without a pause. */
export function atOnce<T>(work: Generator<void, T, void>): T {
  for (;;) {
    const step = work.next();
    if (step.done === true) return step.value;
  }
}
