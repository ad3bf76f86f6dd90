/**
 * One number field that holds several given algebraic numbers: a primitive element by trying θ + tβ, and each number in
 * its powers by a greatest common divisor over the new field (the classical proof of the primitive element theorem).
 */
import type { Budget } from '../limits';
import { leadingOf, type IntegerPoly } from '../polynomials/integer-poly';
import { isFraction, type Algebraic, type Fraction, type Root } from './algebraic';
import { gcdField, remainderField, type FieldPoly } from './field-poly';
import { NumberField, type FieldElement } from './number-field';
import { add, multiply } from './operations';

export interface CommonField {
  readonly field: NumberField;
  /** The given numbers, in their order, in powers of the field's generator. */
  readonly elements: readonly FieldElement[];
}

/** An algebraic integer that generates the field, or null for the rationals. */
interface State {
  readonly theta: Algebraic | null;
  readonly field: NumberField;
  readonly elements: readonly FieldElement[];
}

const RATIONALS = new NumberField([0n, 1n]);

/** Cost: a resultant with its factors for every number that is not rational; degrees multiply at the most. */
export function commonField(numbers: readonly Root[], budget: Budget): CommonField {
  return numbers.reduce<State>((state, number) => join(state, number, budget), {
    theta: null,
    field: RATIONALS,
    elements: [],
  });
}

function join(state: State, number: Root, budget: Budget): State {
  const { theta, field, elements } = state;
  if (isFraction(number)) return { ...state, elements: [...elements, rational(field, number)] };
  const scale = leadingOf(number.poly);
  const beta = multiply(number, { n: scale, d: 1n }, budget) as Algebraic;
  if (theta === null) {
    const first = new NumberField(beta.poly);
    return {
      theta: beta,
      field: first,
      elements: [
        ...elements.map((e) => first.element(e.numerator, e.denominator)),
        first.scale(first.generator, 1n, scale),
      ],
    };
  }
  for (let t = 1n; ; t = t > 0n ? -t : 1n - t) {
    const gamma = add(theta, multiply(beta, { n: t, d: 1n }, budget), budget);
    if (isFraction(gamma)) continue;
    const next = new NumberField(gamma.poly);
    const image = imageOf(next, theta.poly, beta.poly, t, budget);
    if (image === null) continue;
    const old = next.add(next.generator, next.scale(image, -t, 1n));
    budget.charge(elements.length * next.degree ** 3);
    return {
      theta: gamma,
      field: next,
      elements: [
        ...elements.map((e) => next.substituteElement(e, old)),
        next.scale(image, 1n, scale),
      ],
    };
  }
}

const rational = (field: NumberField, { n, d }: Fraction): FieldElement =>
  field.element(n === 0n ? [] : [n], d);

/** β in Q(γ), γ = θ + tβ: the one common root of its polynomial and θ's at γ − t·y; null where there are more. */
function imageOf(
  field: NumberField,
  ofTheta: IntegerPoly,
  ofBeta: IntegerPoly,
  t: bigint,
  budget: Budget,
): FieldElement | null {
  const charge = (work: number): void => budget.charge(work);
  const modulus: FieldPoly = ofBeta.map((c) => rational(field, { n: c, d: 1n }));
  // Horner's rule for θ's polynomial at γ − t·y, modulo the polynomial of β.
  let value: FieldPoly = [];
  for (let k = ofTheta.length - 1; k >= 0; k--) {
    charge(ofBeta.length * field.degree ** 2);
    const grown: FieldElement[] = value.map((c) => field.multiply(c, field.generator));
    value.forEach((c, j) => {
      const shifted = field.scale(c, -t, 1n);
      const before = grown[j + 1];
      grown[j + 1] = before === undefined ? shifted : field.add(before, shifted);
    });
    const constant = rational(field, { n: ofTheta[k] as bigint, d: 1n });
    grown[0] = grown[0] === undefined ? constant : field.add(grown[0], constant);
    value = remainderField(field, grown, modulus);
  }
  const common = gcdField(field, modulus, value, charge);
  return common.length === 2 ? field.scale(common[0] as FieldElement, -1n, 1n) : null;
}
