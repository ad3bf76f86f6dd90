import type { Engine } from '../../engine/index';
import {
  circleOfThree,
  circleThrough,
  lineThrough,
  makeCircle,
  makeLine,
  makePoint,
  polar,
  ring,
} from '../../geometry/index';
import { fail } from '../failure';
import { LANGUAGE_LIMITS } from '../limits';
import { list } from '../lists';
import { type NumberValue, type Value, number } from '../values';
import { fromNum } from '../pi-sum';
import { figureValue } from '../values-geometry';
import { partOfTurn } from './circular';
import {
  commonLength,
  findWhole,
  needCircle,
  needCoordinate,
  needPoint,
  settle,
} from './figure-arguments';

type Arguments = readonly Value[];

/** `point(x, y)`. */
export function point(engine: Engine, [first, second]: Arguments): Value {
  const x = needCoordinate(engine, first, 'point needs an x');
  const y = needCoordinate(engine, second, 'point needs a y');
  const length = commonLength(engine, 'point', [x, y]);
  return figureValue(settle(engine, makePoint(engine, x.num, y.num), length), length);
}

/** `polar(R, angle)`: the angle is measured anticlockwise from the x-axis. */
export function polarPoint(engine: Engine, [first, second]: Arguments): Value {
  const radius = needCoordinate(engine, first, 'polar needs a distance');
  const part = partOfTurn(engine, second as Value);
  return figureValue(polar(engine, radius.num, part), commonLength(engine, 'polar', [radius]));
}

/** `line(P, Q)` through two points, or `line(a, b, c)` with the equation a x + b y + c = 0, a and b plain. */
export function line(engine: Engine, args: Arguments): Value {
  const [first, second, third] = args;
  if (third === undefined) {
    const p = needPoint(first, 'line needs two points, or the numbers a, b, c of its equation');
    const q = needPoint(second, 'line needs a second point');
    const length = commonLength(engine, 'line', [p, q]);
    return figureValue(settle(engine, lineThrough(engine, p.figure, q.figure), length), length);
  }
  const [a, b, c] = [first, second, third].map((value) =>
    needCoordinate(engine, value, 'line needs coefficients'),
  ) as [Coordinate, Coordinate, Coordinate];
  const plain = commonLength(engine, 'line', [a, b, number(fromNum(engine, engine.integer(1n)))]);
  const length = commonLength(engine, 'line', [c]);
  return figureValue(settle(engine, makeLine(engine, a.num, b.num, c.num), plain), length);
}

type Coordinate = ReturnType<typeof needCoordinate>;

/** `circle(C, R)` by its radius, `circle(C, P)` through a point, `circle(P, Q, S)` through three points. */
export function circle(engine: Engine, [first, second, third]: Arguments): Value {
  const p = needPoint(first, 'circle needs a point first');
  if (third !== undefined) {
    const q = needPoint(second, 'circle through three points needs a second point');
    const s = needPoint(third, 'circle through three points needs a third point');
    const length = commonLength(engine, 'circle', [p, q, s]);
    const found = circleOfThree(engine, p.figure, q.figure, s.figure);
    return figureValue(settle(engine, found, length), length);
  }
  if (second?.kind === 'point') {
    const length = commonLength(engine, 'circle', [p, second]);
    const found = circleThrough(engine, p.figure, second.figure);
    return figureValue(settle(engine, found, length), length);
  }
  const radius = needCoordinate(
    engine,
    second,
    'circle needs a radius, or a point to pass through,',
  );
  const length = commonLength(engine, 'circle', [p, radius]);
  return figureValue(settle(engine, makeCircle(engine, p.figure, radius.num), length), length);
}

/** Where a ring begins: at the top, a quarter turn from the x-axis. */
const TOP = { k: 1n, n: 4n };

/**
 * `ring(C, R, n)`: the n points that divide the circle about C equally, anticlockwise from the top; `ring(C, R, n, angle)`
 * begins at another angle, measured as in `polar`. A list, so that its first item is the point that the trade calls 0.
 */
export function ringOfPoints(engine: Engine, args: Arguments): Value {
  const [first, second, third, fourth] = args;
  const middle = needPoint(first, 'ring needs a centre');
  const reach = needCoordinate(engine, second, 'ring needs a radius');
  const length = commonLength(engine, 'ring', [middle, reach]);
  const { radius: size } = settle(engine, makeCircle(engine, middle.figure, reach.num), length);
  const parts = third === undefined ? null : findWhole(engine, third);
  if (parts === null || parts < 1n)
    return fail('domain', 'ring needs a whole number of parts, 1 or more, as its third argument.');
  if (parts > BigInt(LANGUAGE_LIMITS.listItems))
    fail(
      'limit-size',
      `The ring would have ${parts} points; the limit is ${LANGUAGE_LIMITS.listItems}.`,
    );
  const start = fourth === undefined ? TOP : partOfTurn(engine, fourth);
  const points = ring(engine, middle.figure, size, Number(parts), start);
  return list(points.map((each) => figureValue(each, length)));
}

export function abscissa(engine: Engine, [value]: Arguments): NumberValue {
  const { figure, length } = needPoint(value, 'abscissa needs a point');
  return number(fromNum(engine, figure.x), length);
}

export function ordinate(engine: Engine, [value]: Arguments): NumberValue {
  const { figure, length } = needPoint(value, 'ordinate needs a point');
  return number(fromNum(engine, figure.y), length);
}

export function centre(_engine: Engine, [value]: Arguments): Value {
  const { figure, length } = needCircle(value, 'centre needs a circle');
  return figureValue(figure.centre, length);
}

export function radius(engine: Engine, [value]: Arguments): NumberValue {
  const { figure, length } = needCircle(value, 'radius needs a circle');
  return number(fromNum(engine, figure.radius), length);
}
