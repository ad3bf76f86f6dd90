/**
 * Does an angle trisector, added to straightedge and compass, reach a real number?
 *
 * With it the real roots of cubics that have three of them become reachable, and nothing else does (Gleason 1988): a
 * number is reached iff it lies in a tower of real fields of steps of degree 2 and of cubic steps with three
 * real roots. Divisions of the circle: n = 2^a·3^b times distinct Pierpont primes (Gleason 1988).
 */
import type { Budget } from '../limits';
import { isSquarefreeMod, splitByDegree } from '../polynomials/factor-mod';
import { degreeOf, type IntegerPoly } from '../polynomials/integer-poly';
import { monicMod, reduceMod } from '../polynomials/mod-poly';
import { smallPrimes } from '../polynomials/primes';
import type { Algebraic } from './algebraic';
import { isolateRoots } from './all-roots';
import { fieldBelow } from './quadratic-chain';

/** n/2^a·3^b and squarefree in Pierpont primes; n > 0 small enough for trial division. */
export function trisectorDivides(n: bigint): boolean {
  let rest = n;
  for (const p of [2n, 3n]) while (rest % p === 0n) rest /= p;
  for (let p = 5n; rest > 1n; p += 2n) {
    if (p * p > rest) p = rest;
    if (rest % p !== 0n) continue;
    rest /= p;
    let part = p - 1n;
    for (const q of [2n, 3n]) while (part % q === 0n) part /= q;
    if (part !== 1n || rest % p === 0n) return false;
  }
  return true;
}

const isSmooth = (n: number): boolean => {
  let rest = n;
  for (const p of [2, 3]) while (rest % p === 0) rest /= p;
  return rest === 1;
};

const PRIMES_LOOKED_AT = 40;
/** Fields of a larger degree are not searched for subfields. */
const LARGEST_DEGREE = 12;

/** Whether some splitting of f shows an element whose order has a prime factor above 3 (Dedekind). */
function showsLargerOrder(f: IntegerPoly, budget: Budget): boolean {
  let looked = 0;
  for (const p of smallPrimes()) {
    if ((f[f.length - 1] as bigint) % BigInt(p) === 0n) continue;
    const image = reduceMod(f, p);
    if (!isSquarefreeMod(image, p)) continue;
    budget.charge(f.length * f.length * 16);
    for (const { degree } of splitByDegree(monicMod(image, p), p)) {
      if (!isSmooth(degree)) return true;
    }
    if (++looked === PRIMES_LOOKED_AT) return false;
  }
  return false;
}

function realRoots(f: IntegerPoly, budget: Budget): number {
  return isolateRoots(f, budget).boxes.filter(({ im }) => im.low === 0n && im.high === 0n).length;
}

/** The answer and what it rests on; `open` where it is not decided. */
export type Trisector =
  | { readonly reaches: boolean; readonly by: 'division' | 'order' | 'cubic' }
  | { readonly reaches: null; readonly by: 'open' };

const OPEN: Trisector = { reaches: null, by: 'open' };

/**
 * Decided are divisions of the circle, orders with a prime above 3, and real numbers whose field leads down by
 * quadratic steps to degree 3 or to a quartic without a subfield. Cost: one survey of primes, at most log₂(degree)
 * lattice reductions and one isolation of all roots.
 */
export function trisectorReaches(a: Algebraic, budget: Budget): Trisector {
  const { division } = a.origin;
  if (division !== undefined) return { reaches: trisectorDivides(division), by: 'division' };
  if (!isSmooth(a.degree) || showsLargerOrder(a.poly, budget)) {
    return { reaches: false, by: 'order' };
  }
  if (!a.isReal || a.degree > LARGEST_DEGREE) return OPEN;
  let poly = a.poly;
  for (;;) {
    const degree = degreeOf(poly);
    if (degree === 3) return { reaches: realRoots(poly, budget) === 3, by: 'cubic' };
    const lower =
      degree % 2 === 0
        ? fieldBelow(poly, (work) => {
            budget.charge(work);
          })
        : null;
    if (lower !== null) {
      poly = lower;
      continue;
    }
    // A quartic without a quadratic subfield is solved by its resolvent cubic, which has three real roots exactly
    // when the quartic has four or none; with two, the cubic step it needs has one real root.
    return degree === 4 ? { reaches: realRoots(poly, budget) !== 2, by: 'cubic' } : OPEN;
  }
}
