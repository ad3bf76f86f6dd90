import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  areEqual,
  bisectAngle,
  bisectPoints,
  circleOfThree,
  cosineAt,
  cosineOfLines,
  distance,
  distanceOfLines,
  distanceToLine,
  footOf,
  isNone,
  lineThrough,
  makeCircle,
  makeLine,
  makePoint,
  meetAt,
  middle,
  parallelThrough,
  perpendicular,
} from '@/lib/geometry/index';
import { got, inEngine, lineOf, pairs, point, pointOf, surd, surds } from './arbitraries';

const RUNS = { numRuns: 60 };

describe('canonical lines', () => {
  it('a line has the same coefficients through any two of its points, in any order', () => {
    fc.assert(
      fc.property(pairs, pairs, surds, surds, (a, b, s, t) => {
        inEngine((engine) => {
          const [p, q] = [point(engine, a), point(engine, b)];
          if (areEqual(engine, p, q)) return;
          const along = (by: typeof s) => {
            const factor = surd(engine, by);
            const part = (from: typeof p.x, to: typeof p.x) =>
              engine.add(from, engine.mul(factor, engine.sub(to, from)));
            return got(makePoint(engine, part(p.x, q.x), part(p.y, q.y)));
          };
          const [u, v] = [along(s), along(t)];
          if (areEqual(engine, u, v)) return;
          const [line, other] = [got(lineThrough(engine, p, q)), got(lineThrough(engine, v, u))];
          for (const name of ['a', 'b', 'c'] as const)
            expect(engine.write(line[name]).text).toBe(engine.write(other[name]).text);
        });
      }),
      RUNS,
    );
  });

  it('what is no figure is refused: no line, no radius, nothing real', () => {
    inEngine((engine) => {
      const [zero, one] = [engine.integer(0n), engine.integer(1n)];
      const origin = pointOf(engine, 0, 0);
      expect(makeLine(engine, zero, zero, one)).toEqual({ kind: 'none', why: 'no-line' });
      expect(makePoint(engine, one, engine.i)).toEqual({ kind: 'none', why: 'not-real' });
      expect(makeCircle(engine, origin, engine.neg(one))).toEqual({
        kind: 'none',
        why: 'no-radius',
      });
      expect(lineThrough(engine, origin, origin)).toEqual({ kind: 'none', why: 'same-points' });
      const inLine = circleOfThree(engine, origin, pointOf(engine, 1, 2), pointOf(engine, 2, 4));
      expect(inLine).toEqual({ kind: 'none', why: 'in-line' });
    });
  });
});

describe('feet and perpendiculars', () => {
  it('the foot lies on the line and no other point of the line is nearer', () => {
    fc.assert(
      fc.property(pairs, pairs, pairs, surds, (a, b, c, s) => {
        inEngine((engine) => {
          const [p, q, r] = [point(engine, a), point(engine, b), point(engine, c)];
          if (areEqual(engine, p, q)) return;
          const line = got(lineThrough(engine, p, q));
          const foot = footOf(engine, r, line);
          expect(engine.isZero(distanceToLine(engine, foot, line))).toBe(true);
          const factor = surd(engine, s);
          const other = got(
            makePoint(
              engine,
              engine.add(p.x, engine.mul(factor, engine.sub(q.x, p.x))),
              engine.add(p.y, engine.mul(factor, engine.sub(q.y, p.y))),
            ),
          );
          const order = engine.compare(
            engine.pow(distance(engine, r, foot), 2n),
            engine.pow(distance(engine, r, other), 2n),
          );
          expect(order).toBe(areEqual(engine, foot, other) ? 0 : -1);
          expect(engine.equal(distance(engine, r, foot), distanceToLine(engine, r, line))).toBe(
            true,
          );
        });
      }),
      RUNS,
    );
  });

  it('perpendicular and parallel pass through the point, at a right angle and at none', () => {
    fc.assert(
      fc.property(pairs, pairs, pairs, (a, b, c) => {
        inEngine((engine) => {
          const [p, q, r] = [point(engine, a), point(engine, b), point(engine, c)];
          if (areEqual(engine, p, q)) return;
          const line = got(lineThrough(engine, p, q));
          const [across, along] = [
            perpendicular(engine, line, r),
            parallelThrough(engine, line, r),
          ];
          for (const through of [across, along])
            expect(engine.isZero(distanceToLine(engine, r, through))).toBe(true);
          expect(engine.isZero(cosineOfLines(engine, line, across))).toBe(true);
          expect(engine.equal(cosineOfLines(engine, line, along), engine.integer(1n))).toBe(true);
          const gap = distanceOfLines(engine, line, along);
          expect(engine.equal(gap, distanceToLine(engine, r, line))).toBe(true);
          expect(engine.isZero(distanceOfLines(engine, line, across))).toBe(true);
        });
      }),
      RUNS,
    );
  });
});

