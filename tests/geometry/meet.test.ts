import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Engine, type Num } from '@/lib/engine/index';
import {
  type Circle,
  type Line,
  type Point,
  areEqual,
  circleThrough,
  distance,
  distanceToLine,
  explainNone,
  isNone,
  lineThrough,
  makeCircle,
  makeLine,
  meetAt,
} from '@/lib/geometry/index';
import { evaluateExpression } from '@/lib/language/index';
import {
  type Pair,
  circleOf,
  got,
  inEngine,
  lineOf,
  pairs,
  point,
  pointOf,
  surd,
  surds,
} from './arbitraries';

const RUNS = { numRuns: 60 };

const liesOn = (engine: Engine, p: Point, figure: Line | Circle): boolean =>
  figure.kind === 'line'
    ? engine.isZero(distanceToLine(engine, p, figure))
    : engine.equal(distance(engine, p, figure.centre), figure.radius);

/** A line through two of the points, or a circle about one through another. */
const curve = (engine: Engine, isLine: boolean, p: Pair, q: Pair): Line | Circle | null => {
  const [a, b] = [point(engine, p), point(engine, q)];
  if (areEqual(engine, a, b)) return null;
  return isLine ? got(lineThrough(engine, a, b)) : got(circleThrough(engine, a, b));
};

const why = (outcome: object): string => (isNone(outcome) ? outcome.why : 'met');

describe('points of meeting', () => {
  it('a point of meeting lies on both figures, and the order of the figures does not matter', () => {
    fc.assert(
      fc.property(
        fc.tuple(fc.boolean(), pairs, pairs),
        fc.tuple(fc.boolean(), pairs, pairs),
        fc.constantFrom<1 | 2>(1, 2),
        (first, second, which) => {
          inEngine((engine) => {
            const [f, g] = [curve(engine, ...first), curve(engine, ...second)];
            if (f === null || g === null) return;
            const met = meetAt(engine, f, g, which);
            const back = meetAt(engine, g, f, which);
            expect(why(met)).toBe(why(back));
            if (isNone(met) || isNone(back)) return;
            expect(liesOn(engine, met, f)).toBe(true);
            expect(liesOn(engine, met, g)).toBe(true);
            expect(areEqual(engine, met, back)).toBe(true);
          });
        },
      ),
      RUNS,
    );
  });

  it('the first of two points lies to the left of the second, or below it', () => {
    fc.assert(
      fc.property(pairs, surds, pairs, pairs, (centre, r, p, q) => {
        inEngine((engine) => {
          const circle = makeCircle(engine, point(engine, centre), engine.abs(surd(engine, r)));
          const line = curve(engine, true, p, q);
          if (isNone(circle) || line === null) return;
          const [first, second] = [
            meetAt(engine, line, circle, 1),
            meetAt(engine, line, circle, 2),
          ];
          if (isNone(first) || isNone(second) || areEqual(engine, first, second)) return;
          const order = engine.compare(first.x, second.x) || engine.compare(first.y, second.y);
          expect(order).toBe(-1);
        });
      }),
      RUNS,
    );
  });

  it('a point picks the nearer one, and of equally near ones neither', () => {
    inEngine((engine) => {
      const [g, c] = [lineOf(engine, 3, -4, 0), circleOf(engine, 0, 0, 5)];
      const near = got(meetAt(engine, g, c, pointOf(engine, -1, 0)));
      expect(areEqual(engine, near, pointOf(engine, -4, -3))).toBe(true);
      expect(meetAt(engine, g, c, pointOf(engine, 3, -4))).toEqual({
        kind: 'none',
        why: 'equally-near',
      });
      expect(meetAt(engine, g, c, null)).toEqual({ kind: 'none', why: 'two-meets' });
    });
  });

  it('line and circle that touch have one point, whichever is asked for', () => {
    inEngine((engine) => {
      const touching = pointOf(engine, 3, 4);
      for (const which of [1, 2, null, pointOf(engine, 9, 9)] as const) {
        const met = got(
          meetAt(engine, lineOf(engine, 3, 4, -25), circleOf(engine, 0, 0, 5), which),
        );
        expect(areEqual(engine, met, touching)).toBe(true);
      }
    });
  });
});

