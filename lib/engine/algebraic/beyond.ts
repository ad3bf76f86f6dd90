/**
 * Numbers of both kinds together: elements of the tower, and algebraic numbers that no square roots reach.
 *
 * Whatever an operation gives is settled: a rational or constructible outcome goes back into the tower as nested
 * square roots, everything else stays an irreducible polynomial with one of its roots enclosed.
 */
import { isRealCx, real } from '../complex';
import { isRationalEl, integerEl, numerator, rationalEl } from '../element';
import { enclose, signEl } from '../enclosure';
import * as Z from '../int';
import type { Budget } from '../limits';
import type { Cx } from '../complex';
import type { Written } from '../types';
import { minimalPolynomialOf } from '../minimal-polynomial';
import type { IntegerPoly } from '../polynomials/integer-poly';
import type { Field } from '../tower';
import { Algebraic, identify, isFraction, refining, type Fraction, type Root } from './algebraic';
import { addBox, multiplyBox, type Box } from './box';
import { algebraicCosine } from './cosine';
import { CyclotomicFields, type Cyclotomic } from './cyclotomic';
import { isolate } from './newton';
import { Naming } from './naming';
import { nearestOf, rootOf, rootsOf, type Isolated } from './near';
import { rootsOverField } from './norm';
import * as operations from './operations';
import { rationalPart, type RealPart } from './real-part';
import { principalRoot, principalSquareRoot, realRoot } from './principal';
import { TooManyPartitions } from '../subfields/subfield';
import { quadraticChain, type Chain } from './quadratic-chain';
import { maxBits } from '../polynomials/integer-poly';
import type { PackedAlgebraic } from '../packed';
import { toTower } from './square-roots';

export type Value = Cx | Algebraic;

export const isAlgebraic = (x: unknown): x is Algebraic => x instanceof Algebraic;

/** The chain of subfields is worked out up to this degree; above it the verdict is left open. */
const CHAIN_DEGREE = 64;
/** Work that one verdict may take, in the units of the step budget. */
const CHAIN_WORK = 4_000_000;

/** What is known about square roots reaching a number: a chain's refusal, or a limit that was met. */
export type Verdict =
  Exclude<Chain, { kind: 'chain' }> | { readonly kind: 'undecided'; readonly degree: number };

class TooLong extends Error {}

export class Beyond {
  private readonly roots = new WeakMap<Cx, Root>();
  private readonly verdicts = new WeakMap<Algebraic, Verdict>();
  private readonly cyclotomics = new WeakMap<Value, Cyclotomic>();
  private readonly fields = new CyclotomicFields();
  private readonly naming: Naming;

  constructor(
    private readonly field: Field,
    private readonly budget: Budget,
  ) {
    this.naming = new Naming(field, budget);
  }

  write(a: Algebraic): Written {
    return this.naming.write(a);
  }

  /** A value of the tower as an algebraic number, by its minimal polynomial and its enclosures. */
  private rootOf(x: Value): Root {
    if (isAlgebraic(x)) return x;
    const known = this.roots.get(x);
    if (known !== undefined) return known;
    const made = this.makeRoot(x);
    this.roots.set(x, made);
    return made;
  }

  private makeRoot(x: Cx): Root {
    if (isRealCx(x) && isRationalEl(x.re)) {
      return { n: BigInt(numerator(x.re)), d: BigInt(x.re.den) };
    }
    const poly = [...minimalPolynomialOf(x)].reverse();
    for (let P = 64; ; P *= 2) {
      const box = isolate(poly, { re: enclose(x.re, P), im: enclose(x.im, P) }, P);
      if (box === null) continue;
      return new Algebraic(poly, isRealCx(x), refining(poly, box, P, this.budget));
    }
  }

  private rational({ n, d }: Fraction): Cx {
    return real(rationalEl(this.field, Z.small(n), Z.small(d)));
  }

  /** Brings an outcome back into the tower where it belongs there. */
  settle(root: Root): Value {
    if (isFraction(root)) return this.rational(root);
    const chain = this.chainOf(root);
    if (chain.kind === 'chain') return toTower(this.field, root, chain);
    this.verdicts.set(root, chain);
    return root;
  }

