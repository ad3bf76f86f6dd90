/**
 * How numbers beyond square roots came about, for writing them: every operation leaves a sum of named numbers with its
 * outcome, worked out only when the outcome is written. It depends on the operations alone, never on what else was
 * evaluated before.
 */
import { isRealCx, real, type Cx } from '../complex';
import { isRationalEl, numerator } from '../element';
import { OverLimit, type Budget } from '../limits';
import type { Field } from '../tower';
import type { Written } from '../types';
import { Algebraic } from './algebraic';
import type { WrittenName } from './atoms';
import { NamedSums, type NamedSum } from './named-sum';
import { packSum, unpackSum, type PackedSum } from './packed-name';
import { writeNamedSum, type Name } from './write-named-sum';
import { writeRoot } from './writing';

type Value = Cx | Algebraic;

/** A longer sum gives way to `root(polynomial, place)` where that is shorter. */
const LONG = 200;
/** A longer text is not put into another one. */
const TOO_LONG = 160;
const LARGEST_POWER = 8;

/** A chain of operations of this length is worked out at once, so that none grows too deep to be followed. */
const DEEPEST = 100;

interface Made {
  readonly way: () => NamedSum | null;
  readonly depth: number;
}

export class Naming {
  private readonly made = new WeakMap<Algebraic, Made>();
  private readonly sums: NamedSums;

  constructor(
    private readonly field: Field,
    private readonly budget: Budget,
  ) {
    this.sums = new NamedSums(field);
  }

  /** Leaves with an outcome how it is to be written; an operand that was handed back keeps its own way. */
  private leave<T extends Value>(
    outcome: T,
    operands: readonly Value[],
    make: () => NamedSum | null,
  ): T {
    if (!(outcome instanceof Algebraic) || this.made.has(outcome)) return outcome;
    const depth = 1 + Math.max(0, ...operands.map((x) => this.depthOf(x)));
    let known: NamedSum | null | undefined;
    const way = (): NamedSum | null => (known === undefined ? (known = make()) : known);
    this.made.set(outcome, { way, depth: depth % DEEPEST });
    if (depth === DEEPEST) way();
    return outcome;
  }

  /** How a number is to be written, to be kept with it; null where that is not known or went over a limit. */
  pack(a: Algebraic): PackedSum | null {
    try {
      const sum = this.made.get(a)?.way() ?? null;
      return sum && packSum(sum);
    } catch (error) {
      if (error instanceof OverLimit) return null;
      throw error;
    }
  }

  unpack(a: Algebraic, name: PackedSum | null): void {
    if (name === null) return;
    this.leave(a, [], () => unpackSum(this.field, name));
  }

  private depthOf(x: Value): number {
    return x instanceof Algebraic ? (this.made.get(x)?.depth ?? 0) : 0;
  }

  private sumOf(x: Value): NamedSum {
    if (!(x instanceof Algebraic)) return this.sums.constant(x);
    return this.made.get(x)?.way() ?? this.rootOf(x);
  }

  private rootOf(x: Algebraic): NamedSum {
    return this.named(writeRoot(x, this.budget), x.isReal);
  }

  /** A root that was asked for by its polynomial. */
  root(outcome: Value): Value {
    return this.leave(outcome, [], () =>
      outcome instanceof Algebraic ? this.rootOf(outcome) : null,
    );
  }

  private named(name: Name, isReal: boolean, power = 1, root?: WrittenName['root']): NamedSum {
    const atom: WrittenName = { kind: 'written', text: name.text, tex: name.tex, isReal };
    return this.sums.of({ atom: root === undefined ? atom : { ...atom, root }, power });
  }

  private textOf(sum: NamedSum): Name | null {
    const name = writeNamedSum(sum);
    return name === null || name.text.length > TOO_LONG ? null : name;
  }

  write(a: Algebraic): Written {
    const sum = this.made.get(a)?.way() ?? null;
    const name = sum && writeNamedSum(sum);
    if (name !== null && name.text.length <= LONG) return { ...name, staged: false };
    const root = writeRoot(a, this.budget);
    const shorter = name !== null && name.text.length <= root.text.length ? name : root;
    return { ...shorter, staged: false };
  }

  cosine(outcome: Algebraic, k: bigint, n: bigint): Algebraic {
    return this.leave(outcome, [], () => this.sums.cosine(k, n));
  }

  add(outcome: Value, a: Value, b: Value): Value {
    return this.leave(outcome, [a, b], () => this.sums.add(this.sumOf(a), this.sumOf(b)));
  }

  multiply(outcome: Value, a: Value, b: Value): Value {
    return this.leave(outcome, [a, b], () => this.sums.multiply(this.sumOf(a), this.sumOf(b)));
  }

  negate(outcome: Value, a: Value): Value {
    return this.leave(outcome, [a], () => this.sums.negate(this.sumOf(a)));
  }

  invert(outcome: Value, a: Algebraic): Value {
    return this.leave(outcome, [a], () => this.inverseOf(this.sumOf(a), a.isReal));
  }

