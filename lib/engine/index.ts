/** The exact engine: one object for one request. See README.md in this folder. */

import {
  addCx,
  absCx,
  conjCx,
  equalCx,
  inverseCx,
  isRealCx,
  isZeroCx,
  mulCx,
  negCx,
  powCx,
  real,
  sqrtCx,
  subCx,
  type Cx,
} from './complex';
import { decimalOf } from './decimal';
import { integerEl, isRationalEl, numerator, rationalEl, scaleEl, subEl } from './element';
import { floorEl, signEl } from './enclosure';
import * as Z from './int';
import { bitLength } from './integers';
import { Budget, DEFAULT_LIMITS, OutsideDomain, OverLimit } from './limits';
import { degreeOf, minimalPolynomialOf } from './minimal-polynomial';
import { certificateOf } from './certificate';
import { roundTo } from './rounding';
import { Field, type El } from './tower';
import { Cosine, cosineOf, sineOf } from './turn';
import type {
  Certificate,
  Decimal,
  Engine,
  Limits,
  Multiple,
  Num,
  Outcome,
  Rounding,
  TowerStep,
  Written,
} from './types';
import { towerOf, writeValue } from './write';

export { DEFAULT_LIMITS } from './limits';
export type * from './types';

export const ENGINE_VERSION = '0.1.0';

/** A fresh engine. `limits` replaces single defaults; each must be a positive safe integer. */
export function createEngine(limits: Partial<Limits> = {}): Engine {
  return new ExactEngine(limits);
}

class ExactEngine implements Engine {
  private readonly budget: Budget;
  private readonly field: Field;
  private depth = 0;
  readonly i: Num;

  constructor(limits: Partial<Limits>) {
    const all: Limits = { ...DEFAULT_LIMITS, ...limits };
    for (const [name, value] of Object.entries(all)) {
      if (!(name in DEFAULT_LIMITS)) throw new TypeError(`There is no limit named ${name}.`);
      if (!Number.isSafeInteger(value) || (value as number) < 1) {
        throw new RangeError(`The limit ${name} must be a positive integer.`);
      }
    }
    this.budget = new Budget(all);
    this.field = new Field(this.budget, Z.mul);
    this.i = this.seal({ re: integerEl(this.field, 0), im: integerEl(this.field, 1) });
  }

  attempt<T>(work: () => T): Outcome<T> {
    if (this.depth === 0) this.budget.reset();
    this.depth++;
    try {
      return { kind: 'value', value: work() };
    } catch (error) {
      if (error instanceof OutsideDomain) {
        return { kind: 'outside-domain', code: error.code, message: error.message };
      }
      if (error instanceof OverLimit) {
        const { code, limit, allowed, met, message } = error;
        return { kind: 'over-limit', code, limit, allowed, met, message };
      }
      throw error;
    } finally {
      this.depth--;
    }
  }

  integer(n: bigint | number): Num {
    if (typeof n === 'number' && !Number.isSafeInteger(n))
      throw new TypeError('integer() takes a safe integer.');
    if (typeof n === 'bigint') this.checkSize(n);
    return this.seal(real(integerEl(this.field, typeof n === 'bigint' ? Z.small(n) : n + 0)));
  }

  rational(n: bigint, d: bigint): Num {
    if (d === 0n) throw new OutsideDomain('division-by-zero', 'A fraction has the denominator 0.');
    this.checkSize(n);
    this.checkSize(d);
    return this.seal(real(rationalEl(this.field, Z.small(n), Z.small(d))));
  }

  private checkSize(n: bigint): void {
    if (Z.words(Z.small(n)) > 600) this.budget.within('integerBits', bitLength(n));
  }

  add(a: Num, b: Num): Num {
    return this.seal(addCx(this.open(a), this.open(b)));
  }
  sub(a: Num, b: Num): Num {
    return this.seal(subCx(this.open(a), this.open(b)));
  }
  mul(a: Num, b: Num): Num {
    return this.seal(mulCx(this.open(a), this.open(b)));
  }
  div(a: Num, b: Num): Num {
    return this.seal(mulCx(this.open(a), inverseCx(this.open(b))));
  }
  neg(a: Num): Num {
    return this.seal(negCx(this.open(a)));
  }
  inverse(a: Num): Num {
    return this.seal(inverseCx(this.open(a)));
  }
  pow(a: Num, n: bigint): Num {
    return this.seal(powCx(this.field, this.open(a), n));
  }
  sqrt(a: Num): Num {
    return this.seal(sqrtCx(this.open(a)));
  }
  re(a: Num): Num {
    return this.seal(real(this.open(a).re));
  }
  im(a: Num): Num {
    return this.seal(real(this.open(a).im));
  }
  conj(a: Num): Num {
    return this.seal(conjCx(this.open(a)));
  }
  abs(a: Num): Num {
    return this.seal(real(absCx(this.open(a))));
  }