  private chainOf(a: Algebraic): Chain | Verdict {
    if (a.origin.division !== undefined) return { kind: 'degree', degree: a.degree };
    let spent = 0;
    const charge = (work: number): void => {
      spent += work;
      if (spent > CHAIN_WORK) throw new TooLong();
      this.budget.charge(work);
    };
    const undecided: Verdict = { kind: 'undecided', degree: a.degree };
    const isPowerOfTwo = (a.degree & (a.degree - 1)) === 0;
    if (isPowerOfTwo && a.degree > CHAIN_DEGREE) return undecided;
    try {
      return quadraticChain(a.poly, charge);
    } catch (error) {
      if (error instanceof TooLong || error instanceof TooManyPartitions) return undecided;
      throw error;
    }
  }

  /** Why square roots do not reach a settled number. */
  verdictOf(a: Algebraic): Verdict {
    const verdict = this.verdicts.get(a);
    if (verdict !== undefined) return verdict;
    const chain = this.chainOf(a);
    if (chain.kind === 'chain') throw new RangeError('a constructible number was not settled');
    this.verdicts.set(a, chain);
    return chain;
  }

  /** cos(2πk/n) of a division that square roots do not reach, 0 < k/n < 1/2 in lowest terms. */
  cosine(k: bigint, n: bigint): Algebraic {
    const cosine = algebraicCosine(k, n, this.budget);
    const element = this.fields.cosine(Number(k), Number(n));
    if (element !== null) this.cyclotomics.set(cosine, element);
    return this.naming.cosine(cosine, k, n);
  }

  /** The value as an element of a cyclotomic field, where it is known to be one. */
  private cyclotomicOf(x: Value): Cyclotomic | null {
    const known = this.cyclotomics.get(x);
    if (known !== undefined) return known;
    if (isAlgebraic(x) || !isRationalEl(x.re) || !isRationalEl(x.im)) return null;
    const [re, im] = [x.re, x.im].map((part) =>
      this.fields.rational(BigInt(numerator(part)), BigInt(part.den)),
    ) as [Cyclotomic, Cyclotomic];
    const imaginary = this.fields.multiply(im, this.fields.i);
    return imaginary && this.fields.add(re, imaginary);
  }

  /** See `packed.ts`. The box is as small as it takes to hold no other root. */
  pack(a: Algebraic): PackedAlgebraic {
    const poly = [...a.poly];
    for (let P = 64 + maxBits(poly); ; P *= 2) {
      const box = isolate(poly, a.box(P), P);
      if (box === null) continue;
      const { isReal, origin } = a;
      return {
        poly,
        isReal,
        box,
        precision: P,
        origin,
        verdict: this.verdictOf(a),
        name: this.naming.pack(a),
      };
    }
  }

  unpack({ poly, isReal, box, precision, origin, verdict, name }: PackedAlgebraic): Algebraic {
    const root = new Algebraic(
      [...poly],
      isReal,
      refining([...poly], box, precision, this.budget),
      origin,
    );
    this.verdicts.set(root, verdict);
    this.naming.unpack(root, name);
    return root;
  }

  /** What is known of a value as an element of a cyclotomic field, to be kept with it. */
  knownCyclotomic(x: Value): Cyclotomic | null {
    return this.cyclotomics.get(x) ?? null;
  }

  rememberCyclotomic(x: Value, element: Cyclotomic | null): void {
    this.mark(x, element);
  }

  add(a: Value, b: Value): Value {
    const sum = this.combine(
      a,
      b,
      (x, y) => this.fields.add(x, y),
      (x, y) => operations.add(x, y, this.budget),
      (x, y) => addBox(x, y),
    );
    return this.naming.add(sum, a, b);
  }

  multiply(a: Value, b: Value): Value {
    const product = this.combine(
      a,
      b,
      (x, y) => this.fields.multiply(x, y),
      (x, y) => operations.multiply(x, y, this.budget),
      (x, y, P) => multiplyBox(x, y, P),
    );
    return this.naming.multiply(product, a, b);
  }

