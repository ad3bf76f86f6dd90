import type { Engine, Num } from '../../engine/index';
import {
  cosineAt,
  cosineOfLines,
  distance,
  distanceOfLines,
  distanceToLine,
} from '../../geometry/index';
import { fail } from '../failure';
import { fromNum } from '../pi-sum';
import { type AngleValue, type NumberValue, type Value, angle, number } from '../values';
import { aboutDegrees } from './about-degrees';
import { findTurnsWithCosine } from './circular';
import { commonLength, failKind, needLine, needPoint, settle } from './figure-arguments';

type Arguments = readonly Value[];

/** `dist(A, B)` of two points, of a point and a line in either order, or of two lines: 0 unless they are parallel. */
export function dist(engine: Engine, [first, second]: Arguments): NumberValue {
  const need = 'dist needs points or lines';
  const [p, q] = [first, second].map((value) =>
    value?.kind === 'point' || value?.kind === 'line' ? value : failKind(value, need),
  ) as [PointOrLine, PointOrLine];
  const length = commonLength(engine, 'dist', [p, q]);
  return number(fromNum(engine, distanceOf(engine, p, q)), length);
}

type PointOrLine = ReturnType<typeof needPoint> | ReturnType<typeof needLine>;

function distanceOf(engine: Engine, p: PointOrLine, q: PointOrLine): Num {
  if (p.kind === 'point')
    return q.kind === 'point'
      ? distance(engine, p.figure, q.figure)
      : distanceToLine(engine, p.figure, q.figure);
  return q.kind === 'point'
    ? distanceToLine(engine, q.figure, p.figure)
    : distanceOfLines(engine, p.figure, q.figure);
}

/**
 * `angle(P, V, Q)` at the vertex V, from 0 to half a turn; `angle(g, h)` between two lines, from 0 to a quarter.
 * `not-exact` when it is no rational part of a turn; the sentence then gives its exact cosine where that is short.
 */
export function angleBetween(engine: Engine, [first, second, third]: Arguments): AngleValue {
  if (third === undefined) {
    const need = 'angle needs two lines, or three points with the vertex second';
    const [g, h] = [needLine(first, need), needLine(second, need)];
    commonLength(engine, 'angle', [g, h]);
    return angleWith(engine, cosineOfLines(engine, g.figure, h.figure));
  }
  const need = 'angle at a vertex needs three points, the vertex second';
  const [p, v, q] = [needPoint(first, need), needPoint(second, need), needPoint(third, need)];
  const length = commonLength(engine, 'angle', [p, v, q]);
  return angleWith(engine, settle(engine, cosineAt(engine, p.figure, v.figure, q.figure), length));
}

const LONGEST_COSINE = 60;

function angleWith(engine: Engine, cosine: Num): AngleValue {
  const turns = findTurnsWithCosine(engine, cosine);
  if (turns !== null) return angle(turns);
  const { text } = engine.write(cosine);
  const known = text.length <= LONGEST_COSINE ? `is \`${text}\`` : 'can be had from `dist`';
  const degrees = aboutDegrees(engine, cosine);
  const size = degrees === null ? '' : `, about ${degrees} deg,`;
  return fail(
    'not-exact',
    `This angle${size} is not a rational part of a turn, so it has no exact measure; its cosine ${known}.`,
  );
}
