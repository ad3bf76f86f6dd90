/**
 * Is a number with this minimal polynomial a nested square root over the rationals, and of what?
 *
 * α is constructible iff the Galois group of its polynomial is a 2-group. In one every proper subgroup is properly
 * contained in its normaliser; so Q(α) ≠ Q has a subfield of index 2 (Rotman, Galois Theory; Landau & Miller 1985
 * for towers of subfields). Going down by such subfields therefore decides. Before it a splitting modulo a prime
 * with a factor of a degree that is no power of two answers "no" at once (Dedekind).
 */
import type { Charge } from '../polynomials/factor';
import { degreeOf, type IntegerPoly } from '../polynomials/integer-poly';
import { makeIntegral, type Integral } from '../subfields/integral';
import { surveySplittings, type Splitting } from '../subfields/splitting';
import {
  TooManyPartitions,
  findSubfield,
  findSubfieldByHalving,
  type Subfield,
} from '../subfields/subfield';

export type Chain =
  | {
      readonly kind: 'chain';
      readonly start: Integral;
      /** Top first; the last one rests on the rationals. */
      readonly steps: readonly Subfield[];
    }
  | { readonly kind: 'degree'; readonly degree: number }
  | { readonly kind: 'splitting'; readonly splitting: Splitting; readonly degree: number }
  | { readonly kind: 'stuck'; readonly degree: number };

/** Primes looked at for the number itself: they refuse nearly everything that can be refused. */
const PRIMES_AT_FIRST = 24;
/** Primes looked at for a field further down, where only one with few cycles of the Frobenius is wanted. */
const PRIMES_BELOW = 8;

const isPowerOfTwo = (n: number): boolean => (n & (n - 1)) === 0;

/** A subfield of index 2; null proves that the Galois group is no 2-group. */
function halfOf(f: IntegerPoly, splittings: readonly Splitting[], charge: Charge): Subfield | null {
  try {
    return findSubfield(f, 2, splittings, charge);
  } catch (error) {
    if (!(error instanceof TooManyPartitions)) throw error;
    return findSubfieldByHalving(f, splittings, charge);
  }
}

/** Decides for an irreducible integer polynomial. Throws TooManyPartitions where the search would be too long. */
export function quadraticChain(f: IntegerPoly, charge: Charge): Chain {
  const degree = degreeOf(f);
  if (!isPowerOfTwo(degree)) return { kind: 'degree', degree };
  const start = makeIntegral(f);
  const steps: Subfield[] = [];
  let current = start.monic;
  while (degreeOf(current) > 1) {
    const survey = surveySplittings(
      current,
      [2],
      steps.length === 0 ? PRIMES_AT_FIRST : PRIMES_BELOW,
      charge,
    );
    if (survey.kind === 'foreign') {
      return { kind: 'splitting', splitting: survey.splitting, degree: degreeOf(current) };
    }
    const step = halfOf(current, survey.splittings, charge);
    if (step === null) return { kind: 'stuck', degree: degreeOf(current) };
    steps.push(step);
    current = step.lower;
  }
  return { kind: 'chain', start, steps };
}
