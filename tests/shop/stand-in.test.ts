import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createEngine } from '@/lib/engine/index';
import { evaluateExpression } from '@/lib/language/index';
import { encloseForm } from '@/lib/shop/form';
import {
  DEFAULT_SEARCH,
  type StandIn,
  type StandInAnswer,
  type StandInRequest,
  buildForm,
  decimalsOf,
  findStandIns,
  writeForm,
  writeScaled,
} from '@/lib/shop/index';
import { IntervalArithmetic } from '@/lib/shop/interval';
import { closeRing } from '@/lib/shop/ring';
import {
  compareFractions,
  exactTarget,
  fractionOf,
  reachableChord,
  show,
  sideTarget,
} from './targets';

const offersOf = (answer: StandInAnswer): readonly StandIn[] => {
  if (answer.kind !== 'found') throw new Error(`Stand-ins were expected, not ${answer.kind}.`);
  return answer.offers;
};
const sevenIn450: StandInRequest = {
  target: sideTarget(7, 450n),
  tolerance: { n: 1n, d: 5n },
  measure: 'length',
  radius: exactTarget({ n: 450n, d: 1n }),
  parts: 7,
};

describe('the seven-part inlay of radius 450 within 0.2', () => {
  const offers = offersOf(findStandIns(sevenIn450));
  const base = { n: 450n, d: 1n };
  const triangle = offers.find(({ family }) => family === 'hypotenuse');

  // True side 390.495365206 and the figures below: computed to 60 digits for the demonstration notebook.
  it('has the side 390.495365206', () => {
    expect(show(sevenIn450.target.enclose(128), 128, 9)).toBe('390.495365206');
    // PARI/GP 2.15: 900*sin(Pi/7).
    expect(show(sevenIn450.target.enclose(128), 128, 21)).toBe('390.495365205802308428191');
  });

  it('offers √(300² + 250²), off by +0.0171185895', () => {
    expect(triangle && writeScaled(triangle.form, base, 'mm')).toBe('sqrt((300 mm)^2+(250 mm)^2)');
    expect(triangle?.error).toMatchObject({ direction: 'above', bound: '0.0171185895305' });
  });

  it('stepped: worst point 0.0570009, closing side -0.102715, seven one-way steps miss by 0.133002', () => {
    const closing = triangle?.closing;
    if (closing?.kind !== 'ring') throw new Error('A ring was expected.');
    const low = (interval: { low: bigint; high: bigint }, places: number) =>
      show(interval, closing.bits, places);
    expect(low(closing.worst, 7)).toBe('0.0570009');
    expect(decimalsOf({ ...closing.worst, bits: closing.bits }).high).toMatch(/^0\.0570008925/);
    expect(low(closing.last, 6)).toBe('-0.102715');
    expect(low(closing.miss, 6)).toBe('0.133002');
    expect(closing.inside).toBe(true);
  });

  it('begins with √(300² + 250²), the cheapest whose ring keeps to 0.2; fewer strikes come after, with a warning', () => {
    const [first] = offers;
    expect(first).toBe(triangle);
    const cheaper = offers.find(({ form }) => writeForm(form) === '(2*sqrt(5)-1)/4');
    expect(cheaper?.simplicity).toBeLessThan(triangle?.simplicity ?? 0);
    expect(cheaper?.closing?.inside).toBe(false);
  });

  it('begins with the same as for a single part when no ring keeps inside', () => {
    // A side of the seven-part figure stepped round eleven times ends nowhere near its start.
    const asked = { ...sevenIn450, parts: 11 };
    const ring = offersOf(findStandIns(asked));
    expect(ring.map(({ closing }) => closing?.inside)).toEqual(ring.map(() => false));
    const single = offersOf(findStandIns({ ...asked, parts: undefined }));
    expect(ring.map(({ form }) => form)).toEqual(single.map(({ form }) => form));
  });

  it('leaves out the √3/2 rule: its side is 0.78 short and its third point 2.60969 out', () => {
    expect(offers.some(({ form }) => writeForm(form) === 'sqrt(3)/2')).toBe(false);
    const arithmetic = new IntervalArithmetic(200);
    const opening = encloseForm(arithmetic, { kind: 'surd', a: 0n, b: 1n, c: 3n, d: 2n });
    const closing = closeRing({ arithmetic, radius: arithmetic.fraction(base), opening, parts: 7 });
    if (closing?.kind !== 'ring') throw new Error('A ring was expected.');
    expect(show(arithmetic.scale(opening, 450n), 200, 9)).toBe('389.711431703');
    expect(show(closing.worst, 200, 5)).toBe('2.60969');
    const wide = offersOf(findStandIns({ ...sevenIn450, tolerance: { n: 1n, d: 1n } }));
    expect(wide[0]?.closing?.inside).toBe(true);
    const rule = wide.find(({ form }) => writeForm(form) === 'sqrt(3)/2');
    expect(rule).toMatchObject({ family: 'classical', source: 'Common practice' });
    expect(rule?.closing?.inside).toBe(false);
  });
});