  /** Inside a cyclotomic field where both values lie in one; a rational operand keeps the other's name either way. */
  private combine(
    a: Value,
    b: Value,
    inField: (x: Cyclotomic, y: Cyclotomic) => Cyclotomic | null,
    inGeneral: (x: Root, y: Root) => Root,
    box: (x: Box, y: Box, P: number) => Box,
  ): Value {
    const [x, y] = [this.cyclotomicOf(a), this.cyclotomicOf(b)];
    const element = x && y && inField(x, y);
    const [p, q] = [this.rootOf(a), this.rootOf(b)];
    const outcome =
      element === null || isFraction(p) || isFraction(q)
        ? inGeneral(p, q)
        : this.fromField(element, (P) => box(p.box(P), q.box(P), P));
    return this.mark(this.settleSimple(a, b, outcome), element);
  }

  private fromField(element: Cyclotomic, box: (P: number) => Box): Root {
    this.budget.charge(element.order * element.order);
    return identify([this.fields.minimalPolynomial(element)], box, this.budget);
  }

  private mark(value: Value, element: Cyclotomic | null): Value {
    if (element !== null) this.cyclotomics.set(value, element);
    return value;
  }

  /** A sum or product with a rational needs no new verdict: reach does not change. */
  private settleSimple(a: Value, b: Value, outcome: Root): Value {
    for (const [x, y] of [
      [a, b],
      [b, a],
    ] as const) {
      if (isFraction(outcome) || !isAlgebraic(x) || isAlgebraic(y)) continue;
      const verdict = this.verdicts.get(x);
      if (verdict !== undefined && isFraction(this.rootOf(y))) {
        this.verdicts.set(outcome, verdict);
        return outcome;
      }
    }
    return this.settle(outcome);
  }

  negate(a: Algebraic): Value {
    const x = this.cyclotomics.get(a);
    const element = x && this.fields.multiply(x, this.fields.rational(-1n, 1n));
    const outcome = this.mark(this.keep(a, operations.negate(a)), element ?? null);
    return this.naming.negate(outcome, a);
  }

  invert(a: Algebraic): Value {
    const x = this.cyclotomics.get(a);
    const outcome = this.mark(
      this.keep(a, operations.invert(a)),
      x === undefined ? null : this.fields.invert(x),
    );
    return this.naming.invert(outcome, a);
  }

  conjugate(a: Algebraic): Value {
    return this.naming.conjugate(this.keep(a, operations.conjugate(a)), a);
  }

  private keep(a: Algebraic, outcome: Root): Value {
    if (!isFraction(outcome)) this.verdicts.set(outcome, this.verdictOf(a));
    return isFraction(outcome) ? this.rational(outcome) : outcome;
  }

  power(a: Algebraic, n: bigint): Value {
    if (n === 0n) return real(integerEl(this.field, 1));
    const base = n < 0n ? operations.invert(a) : a;
    const size = n < 0n ? -n : n;
    if (size > 1000n) this.budget.within('degree', Number(size) * a.degree);
    const outcome = this.settle(operations.power(base, Number(size), this.budget));
    return this.naming.power(outcome, a, n);
  }

  squareRoot(a: Algebraic): Value {
    const outcome = this.settle(principalSquareRoot(a, this.budget));
    return this.naming.squareRoot(outcome, a, isAlgebraic(outcome) && outcome.isReal);
  }

  /** The real e-th root of a real number, which is not negative where e is even. */
  realRoot(a: Value, e: number): Value {
    const outcome = this.settle(realRoot(this.rootOf(a), e, this.budget));
    return this.naming.realRoot(outcome, a, e, this.sign(a) < 0);
  }

  /** The principal e-th root: its argument is the e-th part of the number's own, taken in (−π, π]. */
  principalRoot(a: Value, e: number): Value {
    if (e === 1) return a;
    const isReal = isAlgebraic(a) ? a.isReal : isRealCx(a);
    if (isReal && this.sign(a) >= 0) return this.realRoot(a, e);
    const outcome = this.settle(principalRoot(this.rootOf(a), e, this.budget));
    return this.naming.principalRoot(outcome, a, e, isReal);
  }

