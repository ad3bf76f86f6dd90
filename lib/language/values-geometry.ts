import type { Engine, Num } from '../engine/index';
import type { Circle, Figure, Line, Point } from '../geometry/index';
import { areEqual, pointAt } from '../geometry/index';
import { fail } from './failure';
import { asAlgebraic } from './pi-sum';
import type { NumberValue, Value } from './values';

/**
 * Points, lines and circles as values. `length` is 1 when their coordinates are lengths in millimetres and 0 when they
 * are plain numbers. In the equation of a line a and b are plain and c is of that unit.
 */
export type FigureValue = FigureOf<Point> | FigureOf<Line> | FigureOf<Circle>;
export type PointFigure = FigureOf<Point>;
export type LineFigure = FigureOf<Line>;
export type CircleFigure = FigureOf<Circle>;

interface FigureOf<F extends Figure> {
  readonly kind: F['kind'];
  readonly figure: F;
  readonly length: Length;
}

export type Length = 0 | 1;

export function figureValue(figure: Point, length: Length): PointFigure;
export function figureValue(figure: Line, length: Length): LineFigure;
export function figureValue(figure: Circle, length: Length): CircleFigure;
export function figureValue(figure: Figure, length: Length): FigureValue;
export function figureValue(figure: Figure, length: Length): FigureValue {
  return { kind: figure.kind, figure, length } as FigureValue;
}

export const isFigure = (value: Value): value is FigureValue =>
  value.kind === 'point' || value.kind === 'line' || value.kind === 'circle';

export function describeFigure(value: FigureValue): string {
  return value.length === 1 ? `a ${value.kind}` : `a ${value.kind} without a unit`;
}

/** Whether a plain value is 0 or lies through the origin, so that it is the same with any unit. */
export function fitsAnyUnit(engine: Engine, value: NumberValue | FigureValue): boolean {
  if (value.length !== 0) return false;
  switch (value.kind) {
    case 'number':
      return value.sum.size === 0;
    case 'point':
      return engine.isZero(value.figure.x) && engine.isZero(value.figure.y);
    case 'line':
      return engine.isZero(value.figure.c);
    case 'circle':
      return false;
  }
}

/** Points are added as vectors from the origin; null when the two do not go together. */
export function addPoints(engine: Engine, a: PointFigure, b: PointFigure): PointFigure | null {
  const length = fitsAnyUnit(engine, a) ? b.length : a.length;
  if (length !== b.length && !fitsAnyUnit(engine, b)) return null;
  const [p, q] = [a.figure, b.figure];
  return figureValue(pointAt({ x: engine.add(p.x, q.x), y: engine.add(p.y, q.y) }), length);
}

/** A point times a real number: the vector from the origin, scaled. A point without a unit may be given one. */
export function scalePoint(engine: Engine, point: PointFigure, factor: NumberValue): PointFigure {
  const length = point.length + factor.length;
  if (length !== 0 && length !== 1) {
    return fail(
      'unit-mismatch',
      `The point would have coordinates in mm^${length}; coordinates are lengths or plain numbers.`,
    );
  }
  const number = needRealFactor(engine, factor);
  const { x, y } = point.figure;
  return figureValue(pointAt({ x: engine.mul(number, x), y: engine.mul(number, y) }), length);
}

function needRealFactor(engine: Engine, factor: NumberValue): Num {
  const algebraic = asAlgebraic(engine, factor.sum);
  if (algebraic === null) {
    return fail(
      'not-exact',
      'A point times a value with π in it has no exact form here; a factor without π was expected.',
    );
  }
  if (!engine.isReal(algebraic)) {
    return fail('domain', 'A point is multiplied only by a real number; this factor is not real.');
  }
  return algebraic;
}

/** Exact equality of two figures of one kind and unit; `unit-mismatch` for others. */
export function areEqualFigures(engine: Engine, a: FigureValue, b: FigureValue): boolean | null {
  if (a.kind !== b.kind) return null;
  if (a.length !== b.length && !fitsAnyUnit(engine, a) && !fitsAnyUnit(engine, b)) return null;
  return areEqual(engine, a.figure, b.figure);
}
