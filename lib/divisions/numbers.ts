/** A prime and how often it divides. */
export interface PrimePower {
  prime: number;
  exponent: number;
}

/** The prime factors of n, ascending. Accepts 1 ≤ n ≤ 2⁵³ − 1. Cost: trial division up to √n. */
export function factorise(n: number): PrimePower[] {
  const factors: PrimePower[] = [];
  let rest = n;
  for (let prime = 2; prime * prime <= rest; prime += prime === 2 ? 1 : 2) {
    let exponent = 0;
    for (; rest % prime === 0; rest /= prime) exponent += 1;
    if (exponent > 0) factors.push({ prime, exponent });
  }
  if (rest > 1) factors.push({ prime: rest, exponent: 1 });
  return factors;
}

/** Euler's φ of the number with these factors. */
export function totient(factors: readonly PrimePower[]): number {
  return factors.reduce(
    (product, { prime, exponent }) => product * (prime - 1) * prime ** (exponent - 1),
    1,
  );
}

/** Degree of cos(2π/n) over the rationals: φ(n)/2 from 3 on (Lehmer 1933), 1 for n = 1 and 2. */
export function cosineDegree(n: number, factors: readonly PrimePower[] = factorise(n)): number {
  return n <= 2 ? 1 : totient(factors) / 2;
}

/** The u of least size with u·a ≡ 1 modulo m, for coprime a and m > 1. */
export function leastInverse(a: number, m: number): number {
  let [r0, r1, u0, u1] = [m, ((a % m) + m) % m, 0, 1];
  while (r1 !== 0) {
    const q = Math.floor(r0 / r1);
    [r0, r1] = [r1, r0 - q * r1];
    [u0, u1] = [u1, u0 - q * u1];
  }
  const u = ((u0 % m) + m) % m;
  return 2 * u > m ? u - m : u;
}
