/**
 * Polynomials modulo a prime below 2^15, with word arithmetic only (products stay below 2^30).
 *
 * A polynomial is an array of residues 0 … p−1, constant term first, without leading zeros.
 */
import type { IntegerPoly } from './integer-poly';

export type ModPoly = number[];

const at = (f: ModPoly, k: number): number => f[k] as number;

function trimMod(f: ModPoly): ModPoly {
  let length = f.length;
  while (length > 0 && f[length - 1] === 0) length--;
  f.length = length;
  return f;
}

export function reduceMod(f: IntegerPoly, p: number): ModPoly {
  const modulus = BigInt(p);
  return trimMod(
    f.map((c) => {
      const r = Number(c % modulus);
      return r < 0 ? r + p : r;
    }),
  );
}

/** a^e mod p by repeated squaring. */
export function powerMod(a: number, e: number, p: number): number {
  let result = 1;
  let base = a % p;
  for (let k = e; k > 0; k >>= 1) {
    if (k & 1) result = (result * base) % p;
    base = (base * base) % p;
  }
  return result;
}

/** 1/a mod p for a not divisible by p (Fermat). */
export const inverseMod = (a: number, p: number): number => powerMod(a, p - 2, p);

export function monicMod(f: ModPoly, p: number): ModPoly {
  if (f.length === 0) return f;
  const scale = inverseMod(at(f, f.length - 1), p);
  return scale === 1 ? f : f.map((c) => (c * scale) % p);
}

export function subtractMod(f: ModPoly, g: ModPoly, p: number): ModPoly {
  const difference: ModPoly = [];
  for (let k = 0; k < Math.max(f.length, g.length); k++) {
    const d = (f[k] ?? 0) - (g[k] ?? 0);
    difference.push(d < 0 ? d + p : d);
  }
  return trimMod(difference);
}

export function multiplyMod(f: ModPoly, g: ModPoly, p: number): ModPoly {
  if (f.length === 0 || g.length === 0) return [];
  const product = new Array<number>(f.length + g.length - 1).fill(0);
  for (let i = 0; i < f.length; i++) {
    const a = at(f, i);
    if (a === 0) continue;
    for (let j = 0; j < g.length; j++) product[i + j] = (at(product, i + j) + a * at(g, j)) % p;
  }
  return trimMod(product);
}

/** Quotient and remainder; the divisor is not zero. */
export function divideMod(f: ModPoly, g: ModPoly, p: number): { quotient: ModPoly; rest: ModPoly } {
  const rest = [...f];
  const scale = inverseMod(at(g, g.length - 1), p);
  const quotient = new Array<number>(Math.max(0, f.length - g.length + 1)).fill(0);
  for (let k = quotient.length - 1; k >= 0; k--) {
    const q = (at(rest, k + g.length - 1) * scale) % p;
    if (q === 0) continue;
    quotient[k] = q;
    for (let j = 0; j < g.length; j++) {
      const r = (at(rest, k + j) - ((q * at(g, j)) % p)) | 0;
      rest[k + j] = r < 0 ? r + p : r;
    }
  }
  return { quotient: trimMod(quotient), rest: trimMod(rest) };
}

export const restMod = (f: ModPoly, g: ModPoly, p: number): ModPoly =>
  f.length < g.length ? f : divideMod(f, g, p).rest;

/** Monic greatest common divisor. */
export function gcdMod(f: ModPoly, g: ModPoly, p: number): ModPoly {
  let a = f;
  let b = g;
  while (b.length > 0) [a, b] = [b, restMod(a, b, p)];
  return monicMod(a, p);
}

export function derivativeMod(f: ModPoly, p: number): ModPoly {
  return trimMod(f.slice(1).map((c, k) => (c * ((k + 1) % p)) % p));
}

/** base^e modulo f. The exponent may be large; its bits are read from the top. */
export function powerModPoly(base: ModPoly, e: bigint, f: ModPoly, p: number): ModPoly {
  let result: ModPoly = [1];
  for (const bit of e.toString(2)) {
    result = restMod(multiplyMod(result, result, p), f, p);
    if (bit === '1') result = restMod(multiplyMod(result, base, p), f, p);
  }
  return result;
}

/** Cofactors s, t with s·f + t·g = 1 for coprime f and g. Extended Euclid. */
export function bezoutMod(f: ModPoly, g: ModPoly, p: number): { s: ModPoly; t: ModPoly } {
  let [r0, r1] = [f, g];
  let [s0, s1]: [ModPoly, ModPoly] = [[1], []];
  let [t0, t1]: [ModPoly, ModPoly] = [[], [1]];
  while (r1.length > 0) {
    const { quotient, rest } = divideMod(r0, r1, p);
    [r0, r1] = [r1, rest];
    [s0, s1] = [s1, subtractMod(s0, multiplyMod(quotient, s1, p), p)];
    [t0, t1] = [t1, subtractMod(t0, multiplyMod(quotient, t1, p), p)];
  }
  if (r0.length !== 1) throw new RangeError('the two polynomials are not coprime modulo p');
  const scale = [inverseMod(at(r0, 0), p)];
  return { s: multiplyMod(s0, scale, p), t: multiplyMod(t0, scale, p) };
}
