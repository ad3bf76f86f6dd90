import type { Engine, Num } from '../engine/index';
import { fail } from './failure';
import type { FunctionStatement } from './syntax';
import {
  type PiSum,
  addSums,
  asAlgebraic,
  divideSums,
  fromNum,
  mapSum,
  multiplySums,
  negateSum,
  powSum,
  signOfSum,
  sqrtSum,
} from './pi-sum';
import {
  type FigureValue,
  type PointFigure,
  addPoints,
  describeFigure,
  isFigure,
  scalePoint,
} from './values-geometry';

/** What an expression can be worth. */
export type Value = Single | ListValue;

/**
 * One value rather than a list of them.
 * A number is a sum of algebraic multiples of powers of π, in millimetres to the power `length`; a plain number has
 * length 0. An angle is an algebraic number of turns and is a kind of its own: it is added only to angles. Points, lines
 * and circles are exact figures; points are added and scaled as vectors from the origin.
 */
export type Single = Magnitude | FigureValue;

/** What has a size: it can be compared, rounded and stood in for. */
export type Magnitude = NumberValue | AngleValue;

export interface NumberValue {
  readonly kind: 'number';
  readonly sum: PiSum;
  readonly length: number;
}

export interface AngleValue {
  readonly kind: 'angle';
  readonly turns: Num;
}

/** At least one value, in order. */
export interface ListValue {
  readonly kind: 'list';
  readonly items: readonly Value[];
  /** Values that are no lists, in it and in the lists inside it. */
  readonly size: number;
  /** 1 for a list without lists in it. */
  readonly depth: number;
}

/** What a line that defines a name gives to those that read it. */
export type LineValue = Value | FunctionValue;

export interface FunctionValue {
  readonly kind: 'function';
  readonly definition: FunctionStatement;
}

const LARGEST_DIMENSION = 60;

export function number(sum: PiSum, length = 0): NumberValue {
  if (Math.abs(length) > LARGEST_DIMENSION) {
    fail(
      'limit-size',
      `The unit would have the exponent ${length}; the limit is ${LARGEST_DIMENSION}.`,
    );
  }
  return { kind: 'number', sum, length };
}

export function angle(turns: Num): AngleValue {
  return { kind: 'angle', turns };
}

/** What a value is, to be read in a sentence: `a length`, `an area`, `a plain number`, `an angle`, `a list of 3 items`. */
export function describe(value: Value): string {
  if (value.kind === 'list') {
    const count = value.items.length;
    return `a list of ${count} item${count === 1 ? '' : 's'}`;
  }
  if (value.kind === 'angle') return 'an angle';
  if (isFigure(value)) return describeFigure(value);
  const names: Readonly<Record<number, string>> = {
    0: 'a plain number',
    1: 'a length',
    2: 'an area',
    3: 'a volume',
  };
  return names[value.length] ?? `a value in mm^${value.length}`;
}

function mismatch(action: string, a: Single, b: Single, hint = ''): never {
  return fail(
    'unit-mismatch',
    `The left side is ${describe(a)} and the right side is ${describe(b)}; ${action}${hint}.`,
  );
}

function hintFor(a: Single, b: Single): string {
  if (isFigure(a) || isFigure(b)) return '';
  const kinds = [a, b].map((value) => (value.kind === 'angle' ? 'angle' : value.length));
  if (kinds.includes('angle') && kinds.includes(0)) return ' (π radians are `turn/2`)';
  if (kinds.includes(1) && kinds.includes(0)) return ' (a length needs its unit, as in `12 mm`)';
  return '';
}

export function add(engine: Engine, a: Single, b: Single): Single {
  if (a.kind === 'angle' && b.kind === 'angle') return angle(engine.add(a.turns, b.turns));
  if (a.kind === 'number' && b.kind === 'number' && a.length === b.length)
    return number(addSums(engine, a.sum, b.sum), a.length);
  const sum = a.kind === 'point' && b.kind === 'point' ? addPoints(engine, a, b) : null;
  if (sum !== null) return sum;
  return mismatch('a sum needs two values of one kind', a, b, hintFor(a, b));
}