describe('a straight run', () => {
  it('is off by the number of parts times the error', () => {
    for (const offer of offersOf(findStandIns({ ...sevenIn450, radius: undefined, parts: 12 }))) {
      const { closing, error } = offer;
      if (closing?.kind !== 'run') throw new Error('A run was expected.');
      expect(closing.run).toEqual({ low: 12n * error.low, high: 12n * error.high });
    }
  });
});

describe('laws of the search', () => {
  const rings = fc.constantFrom(7, 9, 11, 13);
  const request = fc
    .record({
      n: rings,
      radius: fc.bigInt({ min: 1n, max: 5000n }),
      tolerance: fc.record({
        n: fc.bigInt({ min: 1n, max: 50n }),
        d: fc.bigInt({ min: 1n, max: 100_000n }),
      }),
      withRadius: fc.boolean(),
    })
    .map(({ n, radius, tolerance, withRadius }) => ({
      n,
      radius,
      request: {
        target: sideTarget(n, radius),
        tolerance,
        measure: 'length' as const,
        ...(withRadius
          ? { radius: exactTarget({ n: radius, d: 1n }), parts: n }
          : { radius: undefined, parts: undefined }),
      },
    }));
  const runs = { numRuns: 12 };

  it('every error, built exactly and compared to 200 places, lies inside its bounds and the tolerance', () => {
    fc.assert(
      fc.property(request, ({ n, radius, request: asked }) => {
        const answer = findStandIns(asked);
        if (answer.kind !== 'found') return;
        const engine = createEngine();
        const bits = 700;
        const truth = sideTarget(n, radius).enclose(bits);
        for (const { form, error } of answer.offers) {
          const base = asked.radius === undefined ? 1n : radius;
          const scaled = engine.mul(buildForm(engine, form), engine.integer(base << BigInt(bits)));
          const value = engine.floor(scaled);
          // value/2^700 ≤ stand-in < (value + 1)/2^700, and so for the target.
          const [low, high] = [value - truth.high, value + 1n - truth.low];
          const down = BigInt(bits - error.bits);
          expect(error.low << down <= high && low <= error.high << down).toBe(true);
          expect(error.direction).toBe(low > 0n ? 'above' : 'below');
          const size = { n: low > 0n ? low : -high, d: 1n << BigInt(bits) };
          const bound = fractionOf(error.bound);
          expect(compareFractions(size, bound)).toBeLessThanOrEqual(0);
          expect(compareFractions(bound, { n: size.n * 1_000_001n, d: size.d * 1_000_000n })).toBe(
            -1,
          );
          expect(compareFractions(size, asked.tolerance)).toBeLessThanOrEqual(0);
        }
      }),
      runs,
    );
  });

  it('each further offer costs more and errs less, those whose ring keeps inside before the others', () => {
    fc.assert(
      fc.property(request, ({ request: asked }) => {
        const answer = findStandIns(asked);
        if (answer.kind !== 'found') return;
        const flags = answer.offers.map(({ closing }) => closing?.inside ?? true);
        expect(flags).toEqual([...flags].sort((a, b) => Number(b) - Number(a)));
        for (const group of [true, false]) {
          const offers = answer.offers.filter((_, index) => flags[index] === group);
          offers.slice(1).forEach((next, index) => {
            const before = offers[index] as StandIn;
            expect(next.simplicity).toBeGreaterThan(before.simplicity);
            expect(
              compareFractions(fractionOf(next.error.bound), fractionOf(before.error.bound)),
            ).toBe(-1);
          });
        }
        expect(answer.offers.length).toBeLessThanOrEqual(DEFAULT_SEARCH.offers);
      }),
      runs,
    );
  });

  it('the same question has the same answer, and a narrower tolerance no cheaper one', () => {
    fc.assert(
      fc.property(request, ({ request: asked }) => {
        const answer = findStandIns(asked);
        expect(findStandIns(asked)).toEqual(answer);
        const tolerance = { n: asked.tolerance.n, d: asked.tolerance.d * 2n };
        const narrower = findStandIns({ ...asked, tolerance });
        if (narrower.kind !== 'found') return;
        expect(answer.kind).toBe('found');
        const [before] = offersOf(answer);
        const [after] = narrower.offers;
        // A ring that keeps inside may cost more than one that no longer has to.
        if (before?.closing?.inside !== after.closing?.inside) return;
        expect(after.simplicity).toBeGreaterThanOrEqual(before?.simplicity ?? Infinity);
      }),
      runs,
    );
  });

  it('the texts parse back to the same constructible value', () => {
    for (const n of [7, 9, 11, 13]) {
      const R = 360n;
      const target = sideTarget(n, R);
      const radius = exactTarget({ n: R, d: 1n });
      for (const tolerance of [
        { n: 2n, d: 1n },
        { n: 1n, d: 3n },
      ]) {
        const asked = { target, tolerance, measure: 'length' as const, radius, parts: n };
        for (const { form, family, error } of offersOf(findStandIns(asked))) {
          const result = evaluateExpression(writeScaled(form, { n: R, d: 1n }, 'mm'), {
            digits: 40,
          });
          if (result.kind !== 'number') throw new Error(`${family}: a number was expected.`);
          expect(result.reach.straightedgeAndCompass).toBe(true);
          expect(result.unit).toBe('mm');
          const engine = createEngine();
          const value = engine.mul(buildForm(engine, form), engine.integer(R));
          expect(engine.decimal(value, 40).re).toBe(result.decimal.re);
          expect(['above', 'below']).toContain(error.direction);
        }
      }
    }
  });

  it('every candidate of every family writes a text that is its value', () => {
    const engine = createEngine();
    const limits = { parts: 5, radicand: 5, factor: 3, divisor: 3, divisions: 68, offers: 1000 };
    const wide = { ...sevenIn450, tolerance: { n: 100n, d: 1n } };
    for (const { form } of offersOf(findStandIns(wide, limits))) {
      const result = evaluateExpression(writeForm(form), { digits: 30 });
      if (result.kind !== 'number') throw new Error(`${writeForm(form)} is no number.`);
      expect(result.decimal.re).toBe(engine.decimal(buildForm(engine, form), 30).re);
    }
  });
});

