import type { Engine } from '../../engine/index';
import { fail } from '../failure';
import { type PiSum, sqrtSum } from '../pi-sum';
import {
  type UnknownPolynomial,
  addPolynomials,
  areEqualPolynomials,
  commonDivisor,
  constant,
  dividedBy,
  exactQuotient,
  multiplyPolynomials,
  negatePolynomial,
  one,
  unknown,
} from './coefficient-polynomial';

/** A quotient of polynomials in the unknown; the divisor is never 0. */
interface Quotient {
  readonly top: UnknownPolynomial;
  readonly bottom: UnknownPolynomial;
}

/**
 * A value that depends on the unknown u: a sum of quotients of polynomials in u times products of square roots
 * t₁, t₂, … whose radicands depend on u. The key has bit k set when t_{k+1} is a factor; zero terms are not kept.
 */
export type RadicalForm = ReadonlyMap<number, Quotient>;

/** Square roots of different radicands with the unknown in them; each doubles the degree of the polynomial. */
const MOST_RADICALS = 4;

/**
 * Arithmetic of radical forms in one unknown, and their norm.
 * Which of its two values a square root has is not told here, so a form stands for all choices of signs at once: the
 * roots of its norm contain every value of u at which the form is 0, and others, which substitution weeds out.
 */
export class RadicalForms {
  private readonly radicands: RadicalForm[] = [];

  constructor(private readonly engine: Engine) {}

  constant(value: PiSum): RadicalForm {
    return this.of({ top: constant(value), bottom: one(this.engine) });
  }

  unknown(): RadicalForm {
    return this.of({ top: unknown(this.engine), bottom: one(this.engine) });
  }

  private of(quotient: Quotient, key = 0): RadicalForm {
    return quotient.top.length === 0 ? new Map() : new Map([[key, this.reduce(quotient)]]);
  }

  /** Without common factors, which would come back as roots that are none, and with a constant divisor carried out. */
  private reduce(quotient: Quotient): Quotient {
    const { engine } = this;
    let { top, bottom } = quotient;
    if (top.length > 1 && bottom.length > 1) {
      const common = commonDivisor(engine, top, bottom);
      if (common.length > 1)
        [top, bottom] = [exactQuotient(engine, top, common), exactQuotient(engine, bottom, common)];
    }
    const [divisor] = bottom;
    if (bottom.length === 1 && divisor?.size === 1)
      return { top: dividedBy(engine, top, divisor), bottom: one(engine) };
    return { top, bottom };
  }

  add(a: RadicalForm, b: RadicalForm): RadicalForm {
    const sum = new Map(a);
    for (const [key, term] of b) {
      const before = sum.get(key);
      const total = before === undefined ? term : this.addQuotients(before, term);
      if (total.top.length === 0) sum.delete(key);
      else sum.set(key, total);
    }
    return sum;
  }

  negate(a: RadicalForm): RadicalForm {
    const negated = new Map<number, Quotient>();
    for (const [key, { top, bottom }] of a)
      negated.set(key, { top: negatePolynomial(this.engine, top), bottom });
    return negated;
  }

  multiply(a: RadicalForm, b: RadicalForm): RadicalForm {
    let product: RadicalForm = new Map();
    for (const [i, x] of a) {
      for (const [j, y] of b) {
        const top = multiplyPolynomials(this.engine, x.top, y.top);
        const bottom = multiplyPolynomials(this.engine, x.bottom, y.bottom);
        let term = this.of({ top, bottom }, i ^ j);
        // A square root met twice is its radicand, which may hold earlier square roots.
        for (const index of bitsOf(i & j))
          term = this.multiply(term, this.radicands[index] as RadicalForm);
        product = this.add(product, term);
      }
    }
    return product;
  }

  /** 1/a by conjugates, the last square root first. A form that is 0 for one choice of signs is refused as 0. */
  invert(a: RadicalForm): RadicalForm {
    if (a.size === 0) this.refuseZero();
    const last = lastRadical(a);
    if (last === null) {
      const { top, bottom } = a.get(0) as Quotient;
      return this.of({ top: bottom, bottom: top });
    }
    const conjugate = this.conjugate(a, last);
    return this.multiply(conjugate, this.invert(this.multiply(a, conjugate)));
  }

  private refuseZero(): never {
    return fail(
      'division-by-zero',
      'The divisor is 0 whatever the unknown is; another divisor was expected.',
    );
  }

  /** √a: of a constant its value, else a square root of its own, the same one for equal radicands. */
  squareRoot(a: RadicalForm): RadicalForm {
    const known = this.asConstant(a);
    if (known !== null) return this.constant(sqrtSum(this.engine, known));
    let index = this.radicands.findIndex((radicand) => this.areEqual(radicand, a));
    if (index === -1) {
      index = this.radicands.length;
      if (index >= MOST_RADICALS) {
        fail(
          'limit-size',
          `The unknown stands under more than ${MOST_RADICALS} different square roots, which is the limit.`,
        );
      }
      this.radicands.push(a);
    }
    return this.of({ top: one(this.engine), bottom: one(this.engine) }, 1 << index);
  }

  /** The value of a form in which neither the unknown nor a square root of it occurs, or null. */
  private asConstant(a: RadicalForm): PiSum | null {
    if (a.size === 0) return new Map();
    const only = a.get(0);
    if (a.size > 1 || only === undefined) return null;
    if (only.top.length !== 1 || !areEqualPolynomials(this.engine, only.bottom, one(this.engine)))
      return null;
    return only.top[0] ?? null;
  }

  private areEqual(a: RadicalForm, b: RadicalForm): boolean {
    return this.add(a, this.negate(b)).size === 0;
  }

  /**
   * The numerator of the product of all conjugates: a polynomial that is 0 wherever the form is, 0 itself only when
   * the form is 0 for some choice of signs. Cost: two to the number of square roots in the degree.
   */
  norm(a: RadicalForm): UnknownPolynomial {
    let form = a;
    for (let last = lastRadical(form); last !== null; last = lastRadical(form))
      form = this.multiply(form, this.conjugate(form, last));
    return form.get(0)?.top ?? [];
  }

  private conjugate(a: RadicalForm, index: number): RadicalForm {
    const changed = new Map<number, Quotient>();
    for (const [key, { top, bottom }] of a) {
      const signed = (key >> index) & 1 ? negatePolynomial(this.engine, top) : top;
      changed.set(key, { top: signed, bottom });
    }
    return changed;
  }

  private addQuotients(a: Quotient, b: Quotient): Quotient {
    const { engine } = this;
    if (areEqualPolynomials(engine, a.bottom, b.bottom))
      return { top: addPolynomials(engine, a.top, b.top), bottom: a.bottom };
    const top = addPolynomials(
      engine,
      multiplyPolynomials(engine, a.top, b.bottom),
      multiplyPolynomials(engine, b.top, a.bottom),
    );
    return this.reduce({ top, bottom: multiplyPolynomials(engine, a.bottom, b.bottom) });
  }
}

function bitsOf(key: number): number[] {
  const bits: number[] = [];
  for (let index = 0; key >> index > 0; index += 1) if ((key >> index) & 1) bits.push(index);
  return bits;
}

/** Index of the last square root that occurs; null when none does. */
function lastRadical(a: RadicalForm): number | null {
  let greatest = 0;
  for (const key of a.keys()) greatest = Math.max(greatest, key);
  return greatest === 0 ? null : 31 - Math.clz32(greatest);
}