  isZero(a: Num): boolean {
    return isZeroCx(this.open(a));
  }
  isReal(a: Num): boolean {
    return isRealCx(this.open(a));
  }
  isRational(a: Num): boolean {
    const x = this.open(a);
    return isRealCx(x) && isRationalEl(x.re);
  }
  isInteger(a: Num): boolean {
    return this.isRational(a) && this.open(a).re.den === 1;
  }
  equal(a: Num, b: Num): boolean {
    return equalCx(this.open(a), this.open(b));
  }
  sign(a: Num): -1 | 0 | 1 {
    return signEl(this.realPart(a, 'sign'));
  }
  compare(a: Num, b: Num): -1 | 0 | 1 {
    return signEl(subEl(this.realPart(a, 'order'), this.realPart(b, 'order')));
  }
  asRational(a: Num): { n: bigint; d: bigint } | null {
    const x = this.open(a);
    if (!isRealCx(x) || !isRationalEl(x.re)) return null;
    return { n: BigInt(numerator(x.re)), d: BigInt(x.re.den) };
  }
  floor(a: Num): bigint {
    return floorEl(this.realPart(a, 'floor'));
  }
  round(a: Num): bigint {
    return roundTo(this.realPart(a, 'nearest integer'), 'half-even').multiple;
  }

  cosTurn(k: bigint, n: bigint): Num {
    return this.seal(new Cosine(this.field, ...this.turn(k, n)));
  }
  sinTurn(k: bigint, n: bigint): Num {
    const [u, d] = this.turn(k, n);
    return this.seal(new Cosine(this.field, 4n * u - d, 4n * d));
  }
  rootOfUnity(k: bigint, n: bigint): Num {
    const [u, d] = this.turn(k, n);
    return this.seal({ re: cosineOf(this.field, u, d), im: sineOf(this.field, u, d) });
  }
  private turn(k: bigint, n: bigint): [bigint, bigint] {
    if (n === 0n) throw new OutsideDomain('division-by-zero', 'A turn is divided by 0.');
    return n < 0n ? [-k, -n] : [k, n];
  }

  degree(a: Num): number {
    return degreeOf(this.open(a));
  }
  minimalPolynomial(a: Num): bigint[] {
    return minimalPolynomialOf(this.open(a));
  }

  decimal(a: Num, digits: number): Decimal {
    if (!Number.isSafeInteger(digits) || digits < 1)
      throw new RangeError('decimal() takes a positive number of digits.');
    this.budget.within('digits', digits);
    const x = this.open(a);
    const re = decimalOf(x.re, digits);
    if (isRealCx(x)) return { re: re.text, im: null, digits, terminates: re.exact };
    const im = decimalOf(x.im, digits);
    return { re: re.text, im: im.text, digits, terminates: re.exact && im.exact };
  }

  roundToMultiple(a: Num, step: { n: bigint; d: bigint }, rounding: Rounding): Multiple {
    if (step.n <= 0n || step.d <= 0n) throw new RangeError('A step must be positive.');
    const x = this.realPart(a, 'nearest multiple');
    return roundTo(scaleEl(x, Z.small(step.d), Z.small(step.n)), rounding);
  }

  write(a: Num): Written {
    return writeValue(this.open(a));
  }
  tower(a: Num): TowerStep[] {
    return towerOf(this.open(a));
  }
  certificate(a: Num): Certificate {
    return certificateOf(this.open(a));
  }

  private realPart(a: Num, what: string): El {
    const x = this.open(a);
    if (!isRealCx(x))
      throw new OutsideDomain('domain', `A number with an imaginary part has no ${what}.`);
    return x.re;
  }

  private seal(x: Cx): Num {
    return x as unknown as Num;
  }

  private open(a: Num): Cx {
    const x = a as unknown as Cx;
    if (x?.im?.t?.field !== this.field) throw new TypeError('A number of another engine was used.');
    return x;
  }
}