describe('values that are reached already', () => {
  it('comes level with a seventeenth by its own division and counts it', () => {
    const answer = findStandIns({
      target: reachableChord(1n, 17n, 1500n),
      tolerance: { n: 1n, d: 10n ** 20n },
      measure: 'length',
      radius: exactTarget({ n: 1500n, d: 1n }),
      parts: 17,
    });
    const [first, ...others] = offersOf(answer);
    expect(first).toMatchObject({ family: 'bisection', simplicity: 45 });
    expect(first?.error.direction).toBe('level');
    expect(others).toEqual([]);
  });

  it('gives a fraction back as itself', () => {
    const [first] = offersOf(
      findStandIns({
        target: exactTarget({ n: 3n, d: 7n }),
        tolerance: { n: 1n, d: 10n ** 12n },
        measure: 'length',
      }),
    );
    expect(first?.form).toEqual({ kind: 'fraction', n: 3n, d: 7n });
  });

  it('stands in for an angle by a part of a turn that is reached', () => {
    const seventh = exactTarget({ n: 1n, d: 7n });
    const offers = offersOf(
      findStandIns({ target: seventh, tolerance: { n: 1n, d: 3600n }, measure: 'angle' }),
    );
    for (const { form, closing } of offers) {
      if (form.kind !== 'fraction') throw new Error('A part of a turn was expected.');
      expect(2n ** 20n * 15n * 17n).toSatisfy((all: bigint) => all % form.d === 0n);
      expect(closing).toBeNull();
    }
  });
});

