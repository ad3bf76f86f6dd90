import type { Engine, Num } from '../../engine/index';
import { type None, explainNone, isNone } from '../../geometry/index';
import { fail } from '../failure';
import { asAlgebraic } from '../pi-sum';
import { type NumberValue, type Value, describe } from '../values';
import {
  type CircleFigure,
  type FigureValue,
  type Length,
  type LineFigure,
  type PointFigure,
  fitsAnyUnit,
  isFigure,
} from '../values-geometry';

/** What functions of geometry take, with the sentences for what does not fit. `need` begins the sentence. */

export function needPoint(value: Value | undefined, need: string): PointFigure {
  return value?.kind === 'point' ? value : failKind(value, need);
}

export function needLine(value: Value | undefined, need: string): LineFigure {
  return value?.kind === 'line' ? value : failKind(value, need);
}

export function needCircle(value: Value | undefined, need: string): CircleFigure {
  return value?.kind === 'circle' ? value : failKind(value, need);
}

export function needFigure(value: Value | undefined, need: string): FigureValue {
  return value !== undefined && isFigure(value) ? value : failKind(value, need);
}

export function failKind(value: Value | undefined, need: string): never {
  const met = value === undefined ? 'nothing' : describe(value);
  return fail('unit-mismatch', `${need}, and this is ${met}.`);
}

/** A length or a plain number, algebraic and real; `unit-mismatch`, `not-exact` or `domain` otherwise. */
export function needCoordinate(
  engine: Engine,
  value: Value | undefined,
  need: string,
): NumberValue & { readonly num: Num } {
  if (value?.kind !== 'number' || (value.length !== 0 && value.length !== 1))
    return failKind(value, `${need} that is a length or a plain number`);
  const num = asAlgebraic(engine, value.sum);
  if (num === null)
    return fail('not-exact', `${need} without π in it; with π there is no exact figure here.`);
  if (!engine.isReal(num)) fail('domain', `${need} that is real, and this one is not.`);
  return { ...value, num };
}

/** A plain whole number, or null. */
export function findWhole(engine: Engine, value: Value): bigint | null {
  const plain =
    value.kind === 'number' && value.length === 0 ? asAlgebraic(engine, value.sum) : null;
  const rational = plain === null ? null : engine.asRational(plain);
  return rational?.d === 1n ? rational.n : null;
}

/**
 * The one unit of all parts of a figure: all lengths, or all plain numbers. What is 0 or passes through the origin
 * fits both, so `point(0, 0)` goes with lengths.
 */
export function commonLength(
  engine: Engine,
  name: string,
  values: readonly (NumberValue | FigureValue)[],
): Length {
  const settled = values.filter((value) => !fitsAnyUnit(engine, value));
  const [first, ...others] = settled.length > 0 ? settled : values;
  const other = others.find((value) => first !== undefined && value.length !== first.length);
  if (first !== undefined && other !== undefined) {
    fail(
      'unit-mismatch',
      `\`${name}\` was given ${describe(first)} together with ${describe(other)}; lengths go with lengths and plain numbers with plain numbers.`,
    );
  }
  return first?.length === 1 ? 1 : 0;
}

/** The outcome of a construction, or its failure in one sentence; distances in it are in millimetres. */
export function settle<T extends object>(
  engine: Engine,
  outcome: T | None,
  length: Length,
): Exclude<T, None> {
  if (!isNone(outcome)) return outcome as Exclude<T, None>;
  const sentence = explainNone(outcome, (gap) => {
    const { re, terminates } = engine.decimal(gap, 4);
    return `${terminates ? '' : 'about '}${re}${length === 1 ? ' mm' : ''}`;
  });
  return fail('domain', sentence);
}
