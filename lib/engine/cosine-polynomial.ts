/**
 * Minimal polynomials of cosines of parts of a turn, without any tower.
 *
 * The minimal polynomial of 2cos(2πu/d), u prime to d > 2, comes from the cyclotomic polynomial Φ_d, which reads the same both
 * ways: Φ_d(x) = x^m·ψ(x + 1/x). For an odd prime d = 2m + 1 its coefficients are signed binomials,
 *   ψ(X) = Σ (−1)^⌊i/2⌋ · C(m − ⌈i/2⌉, ⌊i/2⌋) · X^(m−i)   (Watkins and Zeitlin 1993).
 */

import { bigGcd } from './integers';

/** Number of units modulo n. */
export function totient(n: bigint): bigint {
  let out = n;
  for (const p of primesOf(n)) out = (out / p) * (p - 1n);
  return out;
}

/** The distinct primes of a number whose odd part is small. */
function primesOf(n: bigint): bigint[] {
  const out: bigint[] = [];
  let rest = n;
  for (let p = 2n; p * p <= rest; p += p === 2n ? 1n : 2n) {
    if (rest % p !== 0n) continue;
    out.push(p);
    while (rest % p === 0n) rest /= p;
  }
  return rest > 1n ? [...out, rest] : out;
}

/** Minimal polynomial of cos(2πu/d) for u prime to d: highest power first, primitive. d > 2. */
export function cosinePolynomial(d: bigint): bigint[] {
  const primes = primesOf(d);
  const psi =
    primes.length === 1 && primes[0] === d
      ? primePolynomial(d)
      : fromCyclotomic(cyclotomic(d, primes));
  // X = 2c: multiply through by powers of 2, then make the polynomial primitive.
  const n = psi.length - 1;
  const out = psi.map((c, i) => c << BigInt(n - i));
  let g = 0n;
  for (let i = n; i >= 0 && g !== 1n; i--)
    g = bigGcd(g, (out[i] as bigint) < 0n ? -(out[i] as bigint) : (out[i] as bigint));
  return g === 1n ? out : out.map((c) => c / g);
}

function primePolynomial(d: bigint): bigint[] {
  const m = Number((d - 1n) / 2n);
  const out: bigint[] = [];
  // C(m − j, j) for i = 2j and C(m − 1 − j, j) for i = 2j + 1, each from the one before.
  let even = 1n;
  let odd = 1n;
  for (let i = 0; i <= m; i++) {
    const j = i >> 1;
    out.push((j % 2 === 0 ? 1n : -1n) * (i % 2 === 0 ? even : odd));
    if (i % 2 === 0) even = step(m - j, j, even);
    else odd = step(m - 1 - j, j, odd);
  }
  return out;
}

/** C(a − 1, j + 1) from C(a, j). */
function step(a: number, j: number, c: bigint): bigint {
  if (a === 0) return 0n;
  return (c * BigInt(a - j) * BigInt(a - j - 1)) / (BigInt(a) * BigInt(j + 1));
}

/** Φ_d, highest power first. */
export const cyclotomicPolynomial = (d: bigint): bigint[] => cyclotomic(d, primesOf(d));

/** Φ_d by Φ_{pm}(x) = Φ_m(x^p)/Φ_m(x) for a prime p that does not divide m, and Φ_{pm}(x) = Φ_m(x^p) for one that does. */
function cyclotomic(d: bigint, primes: readonly bigint[]): bigint[] {
  let f = [1n, -1n];
  let radical = 1n;
  for (const p of primes) {
    f = divide(stretch(f, Number(p)), f);
    radical *= p;
  }
  return stretch(f, Number(d / radical));
}

function stretch(f: readonly bigint[], k: number): bigint[] {
  const out = new Array<bigint>((f.length - 1) * k + 1).fill(0n);
  f.forEach((c, i) => (out[i * k] = c));
  return out;
}

/** Exact quotient by a monic polynomial. */
function divide(f: readonly bigint[], g: readonly bigint[]): bigint[] {
  const r = f.slice();
  const n = f.length - g.length + 1;
  for (let i = 0; i < n; i++) {
    const q = r[i] as bigint;
    if (q === 0n) continue;
    for (let j = 1; j < g.length; j++) r[i + j] = (r[i + j] as bigint) - q * (g[j] as bigint);
  }
  return r.slice(0, n);
}

/** ψ from Φ by Clenshaw's recurrence on x^j + x^−j = X·(x^(j−1) + x^(1−j)) − (x^(j−2) + x^(2−j)). */
function fromCyclotomic(phi: readonly bigint[]): bigint[] {
  const m = (phi.length - 1) / 2;
  let b1: bigint[] = [];
  let b2: bigint[] = [];
  for (let j = m; j >= 1; j--) {
    const b = combine(b1, b2, phi[m - j] as bigint);
    b2 = b1;
    b1 = b;
  }
  // The sum is c₀ + X·b₁ − 2·b₂, lowest power first here.
  const out = [0n, ...b1];
  b2.forEach((c, i) => (out[i] = (out[i] as bigint) - 2n * c));
  out[0] = (out[0] as bigint) + (phi[m] as bigint);
  return out.reverse();
}

/** X·b1 − b2 + c. */
function combine(b1: readonly bigint[], b2: readonly bigint[], c: bigint): bigint[] {
  const out = [0n, ...b1];
  b2.forEach((v, i) => (out[i] = (out[i] as bigint) - v));
  out[0] = (out[0] as bigint) + c;
  return out;
}
