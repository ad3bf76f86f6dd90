/**
 * Elements of cyclotomic fields: cosines, sines and tangents of parts of a turn, and what sums, products and
 * quotients make of them. Inside Q(ζ_n) these are vectors, and the minimal polynomial of an outcome is the squarefree
 * part of its characteristic polynomial, so that no resultant is formed and nothing is factored.
 */
import { squarefreeParts } from '../polynomials/gcd';
import type { IntegerPoly } from '../polynomials/integer-poly';
import { cyclotomicPolynomial } from '../cosine-polynomial';
import { multiplyRoots } from './composed';
import { NumberField, type FieldElement } from './number-field';

/** An element of Q(ζ_order), in powers of ζ_order = e^(2πi/order). */
export interface Cyclotomic {
  readonly order: number;
  readonly value: FieldElement;
}

/** Fields of a larger degree are left to the general methods. */
const LARGEST_DEGREE = 48;

const gcd = (a: number, b: number): number => (b === 0 ? a : gcd(b, a % b));

/** The cyclotomic fields of one engine, each made once. */
export class CyclotomicFields {
  private readonly fields = new Map<number, NumberField | null>();

  private field(order: number): NumberField | null {
    let field = this.fields.get(order);
    if (field === undefined) {
      const f = cyclotomicPolynomial(BigInt(order));
      field = f.length - 1 > LARGEST_DEGREE ? null : new NumberField([...f].reverse());
      this.fields.set(order, field);
    }
    return field;
  }

  rational(n: bigint, d: bigint): Cyclotomic {
    return { order: 1, value: { numerator: n === 0n ? [] : [n], denominator: d } };
  }

  /** The imaginary unit. */
  readonly i: Cyclotomic = { order: 4, value: { numerator: [0n, 1n], denominator: 1n } };

  /** cos(2πk/n) = (ζ^k + ζ^(n−k))/2, or null where the field is too large. */
  cosine(k: number, n: number): Cyclotomic | null {
    const field = this.field(n);
    if (field === null) return null;
    const sum = new Array<bigint>(n).fill(0n);
    sum[k] = (sum[k] ?? 0n) + 1n;
    sum[(n - k) % n] = (sum[(n - k) % n] ?? 0n) + 1n;
    return { order: n, value: field.element(sum, 2n) };
  }

  /** Both elements in one field, or null where that is too large. */
  private meet(
    a: Cyclotomic,
    b: Cyclotomic,
  ): { field: NumberField; order: number; x: FieldElement; y: FieldElement } | null {
    const order = (a.order / gcd(a.order, b.order)) * b.order;
    const field = order > 1000 ? null : this.field(order);
    if (field === null) return null;
    return { field, order, x: lift(field, order, a), y: lift(field, order, b) };
  }

  add(a: Cyclotomic, b: Cyclotomic): Cyclotomic | null {
    const met = this.meet(a, b);
    return met && { order: met.order, value: met.field.add(met.x, met.y) };
  }

  multiply(a: Cyclotomic, b: Cyclotomic): Cyclotomic | null {
    const met = this.meet(a, b);
    return met && { order: met.order, value: met.field.multiply(met.x, met.y) };
  }

  /** 1/a for a ≠ 0. */
  invert(a: Cyclotomic): Cyclotomic | null {
    const field = this.field(a.order);
    return field && { order: a.order, value: field.inverse(a.value) };
  }

  /** The minimal polynomial, constant term first. */
  minimalPolynomial(a: Cyclotomic): IntegerPoly {
    const field = this.field(a.order);
    if (field === null) throw new RangeError('the field of a cyclotomic element is not kept');
    const [part] = squarefreeParts(field.characteristicPolynomial(a.value));
    if (part === undefined) throw new RangeError('a characteristic polynomial has no root');
    return multiplyRoots(part.part, 1n, a.value.denominator);
  }
}

/** ζ_m = ζ_n^(n/m) for m dividing n. */
function lift(field: NumberField, order: number, a: Cyclotomic): FieldElement {
  const step = order / a.order;
  const spread = new Array<bigint>(Math.max(1, a.value.numerator.length * step)).fill(0n);
  a.value.numerator.forEach((c, k) => {
    spread[k * step] = c;
  });
  return field.element(spread, a.value.denominator);
}