describe('what does not meet', () => {
  const gapOf = (engine: Engine, f: Line | Circle, g: Line | Circle): [string, string] => {
    const outcome = meetAt(engine, f, g, 1);
    if (!isNone(outcome) || !('gap' in outcome)) throw new Error(`No gap: ${why(outcome)}.`);
    return [outcome.why, engine.write(outcome.gap).text];
  };

  it('is told with the distance that is missed', () => {
    inEngine((engine) => {
      const circle = circleOf(engine, 0, 0, 5);
      expect(gapOf(engine, lineOf(engine, 1, 1, 0), lineOf(engine, 2, 2, 4))).toEqual([
        'parallel',
        'sqrt(2)',
      ]);
      expect(gapOf(engine, lineOf(engine, 3, 4, -35), circle)).toEqual(['passes', '2']);
      expect(gapOf(engine, circle, circleOf(engine, 6, 8, 2))).toEqual(['apart', '3']);
      expect(gapOf(engine, circle, circleOf(engine, 1, 0, 2))).toEqual(['inside', '2']);
      expect(gapOf(engine, circle, circleOf(engine, 0, 0, 2))).toEqual(['inside', '3']);
    });
  });

  it('figures that are the same have no single point of meeting', () => {
    inEngine((engine) => {
      const line = lineOf(engine, 2, -3, 1);
      expect(meetAt(engine, line, lineOf(engine, -4, 6, -2), 1)).toEqual({
        kind: 'none',
        why: 'same-lines',
      });
      expect(meetAt(engine, circleOf(engine, 1, 2, 3), circleOf(engine, 1, 2, 3), 1)).toEqual({
        kind: 'none',
        why: 'same-circles',
      });
    });
  });

  it('every reason is one sentence', () => {
    inEngine((engine) => {
      const write = (gap: Num): string => `${engine.decimal(gap, 4).re} mm`;
      const apart = meetAt(engine, circleOf(engine, 0, 0, 1), circleOf(engine, 5, 0, 1), 1);
      expect(isNone(apart) && explainNone(apart, write)).toBe(
        'The circles lie apart by 3 mm, so they do not meet.',
      );
      expect(explainNone({ kind: 'none', why: 'no-line' }, write)).toMatch(/^[A-Z].*\.$/);
    });
  });
});

describe('touching is told from missing where double precision cannot', () => {
  /** y = 1 shifted by 10⁻⁴⁰: 1 + 1e-40 is 1 in doubles. */
  it.each([
    [-1, 'met', 2],
    [0, 'met', 1],
    [1, 'passes', 0],
  ])('a line at 1 + %i·10⁻⁴⁰ from the centre of a unit circle', (side, outcome, points) => {
    inEngine((engine) => {
      const shift = engine.rational(BigInt(side), 10n ** 40n);
      const c = engine.neg(engine.add(engine.integer(1n), shift));
      const line = got(makeLine(engine, engine.integer(0n), engine.integer(1n), c));
      const circle = circleOf(engine, 0, 0, 1);
      expect(why(meetAt(engine, line, circle, 1))).toBe(outcome);
      const [p, q] = [meetAt(engine, line, circle, 1), meetAt(engine, line, circle, 2)];
      if (!isNone(p) && !isNone(q)) expect(areEqual(engine, p, q)).toBe(points === 1);
    });
  });

  it('circles of radius √2 and √3 whose centres are √(5+2√6) apart touch, and a hair more parts them', () => {
    inEngine((engine) => {
      const root = (n: number) => engine.sqrt(engine.integer(n));
      // √(5+2√6) = √2+√3.
      const reach = engine.sqrt(
        engine.add(engine.integer(5n), engine.mul(engine.integer(2n), root(6))),
      );
      const first = got(makeCircle(engine, pointOf(engine, 0, 0), root(2)));
      const at = (x: Num) =>
        got(makeCircle(engine, { kind: 'point', x, y: engine.integer(0n) }, root(3)));
      const met = got(meetAt(engine, first, at(reach), null));
      expect(engine.equal(met.x, root(2)) && engine.isZero(met.y)).toBe(true);
      const further = engine.add(reach, engine.rational(1n, 10n ** 30n));
      expect(why(meetAt(engine, first, at(further), null))).toBe('apart');
    });
  });
});

describe('an outside computation', () => {
  const path = fileURLToPath(new URL('../reference/geometry-meets.json', import.meta.url));
  const { cases } = JSON.parse(readFileSync(path, 'utf8')) as {
    cases: { left: string; right: string; meets: [string, string][] }[];
  };

  it.each(cases)('$left and $right meet where sympy finds it', ({ left, right, meets }) => {
    expect(meets.length).toBeGreaterThan(0);
    meets.forEach(([x, y], index) => {
      const met = evaluateExpression(`meet(${left}, ${right}, ${index + 1})`, { digits: 40 });
      if (met.kind !== 'point') throw new Error(JSON.stringify(met));
      for (const [part, expected] of [
        [met.coordinates.x, x],
        [met.coordinates.y, y],
      ] as const) {
        // Both are rounded to 40 figures, and sympy writes zeros at the end.
        const gap = `abs((${part.decimal.re}) - (${expected})) <= 10^-36`;
        expect(evaluateExpression(gap)).toMatchObject({ truth: { value: true } });
      }
    });
  });
});
