import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Engine } from '@/lib/engine/index';
import {
  type Figure,
  areEqual,
  circleThrough,
  distance,
  isNone,
  lineThrough,
  middle,
  polar,
  reflectInLine,
  reflectInPoint,
  ring,
  rotate,
} from '@/lib/geometry/index';
import { type Pair, inEngine, pairs, point, pointOf } from './arbitraries';

const RUNS = { numRuns: 50 };
const KINDS = ['point', 'line', 'circle'] as const;
const kinds = fc.constantFrom(...KINDS);

/** A point, or the line or circle that it and another one fix; null where they are the same. */
function figure(engine: Engine, kind: (typeof KINDS)[number], a: Pair, b: Pair): Figure | null {
  const [p, q] = [point(engine, a), point(engine, b)];
  if (kind === 'point') return p;
  const made = kind === 'line' ? lineThrough(engine, p, q) : circleThrough(engine, p, q);
  return isNone(made) ? null : made;
}

describe('reflections', () => {
  it('a reflection in a line or a point, done twice, changes nothing', () => {
    fc.assert(
      fc.property(kinds, pairs, pairs, pairs, pairs, (kind, a, b, c, d) => {
        inEngine((engine) => {
          const what = figure(engine, kind, a, b);
          const mirror = figure(engine, 'line', c, d);
          if (what === null || mirror?.kind !== 'line') return;
          const once = reflectInLine(engine, what, mirror);
          expect(areEqual(engine, reflectInLine(engine, once, mirror), what)).toBe(true);
          const centre = point(engine, d);
          const turned = reflectInPoint(engine, what, centre);
          expect(areEqual(engine, reflectInPoint(engine, turned, centre), what)).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('a mirrored point is as far from every point of the mirror', () => {
    fc.assert(
      fc.property(pairs, pairs, pairs, (a, c, d) => {
        inEngine((engine) => {
          const mirror = figure(engine, 'line', c, d);
          if (mirror?.kind !== 'line') return;
          const [p, on] = [point(engine, a), point(engine, c)];
          const image = reflectInLine(engine, p, mirror);
          expect(engine.equal(distance(engine, p, on), distance(engine, image, on))).toBe(true);
        });
      }),
      RUNS,
    );
  });
});

describe('rotations', () => {
  it('n turns by 1/n of a turn bring every figure back', () => {
    fc.assert(
      fc.property(
        kinds,
        pairs,
        pairs,
        pairs,
        fc.constantFrom(1n, 2n, 3n, 4n, 5n, 6n, 8n),
        (kind, a, b, c, n) => {
          inEngine((engine) => {
            const what = figure(engine, kind, a, b);
            if (what === null) return;
            const about = point(engine, c);
            let turned: Figure = what;
            for (let k = 0n; k < n; k += 1n) turned = rotate(engine, turned, { k: 1n, n }, about);
            expect(areEqual(engine, turned, what)).toBe(true);
          });
        },
      ),
      RUNS,
    );
  });

  it('half a turn is the reflection in the centre', () => {
    fc.assert(
      fc.property(kinds, pairs, pairs, pairs, (kind, a, b, c) => {
        inEngine((engine) => {
          const what = figure(engine, kind, a, b);
          if (what === null) return;
          const about = point(engine, c);
          const turned = rotate(engine, what, { k: 1n, n: 2n }, about);
          expect(areEqual(engine, turned, reflectInPoint(engine, what, about))).toBe(true);
        });
      }),
      RUNS,
    );
  });

  it('a quarter turn about the origin takes the x-axis to the y-axis, anticlockwise', () => {
    inEngine((engine) => {
      const turned = rotate(engine, pointOf(engine, 2, 0), { k: 1n, n: 4n }, pointOf(engine, 0, 0));
      expect(areEqual(engine, turned, pointOf(engine, 0, 2))).toBe(true);
    });
  });
});

describe('rings', () => {
  it('neighbours of a ring are equally far apart, and each point is R from the centre', () => {
    inEngine((engine) => {
      const centre = pointOf(engine, 3, -1);
      const radius = engine.integer(10n);
      const points = ring(engine, centre, radius, 10, { k: 1n, n: 4n });
      expect(points).toHaveLength(10);
      const [top, next] = points as [(typeof points)[number], (typeof points)[number]];
      expect(areEqual(engine, top, pointOf(engine, 3, 9))).toBe(true);
      const side = distance(engine, top, next);
      // The side of a decagon: R (√5 - 1)/2.
      expect(engine.write(side).text).toBe('5*sqrt(5)-5');
      points.forEach((p, index) => {
        const after = points[(index + 1) % points.length] ?? top;
        expect(engine.equal(distance(engine, p, after), side)).toBe(true);
        expect(engine.equal(distance(engine, p, centre), radius)).toBe(true);
      });
      const across = middle(engine, top, points[5] ?? top);
      expect(areEqual(engine, across, centre)).toBe(true);
    });
  });

  it('the second point lies anticlockwise of the first', () => {
    inEngine((engine) => {
      const [, second] = ring(engine, pointOf(engine, 0, 0), engine.integer(1n), 4, {
        k: 1n,
        n: 4n,
      });
      expect(second && areEqual(engine, second, pointOf(engine, -1, 0))).toBe(true);
      const direct = polar(engine, engine.integer(1n), { k: 1n, n: 2n });
      expect(second && areEqual(engine, second, direct)).toBe(true);
    });
  });
});