  private inverseOf(sum: NamedSum, isReal: boolean): NamedSum | null {
    const inverse = this.sums.invert(sum);
    if (inverse !== null) return inverse;
    const name = this.textOf(sum);
    if (name === null) return null;
    return this.named(bracketed(name), isReal, -1);
  }

  power(outcome: Value, a: Algebraic, exponent: bigint): Value {
    return this.leave(outcome, [a], () => {
      const size = exponent < 0n ? -exponent : exponent;
      if (size > LARGEST_POWER) return null;
      const sum = this.sumOf(a);
      const base = exponent < 0n ? this.inverseOf(sum, a.isReal) : sum;
      return base && this.sums.power(base, Number(size));
    });
  }

  conjugate(outcome: Value, a: Algebraic): Value {
    return this.leave(outcome, [a], () => {
      const sum = this.sumOf(a);
      if (this.sums.isReal(sum)) return this.sums.conjugate(sum);
      return this.call(sum, false, 'conj', (tex) => `\\overline{${tex}}`);
    });
  }

  re(outcome: Value, a: Algebraic): Value {
    return this.leave(outcome, [a], () => {
      const sum = this.sumOf(a);
      if (this.sums.isReal(sum)) return this.sums.mapCoefficients(sum, ({ re }) => real(re));
      return this.call(sum, true, 're', (tex) => `\\operatorname{Re}\\left(${tex}\\right)`);
    });
  }

  im(outcome: Value, a: Algebraic): Value {
    return this.leave(outcome, [a], () => {
      const sum = this.sumOf(a);
      if (this.sums.isReal(sum)) return this.sums.mapCoefficients(sum, ({ im }) => real(im));
      return this.call(sum, true, 'im', (tex) => `\\operatorname{Im}\\left(${tex}\\right)`);
    });
  }

  abs(outcome: Value, a: Algebraic): Value {
    return this.leave(outcome, [a], () =>
      this.call(this.sumOf(a), true, 'abs', (tex) => `\\left|${tex}\\right|`),
    );
  }

  private call(
    sum: NamedSum,
    isReal: boolean,
    name: string,
    tex: (inner: string) => string,
  ): NamedSum | null {
    const inner = this.textOf(sum);
    if (inner === null) return null;
    return this.named({ text: `${name}(${inner.text})`, tex: tex(inner.tex) }, isReal);
  }

  /** The real root of a real number; `isNegative` says whether that is below 0. */
  realRoot(outcome: Value, a: Value, index: number, isNegative: boolean): Value {
    return this.leave(outcome, [a], () => this.realRootOf(a, index, isNegative));
  }

  private realRootOf(a: Value, index: number, isNegative: boolean): NamedSum | null {
    const sum = this.sumOf(a);
    const size = isNegative ? this.sums.negate(sum) : sum;
    const rational = rationalOf(a);
    const root =
      rational === null
        ? this.rootName(size, index, true)
        : this.sums.radical(rational.n < 0n ? -rational.n : rational.n, rational.d, index);
    return root && isNegative ? this.sums.negate(root) : root;
  }

  /** The principal root of a number that is not real, or of a negative one: with the e-th part of half a turn. */
  principalRoot(outcome: Value, a: Value, index: number, isNegative: boolean): Value {
    return this.leave(outcome, [a], () => {
      if (!isNegative) return this.rootName(this.sumOf(a), index, false);
      const size = this.realRootOf(a, index, true);
      const e = BigInt(index);
      const cosine = this.sums.cosine(1n, 2n * e);
      const sine = this.sums.multiply(this.sums.i, this.sums.cosine(e - 2n, 4n * e));
      const turn = sine && this.sums.add(cosine, sine);
      return size && turn && this.sums.multiply(this.sums.negate(size), turn);
    });
  }

  squareRoot(outcome: Value, a: Algebraic, isReal: boolean): Value {
    return this.leave(outcome, [a], () => this.rootName(this.sumOf(a), 2, isReal));
  }

  private rootName(radicand: NamedSum, index: number, isReal: boolean): NamedSum | null {
    const inner = this.textOf(radicand);
    if (inner === null) return null;
    const word = index === 2 ? 'sqrt' : index === 3 ? 'cbrt' : null;
    const text = word === null ? `(${inner.text})^(1/${index})` : `${word}(${inner.text})`;
    const tex = index === 2 ? `\\sqrt{${inner.tex}}` : `\\sqrt[${index}]{${inner.tex}}`;
    return this.named({ text, tex }, isReal, 1, { ...inner, index, radicand });
  }
}

const bracketed = ({ text, tex }: Name): Name => ({
  text: `(${text})`,
  tex: `\\left(${tex}\\right)`,
});

function rationalOf(a: Value): { n: bigint; d: bigint } | null {
  if (a instanceof Algebraic || !isRealCx(a) || !isRationalEl(a.re)) return null;
  return { n: BigInt(numerator(a.re)), d: BigInt(a.re.den) };
}