export function subtract(engine: Engine, a: Single, b: Single): Single {
  if (a.kind === 'angle' && b.kind === 'angle') return angle(engine.sub(a.turns, b.turns));
  if (a.kind === 'number' && b.kind === 'number' && a.length === b.length) {
    return number(addSums(engine, a.sum, negateSum(engine, b.sum)), a.length);
  }
  const difference =
    a.kind === 'point' && b.kind === 'point' ? addPoints(engine, a, opposite(engine, b)) : null;
  if (difference !== null) return difference;
  return mismatch('a difference needs two values of one kind', a, b, hintFor(a, b));
}

export function negate(engine: Engine, a: Single): Single {
  if (a.kind === 'angle') return angle(engine.neg(a.turns));
  if (a.kind === 'point') return opposite(engine, a);
  const plain = needNumber(a, 'Only numbers, angles and points have an opposite');
  return number(negateSum(engine, plain.sum), plain.length);
}

const opposite = (engine: Engine, point: PointFigure): PointFigure =>
  scalePoint(engine, point, number(fromNum(engine, engine.integer(-1n))));

export function multiply(engine: Engine, a: Single, b: Single): Single {
  if (a.kind === 'point' && b.kind === 'number') return scalePoint(engine, a, b);
  if (b.kind === 'point' && a.kind === 'number') return scalePoint(engine, b, a);
  if (isFigure(a) || isFigure(b))
    return mismatch('a product has numbers as factors, and a point at most once', a, b);
  if (a.kind === 'angle')
    return b.kind === 'angle'
      ? mismatch('two angles cannot be multiplied', a, b)
      : scale(engine, a, b, a, b);
  if (b.kind === 'angle') return scale(engine, b, a, a, b);
  return number(multiplySums(engine, a.sum, b.sum), a.length + b.length);
}

export function divide(engine: Engine, a: Single, b: Single): Single {
  if (a.kind === 'point' && b.kind === 'number') {
    const one = fromNum(engine, engine.integer(1n));
    return scalePoint(engine, a, number(divideSums(engine, one, b.sum), -b.length));
  }
  if (isFigure(a) || isFigure(b))
    return mismatch('only a point can be divided, and only by a number', a, b);
  if (b.kind === 'angle') {
    if (a.kind !== 'angle') return mismatch('only an angle can be divided by an angle', a, b);
    if (engine.isZero(b.turns))
      fail('division-by-zero', 'The divisor is an angle of exactly 0; another angle was expected.');
    return number(fromNum(engine, engine.div(a.turns, b.turns)));
  }
  if (a.kind === 'angle') {
    const one = fromNum(engine, engine.integer(1n));
    return scale(engine, a, number(divideSums(engine, one, b.sum), -b.length), a, b);
  }
  return number(divideSums(engine, a.sum, b.sum), a.length - b.length);
}

/** An angle times a plain, real, algebraic number. */
function scale(
  engine: Engine,
  turned: AngleValue,
  factor: NumberValue,
  left: Single,
  right: Single,
): AngleValue {
  if (factor.length !== 0) {
    mismatch(
      'an angle is multiplied or divided only by a plain number',
      left,
      right,
      ' (the length of an arc is `2 pi R (angle / turn)`)',
    );
  }
  const algebraic = asAlgebraic(engine, factor.sum);
  if (algebraic === null)
    return fail(
      'not-exact',
      'An angle times a value with π in it has no exact form here; a factor without π was expected.',
    );
  if (!engine.isReal(algebraic))
    return fail('domain', 'An angle is multiplied only by a real number; this factor is not real.');
  return angle(engine.mul(turned.turns, algebraic));
}

export function power(engine: Engine, base: Single, exponent: bigint): Single {
  const plain = needNumber(base, 'A power needs a number as its base');
  const least = BigInt(LARGEST_DIMENSION);
  if (plain.length !== 0 && (exponent > least || exponent < -least)) {
    fail(
      'limit-size',
      `The unit would have an exponent beyond ${LARGEST_DIMENSION}, which is the limit.`,
    );
  }
  return number(
    powSum(engine, plain.sum, exponent),
    plain.length * Number(plain.length === 0 ? 0n : exponent),
  );
}

