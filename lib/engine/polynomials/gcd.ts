/**
 * Greatest common divisor of integer polynomials by images modulo small primes (Brown 1971), proven by
 * division: a candidate is returned only after it has divided both arguments over the integers.
 */
import {
  derivativeOf,
  divideExactly,
  gcdOf,
  isEqual,
  leadingOf,
  primitivePart,
  scalePoly,
  subtractPoly,
  type IntegerPoly,
} from './integer-poly';
import { inverseBig, symmetricMod } from './hensel';
import { gcdMod, reduceMod } from './mod-poly';
import { smallPrimes } from './primes';

/** Combines residues modulo m and modulo the prime p, coefficient by coefficient, symmetric. */
function combine(f: IntegerPoly, m: bigint, g: IntegerPoly, p: bigint): IntegerPoly {
  const inverse = inverseBig(m, p);
  const length = Math.max(f.length, g.length);
  const joined: bigint[] = [];
  for (let k = 0; k < length; k++) {
    const a = f[k] ?? 0n;
    const step = ((((g[k] ?? 0n) - a) % p) * inverse) % p;
    joined.push(a + m * step);
  }
  return symmetricMod(joined, m * p);
}

/** Primitive gcd with positive leading coefficient; gcd(f, 0) is the primitive part of f. */
export function gcdPoly(f: IntegerPoly, g: IntegerPoly): IntegerPoly {
  if (f.length === 0) return primitivePart(g);
  if (g.length === 0) return primitivePart(f);
  const a = primitivePart(f);
  const b = primitivePart(g);
  const lead = gcdOf(leadingOf(a), leadingOf(b));
  let known: IntegerPoly = [];
  let modulus = 1n;
  for (const p of smallPrimes()) {
    if (lead % BigInt(p) === 0n || (leadingOf(a) * leadingOf(b)) % BigInt(p) === 0n) continue;
    const image = gcdMod(reduceMod(a, p), reduceMod(b, p), p);
    if (image.length === 1) return [1n];
    if (modulus > 1n && image.length > known.length) continue;
    const scaled = scalePoly(image.map(BigInt), lead);
    if (modulus === 1n || image.length < known.length) {
      known = symmetricMod(scaled, BigInt(p));
      modulus = BigInt(p);
      continue;
    }
    const next = combine(known, modulus, scaled, BigInt(p));
    modulus *= BigInt(p);
    if (isEqual(next, known)) {
      const candidate = primitivePart(next);
      if (divideExactly(a, candidate) && divideExactly(b, candidate)) return candidate;
    }
    known = next;
  }
  throw new RangeError('the coefficients outgrow the table of small primes');
}

/**
 * Squarefree factors with their multiplicities, f = content · ∏ part^multiplicity (Yun 1976).
 * Needs f ≠ 0. Parts are primitive with positive leading coefficient and pairwise coprime.
 */
export function squarefreeParts(f: IntegerPoly): { part: IntegerPoly; multiplicity: number }[] {
  const parts: { part: IntegerPoly; multiplicity: number }[] = [];
  if (f.length < 2) return parts;
  const primitive = primitivePart(f);
  const exact = (a: IntegerPoly, b: IntegerPoly): IntegerPoly => {
    const quotient = divideExactly(a, b);
    if (quotient === null) throw new RangeError('a gcd does not divide its arguments');
    return quotient;
  };
  const slope = derivativeOf(primitive);
  const common = gcdPoly(primitive, slope);
  let b = exact(primitive, common);
  let d = subtractPoly(exact(slope, common), derivativeOf(b));
  for (let multiplicity = 1; b.length > 1; multiplicity++) {
    const part = gcdPoly(b, d);
    if (part.length > 1) parts.push({ part, multiplicity });
    b = exact(b, part);
    d = subtractPoly(exact(d, part), derivativeOf(b));
  }
  return parts;
}
