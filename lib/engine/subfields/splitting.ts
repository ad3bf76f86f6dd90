/**
 * How a polynomial splits modulo primes, and what the splittings alone decide.
 *
 * By Dedekind's theorem the degrees of the factors modulo a prime that keeps f squarefree are the cycle lengths of
 * an element of the Galois group of f, the Frobenius. So a degree with a prime factor q proves q to divide the order of the group.
 */
import type { Charge } from '../polynomials/factor';
import { isSquarefreeMod, splitByDegree } from '../polynomials/factor-mod';
import { degreeOf, leadingOf, type IntegerPoly } from '../polynomials/integer-poly';
import { monicMod, reduceMod } from '../polynomials/mod-poly';
import { smallPrimes } from '../polynomials/primes';

/** The degrees of the irreducible factors modulo a prime that keeps f squarefree, lowest first. */
export interface Splitting {
  readonly prime: number;
  readonly degrees: readonly number[];
}

function splittingAt(f: IntegerPoly, p: number): Splitting | null {
  if (leadingOf(f) % BigInt(p) === 0n) return null;
  const image = reduceMod(f, p);
  if (!isSquarefreeMod(image, p)) return null;
  const degrees = splitByDegree(monicMod(image, p), p).flatMap(({ degree, product }) =>
    new Array<number>((product.length - 1) / degree).fill(degree),
  );
  return { prime: p, degrees };
}

/** Whether n has no prime factors but the given ones. */
export function isMadeOf(n: number, primes: readonly number[]): boolean {
  let rest = n;
  for (const p of primes) while (rest % p === 0) rest /= p;
  return rest === 1;
}

export type Survey =
  | { readonly kind: 'foreign'; readonly splitting: Splitting }
  | { readonly kind: 'splittings'; readonly splittings: readonly Splitting[] };

/**
 * The splittings at the first `count` good primes (a count, so that machines agree), or the first one with a degree that has another prime factor than `allowed`:
 * it proves that the order of the Galois group has one too.
 */
export function surveySplittings(
  f: IntegerPoly,
  allowed: readonly number[],
  count: number,
  charge: Charge,
): Survey {
  const splittings: Splitting[] = [];
  const n = degreeOf(f);
  for (const p of smallPrimes()) {
    charge(n * n * (n + 32) + 500);
    const splitting = splittingAt(f, p);
    if (splitting === null) continue;
    if (!splitting.degrees.every((degree) => isMadeOf(degree, allowed))) {
      return { kind: 'foreign', splitting };
    }
    splittings.push(splitting);
    if (splittings.length === count) break;
  }
  return { kind: 'splittings', splittings };
}