  private sign(a: Value): -1 | 0 | 1 {
    return isAlgebraic(a) ? this.signOf(a) : signEl(a.re);
  }

  /** All roots of a polynomial with any coefficients, constant term first, the last one not 0. */
  allRoots(coefficients: readonly Value[]): Value[] {
    const roots = rootsOverField(
      coefficients.map((c) => this.rootOf(c)),
      this.budget,
    );
    return roots.map((root) => this.naming.root(this.settle(rootOf(root, this.budget))));
  }

  /** The nearest root of an integer polynomial of positive degree, constant term first. */
  nearestRoot(polynomial: IntegerPoly, near: Value): Value {
    return this.nearestAmong(rootsOf(polynomial, this.budget), near);
  }

  /** The same for a polynomial with any coefficients, the last one not 0. */
  nearestRootOver(coefficients: readonly Value[], near: Value): Value {
    const roots = rootsOverField(
      coefficients.map((c) => this.rootOf(c)),
      this.budget,
    );
    return this.nearestAmong(roots, near);
  }

  private nearestAmong(roots: readonly Isolated[], near: Value): Value {
    const place = (P: number): Box =>
      isAlgebraic(near) ? near.box(P) : { re: enclose(near.re, P), im: enclose(near.im, P) };
    const root = nearestOf(roots, place, this.budget);
    return this.naming.root(this.settle(root));
  }

  re(a: Algebraic): Value {
    if (a.isReal) return a;
    const sum = operations.add(a, operations.conjugate(a), this.budget);
    const outcome = this.settle(operations.multiply(sum, { n: 1n, d: 2n }, this.budget));
    return this.naming.re(outcome, a);
  }

  im(a: Algebraic): Value {
    if (a.isReal) return real(integerEl(this.field, 0));
    const difference = operations.add(a, operations.negate(operations.conjugate(a)), this.budget);
    // a − ā = 2i·im.
    const outcome = this.settle(
      operations.multiply(difference, this.imaginary(-1, 2), this.budget),
    );
    return this.naming.im(outcome, a);
  }

  private imaginary(n: number, d: number): Root {
    return this.rootOf({ re: integerEl(this.field, 0), im: rationalEl(this.field, n, d) });
  }

  /** Both parts of a number that is not real as digits need them: by enclosures, or as the rational that a part is. */
  parts(a: Algebraic): { readonly re: RealPart; readonly im: RealPart } {
    // The imaginary part of a is the real part of −i·a.
    const turned = operations.multiply(a, this.imaginary(-1, 1), this.budget);
    return {
      re: rationalPart(a, this.budget) ?? ((P) => a.box(P).re),
      im: rationalPart(turned, this.budget) ?? ((P) => a.box(P).im),
    };
  }

  /** Whether the imaginary part of a number that is not real is negative. */
  isBelow(a: Algebraic): boolean {
    for (let P = 64; ; P *= 2) {
      const { low, high } = a.box(P).im;
      if (low > 0n || high < 0n) return high < 0n;
    }
  }

  abs(a: Algebraic): Value {
    if (a.isReal) return this.signOf(a) < 0 ? this.negate(a) : a;
    const square = operations.multiply(a, operations.conjugate(a), this.budget);
    const outcome = this.settle(
      isFraction(square)
        ? realRoot(square, 2, this.budget)
        : principalSquareRoot(square, this.budget),
    );
    return this.naming.abs(outcome, a);
  }

  equal(a: Value, b: Value): boolean {
    return operations.equal(this.rootOf(a), this.rootOf(b), this.budget);
  }

  compare(a: Value, b: Value): -1 | 0 | 1 {
    return operations.compare(this.rootOf(a), this.rootOf(b), this.budget);
  }

  signOf(a: Algebraic): -1 | 1 {
    for (let P = 64; ; P *= 2) {
      const { low, high } = a.box(P).re;
      if (low > 0n) return 1;
      if (high < 0n) return -1;
    }
  }
}
