import type { Engine, Num } from '../engine/index';
import {
  type Circle,
  type Line,
  type Point,
  areEqual,
  equationAt,
  makeLine,
  normalOf,
  pointAt,
} from './figures';
import { distanceToLine } from './measure';
import { type None, isNone, none } from './none';
import { cross, minus, plus, quarter, square, times } from './vector';

/** One point where two figures cross or touch, or two: the left one first, or the lower one where they stand one above the other. */
export type Meets = readonly [Point] | readonly [Point, Point];

/**
 * Where two lines or circles meet, decided exactly: touching is told from missing or cutting by however little.
 * The order of the two points does not depend on the order of the figures. None when they do not meet, with the
 * distance that is missed, or when they are the same.
 * Cost: rational operations of the coefficients, and one square root for two points.
 */
export function meetOf(engine: Engine, f: Line | Circle, g: Line | Circle): Meets | None {
  if (f.kind === 'line')
    return g.kind === 'line' ? meetLines(engine, f, g) : meetLineCircle(engine, f, g);
  return g.kind === 'line' ? meetLineCircle(engine, g, f) : meetCircles(engine, f, g);
}

/** The single point that is asked for: the first or second one, or the one nearest to a point; a single meeting is any of them. */
export function meetAt(
  engine: Engine,
  f: Line | Circle,
  g: Line | Circle,
  which: 1 | 2 | Point | null,
): Point | None {
  const meets = meetOf(engine, f, g);
  if (isNone(meets)) return meets;
  const [first, second = null] = meets;
  if (second === null) return first;
  if (which === null) return none('two-meets');
  if (typeof which === 'number') return which === 1 ? first : second;
  const order = engine.compare(
    square(engine, minus(engine, first, which)),
    square(engine, minus(engine, second, which)),
  );
  if (order === 0) return none('equally-near');
  return order < 0 ? first : second;
}

/** By Cramer's rule. */
function meetLines(engine: Engine, f: Line, g: Line): Meets | None {
  const area = cross(engine, normalOf(f), normalOf(g));
  if (engine.isZero(area)) {
    if (areEqual(engine, f, g)) return none('same-lines');
    return { kind: 'none', why: 'parallel', gap: gapOfParallels(engine, f, g) };
  }
  const factor = engine.inverse(area);
  const minor = (p: Num, q: Num, r: Num, s: Num): Num =>
    engine.mul(factor, engine.sub(engine.mul(p, s), engine.mul(q, r)));
  return [pointAt({ x: minor(f.b, f.c, g.b, g.c), y: minor(f.c, f.a, g.c, g.a) })];
}

/** Distance of two lines: 0 unless they are parallel. Cost: one square root. */
export function distanceOfLines(engine: Engine, f: Line, g: Line): Num {
  const parallel = engine.isZero(cross(engine, normalOf(f), normalOf(g)));
  return parallel ? gapOfParallels(engine, f, g) : engine.integer(0n);
}

/** Parallel lines have the same a and b, as their equations are scaled alike. */
function gapOfParallels(engine: Engine, f: Line, g: Line): Num {
  const between = engine.abs(engine.sub(f.c, g.c));
  return engine.div(between, engine.sqrt(square(engine, normalOf(f))));
}

/**
 * From the foot of the centre on the line half the chord either way. With e the equation at the centre and n the normal,
 * (half chord / |n|)² = (r² n² - e²) / n⁴, whose sign decides.
 */
function meetLineCircle(engine: Engine, line: Line, circle: Circle): Meets | None {
  const normal = normalOf(line);
  const size = square(engine, normal);
  const equation = equationAt(engine, line, circle.centre);
  const room = engine.sub(engine.mul(circle.square, size), engine.mul(equation, equation));
  const sign = engine.sign(room);
  if (sign < 0) {
    const gap = engine.sub(distanceToLine(engine, circle.centre, line), circle.radius);
    return { kind: 'none', why: 'passes', gap };
  }
  const shift = engine.div(equation, size);
  const foot = minus(engine, circle.centre, times(engine, shift, normal));
  if (sign === 0) return [pointAt(foot)];
  const reach = times(engine, engine.div(engine.sqrt(room), size), quarter(engine, normal));
  const [ahead, behind] = [pointAt(plus(engine, foot, reach)), pointAt(minus(engine, foot, reach))];
  const side = engine.sign(reach.x) || engine.sign(reach.y);
  return side > 0 ? [behind, ahead] : [ahead, behind];
}

/** On the line of the points that have the same power to both circles: the difference of their equations. */
function meetCircles(engine: Engine, f: Circle, g: Circle): Meets | None {
  if (areEqual(engine, f, g)) return none('same-circles');
  const between = square(engine, minus(engine, g.centre, f.centre));
  const [sum, difference] = [
    engine.add(f.radius, g.radius),
    engine.abs(engine.sub(f.radius, g.radius)),
  ];
  const outer = engine.compare(between, engine.mul(sum, sum));
  if (outer > 0) {
    return { kind: 'none', why: 'apart', gap: engine.sub(engine.sqrt(between), sum) };
  }
  const inner = engine.compare(between, engine.mul(difference, difference));
  if (inner < 0) {
    return { kind: 'none', why: 'inside', gap: engine.sub(difference, engine.sqrt(between)) };
  }
  const two = engine.integer(2n);
  const power = ({ centre, square: radiusSquared }: Circle): Num =>
    engine.sub(square(engine, centre), radiusSquared);
  const along = times(engine, two, minus(engine, g.centre, f.centre));
  const radical = makeLine(engine, along.x, along.y, engine.sub(power(f), power(g)));
  // The centres differ, or the circles would be the same or one inside the other.
  return isNone(radical) ? radical : meetLineCircle(engine, radical, f);
}
