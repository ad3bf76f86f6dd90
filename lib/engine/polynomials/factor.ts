/**
 * Factorisation of polynomials over the integers into irreducibles, proven.
 *
 * Method: squarefree parts (Yun 1976), a factorisation modulo one small prime (Cantor & Zassenhaus 1981),
 * Hensel lifting, then recombination of the lifted factors: by trial of subsets while they are few
 * (Zassenhaus 1969), by lattice reduction otherwise (van Hoeij 2002; knapsack rows from logarithmic
 * derivatives as in Belabas, van Hoeij, Klüners & Steel 2009). The lattice route is what sums of square
 * roots need: the minimal polynomial of √2+√3+√5+… splits into factors of degree at most two modulo every
 * prime, so that subsets alone would take exponential time.
 */
import { squarefreeParts } from './gcd';
import { isSquarefreeMod, factorMod } from './factor-mod';
import { leadingOf, primitivePart, type IntegerPoly } from './integer-poly';
import { reduceMod, type ModPoly } from './mod-poly';
import { smallPrimes } from './primes';
import { recombineByLattice } from './recombine-lattice';
import { recombineBySubsets } from './recombine-subsets';

/** Called with an amount of work; throws to stop a computation that has become too long. */
export type Charge = (work: number) => void;
const free: Charge = () => undefined;

/** Up to this many modular factors are recombined by trying subsets: at most 2^9 trials. */
const SUBSET_LIMIT = 10;
/** How many good primes are compared for the fewest modular factors. */
const PRIMES_COMPARED = 5;

export interface Factor {
  readonly poly: IntegerPoly;
  readonly multiplicity: number;
}

function bestPrime(f: IntegerPoly, charge: Charge): { p: number; factors: ModPoly[] } {
  let best: { p: number; factors: ModPoly[] } | null = null;
  let good = 0;
  // Large primes of the table split a polynomial no worse than small ones and need fewer lifting steps.
  for (const p of smallPrimes()) {
    if (leadingOf(f) % BigInt(p) === 0n) continue;
    const image = reduceMod(f, p);
    if (!isSquarefreeMod(image, p)) continue;
    charge(f.length * f.length * 16);
    const factors = factorMod(image, p);
    if (best === null || factors.length < best.factors.length) best = { p, factors };
    good++;
    if (best.factors.length === 1 || good === PRIMES_COMPARED) break;
  }
  if (best === null) throw new RangeError('no small prime keeps the polynomial squarefree');
  return best;
}

/** Irreducible factors of a primitive squarefree polynomial of positive degree. */
function factorSquarefree(f: IntegerPoly, charge: Charge): IntegerPoly[] {
  if (f.length === 2) return [f];
  if (f[0] === 0n) return [[0n, 1n], ...factorSquarefree(f.slice(1), charge)];
  const { p, factors } = bestPrime(f, charge);
  if (factors.length === 1) return [f];
  return factors.length <= SUBSET_LIMIT
    ? recombineBySubsets(f, factors, p, charge)
    : recombineByLattice(f, factors, p, charge);
}

const byShape = (a: IntegerPoly, b: IntegerPoly): number => {
  if (a.length !== b.length) return a.length - b.length;
  for (let k = a.length - 1; k >= 0; k--) {
    const d = (a[k] as bigint) - (b[k] as bigint);
    if (d !== 0n) return d < 0n ? -1 : 1;
  }
  return 0;
};

/**
 * The irreducible factors of f ≠ 0 over the integers, primitive with positive leading coefficient, lowest
 * degree first, with multiplicities; the content is left out. `charge` is told of the work done.
 */
export function factorOverIntegers(f: IntegerPoly, charge: Charge = free): Factor[] {
  if (f.length === 0) throw new RangeError('the zero polynomial has no factorisation');
  return squarefreeParts(primitivePart(f))
    .flatMap(({ part, multiplicity }) =>
      factorSquarefree(part, charge).map((poly) => ({ poly, multiplicity })),
    )
    .sort((a, b) => byShape(a.poly, b.poly));
}

/** Whether f is irreducible over the rationals (constants are not). */
export function isIrreducible(f: IntegerPoly, charge: Charge = free): boolean {
  const factors = f.length < 2 ? [] : factorOverIntegers(f, charge);
  return factors.length === 1 && factors[0]?.multiplicity === 1;
}
