import type { Engine, Num } from '../engine/index';
import {
  type Figure,
  type Line,
  type Point,
  equationAt,
  lineAcross,
  normalOf,
  pointAt,
} from './figures';
import { type Vector, dot, minus, plus, square, times } from './vector';

/** k/n of a turn, anticlockwise; n is not 0. */
export interface TurnPart {
  readonly k: bigint;
  readonly n: bigint;
}

/** A movement of the plane that keeps lengths, by what it does to directions and to points. */
interface Movement {
  readonly direction: (v: Vector) => Vector;
  readonly place: (p: Vector) => Vector;
}

function move<F extends Figure>(engine: Engine, figure: F, movement: Movement): F;
function move(engine: Engine, figure: Figure, { direction, place }: Movement): Figure {
  switch (figure.kind) {
    case 'point':
      return pointAt(place(figure));
    case 'circle':
      return { ...figure, centre: pointAt(place(figure.centre)) };
    case 'line':
      return lineAcross(engine, direction(normalOf(figure)), place(pointOf(engine, figure)));
  }
}

/** A point of the line: where it crosses an axis. */
function pointOf(engine: Engine, { a, c }: Line): Vector {
  const [zero, cut] = [engine.integer(0n), engine.neg(c)];
  return engine.isZero(a) ? { x: zero, y: cut } : { x: cut, y: zero };
}

function turn(engine: Engine, { k, n }: TurnPart): (v: Vector) => Vector {
  const [cos, sin] = [engine.cosTurn(k, n), engine.sinTurn(k, n)];
  return ({ x, y }) => ({
    x: engine.sub(engine.mul(cos, x), engine.mul(sin, y)),
    y: engine.add(engine.mul(sin, x), engine.mul(cos, y)),
  });
}

/**
 * A figure turned about a point by an exact part of a turn, anticlockwise.
 * Cost: cosine and sine of the division, and four products; over a limit where the engine's divisions end.
 */
export function rotate<F extends Figure>(
  engine: Engine,
  figure: F,
  part: TurnPart,
  about: Vector,
): F {
  const direction = turn(engine, part);
  const place = (p: Vector): Vector => plus(engine, about, direction(minus(engine, p, about)));
  return move(engine, figure, { direction, place });
}

/** A figure mirrored in a line. */
export function reflectInLine<F extends Figure>(engine: Engine, figure: F, mirror: Line): F {
  const normal = normalOf(mirror);
  const factor = engine.div(engine.integer(2n), square(engine, normal));
  const back = (v: Vector, reach: Num): Vector =>
    minus(engine, v, times(engine, engine.mul(factor, reach), normal));
  return move(engine, figure, {
    direction: (v) => back(v, dot(engine, normal, v)),
    place: (p) => back(p, equationAt(engine, mirror, p)),
  });
}

/** A figure mirrored in a point: turned by half a turn. */
export function reflectInPoint<F extends Figure>(engine: Engine, figure: F, centre: Vector): F {
  const twice = times(engine, engine.integer(2n), centre);
  return move(engine, figure, {
    direction: (v) => v,
    place: (p) => minus(engine, twice, p),
  });
}

/** The point at this distance from the origin, its direction measured anticlockwise from that of the x-axis. */
export function polar(engine: Engine, radius: Num, part: TurnPart): Point {
  return pointAt(
    times(engine, radius, { x: engine.cosTurn(part.k, part.n), y: engine.sinTurn(part.k, part.n) }),
  );
}

/**
 * n ≥ 1 points that divide a circle equally, anticlockwise from the direction `start`.
 * Cost: a cosine and a sine for each point.
 */
export function ring(
  engine: Engine,
  centre: Vector,
  radius: Num,
  parts: number,
  start: TurnPart,
): Point[] {
  const n = BigInt(parts);
  return Array.from({ length: parts }, (_, index) => {
    const part = { k: start.k * n + BigInt(index) * start.n, n: start.n * n };
    return pointAt(plus(engine, centre, polar(engine, radius, part)));
  });
}
