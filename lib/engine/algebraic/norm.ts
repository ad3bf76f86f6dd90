/**
 * Roots of a polynomial with algebraic coefficients: its norm, the product over all conjugates of the coefficients, has
 * rational coefficients and these roots among its own; as many of them as the polynomial has are kept.
 */
import type { Budget } from '../limits';
import { factorOverIntegers } from '../polynomials/factor';
import { gcdOf, type IntegerPoly } from '../polynomials/integer-poly';
import { isFraction, type Root } from './algebraic';
import { addBox, holdsZero, multiplyBox, pointBox, type Box } from './box';
import { commonField } from './common-field';
import { fromPowerSums, unscaleRoots } from './composed';
import { derivativeField, gcdField, monicField, type FieldPoly } from './field-poly';
import { isolatedRoots, refinedBox, type Isolated } from './near';
import type { FieldElement, NumberField } from './number-field';
import { boxOf, COMPOSED_DEGREE } from './operations';

/** Boxes of all different roots. `coefficients` stand constant term first, the last one is not 0; the degree is positive. */
export function rootsOverField(coefficients: readonly Root[], budget: Budget): Isolated[] {
  const largest = coefficients.reduce((n, c) => n * (isFraction(c) ? 1 : c.degree), 1);
  const { field, elements } = commonField(coefficients, budget);
  const degree = (coefficients.length - 1) * field.degree;
  if (degree > COMPOSED_DEGREE) budget.within('degree', Math.min(degree, largest * degree));
  const f = monicField(field, elements);
  const charge = (work: number): void => budget.charge(work);
  const repeated = gcdField(field, f, derivativeField(field, f), charge).length - 1;
  const count = f.length - 1 - repeated;
  const candidates = factorOverIntegers(normOf(field, f, budget), charge).flatMap(({ poly }) =>
    isolatedRoots(poly, budget),
  );
  return select(coefficients, candidates, count, budget);
}

/**
 * The norm of a monic polynomial over the field: the traces of the power sums of its roots are the power sums of all
 * conjugate roots (Newton's identities, once over the field and once over the integers).
 */
function normOf(field: NumberField, f: FieldPoly, budget: Budget): IntegerPoly {
  const n = f.length - 1;
  const count = n * field.degree;
  budget.charge(count * n * field.degree ** 2);
  const scale = f.reduce((d, c) => (d * c.denominator) / gcdOf(d, c.denominator), 1n);
  const scaled = f.map((c, k) => field.scale(c, scale ** BigInt(n - k), 1n));
  const powers: FieldElement[] = [];
  const sums: bigint[] = [BigInt(count)];
  for (let k = 1; k <= count; k++) {
    budget.charge(n * field.degree ** 2 * (1 + (k >> 3)));
    let sum: FieldElement =
      k <= n ? field.scale(scaled[n - k] as FieldElement, BigInt(-k), 1n) : field.element([], 1n);
    for (let j = 1; j < k && j <= n; j++) {
      const term = field.multiply(scaled[n - j] as FieldElement, powers[k - j - 1] as FieldElement);
      sum = field.add(sum, field.scale(term, -1n, 1n));
    }
    powers.push(sum);
    const trace = field.trace(sum);
    sums.push(trace.n / trace.d);
  }
  return unscaleRoots(fromPowerSums(sums), scale);
}

/** Those of the candidates that are roots: candidates where the polynomial is not 0 are left out until `count` remain. */
function select(
  coefficients: readonly Root[],
  candidates: readonly Isolated[],
  count: number,
  budget: Budget,
): Isolated[] {
  let left = [...candidates];
  for (let P = 64; left.length > count; P *= 2) {
    budget.charge(left.length * coefficients.length * (4 + (P >> 4)));
    const boxes = coefficients.map((c) => boxOf(c, P));
    left = left.filter((root) => holdsZero(evaluate(boxes, refinedBox(root, P, budget), P)));
  }
  return left;
}

function evaluate(coefficients: readonly Box[], at: Box, P: number): Box {
  return coefficients.reduceRight<Box>(
    (value, c) => addBox(multiplyBox(value, at, P), c),
    pointBox(0n, P),
  );
}
