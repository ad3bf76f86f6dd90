import fc from 'fast-check';
import { type Engine, type Num, createEngine } from '@/lib/engine/index';
import {
  type Circle,
  type Line,
  type None,
  type Point,
  isNone,
  makeCircle,
  makeLine,
  makePoint,
} from '@/lib/geometry/index';

/** n/d + m√k, before it belongs to an engine. */
export interface Surd {
  n: number;
  d: number;
  m: number;
  k: number;
}

export const surds: fc.Arbitrary<Surd> = fc.record({
  n: fc.integer({ min: -12, max: 12 }),
  d: fc.integer({ min: 1, max: 5 }),
  m: fc.constantFrom(0, 0, 0, 1, -2),
  k: fc.constantFrom(2, 3),
});

export type Pair = readonly [Surd, Surd];
export const pairs: fc.Arbitrary<Pair> = fc.tuple(surds, surds);

export function surd(engine: Engine, { n, d, m, k }: Surd): Num {
  const root = engine.mul(engine.integer(m), engine.sqrt(engine.integer(k)));
  return engine.add(engine.rational(BigInt(n), BigInt(d)), root);
}

/** What a construction gives; a test that meets none where there must be something fails with the reason. */
export function got<T extends object>(outcome: T | None): Exclude<T, None> {
  if (isNone(outcome)) throw new Error(`Nothing was constructed: ${outcome.why}.`);
  return outcome as Exclude<T, None>;
}

export const point = (engine: Engine, [x, y]: Pair): Point =>
  got(makePoint(engine, surd(engine, x), surd(engine, y)));

export function pointOf(engine: Engine, x: number, y: number): Point {
  return got(makePoint(engine, engine.integer(x), engine.integer(y)));
}

export function lineOf(engine: Engine, a: number, b: number, c: number): Line {
  return got(makeLine(engine, engine.integer(a), engine.integer(b), engine.integer(c)));
}

export function circleOf(engine: Engine, x: number, y: number, radius: number): Circle {
  return got(makeCircle(engine, pointOf(engine, x, y), engine.integer(radius)));
}

/** Runs a law in one engine; a limit fails it. */
export function inEngine(check: (engine: Engine) => void): void {
  const engine = createEngine();
  const outcome = engine.attempt(() => check(engine));
  if (outcome.kind !== 'value') throw new Error(`${outcome.kind}: ${outcome.message}`);
}
