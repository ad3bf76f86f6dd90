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
} from './complex';
import { decimalOf, irrationalDecimal, type Part } from './decimal';
import { integerEl, isRationalEl, numerator, rationalEl, scaleEl, subEl } from './element';
import { enclose, floorEl, signEl, type Enclosure } from './enclosure';
import * as Z from './int';
import { bitLength } from './integers';
import type { Algebraic } from './algebraic/algebraic';
import type { Cx } from './complex';
import { Beyond, isAlgebraic, type Value } from './algebraic/beyond';
import type { RealPart } from './algebraic/real-part';
import { partOfTurn } from './algebraic/roots-of-unity';
import { trisectorReaches, type Trisector } from './algebraic/trisector';
import { decimalOfAlgebraic, floorOfIrrational, roundIrrational } from './algebraic/writing';
import { Budget, DEFAULT_LIMITS, OutsideDomain, OverLimit } from './limits';
import { degreeOf, minimalPolynomialOf } from './minimal-polynomial';
import { PackedNum, packElements, unpackElements } from './packed';
import { certificateOf } from './certificate';
import { roundTo } from './rounding';
import { Field, type El } from './tower';
import { cosineEnclosure, isLongCosine, nameOfCosine } from './long-cosine';
import { Cosine, isConstructibleDivision } from './turn';
import type {
  Certificate,
  Decimal,
  Engine,
  Limits,
  Multiple,
  Num,
  Outcome,
  Reach,
  Rounding,
  TowerStep,
  Written,
} from './types';
import { towerOf, writeValue } from './write';

export { DEFAULT_LIMITS } from './limits';
export { PackedNum } from './packed';
export { boundsOfPi } from './pi';
export type * from './types';

export const ENGINE_VERSION = '0.1.0';

/** A fresh engine. `limits` replaces single defaults; each must be a positive safe integer. */
export function createEngine(limits: Partial<Limits> = {}): Engine {
  return new ExactEngine(limits);
}

