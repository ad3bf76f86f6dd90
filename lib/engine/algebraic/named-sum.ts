/**
 * Numbers beyond square roots as people write them: sums of products of named numbers (roots of integers, cosines of
 * parts of a turn, whatever else was written) with coefficients in square roots. Such a sum is carried beside a value as
 * the way it was made; it is equal to the value and decides nothing.
 */
import { addCx, conjCx, inverseCx, isZeroCx, mulCx, real, type Cx } from '../complex';
import { integerEl, rationalEl } from '../element';
import * as Z from '../int';
import type { Field } from '../tower';
import { cosineOf, isConstructibleDivision } from '../turn';
import {
  compareFactors,
  isSameAtom,
  normalAngle,
  pullOut,
  type Cosine,
  type Factor,
  type Radical,
} from './atoms';

export interface Term {
  /** Not 0. */
  readonly coefficient: Cx;
  readonly factors: readonly Factor[];
}

/** Terms with different factors in a fixed order; the empty sum is 0. */
export type NamedSum = readonly Term[];

/** Longer sums are not readable and not carried on. */
const MOST_TERMS = 12;

export class NamedSums {
  constructor(private readonly field: Field) {}

  /** The imaginary unit. */
  get i(): NamedSum {
    const zero = integerEl(this.field, 0);
    return this.constant({ re: zero, im: integerEl(this.field, 1) });
  }

  readonly constant = (x: Cx): NamedSum => (isZeroCx(x) ? [] : [{ coefficient: x, factors: [] }]);

  private rational(n: bigint, d: bigint): Cx {
    return real(rationalEl(this.field, Z.small(n), Z.small(d)));
  }

  /** cos of k/n of a turn. */
  cosine(k: bigint, n: bigint): NamedSum {
    const angle = normalAngle(k, n);
    if (isConstructibleDivision(angle.n)) {
      return this.constant(real(cosineOf(this.field, angle.k, angle.n)));
    }
    const { sign, k: part, n: parts } = angle;
    const atom: Cosine = { kind: 'cosine', k: part, n: parts };
    return [{ coefficient: this.rational(sign, 1n), factors: [{ atom, power: 1 }] }];
  }

  /** The positive e-th root of n/d > 0. */
  radical(n: bigint, d: bigint, index: number): NamedSum {
    // (n/d)^(1/e) = (n·d^(e−1))^(1/e)/d.
    const { outside, inside } = pullOut(n * d ** BigInt(index - 1), index);
    const atom: Radical = { kind: 'radical', radicand: inside, index };
    return [
      {
        coefficient: this.rational(outside, d),
        factors: inside === 1n ? [] : [{ atom, power: 1 }],
      },
    ];
  }

  /** A single named number. */
  of(factor: Factor): NamedSum {
    return [{ coefficient: real(integerEl(this.field, 1)), factors: [factor] }];
  }

  add(a: NamedSum, b: NamedSum): NamedSum | null {
    return this.gather([...a, ...b]);
  }

  negate(a: NamedSum): NamedSum {
    const minus = this.rational(-1n, 1n);
    return a.map((t) => ({ ...t, coefficient: mulCx(t.coefficient, minus) }));
  }

  multiply(a: NamedSum, b: NamedSum): NamedSum | null {
    if (a.length * b.length > 4 * MOST_TERMS) return null;
    return this.gather(a.flatMap((x) => b.flatMap((y) => this.multiplyTerms(x, y))));
  }

  /** 1/a where a is one product, else null. */
  invert(a: NamedSum): NamedSum | null {
    const [only, second] = a;
    if (only === undefined || second !== undefined) return null;
    const start: Term = { coefficient: inverseCx(only.coefficient), factors: [] };
    const terms = only.factors.reduce<Term[]>(
      (made, { atom, power }) => made.flatMap((t) => this.timesFactor(t, { atom, power: -power })),
      [start],
    );
    return this.gather(terms);
  }

  power(a: NamedSum, exponent: number): NamedSum | null {
    let result: NamedSum | null = this.constant(real(integerEl(this.field, 1)));
    for (let k = 0; k < exponent && result !== null; k++) result = this.multiply(result, a);
    return result;
  }

  isReal(a: NamedSum): boolean {
    return a.every(({ factors }) => factors.every(({ atom }) => isRealAtom(atom)));
  }

  /** The conjugate of a sum of real names. */
  conjugate(a: NamedSum): NamedSum {
    return a.map((t) => ({ ...t, coefficient: conjCx(t.coefficient) }));
  }

