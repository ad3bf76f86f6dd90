/** Polynomials over the integers and over word-size primes, highest power first. */

import { mulMod, powMod, wordPrime } from './residues';

/** The monic polynomial g with g^e = f, or null when there is none; e a power of two. By square roots, coefficient after coefficient. */
export function powerRoot(f: readonly bigint[], e: number): bigint[] | null {
  let g: bigint[] | null = [...f];
  for (let k = e; k > 1 && g !== null; k >>= 1) g = squareRoot(g);
  return g;
}

function squareRoot(f: readonly bigint[]): bigint[] | null {
  const n = f.length - 1;
  if (n % 2 !== 0) return null;
  const m = n / 2;
  const g: bigint[] = [1n];
  for (let j = 1; j <= m; j++) {
    let c = f[j] as bigint;
    for (let i = 1; i < j; i++) c -= (g[i] as bigint) * (g[j - i] as bigint);
    if (c % 2n !== 0n) return null;
    g.push(c / 2n);
  }
  for (let j = m + 1; j <= n; j++) {
    let c = 0n;
    for (let i = j - m; i <= m; i++) c += (g[i] as bigint) * (g[j - i] as bigint);
    if (c !== f[j]) return null;
  }
  return g;
}

/** True proves that a monic polynomial has no repeated factor: it has none modulo some prime. Up to three primes are tried. */
export function squarefreeModulo(f: readonly bigint[]): boolean {
  for (let j = 0; j < 3; j++) {
    const p = wordPrime(j);
    const big = BigInt(p);
    const a = f.map((c) => {
      const r = Number(c % big);
      return r < 0 ? r + p : r;
    });
    const n = a.length - 1;
    const derivative = a.slice(0, n).map((c, i) => mulMod(c, n - i, p, 1 / p));
    if (gcdIsConstant(a, derivative, p)) return true;
  }
  return false;
}

function gcdIsConstant(f: readonly number[], g: readonly number[], p: number): boolean {
  const inv = 1 / p;
  let a = f.slice();
  let b = strip(g);
  while (b.length > 0) {
    const lead = powMod(b[0] as number, p - 2, p, inv);
    for (let i = 0; i + b.length <= a.length; i++) {
      const q = p - mulMod(a[i] as number, lead, p, inv);
      if (q === p) continue;
      for (let j = 0; j < b.length; j++) {
        const v = (a[i + j] as number) + mulMod(q, b[j] as number, p, inv);
        a[i + j] = v >= p ? v - p : v;
      }
    }
    const r = strip(a.slice(Math.max(0, a.length - b.length + 1)));
    a = b;
    b = r;
  }
  return a.length === 1;
}

function strip(f: readonly number[]): number[] {
  let i = 0;
  while (i < f.length && f[i] === 0) i++;
  return f.slice(i);
}
