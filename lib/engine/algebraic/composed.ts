/**
 * Polynomials whose roots are sums, products, quotients and powers of the roots of given ones, by power sums
 * (Newton's identities; Bostan, Flajolet, Salvy & Schost 2006). They equal the classical resultants
 * Res_y(f(y), g(x−y)) and Res_y(f(y), y^m g(x/y)) up to a constant, without a determinant in two variables.
 *
 * All arguments are integer polynomials of positive degree; results are primitive with positive leading
 * coefficient and keep multiplicities, so that the degree of a result is the product of the degrees.
 */
import {
  degreeOf,
  leadingOf,
  primitivePart,
  trim,
  type IntegerPoly,
} from '../polynomials/integer-poly';

/** f with its roots multiplied by `by` ≠ 0, monic when `by` is a multiple of the leading coefficient. */
function scaleRootsMonic(f: IntegerPoly, by: bigint): IntegerPoly {
  const n = degreeOf(f);
  const lead = leadingOf(f);
  // lc · ∏ (x − by·α) = Σ f_k by^(n−k) x^k; by is a multiple of lc, so lc divides every lower coefficient.
  let power = 1n;
  const scaled: bigint[] = new Array<bigint>(n + 1).fill(0n);
  for (let k = n; k >= 0; k--) {
    scaled[k] = ((f[k] as bigint) * power) / lead;
    power *= by;
  }
  return scaled;
}

/** P₁ … P_count of a monic integer polynomial: sums of the k-th powers of its roots. Newton's identities. */
export function powerSums(monic: IntegerPoly, count: number): bigint[] {
  const n = degreeOf(monic);
  const sums: bigint[] = [BigInt(n)];
  for (let k = 1; k <= count; k++) {
    let sum = k <= n ? -BigInt(k) * (monic[n - k] as bigint) : 0n;
    for (let j = 1; j < k && j <= n; j++) sum -= (monic[n - j] as bigint) * (sums[k - j] as bigint);
    sums.push(sum);
  }
  return sums;
}

/** The monic polynomial with the given power sums P₀ … P_n, n = P₀. */
export function fromPowerSums(sums: readonly bigint[]): IntegerPoly {
  const n = Number(sums[0]);
  const coefficients: bigint[] = new Array<bigint>(n + 1).fill(0n);
  coefficients[n] = 1n;
  for (let k = 1; k <= n; k++) {
    let sum = 0n;
    for (let j = 1; j <= k; j++) sum += (coefficients[n - k + j] as bigint) * (sums[j] as bigint);
    coefficients[n - k] = -sum / BigInt(k);
  }
  return coefficients;
}

/** Undoes a scaling of all roots by `by`. */
export function unscaleRoots(monic: IntegerPoly, by: bigint): IntegerPoly {
  let power = 1n;
  return primitivePart(
    trim(
      monic.map((c) => {
        const scaled = c * power;
        power *= by;
        return scaled;
      }),
    ),
  );
}

/** Roots α+β for every root α of f and β of g. */
export function composedSum(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  const scale = leadingOf(f) * leadingOf(g);
  const count = degreeOf(f) * degreeOf(g);
  const p = powerSums(scaleRootsMonic(f, scale), count);
  const q = powerSums(scaleRootsMonic(g, scale), count);
  const sums: bigint[] = [];
  let binomials: bigint[] = [1n];
  for (let k = 0; k <= count; k++) {
    let sum = 0n;
    for (let j = 0; j <= k; j++) {
      sum += (binomials[j] as bigint) * (p[j] as bigint) * (q[k - j] as bigint);
    }
    sums.push(sum);
    const next: bigint[] = [1n];
    for (let j = 1; j <= k; j++) next.push((binomials[j - 1] as bigint) + (binomials[j] as bigint));
    binomials = [...next, 1n];
  }
  return unscaleRoots(fromPowerSums(sums), scale);
}

/** Roots α·β for every root α of f and β of g. */
export function composedProduct(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  const [a, b] = [leadingOf(f), leadingOf(g)];
  const count = degreeOf(f) * degreeOf(g);
  const p = powerSums(scaleRootsMonic(f, a), count);
  const q = powerSums(scaleRootsMonic(g, b), count);
  return unscaleRoots(fromPowerSums(p.map((s, k) => s * (q[k] as bigint))), a * b);
}

/** Roots α^e, e ≥ 1. */
export function powerRoots(f: IntegerPoly, e: number): IntegerPoly {
  const lead = leadingOf(f);
  const n = degreeOf(f);
  const p = powerSums(scaleRootsMonic(f, lead), n * e);
  const sums = Array.from({ length: n + 1 }, (_, k) => p[k * e] as bigint);
  return unscaleRoots(fromPowerSums(sums), lead ** BigInt(e));
}

/** Roots −α. */
export const negateRoots = (f: IntegerPoly): IntegerPoly =>
  primitivePart(f.map((c, k) => (k % 2 === 1 ? -c : c)));

/** Roots 1/α; f(0) ≠ 0. */
export const invertRoots = (f: IntegerPoly): IntegerPoly => primitivePart([...f].reverse());

/** All e-th roots of the roots of f: f(x^e). */
export function rootsOfRoots(f: IntegerPoly, e: number): IntegerPoly {
  const spread = new Array<bigint>((f.length - 1) * e + 1).fill(0n);
  f.forEach((c, k) => {
    spread[k * e] = c;
  });
  return spread;
}

/** Roots r·α for a rational r = n/d ≠ 0. */
export function multiplyRoots(f: IntegerPoly, n: bigint, d: bigint): IntegerPoly {
  const degree = degreeOf(f);
  return primitivePart(f.map((c, k) => c * n ** BigInt(degree - k) * d ** BigInt(k)));
}

/** Roots α + r for a rational r = n/d. Horner's scheme (Taylor shift by −r, cleared of d). */
export function shiftRoots(f: IntegerPoly, n: bigint, d: bigint): IntegerPoly {
  // g(x) = f(x − n/d)·d^deg: build from the top with the linear factor (d·x − n).
  let result: bigint[] = [];
  let scale = 1n;
  for (let k = f.length - 1; k >= 0; k--) {
    const next = new Array<bigint>(result.length + 1).fill(0n);
    result.forEach((c, j) => {
      next[j + 1] = (next[j + 1] as bigint) + c * d;
      next[j] = (next[j] as bigint) - c * n;
    });
    next[0] = (next[0] as bigint) + (f[k] as bigint) * scale;
    result = next;
    scale *= d;
  }
  return primitivePart(trim(result));
}