  /** The same sum with another real coefficient in place of each, as for a real part. */
  mapCoefficients(a: NamedSum, change: (x: Cx) => Cx): NamedSum {
    return a
      .map((t) => ({ ...t, coefficient: change(t.coefficient) }))
      .filter(({ coefficient }) => !isZeroCx(coefficient));
  }

  private gather(terms: readonly Term[]): NamedSum | null {
    const sorted = [...terms].sort((a, b) => compareFactors(a.factors, b.factors));
    const sum: Term[] = [];
    for (const term of sorted) {
      const last = sum[sum.length - 1];
      if (last === undefined || compareFactors(last.factors, term.factors) !== 0) {
        if (!isZeroCx(term.coefficient)) sum.push(term);
        continue;
      }
      sum.pop();
      const coefficient = addCx(last.coefficient, term.coefficient);
      if (!isZeroCx(coefficient)) sum.push({ coefficient, factors: term.factors });
    }
    return sum.length > MOST_TERMS ? null : sum;
  }

  private multiplyTerms(a: Term, b: Term): Term[] {
    const start: Term = {
      coefficient: mulCx(a.coefficient, b.coefficient),
      factors: a.factors,
    };
    return b.factors.reduce<Term[]>(
      (made, factor) => made.flatMap((t) => this.timesFactor(t, factor)),
      [start],
    );
  }

  private timesFactor(term: Term, factor: Factor): Term[] {
    const { atom, power } = factor;
    if (atom.kind === 'radical') return [this.timesRadical(term, atom, power)];
    const same = term.factors.find((f) => isSameAtom(f.atom, atom));
    if (atom.kind === 'cosine' && power > 0 && (same === undefined || same.power > 0)) {
      const other = term.factors.find((f) => f.atom.kind === 'cosine' && f.power > 0);
      if (other !== undefined) return this.timesCosine(term, other, atom);
    }
    const rest = term.factors.filter((f) => f !== same);
    const total = (same?.power ?? 0) + power;
    if (total === 0) return [{ ...term, factors: rest }];
    if (atom.kind === 'written' && atom.root !== undefined && total >= atom.root.index) {
      const left = total - atom.root.index;
      const factors = left === 0 ? rest : sortFactors([...rest, { atom, power: left }]);
      return atom.root.radicand.flatMap((t) => this.multiplyTerms({ ...term, factors }, t));
    }
    return [{ ...term, factors: sortFactors([...rest, { atom, power: total }]) }];
  }

  /** cos α·cos β = (cos(α + β) + cos(α − β))/2; `other` is the factor cos α of the term. */
  private timesCosine(term: Term, other: Factor, { k, n }: Cosine): Term[] {
    const first = other.atom as Cosine;
    const rest: Term = {
      coefficient: mulCx(term.coefficient, this.rational(1n, 2n)),
      factors: term.factors.filter((f) => f !== other),
    };
    const [a, b] = [first.k * n, k * first.n];
    return [a + b, a - b].flatMap((sum) =>
      this.cosine(sum, n * first.n).map((t) => ({
        coefficient: mulCx(rest.coefficient, t.coefficient),
        factors: sortFactors([...rest.factors, ...t.factors]),
      })),
    );
  }

  /** Roots of one index are taken together under one root. */
  private timesRadical(term: Term, { radicand, index }: Radical, power: number): Term {
    const same = term.factors.find((f) => f.atom.kind === 'radical' && f.atom.index === index);
    const others = term.factors.filter((f) => f !== same);
    // A power −p is that of e − p over the radicand; powers are 1 and −1 only.
    const raised = power < 0 ? radicand ** BigInt(index - 1) : radicand;
    const inside = raised * (same?.atom.kind === 'radical' ? same.atom.radicand : 1n);
    const made = pullOut(inside, index);
    const scale = this.rational(made.outside, power < 0 ? radicand : 1n);
    const root: Factor = { atom: { kind: 'radical', radicand: made.inside, index }, power: 1 };
    return {
      coefficient: mulCx(term.coefficient, scale),
      factors: made.inside === 1n ? others : sortFactors([...others, root]),
    };
  }
}

const isRealAtom = (atom: Factor['atom']): boolean => atom.kind !== 'written' || atom.isReal;

const sortFactors = (factors: readonly Factor[]): Factor[] =>
  [...factors].sort((a, b) => compareFactors([a], [b]));
