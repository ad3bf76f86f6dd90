/**
 * Factorisation of squarefree polynomials modulo a small odd prime.
 *
 * Distinct degrees first, then equal degrees after Cantor & Zassenhaus (1981). Their method draws trial
 * polynomials at random; here they are taken in a fixed order that runs through every residue class, so that
 * the outcome and the running time never depend on luck: by the Chinese remainder theorem some class
 * separates any two factors, hence the search ends.
 */
import {
  derivativeMod,
  divideMod,
  gcdMod,
  monicMod,
  powerModPoly,
  restMod,
  subtractMod,
  type ModPoly,
} from './mod-poly';

export const isSquarefreeMod = (f: ModPoly, p: number): boolean =>
  gcdMod(f, derivativeMod(f, p), p).length === 1;

/** Splits a monic squarefree f into products of irreducible factors of one degree each. */
export function splitByDegree(f: ModPoly, p: number): { degree: number; product: ModPoly }[] {
  const parts: { degree: number; product: ModPoly }[] = [];
  let rest = f;
  let frobenius: ModPoly = [0, 1];
  for (let degree = 1; 2 * degree <= rest.length - 1; degree++) {
    frobenius = powerModPoly(restMod(frobenius, rest, p), BigInt(p), rest, p);
    const product = gcdMod(rest, subtractMod(frobenius, [0, 1], p), p);
    if (product.length > 1) {
      parts.push({ degree, product });
      rest = divideMod(rest, product, p).quotient;
    }
  }
  if (rest.length > 1) parts.push({ degree: rest.length - 1, product: rest });
  return parts;
}

/** The n-th trial polynomial: x plus the digits of n to the base p, one more coefficient per power of p. */
function trialPolynomial(n: number, p: number): ModPoly {
  const digits: ModPoly = [];
  for (let k = n; k > 0; k = Math.floor(k / p)) digits.push(k % p);
  if (digits.length === 0) digits.push(0);
  return [...digits, 1];
}

/** The irreducible factors of a monic product of distinct irreducibles of the same degree. */
function splitEqualDegree(f: ModPoly, degree: number, p: number): ModPoly[] {
  if (f.length - 1 === degree) return [f];
  const exponent = (BigInt(p) ** BigInt(degree) - 1n) / 2n;
  for (let n = 0; ; n++) {
    const trial = restMod(trialPolynomial(n, p), f, p);
    const power = powerModPoly(trial, exponent, f, p);
    const part = gcdMod(f, subtractMod(power, [1], p), p);
    if (part.length > 1 && part.length < f.length) {
      const other = monicMod(divideMod(f, part, p).quotient, p);
      return [...splitEqualDegree(part, degree, p), ...splitEqualDegree(other, degree, p)];
    }
  }
}

/** All monic irreducible factors of a squarefree f modulo the odd prime p, lowest degree first. */
export function factorMod(f: ModPoly, p: number): ModPoly[] {
  return splitByDegree(monicMod(f, p), p).flatMap(({ degree, product }) =>
    splitEqualDegree(product, degree, p),
  );
}
