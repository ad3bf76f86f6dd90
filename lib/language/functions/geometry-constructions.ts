import type { Engine } from '../../engine/index';
import {
  type Point,
  bisectAngle,
  bisectPoints,
  footOf,
  meetAt,
  middle,
  parallelThrough,
  perpendicular,
  pointAt,
  reflectInLine,
  reflectInPoint,
  rotate,
} from '../../geometry/index';
import { fail } from '../failure';
import type { Value } from '../values';
import {
  type CircleFigure,
  type LineFigure,
  type PointFigure,
  figureValue,
} from '../values-geometry';
import { partOfTurn } from './circular';
import {
  commonLength,
  failKind,
  findWhole,
  needFigure,
  needLine,
  needPoint,
  settle,
} from './figure-arguments';

type Arguments = readonly Value[];

/**
 * `meet(f, g)` of two lines or circles; where they have two points, `meet(f, g, 1)` is the left one (the lower one, if
 * they stand one above the other), `meet(f, g, 2)` the other and `meet(f, g, P)` the one nearer to P.
 */
export function meet(engine: Engine, [first, second, third]: Arguments): PointFigure {
  const f = needCurve(first);
  const g = needCurve(second);
  const near = third?.kind === 'point' ? [third] : [];
  const length = commonLength(engine, 'meet', [f, g, ...near]);
  const which = third === undefined ? null : whichMeet(engine, third);
  return figureValue(settle(engine, meetAt(engine, f.figure, g.figure, which), length), length);
}

function needCurve(value: Value | undefined): LineFigure | CircleFigure {
  return value?.kind === 'line' || value?.kind === 'circle'
    ? value
    : failKind(value, 'meet needs two lines or circles');
}

function whichMeet(engine: Engine, value: Value): 1 | 2 | Point {
  if (value.kind === 'point') return value.figure;
  const whole = findWhole(engine, value);
  if (whole === 1n) return 1;
  if (whole === 2n) return 2;
  return fail(
    'domain',
    'meet takes 1, 2 or a point as its third argument, to say which point of meeting it is.',
  );
}

/** `mid(P, Q)`. */
export function mid(engine: Engine, [first, second]: Arguments): PointFigure {
  const p = needPoint(first, 'mid needs two points');
  const q = needPoint(second, 'mid needs two points');
  return figureValue(middle(engine, p.figure, q.figure), commonLength(engine, 'mid', [p, q]));
}

/** A line and a point, in either order. */
function lineAndPoint(
  engine: Engine,
  name: string,
  [first, second]: Arguments,
): { line: LineFigure; point: PointFigure; length: 0 | 1 } {
  const [one, other] = first?.kind === 'point' ? [second, first] : [first, second];
  const line = needLine(one, `${name} needs a line and a point`);
  const point = needPoint(other, `${name} needs a line and a point`);
  return { line, point, length: commonLength(engine, name, [line, point]) };
}

/** `foot(P, line)`: the point of the line nearest to P. */
export function foot(engine: Engine, args: Arguments): PointFigure {
  const { line, point, length } = lineAndPoint(engine, 'foot', args);
  return figureValue(footOf(engine, point.figure, line.figure), length);
}

/** `perp(line, P)`: at right angles to the line, through P. */
export function perp(engine: Engine, args: Arguments): LineFigure {
  const { line, point, length } = lineAndPoint(engine, 'perp', args);
  return figureValue(perpendicular(engine, line.figure, point.figure), length);
}

/** `parallel(line, P)`: through P. */
export function parallel(engine: Engine, args: Arguments): LineFigure {
  const { line, point, length } = lineAndPoint(engine, 'parallel', args);
  return figureValue(parallelThrough(engine, line.figure, point.figure), length);
}

/** `bisect(P, Q)`: all points as far from P as from Q. `bisect(P, V, Q)`: the line that halves the angle at V. */
export function bisect(engine: Engine, [first, second, third]: Arguments): LineFigure {
  const need = 'bisect needs two points, or three with the vertex of the angle second';
  const p = needPoint(first, need);
  const q = needPoint(second, need);
  if (third === undefined) {
    const length = commonLength(engine, 'bisect', [p, q]);
    return figureValue(settle(engine, bisectPoints(engine, p.figure, q.figure), length), length);
  }
  const s = needPoint(third, need);
  const length = commonLength(engine, 'bisect', [p, q, s]);
  const found = bisectAngle(engine, p.figure, q.figure, s.figure);
  return figureValue(settle(engine, found, length), length);
}

/** `rotate(figure, angle, C)`: anticlockwise about C, or about the origin. */
export function rotateFigure(engine: Engine, [first, second, third]: Arguments): Value {
  const value = needFigure(first, 'rotate needs a point, a line or a circle first');
  const part = partOfTurn(engine, second as Value);
  const about = third === undefined ? [] : [needPoint(third, 'rotate needs a point to turn about')];
  const zero = engine.integer(0n);
  const centre = about[0]?.figure ?? pointAt({ x: zero, y: zero });
  const length = commonLength(engine, 'rotate', [value, ...about]);
  return figureValue(rotate(engine, value.figure, part, centre), length);
}

/** `reflect(figure, mirror)` in a line or a point. */
export function reflect(engine: Engine, [first, second]: Arguments): Value {
  const value = needFigure(first, 'reflect needs a point, a line or a circle first');
  const mirror = needFigure(second, 'reflect needs a line or a point as its mirror');
  if (mirror.kind === 'circle') failKind(mirror, 'reflect needs a line or a point as its mirror');
  const length = commonLength(engine, 'reflect', [value, mirror]);
  const figure =
    mirror.kind === 'line'
      ? reflectInLine(engine, value.figure, mirror.figure)
      : reflectInPoint(engine, value.figure, mirror.figure);
  return figureValue(figure, length);
}
