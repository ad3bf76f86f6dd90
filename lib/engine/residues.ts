/**
 * Residues: ring homomorphisms from a tower to word-size prime fields.
 *
 * A homomorphism is a prime p and, for each generator, a root modulo p of the image of its radicand. If the image of x is a
 * quadratic non-residue, x is not a square: that is a proof. If all images are residues nothing is decided.
 *
 * Primes p < 2²⁶ with p ≡ 3 (mod 4): then products stay below 2⁵² and are exact in a double, and a square root is one power.
 * (A positive real element that is not a square has such a non-residue: the field is real, so the root of −1 cannot
 * interfere.) A homomorphism of a tower is one of its parent for which the new radicand is a residue; both roots are taken, so
 * there is on average one for each prime, whatever the degree (Landau's prime ideal theorem).
 */

import { residue, type Int } from './int';
import type { El, Gen, Tower } from './tower';

export interface Hom {
  readonly p: number;
  /** 1/p, for reduction by multiplication. */
  readonly inv: number;
  readonly big: bigint;
  /** Residues of the generators of the tower it belongs to. */
  readonly roots: readonly number[];
}

/** a·b mod p for 0 ≤ a, b < p < 2²⁶. The quotient is off by one at most. */
export function mulMod(a: number, b: number, p: number, inv: number): number {
  const x = a * b;
  const r = x - Math.floor(x * inv) * p;
  return r < 0 ? r + p : r >= p ? r - p : r;
}

export function powMod(a: number, e: number, p: number, inv: number): number {
  let r = 1;
  let x = a;
  for (let k = e; k > 0; k = Math.floor(k / 2)) {
    if (k % 2 === 1) r = mulMod(r, x, p, inv);
    x = mulMod(x, x, p, inv);
  }
  return r;
}

const TOP = 2 ** 26;
const WINDOW = 1 << 16;
const primes: number[] = [];
let nextTop = TOP;
let sievePrimes: number[] | null = null;

/** The j-th prime below 2²⁶, from the top. A table of constants that grows on demand. */
export function wordPrime(j: number): number {
  while (j >= primes.length) {
    sievePrimes ??= sieveBelow(8192);
    const low = nextTop - WINDOW;
    const composite = new Uint8Array(WINDOW);
    for (const q of sievePrimes) {
      for (let m = Math.ceil(low / q) * q - low; m < WINDOW; m += q) composite[m] = 1;
    }
    for (let i = WINDOW - 1; i >= 0; i--) if (!composite[i]) primes.push(low + i);
    nextTop = low;
  }
  return primes[j] as number;
}

function sieveBelow(n: number): number[] {
  const composite = new Uint8Array(n);
  const out: number[] = [];
  for (let i = 2; i < n; i++) {
    if (composite[i]) continue;
    out.push(i);
    for (let j = i * i; j < n; j += i) composite[j] = 1;
  }
  return out;
}

interface Pool {
  list: Hom[];
  /** How many homomorphisms of the parent (or primes, at the base) have been tried. */
  tried: number;
}

/** How many radicands are tried, over all levels, for one request before giving up: the descent may be cheaper. */
export const PATIENCE = 1500;

function poolOf(t: Tower): Pool {
  t.homs ??= { list: [], tried: 0 } satisfies Pool;
  return t.homs as Pool;
}

/** Trials left of the request at hand. */
export interface Effort {
  left: number;
}

/** The j-th homomorphism of a tower, or null when none is found within the effort. */
export function homOf(t: Tower, j: number, effort: Effort): Hom | null {
  const pool = poolOf(t);
  while (pool.list.length <= j) {
    if (t.parent === null) {
      const p = wordPrime(pool.tried++);
      if (p % 4 === 3) pool.list.push({ p, inv: 1 / p, big: BigInt(p), roots: [] });
      continue;
    }
    if (effort.left <= 0) return null;
    const h = homOf(t.parent, pool.tried, effort);
    if (h === null) return null;
    pool.tried++;
    effort.left--;
    t.field.budget.charge(5);
    const g = t.top as Gen;
    const d = g.int !== 0 ? residue(g.int, h.p, h.big) : imageOf(g.rad, t.parent, h);
    if (d === null || d === 0) continue;
    const r = powMod(d, (h.p + 1) / 4, h.p, h.inv);
    if (mulMod(r, r, h.p, h.inv) !== d) continue;
    pool.list.push({ ...h, roots: [...h.roots, r] });
    pool.list.push({ ...h, roots: [...h.roots, h.p - r] });
  }
  return pool.list[j] as Hom;
}

/** Image of the numerator of x (an element of t or of a tower inside it). */
export function imageOf(x: El, t: Tower, h: Hom): number {
  const { p, inv, big } = h;
  let roots = h.roots;
  if (x.t !== t) {
    const own = new Array<number>(x.t.k);
    for (let i = 0; i < x.t.k; i++) own[i] = h.roots[t.position(x.t.gens[i] as Gen)] as number;
    roots = own;
  }
  if (x.m === null) {
    let n = x.c.length;
    const v = new Array<number>(n);
    for (let i = 0; i < n; i++) v[i] = residue(x.c[i] as Int, p, big);
    for (let k = x.t.k - 1; k >= 0; k--) {
      n >>= 1;
      const r = roots[k] as number;
      for (let i = 0; i < n; i++) {
        const w = v[n + i] as number;
        if (w !== 0) v[i] = ((v[i] as number) + mulMod(w, r, p, inv)) % p;
      }
    }
    return v[0] as number;
  }
  let sum = 0;
  for (let j = 0; j < x.m.length; j++) {
    let v = residue(x.c[j] as Int, p, big);
    for (let i = 0, rest = x.m[j] as bigint; rest !== 0n; i++, rest >>= 1n) {
      if (rest & 1n) v = mulMod(v, roots[i] as number, p, inv);
    }
    sum = (sum + v) % p;
  }
  return sum;
}

/** Quadratic character of x under h: 1 residue, −1 non-residue, 0 when it says nothing. */
export function character(x: El, t: Tower, h: Hom): number {
  const top = imageOf(x, t, h);
  const den = x.den === 1 ? 1 : residue(x.den, h.p, h.big);
  if (top === 0 || den === 0) return 0;
  const v = mulMod(top, den, h.p, h.inv);
  return powMod(v, (h.p - 1) / 2, h.p, h.inv) === 1 ? 1 : -1;
}

/** Character of an integer. */
export function characterOfInteger(n: bigint, h: Hom): number {
  const r = residue(n, h.p, h.big);
  return r === 0 ? 0 : powMod(r, (h.p - 1) / 2, h.p, h.inv) === 1 ? 1 : -1;
}

/** False proves that x is not a square in t; true says nothing. */
export function maybeSquare(x: El, t: Tower, tries: number): boolean {
  const effort = { left: PATIENCE };
  for (let j = 0; j < tries; j++) {
    const h = homOf(t, j, effort);
    if (h === null) return true;
    t.field.budget.charge(x.c.length + 5);
    if (character(x, t, h) < 0) return false;
  }
  return true;
}

/** The first `n` (at most 30) characters of x as a bit mask of the non-residues and one of those that count. */
export function characters(x: El, t: Tower, n: number): { bits: number; known: number } {
  let bits = 0;
  let known = 0;
  const effort = { left: PATIENCE };
  t.field.budget.charge(n * (x.c.length + 5));
  for (let j = 0; j < n; j++) {
    const h = homOf(t, j, effort);
    if (h === null) break;
    const c = character(x, t, h);
    if (c !== 0) known |= 1 << j;
    if (c < 0) bits |= 1 << j;
  }
  return { bits, known };
}
