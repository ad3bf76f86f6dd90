import type { Engine, Num } from '../engine/index';
import { enclosePi, encloseSine } from './circular';
import type { Fraction, Interval, IntervalArithmetic } from './interval';

/**
 * A constructible positive number, as a multiple of the base, in the shape in which it is struck. All parts are small
 * whole numbers; square roots are taken of what is positive.
 */
export type Form =
  | { readonly kind: 'fraction'; readonly n: bigint; readonly d: bigint }
  | { readonly kind: 'root'; readonly of: Form }
  | { readonly kind: 'sum'; readonly a: Form; readonly b: Form }
  | { readonly kind: 'difference'; readonly a: Form; readonly b: Form }
  | { readonly kind: 'product'; readonly a: Form; readonly b: Form }
  /** √(p² + q²)/d. */
  | { readonly kind: 'hypotenuse'; readonly p: bigint; readonly q: bigint; readonly d: bigint }
  /** (a + b√c)/d, d > 0. */
  | {
      readonly kind: 'surd';
      readonly a: bigint;
      readonly b: bigint;
      readonly c: bigint;
      readonly d: bigint;
    }
  /** 2 sin(π k/n): the chord of k of the n parts of a circle of radius 1, in lowest terms. */
  | { readonly kind: 'chord'; readonly k: bigint; readonly n: bigint };

export function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let [x, y] = [a < 0n ? -a : a, b < 0n ? -b : b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** n/d in lowest terms, d > 0. */
export function fraction(n: bigint, d = 1n): Extract<Form, { kind: 'fraction' }> {
  const common = greatestCommonDivisor(n, d);
  return { kind: 'fraction', n: n / common, d: d / common };
}

/** The interval in which the value of a form lies. Cost: one operation of the arithmetic for each part of the form. */
export function encloseForm(arithmetic: IntervalArithmetic, form: Form): Interval {
  const of = (part: Form): Interval => encloseForm(arithmetic, part);
  switch (form.kind) {
    case 'fraction':
      return arithmetic.fraction(form);
    case 'root':
      return arithmetic.root(of(form.of));
    case 'sum':
      return arithmetic.add(of(form.a), of(form.b));
    case 'difference':
      return arithmetic.subtract(of(form.a), of(form.b));
    case 'product':
      return arithmetic.multiply(of(form.a), of(form.b));
    case 'hypotenuse': {
      const { p, q, d } = form;
      return arithmetic.root(arithmetic.fraction({ n: p * p + q * q, d: d * d }));
    }
    case 'surd': {
      const root = arithmetic.scale(arithmetic.rootOf(form.c), form.b);
      const whole = form.a << arithmetic.shift;
      return arithmetic.scale({ low: whole + root.low, high: whole + root.high }, 1n, form.d);
    }
    case 'chord': {
      const half = arithmetic.scale(enclosePi(arithmetic), form.k, form.n);
      return arithmetic.scale(encloseSine(arithmetic, half), 2n);
    }
  }
}

/** The exact value of a form. To be called inside `attempt`: a fine division may go over a limit of the engine. */
export function buildForm(engine: Engine, form: Form): Num {
  const of = (part: Form): Num => buildForm(engine, part);
  switch (form.kind) {
    case 'fraction':
      return engine.rational(form.n, form.d);
    case 'root':
      return engine.sqrt(of(form.of));
    case 'sum':
      return engine.add(of(form.a), of(form.b));
    case 'difference':
      return engine.sub(of(form.a), of(form.b));
    case 'product':
      return engine.mul(of(form.a), of(form.b));
    case 'hypotenuse': {
      const { p, q, d } = form;
      return engine.sqrt(engine.rational(p * p + q * q, d * d));
    }
    case 'surd': {
      const root = engine.mul(engine.integer(form.b), engine.sqrt(engine.integer(form.c)));
      return engine.div(engine.add(engine.integer(form.a), root), engine.integer(form.d));
    }
    case 'chord':
      return engine.mul(engine.integer(2n), engine.sinTurn(form.k, 2n * form.n));
  }
}

/** The form in the cell language, as a plain number. */
export function writeForm(form: Form): string {
  switch (form.kind) {
    case 'fraction':
      return over(`${form.n}`, form.d);
    case 'root':
      return `sqrt(${writeForm(form.of)})`;
    case 'sum':
      return `${writeForm(form.a)}+${writeForm(form.b)}`;
    case 'difference':
      return `${writeForm(form.a)}-${writeFactor(form.b)}`;
    case 'product':
      return `${writeFactor(form.a)}*${writeFactor(form.b)}`;
    case 'hypotenuse':
      return over(`sqrt(${form.p}^2+${form.q}^2)`, form.d);
    case 'surd': {
      const sum = writeSurd(form.a, form.b, form.c);
      return form.d === 1n || form.a === 0n ? over(sum, form.d) : over(`(${sum})`, form.d);
    }
    case 'chord': {
      const part = fraction(form.k, 2n * form.n);
      return `2*sin(${part.n === 1n ? '' : `${part.n} `}turn/${part.d})`;
    }
  }
}

const over = (text: string, d: bigint): string => (d === 1n ? text : `${text}/${d}`);

/** With brackets where it is a sum or a difference. */
function writeFactor(form: Form): string {
  const isSum =
    form.kind === 'sum' ||
    form.kind === 'difference' ||
    (form.kind === 'surd' && form.d === 1n && form.a !== 0n);
  return isSum ? `(${writeForm(form)})` : writeForm(form);
}

function writeSurd(a: bigint, b: bigint, c: bigint): string {
  const size = b < 0n ? -b : b;
  const root = size === 1n ? `sqrt(${c})` : `${size}*sqrt(${c})`;
  if (a === 0n) return root;
  return b < 0n ? `${a}-${root}` : a < 0n ? `${root}-${-a}` : `${a}+${root}`;
}

/** A base, as text of a single factor, times the form. */
export const writeTimes = (base: string, form: Form): string => `${base}*${writeFactor(form)}`;

/**
 * The form times a base of so many units, in the cell language: a fraction as a plain quantity, a right triangle with
 * its legs in units, everything else as base times form. `unit` is null for plain numbers.
 */
export function writeScaled(form: Form, base: Fraction, unit: string | null): string {
  const quantity = (n: bigint, d: bigint): string => {
    const part = fraction(n * base.n, d * base.d);
    const count = part.d === 1n ? `${part.n}` : `${part.n}/${part.d}`;
    return unit === null ? count : `${count} ${unit}`;
  };
  if (form.kind === 'fraction') return quantity(form.n, form.d);
  if (unit === null && base.n === base.d) return writeForm(form);
  if (form.kind === 'hypotenuse') {
    const [p, q] = [quantity(form.p, form.d), quantity(form.q, form.d)];
    return `sqrt((${p})^2+(${q})^2)`;
  }
  return writeTimes(quantity(1n, 1n), form);
}

/** A form whose square is a fraction, by that square; null for others. Two forms with one key are one number. */
export function squareOf(form: Form): Fraction | null {
  switch (form.kind) {
    case 'fraction':
      return fraction(form.n * form.n, form.d * form.d);
    case 'root':
      return form.of.kind === 'fraction' ? form.of : null;
    case 'hypotenuse':
      return fraction(form.p * form.p + form.q * form.q, form.d * form.d);
    case 'surd':
      return form.a === 0n ? fraction(form.b * form.b * form.c, form.d * form.d) : null;
    default:
      return null;
  }
}
