/** Integral generators of the field of an algebraic number with small polynomials: multiples, shifts and quotients. */
import { degreeOf, leadingOf, type IntegerPoly } from '../polynomials/integer-poly';

const SMALL_PRIMES = [2n, 3n, 5n, 7n, 11n, 13n, 17n, 19n, 23n, 29n, 31n, 37n, 41n, 43n, 47n];

/** The polynomial of α/s where s^k divides the coefficient of x^(n−k) of the monic f for every k, else null. */
function divideRoots(f: IntegerPoly, s: bigint): IntegerPoly | null {
  const n = degreeOf(f);
  const divided: bigint[] = new Array<bigint>(n + 1).fill(0n);
  let power = 1n;
  for (let k = n; k >= 0; k--) {
    if ((f[k] as bigint) % power !== 0n) return null;
    divided[k] = (f[k] as bigint) / power;
    power *= s;
  }
  return divided;
}

/** f(x + shift). */
export function shiftBy(f: IntegerPoly, shift: bigint): IntegerPoly {
  const g = [...f];
  for (let k = 0; k < degreeOf(f); k++) {
    for (let j = degreeOf(f) - 1; j >= k; j--) {
      g[j] = (g[j] as bigint) + shift * (g[j + 1] as bigint);
    }
  }
  return g;
}

/**
 * The polynomial of (θ − shift)/divisor for a root θ of a monic g: the shift brings the mean of the roots near 0, the divisor is
 * the largest product of small primes that keeps it integral.
 */
export function centre(g: IntegerPoly): { poly: IntegerPoly; shift: bigint; divisor: bigint } {
  const n = BigInt(degreeOf(g));
  const doubled = -2n * (g[g.length - 2] ?? 0n) + n;
  const shift = doubled >= 0n ? doubled / (2n * n) : -((-doubled + 2n * n - 1n) / (2n * n));
  let poly = shiftBy(g, shift);
  let divisor = 1n;
  for (const p of SMALL_PRIMES) {
    for (let next = divideRoots(poly, p); next !== null; next = divideRoots(poly, p)) {
      if (poly.length === 2 && poly[0] === 0n) break;
      poly = next;
      divisor *= p;
    }
  }
  return { poly, shift, divisor };
}

/** (scale·α − shift)/divisor is integral with the monic polynomial `monic`, α a root of f. */
export interface Integral {
  readonly monic: IntegerPoly;
  readonly scale: bigint;
  readonly shift: bigint;
  readonly divisor: bigint;
}

export function makeIntegral(f: IntegerPoly): Integral {
  const lead = leadingOf(f);
  const n = degreeOf(f);
  // lc·α is a root of Σ f_k·lc^(n−1−k)·x^k.
  let power = 1n;
  const monic: bigint[] = new Array<bigint>(n + 1).fill(1n);
  for (let k = n - 1; k >= 0; k--) {
    monic[k] = (f[k] as bigint) * power;
    power *= lead;
  }
  const { poly, shift, divisor } = centre(monic);
  return { monic: poly, scale: lead, shift, divisor };
}
