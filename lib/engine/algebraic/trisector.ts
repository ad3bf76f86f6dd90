/**
 * Does an angle trisector, added to straightedge and compass, reach a number?
 *
 * Theorem (after Gleason 1988, Angle trisection, the heptagon, and the triskaidecagon). A real number is reached iff it lies
 * in a tower of real fields over the rationals whose steps have degree 2, or degree 3 with a cubic of three real
 * roots. A complex number is reached iff its parts are; these numbers are a field, closed under complex square roots.
 *
 * What follows from it and is used here, for a chain of subfields Q = F_0 < F_1 < … < Q(α) without fields between:
 * - The Galois group of a number reached has order 2^a·3^b: that of a tower of such steps embeds in repeated wreath products
 *   of S2 and S3. Such groups are solvable (Burnside), so that a step without fields between has a prime power as its
 *   degree (Galois), here a power of 2 or 3; and not 8, as irreducible subgroups of GL(3, 2) have elements of order 7.
 * - Degree 2 is always reached from below.
 * - Degree 3 over a real field F: reached iff three roots are real. For if the cubic has one real root γ and γ were reached,
 *   it would first become reducible at a cubic step of a tower over F, which γ then generates; but that step has
 *   only real conjugates. A non-real root would give γ by Vieta's formulas.
 * - Degree 4 over a real field, without a field between: the group is A4 or S4, and a chain of subgroups of index 2 and 3 has to pass
 *   through the resolvent cubic. It has three real roots iff the quartic has four or none.
 * - Degree 9 over the rationals, without a field between and with an affine group: reached iff all nine roots are real. A chain
 *   of subgroups has to leave the plane of translations by steps of index 3 on which complex conjugation acts
 *   trivially, so that it commutes with all translations and is trivial; conversely a solvable group has
 *   a composition series, of real fields here. With another group an order has the factor 5 or 7.
 * - One step that is not reached refuses the number, whatever lies below it.
 * Divisions of the circle: n = 2^a·3^b times distinct Pierpont primes (Gleason 1988).
 */
import type { Budget } from '../limits';
import { degreeOf, type IntegerPoly } from '../polynomials/integer-poly';
import { hasAffineGroup } from '../subfields/affine-nine';
import { makeIntegral } from '../subfields/integral';
import { isMadeOf, surveySplittings, type Splitting } from '../subfields/splitting';
import { TooManyPartitions, findSubfield, type Subfield } from '../subfields/subfield';
import { isFraction, type Algebraic } from './algebraic';
import { countFibre, integralBox, lowerBox, type BoxAt } from './lower-box';
import { add, conjugate, multiply, negate } from './operations';

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

const SMOOTH = [2, 3];
const PRIMES_AT_FIRST = 40;
const PRIMES_BELOW = 10;
/** A number that is not real is decided by its parts up to this degree; theirs is up to half its square. */
const LARGEST_WITH_PARTS = 9;
/** Fields of a larger degree are not searched for subfields. */
const LARGEST_DEGREE = 36;

/**
 * The answer and what it rests on. `open` where it is not decided: a cubic over a field that is not real, in a degree above 9 (`coefficients`), a
 * step of degree 16, 27 … or of degree 9 over a larger field, without fields between (`step`), or a search that is too long (`limit`).
 */
export type Trisector =
  | { readonly reaches: boolean; readonly by: 'division' | 'order' | 'cubic' }
  | {
      readonly reaches: null;
      readonly by: 'open';
      readonly why: 'coefficients' | 'step' | 'limit';
    };

const BY_ORDER: Trisector = { reaches: false, by: 'order' };
const BY_CUBIC: Trisector = { reaches: false, by: 'cubic' };

/** A step down; `lower` is null where the next field is that of the rationals. */
interface Step {
  readonly polynomial: IntegerPoly;
  readonly index: number;
  readonly field: Subfield | null;
  readonly splittings: readonly Splitting[];
}

function leastSubfield(
  f: IntegerPoly,
  splittings: readonly Splitting[],
  charge: (work: number) => void,
): Subfield | null {
  const n = degreeOf(f);
  for (let index = 2; 2 * index <= n; index++) {
    if (n % index !== 0) continue;
    const found = findSubfield(f, index, splittings, charge);
    if (found !== null) return found;
  }
  return null;
}