class ExactEngine implements Engine {
  private readonly budget: Budget;
  private readonly field: Field;
  private readonly beyond: Beyond;
  /** The numbers beyond square roots that this engine has handed out. */
  private readonly algebraic = new WeakSet<Algebraic>();
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
    this.beyond = new Beyond(this.field, this.budget);
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
    const [x, y] = [this.open(a), this.open(b)];
    return this.seal(isAlgebraic(x) || isAlgebraic(y) ? this.beyond.add(x, y) : addCx(x, y));
  }
  sub(a: Num, b: Num): Num {
    const [x, y] = [this.open(a), this.open(b)];
    if (isAlgebraic(x) || isAlgebraic(y)) return this.add(a, this.neg(b));
    return this.seal(subCx(x, y));
  }
  mul(a: Num, b: Num): Num {
    const [x, y] = [this.open(a), this.open(b)];
    const multiple = this.multipleOf(x, b) ?? this.multipleOf(y, a);
    if (multiple !== null) return this.seal(multiple);
    return this.seal(isAlgebraic(x) || isAlgebraic(y) ? this.beyond.multiply(x, y) : mulCx(x, y));
  }
  /** A cosine that is too long to be built, times a rational other than 0. */
  private multipleOf(x: Value, factor: Num): Cosine | null {
    if (!isLongCosine(x)) return null;
    const rational = this.asRational(factor);
    return rational === null || rational.n === 0n ? null : x.times(rational.n, rational.d);
  }
  div(a: Num, b: Num): Num {
    return this.mul(a, this.inverse(b));
  }
  neg(a: Num): Num {
    const x = this.open(a);
    if (isLongCosine(x)) return this.seal(x.times(-1n, 1n));
    return this.seal(isAlgebraic(x) ? this.beyond.negate(x) : negCx(x));
  }
  inverse(a: Num): Num {
    const x = this.open(a);
    return this.seal(isAlgebraic(x) ? this.beyond.invert(x) : inverseCx(x));
  }
  pow(a: Num, n: bigint): Num {
    const x = this.open(a);
    return this.seal(isAlgebraic(x) ? this.beyond.power(x, n) : powCx(this.field, x, n));
  }
  sqrt(a: Num): Num {
    const x = this.open(a);
    return this.seal(isAlgebraic(x) ? this.beyond.squareRoot(x) : sqrtCx(x));
  }
  realRoot(a: Num, index: number): Num {
    checkIndex(index);
    return this.seal(this.beyond.realRoot(this.open(a), index));
  }
  principalRoot(a: Num, index: number): Num {
    checkIndex(index);
    return this.seal(this.beyond.principalRoot(this.open(a), index));
  }
  roots(coefficients: readonly Num[]): Num[] {
    const [leading, ...others] = coefficients.map((c) => this.open(c));
    if (leading === undefined || others.length === 0 || this.isZero(coefficients[0] as Num))
      throw new RangeError('roots() takes a polynomial of positive degree.');
    this.budget.within('degree', others.length);
    return this.beyond.allRoots([leading, ...others].reverse()).map((root) => this.seal(root));
  }
  nearestRoot(polynomial: readonly bigint[], near: Num): Num {
    const f = [...polynomial].reverse();
    while (f.length > 0 && f[f.length - 1] === 0n) f.pop();
    if (f.length < 2) throw new RangeError('nearestRoot() takes a polynomial of positive degree.');
    this.budget.within('degree', f.length - 1);
    return this.seal(this.beyond.nearestRoot(f, this.open(near)));
  }
  nearestRootOf(coefficients: readonly Num[], near: Num): Num {
    const [leading, ...others] = coefficients.map((c) => this.open(c));
    if (leading === undefined || others.length === 0 || this.isZero(coefficients[0] as Num))
      throw new RangeError('nearestRootOf() takes a polynomial of positive degree.');
    this.budget.within('degree', others.length);
    return this.seal(this.beyond.nearestRootOver([leading, ...others].reverse(), this.open(near)));
  }
  re(a: Num): Num {
    const x = this.open(a);
    if (isLongCosine(x)) return a;
    return this.seal(isAlgebraic(x) ? this.beyond.re(x) : real(x.re));
  }
  im(a: Num): Num {
    const x = this.open(a);
    return this.seal(isAlgebraic(x) ? this.beyond.im(x) : real(x.im));
  }
  conj(a: Num): Num {
    const x = this.open(a);
    if (isLongCosine(x)) return a;
    return this.seal(isAlgebraic(x) ? this.beyond.conjugate(x) : conjCx(x));
  }
  abs(a: Num): Num {
    const x = this.open(a);
    if (isLongCosine(x)) return this.sign(a) < 0 ? this.neg(a) : a;
    return this.seal(isAlgebraic(x) ? this.beyond.abs(x) : real(absCx(x)));
  }

  isZero(a: Num): boolean {
    const x = this.open(a);
    return !isAlgebraic(x) && !isLongCosine(x) && isZeroCx(x);
  }
  isReal(a: Num): boolean {
    const x = this.open(a);
    return isAlgebraic(x) ? x.isReal : isRealCx(x);
  }
  isRational(a: Num): boolean {
    return this.asRational(a) !== null;
  }
  isInteger(a: Num): boolean {
    return this.asRational(a)?.d === 1n;
  }
  equal(a: Num, b: Num): boolean {
    const [x, y] = [this.open(a), this.open(b)];
    if (x === y) return true;
    if (isLongCosine(x) && this.isRational(b)) return false;
    if (isLongCosine(y) && this.isRational(a)) return false;
    return isAlgebraic(x) || isAlgebraic(y) ? this.beyond.equal(x, y) : equalCx(x, y);
  }
  sign(a: Num): -1 | 0 | 1 {
    const long = this.long(a);
    if (long !== null) return isNegative(long) ? -1 : 1;
    const x = this.realValue(a, 'sign');
    return isAlgebraic(x) ? this.beyond.signOf(x) : signEl(x);
  }
  compare(a: Num, b: Num): -1 | 0 | 1 {
    const order = this.compareLong(a, b);
    if (order !== null) return order;
    const [x, y] = [this.realValue(a, 'order'), this.realValue(b, 'order')];
    if (!isAlgebraic(x) && !isAlgebraic(y)) return signEl(subEl(x, y));
    return this.beyond.compare(this.open(a), this.open(b));
  }
  /** Enclosures of a cosine that is too long to be built; null for any other number. */
  private long(a: Num): ((P: number) => Enclosure) | null {
    const x = this.open(a);
    return isLongCosine(x) ? (P) => cosineEnclosure(x, P, this.budget) : null;
  }
  /** The order of such a cosine and a rational, which are never equal. */
  private compareLong(a: Num, b: Num): -1 | 1 | null {
    const [x, y] = [this.open(a), this.open(b)];
    if (isLongCosine(y) && !isLongCosine(x)) {
      const order = this.compareLong(b, a);
      return order === null ? null : order === 1 ? -1 : 1;
    }
    const rational = isLongCosine(x) ? this.asRational(b) : null;
    if (!isLongCosine(x) || rational === null) return null;
    for (let P = 64; ; P *= 2) {
      const { low, high } = cosineEnclosure(x, P, this.budget);
      const border = rational.n << BigInt(P);
      if (low * rational.d > border) return 1;
      if (high * rational.d < border) return -1;
    }
  }
  asRational(a: Num): { n: bigint; d: bigint } | null {
    const x = this.open(a);
    if (isAlgebraic(x) || isLongCosine(x) || !isRealCx(x) || !isRationalEl(x.re)) return null;
    return { n: BigInt(numerator(x.re)), d: BigInt(x.re.den) };
  }
  floor(a: Num): bigint {
    const long = this.long(a);
    if (long !== null) return floorOfIrrational(long);
    const x = this.realValue(a, 'floor');
    return isAlgebraic(x) ? floorOfIrrational((P) => x.box(P).re) : floorEl(x);
  }
  round(a: Num): bigint {
    return this.roundToMultiple(a, { n: 1n, d: 1n }, 'half-even').multiple;
  }

  cosTurn(k: bigint, n: bigint): Num {
    const [u, d] = this.turn(k, n);
    if (isConstructibleDivision(d / gcd(u, d))) return this.seal(new Cosine(this.field, u, d));
    const g = gcd(u, d);
    const [division, part] = [d / g, (((u / g) % (d / g)) + d / g) % (d / g)];
    // The largest degree that a division below 10⁴ can have is half of it; a cosine itself needs no arithmetic.
    if (division > COSINE_DIVISION) this.budget.within('degree', Number(division));
    return this.seal(this.beyond.cosine(2n * part > division ? division - part : part, division));
  }
  sinTurn(k: bigint, n: bigint): Num {
    return this.cosTurn(4n * k - n, 4n * n);
  }
  rootOfUnity(k: bigint, n: bigint): Num {
    return this.add(this.cosTurn(k, n), this.mul(this.i, this.sinTurn(k, n)));
  }
  private turn(k: bigint, n: bigint): [bigint, bigint] {
    if (n === 0n) throw new OutsideDomain('division-by-zero', 'A turn is divided by 0.');
    return n < 0n ? [-k, -n] : [k, n];
  }

  degree(a: Num): number {
    const x = this.open(a);
    return isAlgebraic(x) ? x.degree : degreeOf(x);
  }
  minimalPolynomial(a: Num): bigint[] {
    const x = this.open(a);
    return isAlgebraic(x) ? [...x.poly].reverse() : minimalPolynomialOf(x);
  }
  reach(a: Num): Reach {
    const x = this.open(a);
    if (!isAlgebraic(x)) return { kind: 'constructible' };
    const verdict = this.beyond.verdictOf(x);
    const trisector = this.trisectorOf(x);
    return { ...verdict, trisector, division: x.origin.division ?? null };
  }

  partOfTurn(a: Num): { k: bigint; n: bigint } | null {
    const x = this.open(a);
    if (!isAlgebraic(x) && !isRationalEl(x.re) && isRealCx(x)) return null;
    return partOfTurn(
      this.minimalPolynomial(a).reverse(),
      (P) => (isAlgebraic(x) ? x.box(P).re : enclose(x.re, P)),
      () => (isAlgebraic(x) ? this.beyond.isBelow(x) : signEl(x.im) < 0),
      this.budget,
    );
  }

  /** A question that goes over the step limit is open; the verdict on square roots stands without it. */
  private trisectorOf(x: Algebraic): Trisector {
    try {
      return trisectorReaches(x, this.budget);
    } catch (error) {
      if (error instanceof OverLimit) return { reaches: null, by: 'open', why: 'limit' };
      throw error;
    }
  }

  decimal(a: Num, digits: number): Decimal {
    if (!Number.isSafeInteger(digits) || digits < 1)
      throw new RangeError('decimal() takes a positive number of digits.');
    this.budget.within('digits', digits);
    if (this.isReal(a)) {
      const { text, exact } = this.part(a, digits);
      return { re: text, im: null, digits, terminates: exact };
    }
    const x = this.open(a);
    const [re, im] = isAlgebraic(x)
      ? this.partsOf(x, digits)
      : [decimalOf(x.re, digits), decimalOf(x.im, digits)];
    return { re: re.text, im: im.text, digits, terminates: re.exact && im.exact };
  }
  private partsOf(x: Algebraic, digits: number): [Part, Part] {
    const { re, im } = this.beyond.parts(x);
    const written = (part: RealPart): Part =>
      typeof part === 'function'
        ? irrationalDecimal(part, digits, isNegative(part))
        : this.part(this.rational(part.n, part.d), digits);
    return [written(re), written(im)];
  }
  private part(a: Num, digits: number): Part {
    const x = this.open(a);
    const long = this.long(a);
    if (long !== null) return irrationalDecimal(long, digits, isNegative(long));
    return isAlgebraic(x)
      ? decimalOfAlgebraic(x, digits, this.beyond.signOf(x) < 0)
      : decimalOf(x.re, digits);
  }

  roundToMultiple(a: Num, step: { n: bigint; d: bigint }, rounding: Rounding): Multiple {
    if (step.n <= 0n || step.d <= 0n) throw new RangeError('A step must be positive.');
    const long = this.long(a);
    if (long !== null) return roundIrrational(long, step.d, step.n, rounding);
    const x = this.realValue(a, 'nearest multiple');
    if (isAlgebraic(x)) return roundIrrational((P) => x.box(P).re, step.d, step.n, rounding);
    return roundTo(scaleEl(x, Z.small(step.d), Z.small(step.n)), rounding);
  }

  write(a: Num): Written {
    const x = this.open(a);
    if (isLongCosine(x)) return nameOfCosine(x);
    return isAlgebraic(x) ? this.beyond.write(x) : writeValue(x);
  }
  tower(a: Num): TowerStep[] | null {
    const x = this.open(a);
    return isAlgebraic(x) ? null : towerOf(x);
  }
  certificate(a: Num): Certificate {
    const x = this.open(a);
    if (isAlgebraic(x)) {
      throw new OutsideDomain(
        'not-exact',
        'A certificate lists square roots, and square roots do not reach this number.',
      );
    }
    return certificateOf(x);
  }

  holds(x: unknown): x is Num {
    if (isAlgebraic(x)) return this.algebraic.has(x);
    return (x as Partial<Cx> | null | undefined)?.im?.t?.field === this.field;
  }
  pack(a: Num): PackedNum {
    const x = this.open(a);
    const cyclotomic = this.beyond.knownCyclotomic(x);
    if (isAlgebraic(x)) return new PackedNum(null, this.beyond.pack(x), null, cyclotomic);
    if (x instanceof Cosine) {
      const tower = x.known === null ? null : packElements([x.known]);
      return new PackedNum(tower, null, { k: x.k, n: x.n, scale: x.scale }, cyclotomic);
    }
    return new PackedNum(packElements([x.re, x.im]), null, null, cyclotomic);
  }
  unpack(packed: PackedNum): Num {
    const x = this.unpacked(packed);
    this.beyond.rememberCyclotomic(x, packed.cyclotomic);
    return this.seal(x);
  }
  private unpacked({ tower, algebraic, cosine }: PackedNum): Value {
    if (algebraic !== null) return this.beyond.unpack(algebraic);
    const [re, im] = tower === null ? [] : unpackElements(this.field, tower);
    if (cosine !== null)
      return new Cosine(this.field, cosine.k, cosine.n, cosine.scale, re ?? null);
    if (re === undefined || im === undefined) throw new TypeError('A packed number has no parts.');
    return { re, im };
  }

  private realValue(a: Num, what: string): El | Algebraic {
    const x = this.open(a);
    if (isAlgebraic(x) ? !x.isReal : !isRealCx(x)) {
      throw new OutsideDomain('domain', `A number with an imaginary part has no ${what}.`);
    }
    return isAlgebraic(x) ? x : x.re;
  }

  private seal(x: Value): Num {
    if (isAlgebraic(x)) this.algebraic.add(x);
    return x as unknown as Num;
  }

  private open(a: Num): Value {
    const x = a as unknown as Value;
    if (isAlgebraic(x)) {
      if (!this.algebraic.has(x)) throw new TypeError('A number of another engine was used.');
      return x;
    }
    if (x?.im?.t?.field !== this.field) throw new TypeError('A number of another engine was used.');
    return x;
  }
}

/** Cosines of divisions up to this one are made from their closed form; it takes some tens of milliseconds at the most. */
const COSINE_DIVISION = 2000n;

/** The sign of an irrational number. */
function isNegative(encloseAt: (P: number) => Enclosure): boolean {
  for (let P = 64; ; P *= 2) {
    const { low, high } = encloseAt(P);
    if (low > 0n || high < 0n) return high < 0n;
  }
}

function checkIndex(index: number): void {
  if (!Number.isSafeInteger(index) || index < 1)
    throw new RangeError('The index of a root is a positive integer.');
}

const gcd = (a: bigint, b: bigint): bigint => {
  let [x, y] = [a < 0n ? -a : a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
};
