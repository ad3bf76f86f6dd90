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
  multiplyMod,
  powerModPoly,
  restMod,
  subtractMod,
  type ModPoly,
} from './mod-poly';

/** Up to this length the Frobenius map is written out: its set-up costs as much as about n/15 powers. */
const MAP_LENGTH = 48;

export const isSquarefreeMod = (f: ModPoly, p: number): boolean =>
  gcdMod(f, derivativeMod(f, p), p).length === 1;

/** The map h ↦ h^p modulo f, as the images of 1, x, x², …; it is linear over the residues. */
function frobeniusMap(f: ModPoly, xToP: ModPoly, p: number): (h: ModPoly) => ModPoly {
  const n = f.length - 1;
  const images: ModPoly[] = [[1]];
  for (let k = 1; k < n; k++) {
    images.push(restMod(multiplyMod(images[k - 1] as ModPoly, xToP, p), f, p));
  }
  return (h) => {
    const sum = new Array<number>(n).fill(0);
    h.forEach((c, k) => {
      if (c === 0) return;
      images[k]?.forEach((b, j) => {
        sum[j] = ((sum[j] as number) + c * b) % p;
      });
    });
    return subtractMod(sum, [], p);
  };
}

/**
 * Splits a monic squarefree f into products of irreducible factors of one degree each. For small f the linear
 * map h ↦ h^p is written out once, which makes every further degree cheap.
 */
export function splitByDegree(f: ModPoly, p: number): { degree: number; product: ModPoly }[] {
  const parts: { degree: number; product: ModPoly }[] = [];
  let rest = f;
  let frobenius: ModPoly = [0, 1];
  let map: ((h: ModPoly) => ModPoly) | null = null;
  for (let degree = 1; 2 * degree <= rest.length - 1; degree++) {
    if (map !== null) frobenius = map(frobenius);
    else frobenius = powerModPoly(restMod(frobenius, rest, p), BigInt(p), rest, p);
    if (degree === 1) map = rest.length <= MAP_LENGTH ? frobeniusMap(rest, frobenius, p) : null;
    const product = gcdMod(rest, subtractMod(frobenius, [0, 1], p), p);
    if (product.length > 1) {
      parts.push({ degree, product });
      rest = divideMod(rest, product, p).quotient;
    }
  }
  if (rest.length > 1) parts.push({ degree: rest.length - 1, product: rest });
  return parts;
}

/** Whether a monic f of positive degree is irreducible. */
export function isIrreducibleMod(f: ModPoly, p: number): boolean {
  if (!isSquarefreeMod(f, p)) return false;
  return splitByDegree(f, p)[0]?.degree === f.length - 1;
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
