import type { Engine, Num } from '../engine/index';
import { type None, none } from './none';
import { type Vector, cross, dot, isNull, minus, plus, quarter, square, times } from './vector';

/** A point by its exact real coordinates: x to the right, y upwards. */
export interface Point extends Vector {
  readonly kind: 'point';
}

/**
 * The line a x + b y + c = 0. The equation is scaled so that the first of a and b that is not 0 is 1: lines that are
 * equal have equal coefficients, and no square root comes in.
 */
export interface Line {
  readonly kind: 'line';
  readonly a: Num;
  readonly b: Num;
  readonly c: Num;
}

/** A circle by its centre and its radius, above 0. `square` is the square of the radius, kept as it is needed often. */
export interface Circle {
  readonly kind: 'circle';
  readonly centre: Point;
  readonly radius: Num;
  readonly square: Num;
}

export type Figure = Point | Line | Circle;

export const pointAt = ({ x, y }: Vector): Point => ({ kind: 'point', x, y });

/** The point with these coordinates; none when one is not real. */
export function makePoint(engine: Engine, x: Num, y: Num): Point | None {
  return engine.isReal(x) && engine.isReal(y) ? pointAt({ x, y }) : none('not-real');
}

/** The line a x + b y + c = 0; none when a coefficient is not real, or a and b are 0. Cost: two divisions. */
export function makeLine(engine: Engine, a: Num, b: Num, c: Num): Line | None {
  if (![a, b, c].every((coefficient) => engine.isReal(coefficient))) return none('not-real');
  return isNull(engine, { x: a, y: b }) ? none('no-line') : scaledLine(engine, { x: a, y: b }, c);
}

function scaledLine(engine: Engine, normal: Vector, c: Num): Line {
  const [zero, one] = [engine.integer(0n), engine.integer(1n)];
  if (engine.isZero(normal.x)) return { kind: 'line', a: zero, b: one, c: engine.div(c, normal.y) };
  const factor = engine.inverse(normal.x);
  return { kind: 'line', a: one, b: engine.mul(normal.y, factor), c: engine.mul(c, factor) };
}

/** The direction at right angles to a line, not null. */
export const normalOf = ({ a, b }: Line): Vector => ({ x: a, y: b });

/** The line at right angles to a direction that is not null, through a point. */
export function lineAcross(engine: Engine, normal: Vector, through: Vector): Line {
  return scaledLine(engine, normal, engine.neg(dot(engine, normal, through)));
}

/** The line through two points; none when they are the same. */
export function lineThrough(engine: Engine, p: Vector, q: Vector): Line | None {
  const along = minus(engine, q, p);
  return isNull(engine, along)
    ? none('same-points')
    : lineAcross(engine, quarter(engine, along), p);
}

/** a x + b y + c at a point: 0 exactly when the point lies on the line. */
export function equationAt(engine: Engine, line: Line, point: Vector): Num {
  return engine.add(dot(engine, normalOf(line), point), line.c);
}

/** The circle of this centre and radius; none unless the radius is real and above 0. */
export function makeCircle(engine: Engine, centre: Point, radius: Num): Circle | None {
  if (!engine.isReal(radius)) return none('not-real');
  if (engine.sign(radius) <= 0) return none('no-radius');
  return { kind: 'circle', centre, radius, square: engine.mul(radius, radius) };
}

/** The circle about a centre that passes through another point. Cost: one square root. */
export function circleThrough(engine: Engine, centre: Point, point: Vector): Circle | None {
  const radiusSquared = square(engine, minus(engine, point, centre));
  if (engine.isZero(radiusSquared)) return none('no-radius');
  return { kind: 'circle', centre, radius: engine.sqrt(radiusSquared), square: radiusSquared };
}

/**
 * The circle through three points; none when they lie in one line.
 * With p and q from the first point to the others, its centre lies from there by (p²·q - q²·p) turned a quarter
 * backwards, over 2 p×q. Cost: one division, one square root.
 */
export function circleOfThree(engine: Engine, a: Vector, b: Vector, c: Vector): Circle | None {
  const [p, q] = [minus(engine, b, a), minus(engine, c, a)];
  const area = cross(engine, p, q);
  if (engine.isZero(area)) return none('in-line');
  const weighted = minus(
    engine,
    times(engine, square(engine, q), p),
    times(engine, square(engine, p), q),
  );
  const factor = engine.inverse(engine.mul(engine.integer(2n), area));
  const reach = times(engine, factor, quarter(engine, weighted));
  const radiusSquared = square(engine, reach);
  return {
    kind: 'circle',
    centre: pointAt(plus(engine, a, reach)),
    radius: engine.sqrt(radiusSquared),
    square: radiusSquared,
  };
}

/** Whether two figures of one kind are the same, exactly; figures of two kinds never are. */
export function areEqual(engine: Engine, f: Figure, g: Figure): boolean {
  if (f.kind === 'point' && g.kind === 'point')
    return engine.equal(f.x, g.x) && engine.equal(f.y, g.y);
  if (f.kind === 'line' && g.kind === 'line')
    return engine.equal(f.a, g.a) && engine.equal(f.b, g.b) && engine.equal(f.c, g.c);
  if (f.kind === 'circle' && g.kind === 'circle')
    return areEqual(engine, f.centre, g.centre) && engine.equal(f.square, g.square);
  return false;
}
