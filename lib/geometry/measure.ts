import type { Engine, Num } from '../engine/index';
import { type Line, type Point, equationAt, normalOf } from './figures';
import { type None, none } from './none';
import { type Vector, dot, isNull, minus, square } from './vector';

/** Distance of two points. Cost: one square root. */
export function distance(engine: Engine, p: Vector, q: Vector): Num {
  return engine.sqrt(square(engine, minus(engine, p, q)));
}

/** Distance of a point from a line, along the perpendicular. Cost: one square root. */
export function distanceToLine(engine: Engine, point: Vector, line: Line): Num {
  const reach = engine.abs(equationAt(engine, line, point));
  return engine.div(reach, engine.sqrt(square(engine, normalOf(line))));
}

/** Cosine of the angle at a vertex between the directions to two points; none when one of them is the vertex. */
export function cosineAt(engine: Engine, a: Point, vertex: Point, b: Point): Num | None {
  const [p, q] = [minus(engine, a, vertex), minus(engine, b, vertex)];
  return isNull(engine, p) || isNull(engine, q) ? none('no-side') : cosineBetween(engine, p, q);
}

/** Cosine of the angle between two lines, the one that is not obtuse. */
export function cosineOfLines(engine: Engine, f: Line, g: Line): Num {
  return engine.abs(cosineBetween(engine, normalOf(f), normalOf(g)));
}

function cosineBetween(engine: Engine, p: Vector, q: Vector): Num {
  const sizes = engine.mul(square(engine, p), square(engine, q));
  return engine.div(dot(engine, p, q), engine.sqrt(sizes));
}
