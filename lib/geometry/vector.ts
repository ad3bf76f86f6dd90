import type { Engine, Num } from '../engine/index';

/** Two exact real coordinates. */
export interface Vector {
  readonly x: Num;
  readonly y: Num;
}

export const plus = (engine: Engine, p: Vector, q: Vector): Vector => ({
  x: engine.add(p.x, q.x),
  y: engine.add(p.y, q.y),
});

export const minus = (engine: Engine, p: Vector, q: Vector): Vector => ({
  x: engine.sub(p.x, q.x),
  y: engine.sub(p.y, q.y),
});

export const times = (engine: Engine, factor: Num, p: Vector): Vector => ({
  x: engine.mul(factor, p.x),
  y: engine.mul(factor, p.y),
});

/** The vector turned by a quarter, anticlockwise. */
export const quarter = (engine: Engine, p: Vector): Vector => ({ x: engine.neg(p.y), y: p.x });

export const dot = (engine: Engine, p: Vector, q: Vector): Num =>
  engine.add(engine.mul(p.x, q.x), engine.mul(p.y, q.y));

/** Twice the area of the triangle of the two, positive when the second lies anticlockwise of the first. */
export const cross = (engine: Engine, p: Vector, q: Vector): Num =>
  engine.sub(engine.mul(p.x, q.y), engine.mul(p.y, q.x));

export const square = (engine: Engine, p: Vector): Num => dot(engine, p, p);

export const isNull = (engine: Engine, p: Vector): boolean =>
  engine.isZero(p.x) && engine.isZero(p.y);