/** The principal square root. A dimension must be even to be halved. */
export function squareRoot(engine: Engine, value: Single): NumberValue {
  const plain = needNumber(value, 'A square root needs a number');
  if (plain.length % 2 !== 0) {
    fail(
      'unit-mismatch',
      `A square root halves the dimension and this is ${describe(plain)}; an area or a plain number was expected.`,
    );
  }
  return number(sqrtSum(engine, plain.sum), plain.length / 2);
}

/** A number, of whatever dimension, rather than an angle. `need` begins the sentence. */
export function needNumber(value: Value, need: string): NumberValue {
  if (value.kind === 'number') return value;
  return fail('unit-mismatch', `${need}, and this is ${describe(value)}.`);
}

/** One value rather than a list of them. */
export function needSingle(value: Value): Single {
  if (value.kind !== 'list') return value;
  return fail('unit-mismatch', `A single value was expected, and this is ${describe(value)}.`);
}

/** A number or an angle rather than a figure. `need` begins the sentence. */
export function needMagnitude(value: Value, need: string): Magnitude {
  if (value.kind === 'number' || value.kind === 'angle') return value;
  return fail('unit-mismatch', `${need}, and this is ${describe(value)}.`);
}

/** A number without a unit and without π. `need` begins the sentence. */
export function needAlgebraic(engine: Engine, value: Value, need: string): Num {
  const plain = needNumber(value, need);
  if (plain.length !== 0)
    fail('unit-mismatch', `${need} without a unit, and this is ${describe(plain)}.`);
  const algebraic = asAlgebraic(engine, plain.sum);
  return (
    algebraic ?? fail('not-exact', `${need} without π in it; with π there is no exact form here.`)
  );
}

export function isRealValue(engine: Engine, value: Single): boolean {
  if (value.kind !== 'number') return true;
  for (const coefficient of value.sum.values()) if (!engine.isReal(coefficient)) return false;
  return true;
}

export function isZeroValue(engine: Engine, value: Magnitude): boolean {
  return value.kind === 'angle' ? engine.isZero(value.turns) : value.sum.size === 0;
}

/** Difference of two numbers or two angles for a decision; both must be of one kind. */
export function differenceForDecision(engine: Engine, a: Single, b: Single): Magnitude {
  if (a.kind === 'angle' && b.kind === 'angle') return angle(engine.sub(a.turns, b.turns));
  if (a.kind === 'number' && b.kind === 'number' && a.length === b.length)
    return number(addSums(engine, a.sum, negateSum(engine, b.sum)), a.length);
  return mismatchInDecision(a, b);
}

export function mismatchInDecision(a: Single, b: Single): never {
  return mismatch('only values of one kind can be compared', a, b, hintFor(a, b));
}

/** Sign of a real value; the order of others is asked in vain: `domain`. */
export function signOf(engine: Engine, value: Single): -1 | 0 | 1 {
  if (value.kind === 'angle') return engine.sign(value.turns);
  if (value.kind !== 'number')
    return fail('domain', `Only numbers and angles have an order, and this is ${describe(value)}.`);
  if (!isRealValue(engine, value))
    fail('domain', 'Only real values have an order, and the difference of these is not real.');
  return signOfSum(engine, value.sum);
}

/** -1, 0 or 1 as a is below, equal to or above b; both must be real and of one kind. */
export function compareValues(engine: Engine, a: Single, b: Single): -1 | 0 | 1 {
  for (const [value, side] of [
    [a, 'left'],
    [b, 'right'],
  ] as const) {
    if (isFigure(value))
      fail(
        'domain',
        `Only numbers and angles have an order, and the ${side} one is ${describe(value)}.`,
      );
    if (!isRealValue(engine, value))
      fail('domain', `Only real values have an order, and the ${side} one is not real.`);
  }
  return signOf(engine, differenceForDecision(engine, a, b));
}

/** Applies a change that keeps real and imaginary parts apart, such as conjugation, to every coefficient. */
export function mapNumber(
  engine: Engine,
  value: NumberValue,
  change: (coefficient: Num) => Num,
): NumberValue {
  return number(mapSum(engine, value.sum, change), value.length);
}