describe('bisectors and centres of triangles', () => {
  /** Integers, as three distances over one another soon make towers of many roots. */
  const corner = fc.tuple(fc.integer({ min: -6, max: 6 }), fc.integer({ min: -6, max: 6 }));

  it('the bisector of two points passes through their middle, at right angles', () => {
    fc.assert(
      fc.property(pairs, pairs, (a, b) => {
        inEngine((engine) => {
          const [p, q] = [point(engine, a), point(engine, b)];
          const line = bisectPoints(engine, p, q);
          if (areEqual(engine, p, q)) return expect(isNone(line)).toBe(true);
          expect(engine.isZero(distanceToLine(engine, middle(engine, p, q), got(line)))).toBe(true);
          const across = got(lineThrough(engine, p, q));
          expect(engine.isZero(cosineOfLines(engine, across, got(line)))).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('the perpendicular bisectors meet at the centre of the circle through the corners', () => {
    fc.assert(
      fc.property(pairs, pairs, pairs, (a, b, c) => {
        inEngine((engine) => {
          const [p, q, r] = [point(engine, a), point(engine, b), point(engine, c)];
          const circle = circleOfThree(engine, p, q, r);
          if (isNone(circle)) return;
          const [first, second] = [bisectPoints(engine, p, q), bisectPoints(engine, q, r)];
          const centre = got(meetAt(engine, got(first), got(second), null));
          expect(areEqual(engine, centre, circle.centre)).toBe(true);
          for (const corner of [p, q, r])
            expect(engine.equal(distance(engine, corner, centre), circle.radius)).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('the three heights meet in one point', () => {
    fc.assert(
      fc.property(pairs, pairs, pairs, (a, b, c) => {
        inEngine((engine) => {
          const [p, q, r] = [point(engine, a), point(engine, b), point(engine, c)];
          if (isNone(circleOfThree(engine, p, q, r))) return;
          const height = (from: typeof p, u: typeof p, v: typeof p) =>
            perpendicular(engine, got(lineThrough(engine, u, v)), from);
          const one = got(meetAt(engine, height(p, q, r), height(q, r, p), null));
          expect(engine.isZero(distanceToLine(engine, one, height(r, p, q)))).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('the bisector of an angle is equally far from both sides, and the three of a triangle meet inside it', () => {
    fc.assert(
      fc.property(corner, corner, corner, (a, b, c) => {
        inEngine((engine) => {
          const [p, q, r] = [a, b, c].map(([x, y]) => pointOf(engine, x, y)) as [
            ReturnType<typeof pointOf>,
            ReturnType<typeof pointOf>,
            ReturnType<typeof pointOf>,
          ];
          if (isNone(circleOfThree(engine, p, q, r))) return;
          const first = got(bisectAngle(engine, q, p, r));
          const second = got(bisectAngle(engine, p, q, r));
          const third = got(bisectAngle(engine, p, r, q));
          const centre = got(meetAt(engine, first, second, null));
          expect(engine.isZero(distanceToLine(engine, centre, third))).toBe(true);
          const [u, v] = [got(lineThrough(engine, p, q)), got(lineThrough(engine, p, r))];
          expect(
            engine.equal(distanceToLine(engine, centre, u), distanceToLine(engine, centre, v)),
          ).toBe(true);
        });
      }),
      { numRuns: 25 },
    );
  });

  it('sides that lie opposite each other have their bisector across them; a side must leave the vertex', () => {
    inEngine((engine) => {
      const [p, v, q] = [pointOf(engine, -2, 0), pointOf(engine, 1, 0), pointOf(engine, 5, 0)];
      const line = got(bisectAngle(engine, p, v, q));
      expect(engine.write(line.b).text).toBe('0');
      expect(engine.write(line.c).text).toBe('-1');
      expect(bisectAngle(engine, v, v, q)).toEqual({ kind: 'none', why: 'no-side' });
      expect(cosineAt(engine, v, v, q)).toEqual({ kind: 'none', why: 'no-side' });
    });
  });
});

describe('measures', () => {
  it('the distance of two points does not depend on their order, and obeys Pythagoras', () => {
    fc.assert(
      fc.property(pairs, surds, surds, (a, s, t) => {
        inEngine((engine) => {
          const p = point(engine, a);
          const q = got(makePoint(engine, surd(engine, s), p.y));
          const r = got(makePoint(engine, p.x, surd(engine, t)));
          expect(engine.equal(distance(engine, q, r), distance(engine, r, q))).toBe(true);
          const square = (u: typeof p, v: typeof p) => engine.pow(distance(engine, u, v), 2n);
          expect(engine.equal(square(q, r), engine.add(square(p, q), square(p, r)))).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('the cosine at a vertex is that of the law of cosines', () => {
    fc.assert(
      fc.property(pairs, pairs, pairs, (a, b, c) => {
        inEngine((engine) => {
          const [p, v, q] = [point(engine, a), point(engine, b), point(engine, c)];
          const cosine = cosineAt(engine, p, v, q);
          if (isNone(cosine)) return;
          const [s, t, u] = [
            distance(engine, p, v),
            distance(engine, q, v),
            distance(engine, p, q),
          ];
          const right = engine.sub(
            engine.add(engine.mul(s, s), engine.mul(t, t)),
            engine.mul(u, u),
          );
          const left = engine.mul(engine.integer(2n), engine.mul(cosine, engine.mul(s, t)));
          expect(engine.equal(left, right)).toBe(true);
        });
      }),
      { numRuns: 30 },
    );
  });

  it('lines at 45 degrees have the cosine √2/2, whichever way they run', () => {
    inEngine((engine) => {
      const cosine = cosineOfLines(engine, lineOf(engine, 1, 0, 3), lineOf(engine, 1, 1, 0));
      expect(engine.write(cosine).text).toBe('sqrt(2)/2');
      const other = cosineOfLines(engine, lineOf(engine, 1, 0, 3), lineOf(engine, 1, -1, 7));
      expect(engine.equal(cosine, other)).toBe(true);
    });
  });
});