/** Whether a step of this degree without fields between can have a group of order 2^a·3^b. */
const isPrimitiveDegree = (n: number): boolean => n !== 8 && (isMadeOf(n, [2]) || isMadeOf(n, [3]));

/** The steps, top first, or `order` where a group has an order with a prime factor above 3. */
function stepsDown(f: IntegerPoly, charge: (work: number) => void): Step[] | 'order' {
  const steps: Step[] = [];
  let current = f;
  while (degreeOf(current) > 1) {
    const count = steps.length === 0 ? PRIMES_AT_FIRST : PRIMES_BELOW;
    const survey = surveySplittings(current, SMOOTH, count, charge);
    if (survey.kind === 'foreign') return 'order';
    const field = leastSubfield(current, survey.splittings, charge);
    const index = field?.index ?? degreeOf(current);
    if (!isPrimitiveDegree(index)) return 'order';
    steps.push({ polynomial: current, index, field, splittings: survey.splittings });
    if (field === null) break;
    current = field.lower;
  }
  return steps;
}

type StepVerdict = 'reached' | 'refused' | 'order' | 'coefficients' | 'step';

/** One step; `box` closes in on the generator of its upper field. */
function decideStep(step: Step, box: BoxAt, budget: Budget): StepVerdict {
  const { polynomial, index, field, splittings } = step;
  if (index === 2) return 'reached';
  if (index === 9 && field === null) {
    const isAffine = hasAffineGroup(polynomial, splittings, (work) => budget.charge(work));
    if (!isAffine) return 'order';
    return countFibre(polynomial, null, box, budget).real === 9 ? 'reached' : 'refused';
  }
  if (index > 4) return 'step';
  const { real, isLowerReal } = countFibre(polynomial, field, box, budget);
  if (!isLowerReal) return 'coefficients';
  if (index === 3) return real === 3 ? 'reached' : 'refused';
  return real === 2 ? 'refused' : 'reached';
}

/**
 * Decides for divisions of the circle, and for every number of a degree up to 36 whose subfields can be found, except as
 * `Trisector` says. Cost: a search for subfields at every step down, and an isolation of all roots at those of degree 3 and 4.
 */
export function trisectorReaches(a: Algebraic, budget: Budget): Trisector {
  const { division } = a.origin;
  if (division !== undefined) return { reaches: trisectorDivides(division), by: 'division' };
  if (!isMadeOf(a.degree, SMOOTH)) return BY_ORDER;
  const charge = (work: number): void => {
    budget.charge(work);
  };
  const start = makeIntegral(a.poly);
  if (a.degree > LARGEST_DEGREE) {
    const survey = surveySplittings(start.monic, SMOOTH, PRIMES_AT_FIRST, charge);
    return survey.kind === 'foreign' ? BY_ORDER : { reaches: null, by: 'open', why: 'limit' };
  }
  try {
    const steps = stepsDown(start.monic, charge);
    if (steps === 'order') return BY_ORDER;
    let box = integralBox(start, (P) => a.box(P));
    let open: 'coefficients' | 'step' | null = null;
    for (const step of steps) {
      const verdict = decideStep(step, box, budget);
      if (verdict === 'refused') return BY_CUBIC;
      if (verdict === 'order') return BY_ORDER;
      if (verdict !== 'reached') open = verdict;
      if (step.field !== null) box = lowerBox(step.field, box);
    }
    if (open === 'coefficients' && a.degree <= LARGEST_WITH_PARTS) return byParts(a, budget);
    return open === null
      ? { reaches: true, by: 'cubic' }
      : { reaches: null, by: 'open', why: open };
  } catch (error) {
    if (error instanceof TooManyPartitions) return { reaches: null, by: 'open', why: 'limit' };
    throw error;
  }
}

/** A number that is not real, by α + ᾱ and (α − ᾱ)²: it is reached iff these real numbers are. */
function byParts(a: Algebraic, budget: Budget): Trisector {
  const mirror = conjugate(a);
  const difference = add(a, negate(mirror), budget);
  let verdict: Trisector = { reaches: true, by: 'cubic' };
  for (const part of [add(a, mirror, budget), multiply(difference, difference, budget)]) {
    if (isFraction(part)) continue;
    const own = trisectorReaches(part, budget);
    if (own.reaches === false) return own;
    if (own.reaches === null) verdict = own;
  }
  return verdict;
}
