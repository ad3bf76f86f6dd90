/**
 * Cosines of rational parts of a turn of any division as algebraic numbers: the minimal polynomial in closed form,
 * enclosures from Taylor's series in integers.
 */
import type { Budget } from '../limits';
import { cosinePolynomial } from '../cosine-polynomial';
import { boundsOfPi } from '../pi';
import { Algebraic } from './algebraic';

/** cos(2πk/n)·2^P between two integers, 0 ≤ k/n ≤ 1/2. */
export function encloseCosine(
  k: bigint,
  n: bigint,
  P: number,
  budget: Budget,
): { low: bigint; high: bigint } {
  if (4n * k > n) {
    const { low, high } = encloseCosine(n - 2n * k, 2n * n, P, budget);
    return { low: -high, high: -low };
  }
  const working = P + 40;
  const w = BigInt(working);
  budget.charge((working >> 2) * (1 + (working >> 10)));
  const x = (2n * k * boundsOfPi(working).low) / n;
  const square = (x * x) >> w;
  let term = 1n << w;
  let sum = term;
  let terms = 1n;
  for (let j = 1n; term !== 0n; j += 2n, terms++) {
    term = -((term * square) >> w) / (j * (j + 1n));
    sum += term;
  }
  // The angle is off by less than P + 2 units; every term adds at most two units of its own.
  const error = 2n * BigInt(working) + 4n * terms + 8n;
  return { low: (sum - error) >> 40n, high: -(-(sum + error) >> 40n) };
}

/** cos(2πk/n) as an algebraic number; k/n in lowest terms, 0 < k/n < 1/2, φ(n)/2 ≥ 2. */
export function algebraicCosine(k: bigint, n: bigint, budget: Budget): Algebraic {
  const made = new Map<number, { low: bigint; high: bigint }>();
  return new Algebraic(
    cosinePolynomial(n).reverse(),
    true,
    (P) => {
      let re = made.get(P);
      if (re === undefined) made.set(P, (re = encloseCosine(k, n, P, budget)));
      return { re, im: { low: 0n, high: 0n } };
    },
    { division: n },
  );
}
