/** Arithmetic in Q(α) = Q[x]/(f) for a monic irreducible integer polynomial f. */
import {
  degreeOf,
  gcdOf,
  multiplyPoly,
  scalePoly,
  addPoly,
  restByMonic,
  trim,
  type IntegerPoly,
} from '../polynomials/integer-poly';
import { fromPowerSums, powerSums } from './composed';

/** Integer coordinates in 1, α, α², … over one positive denominator, in lowest terms. */
export interface FieldElement {
  readonly numerator: IntegerPoly;
  readonly denominator: bigint;
}

export class NumberField {
  readonly degree: number;
  readonly generator: FieldElement;
  private readonly sums: readonly bigint[];

  constructor(readonly modulus: IntegerPoly) {
    this.degree = degreeOf(modulus);
    this.generator = this.element([0n, 1n], 1n);
    this.sums = powerSums(modulus, this.degree);
  }

  element(numerator: IntegerPoly, denominator: bigint): FieldElement {
    const rest = restByMonic(trim(numerator), this.modulus);
    let common = denominator;
    for (const c of rest) common = gcdOf(common, c);
    if (denominator < 0n) common = -common;
    if (common === 1n) return { numerator: rest, denominator };
    return { numerator: rest.map((c) => c / common), denominator: denominator / common };
  }

  add(a: FieldElement, b: FieldElement): FieldElement {
    return this.element(
      addPoly(scalePoly(a.numerator, b.denominator), scalePoly(b.numerator, a.denominator)),
      a.denominator * b.denominator,
    );
  }

  multiply(a: FieldElement, b: FieldElement): FieldElement {
    return this.element(multiplyPoly(a.numerator, b.numerator), a.denominator * b.denominator);
  }

  isZero(a: FieldElement): boolean {
    return a.numerator.length === 0;
  }

  scale(a: FieldElement, n: bigint, d: bigint): FieldElement {
    return this.element(scalePoly(a.numerator, n), a.denominator * d);
  }

  /** An integer polynomial at an element, by Horner's rule. */
  private substitute(f: IntegerPoly, at: FieldElement): FieldElement {
    let value: FieldElement = this.element([], 1n);
    for (let k = f.length - 1; k >= 0; k--) {
      value = this.add(this.multiply(value, at), this.element([f[k] as bigint], 1n));
    }
    return value;
  }

  /** The element a, read as a polynomial in α, with α replaced by `at`. */
  substituteElement(a: FieldElement, at: FieldElement): FieldElement {
    return this.scale(this.substitute(a.numerator, at), 1n, a.denominator);
  }

  /** Tr a: the sum of the conjugates, as a fraction. */
  trace(a: FieldElement): { n: bigint; d: bigint } {
    let n = 0n;
    a.numerator.forEach((c, k) => {
      n += c * (this.sums[k] as bigint);
    });
    return { n, d: a.denominator };
  }

  /** 1/a for a ≠ 0: solves a·x = 1 in coordinates. */
  inverse(a: FieldElement): FieldElement {
    const columns: FieldElement[] = [];
    let power = a;
    for (let k = 0; k < this.degree; k++) {
      columns.push(power);
      power = this.multiply(power, this.generator);
    }
    const solution = this.combination(columns, this.element([1n], 1n));
    if (solution === null) throw new RangeError('the element is zero');
    return this.element(
      solution.map(({ n }) => n),
      solution[0]?.d ?? 1n,
    );
  }

  /**
   * Rational x_k with Σ x_k·columns_k = target, over one common denominator, or null when there are none.
   * Fraction-free elimination (Bareiss 1968).
   */
  private combination(
    columns: readonly FieldElement[],
    target: FieldElement,
  ): { n: bigint; d: bigint }[] | null {
    const width = columns.length;
    let common = target.denominator;
    for (const c of columns) common = (common * c.denominator) / gcdOf(common, c.denominator);
    const entry = (a: FieldElement, row: number): bigint =>
      (a.numerator[row] ?? 0n) * (common / a.denominator);
    const matrix = Array.from({ length: this.degree }, (_, row) => [
      ...columns.map((c) => entry(c, row)),
      entry(target, row),
    ]);
    const at = (row: number, column: number): bigint => (matrix[row] as bigint[])[column] as bigint;
    let previous = 1n;
    for (let k = 0; k < width; k++) {
      const pivot = matrix.findIndex((row, index) => index >= k && row[k] !== 0n);
      if (pivot < 0) return null;
      [matrix[k], matrix[pivot]] = [matrix[pivot] as bigint[], matrix[k] as bigint[]];
      for (let row = 0; row < matrix.length; row++) {
        if (row === k) continue;
        const factor = at(row, k);
        const own = matrix[row] as bigint[];
        for (let column = 0; column <= width; column++) {
          own[column] = (at(k, k) * (own[column] as bigint) - factor * at(k, column)) / previous;
        }
      }
      previous = at(k, k);
    }
    for (let row = width; row < matrix.length; row++) if (at(row, width) !== 0n) return null;
    return columns.map((_, k) => ({ n: at(k, width), d: previous }));
  }

  /** The characteristic polynomial of a·(its denominator), monic with integer coefficients. */
  characteristicPolynomial(a: FieldElement): IntegerPoly {
    const whole: FieldElement = { numerator: a.numerator, denominator: 1n };
    const sums: bigint[] = [BigInt(this.degree)];
    let power: FieldElement = this.element([1n], 1n);
    for (let k = 1; k <= this.degree; k++) {
      power = this.multiply(power, whole);
      sums.push(this.trace(power).n);
    }
    return fromPowerSums(sums);
  }
}
