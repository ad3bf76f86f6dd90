import { atOnce } from './fixed-point';
import {
  lastLevel,
  periodValues,
  siblingProduct,
  type FermatPrime,
  type Period,
  type PeriodValues,
} from './periods';

/** coefficient · η(level, index). */
export interface Term extends Period {
  coefficient: number;
}

/** constant + a sum of multiples of periods. */
export interface Combination {
  constant: number;
  terms: readonly Term[];
}

/** x² − sum·x + product = 0, whose roots are the two periods that `parent` splits into. */
export interface Quadratic {
  parent: Period;
  /** The parent itself, as a combination: the integer −1 at the top. */
  sum: Combination;
  product: Combination;
  larger: Period;
  smaller: Period;
}

/** All quadratics that 2cos(2π/p) needs, in an order in which each uses only roots of those before it. */
export interface Chain {
  prime: FermatPrime;
  /** η(lastLevel, 0) = 2cos(2π/p). */
  target: Period;
  quadratics: readonly Quadratic[];
}

/** DeTemple 1991 counts this many Carlyle circles for 257, and at most this many for 65537. */
export const DETEMPLE_CARLYLE_CIRCLES = { 257: 24, 65537: 1332 } as const;

/**
 * The chain of quadratics for 2cos(2π/p).
 * Method: start from the wanted period and go up. The quadratic of a period needs its parent and the product of the
 * siblings, an integer combination of the parent's level. Two siblings with equal coefficients there stand for their own parent,
 * level by level, so neither needs to be separated; the rest have to be. Periods satisfy no linear relations but
 * sibling + sibling = parent, so no linear combination of fewer of them gives the same product, and the set is the least one for
 * quadratics whose roots are periods. Which root is the larger is read off disjoint enclosures.
 * Cost: for 65537 about a fifth of a second, 1141 quadratics.
 */
export function quadraticChain(prime: FermatPrime): Chain {
  const last = lastLevel(prime);
  const products = Array.from({ length: last }, (_, k) => siblingProduct(prime, k));
  const levels = Array.from({ length: last }, () => new Map<number, Combination>());

  const need = ({ level, index }: Period): void => {
    if (level > 0) needQuadratic(level - 1, index % 2 ** (level - 1));
  };
  const needQuadratic = (k: number, j: number): void => {
    const level = levels[k];
    const product = products[k];
    if (level === undefined || product === undefined || level.has(j)) return;
    const shifted = shift(product.coefficients, j);
    const combination = gather(product.constant, k, shifted);
    level.set(j, combination);
    need({ level: k, index: j });
    combination.terms.forEach(need);
  };
  const target = { level: last, index: 0 };
  need(target);

  const values = decidedValues(prime);
  const quadratics = levels.flatMap((level, k) =>
    [...level]
      .sort(([a], [b]) => a - b)
      .map(([j, product]) => makeQuadratic(k, j, product, values)),
  );
  return { prime, target, quadratics };
}

/** coefficients of the periods of level k after moving every index up by j. */
function shift(coefficients: Int32Array, j: number): Int32Array {
  const shifted = new Int32Array(coefficients.length);
  coefficients.forEach((c, i) => (shifted[(i + j) % coefficients.length] = c));
  return shifted;
}

/** Writes siblings with equal coefficients as their parent, from level k up; η(0, 0) = −1 joins the constant. */
function gather(constant: number, k: number, coefficients: Int32Array): Combination {
  const terms: Term[] = [];
  let here = coefficients;
  for (let level = k; level > 0; level--) {
    const half = here.length / 2;
    const above = new Int32Array(half);
    for (let index = 0; index < half; index++) {
      const [a, b] = [here[index] as number, here[index + half] as number];
      if (a === b) {
        above[index] = a;
        continue;
      }
      if (a !== 0) terms.push({ level, index, coefficient: a });
      if (b !== 0) terms.push({ level, index: index + half, coefficient: b });
    }
    here = above;
  }
  return { constant: constant - (here[0] as number), terms };
}

function makeQuadratic(
  k: number,
  j: number,
  product: Combination,
  values: PeriodValues,
): Quadratic {
  const parent = { level: k, index: j };
  const one = { level: k + 1, index: j };
  const other = { level: k + 1, index: j + 2 ** k };
  const [larger, smaller] = values.of(one) > values.of(other) ? [one, other] : [other, one];
  const sum =
    k === 0 ? { constant: -1, terms: [] } : { constant: 0, terms: [{ ...parent, coefficient: 1 }] };
  return { parent, sum, product, larger, smaller };
}

/** Values precise enough that the enclosures of any two siblings are disjoint. */
function decidedValues(prime: FermatPrime): PeriodValues {
  for (let bits = 96; ; bits *= 2) {
    const values = atOnce(periodValues(prime, bits));
    if (siblingsDiffer(prime, values)) return values;
  }
}

function siblingsDiffer(prime: FermatPrime, values: PeriodValues): boolean {
  for (let level = 1; level <= lastLevel(prime); level++) {
    const apart = 2n * values.error(level);
    for (let index = 0; index < 2 ** (level - 1); index++) {
      const gap =
        values.of({ level, index }) - values.of({ level, index: index + 2 ** (level - 1) });
      if (gap <= apart && -gap <= apart) return false;
    }
  }
  return true;
}