describe('what the search covers and where it ends', () => {
  it('counts what it looked at, family by family, with the ranges', () => {
    const answer = findStandIns(sevenIn450);
    if (answer.kind !== 'found') throw new Error('Stand-ins were expected.');
    expect(answer.covered.map(({ family }) => family)).toEqual([
      'fraction',
      'root',
      'hypotenuse',
      'surd',
      'bisection',
      'classical',
    ]);
    for (const { examined, inside, complete, ranges } of answer.covered) {
      expect(examined).toBeGreaterThan(0);
      expect(inside).toBeLessThanOrEqual(examined);
      expect(complete).toBe(true);
      expect(ranges).toMatch(/\d/);
    }
  });

  it('stops at the limit of candidates in each family and says so', () => {
    const answer = findStandIns(sevenIn450, { candidates: 10 });
    if (!('covered' in answer)) throw new Error('A coverage was expected.');
    expect(answer.covered.every(({ examined }) => examined <= 10)).toBe(true);
    expect(answer.covered.filter(({ complete }) => !complete).length).toBeGreaterThanOrEqual(4);
  });

  it('names the nearest when none is inside, from all families', () => {
    const answer = findStandIns({ ...sevenIn450, tolerance: { n: 1n, d: 10n ** 40n } });
    if (answer.kind !== 'none-inside') throw new Error('Nothing inside was expected.');
    const found = offersOf(findStandIns({ ...sevenIn450, parts: undefined }, { offers: 100 })).at(
      -1,
    );
    expect(answer.nearest?.error.bound).toBe(found?.error.bound);
    expect(answer.covered.every(({ inside }) => inside === 0)).toBe(true);
  });

  it('refuses a tolerance that needs more places than the limit, with both figures', () => {
    const tolerance = { n: 1n, d: 10n ** 900n };
    expect(findStandIns({ ...sevenIn450, tolerance })).toEqual({
      kind: 'over-limit',
      limit: 'bits',
      allowed: 2048,
      met: 3085,
    });
  });

  it('does not stand in for 0 or less', () => {
    for (const n of [0n, -3n]) {
      const target = {
        enclose: (bits: number) => ({ low: n << BigInt(bits), high: n << BigInt(bits) }),
      };
      expect(findStandIns({ ...sevenIn450, target }).kind).toBe('not-positive');
    }
  });

  it.each([
    [{ tolerance: { n: 0n, d: 1n } }, {}],
    [{ tolerance: { n: -1n, d: 5n } }, {}],
    [{ parts: 1 }, {}],
    [{ parts: 2.5 }, {}],
    [{ parts: 10_000_000 }, {}],
    [{ measure: 'angle' as const }, {}],
    [{}, { candidates: 0 }],
    [{}, { bits: 0.5 }],
  ])('a request that makes no sense is a mistake of the program: %o %o', (change, limits) => {
    expect(() => findStandIns({ ...sevenIn450, ...change }, limits)).toThrow(RangeError);
  });

  it('ends for the smallest and the largest targets', () => {
    for (const target of [
      exactTarget({ n: 1n, d: 10n ** 12n }),
      exactTarget({ n: 10n ** 30n, d: 7n }),
    ]) {
      const answer = findStandIns({
        target,
        tolerance: { n: 1n, d: 10n ** 3n },
        measure: 'length',
      });
      expect(['found', 'none-inside']).toContain(answer.kind);
    }
  });
});
