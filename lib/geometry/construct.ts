import type { Engine } from '../engine/index';
import { type Line, type Point, equationAt, lineAcross, normalOf, pointAt } from './figures';
import { type None, none } from './none';
import { type Vector, isNull, minus, plus, quarter, square, times } from './vector';

/** The middle of two points. */
export function middle(engine: Engine, p: Vector, q: Vector): Point {
  return pointAt(times(engine, engine.rational(1n, 2n), plus(engine, p, q)));
}

/** The foot of the perpendicular from a point: the point of the line nearest to it. Cost: one division, no root. */
export function footOf(engine: Engine, point: Vector, line: Line): Point {
  const normal = normalOf(line);
  const shift = engine.div(equationAt(engine, line, point), square(engine, normal));
  return pointAt(minus(engine, point, times(engine, shift, normal)));
}

/** The line at right angles to a line, through a point on it or off it. */
export function perpendicular(engine: Engine, line: Line, point: Vector): Line {
  return lineAcross(engine, quarter(engine, normalOf(line)), point);
}

/** The line parallel to a line through a point; the line itself when the point lies on it. */
export function parallelThrough(engine: Engine, line: Line, point: Vector): Line {
  return lineAcross(engine, normalOf(line), point);
}

/** The line of all points equally far from two; none when they are the same. */
export function bisectPoints(engine: Engine, p: Vector, q: Vector): Line | None {
  const across = minus(engine, q, p);
  return isNull(engine, across)
    ? none('same-points')
    : lineAcross(engine, across, middle(engine, p, q));
}

/**
 * The line that halves the angle at a vertex between the directions p, q to two points; none when one is the vertex.
 * It runs along p + q·|p|/|q|, so one square root is enough; sides that lie opposite each other have it across them.
 */
export function bisectAngle(engine: Engine, a: Vector, vertex: Vector, b: Vector): Line | None {
  const [p, q] = [minus(engine, a, vertex), minus(engine, b, vertex)];
  if (isNull(engine, p) || isNull(engine, q)) return none('no-side');
  const ratio = engine.sqrt(engine.div(square(engine, p), square(engine, q)));
  const along = plus(engine, p, times(engine, ratio, q));
  return lineAcross(engine, isNull(engine, along) ? p : quarter(engine, along), vertex);
}
