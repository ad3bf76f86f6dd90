import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { divide, vertices, type Measures, type Radius } from '@/lib/divisions';
import { rationalDecimal, settledDecimal } from '@/lib/divisions/decimals';
import { cosineFixed, piFixed, sineFixed } from '@/lib/divisions/fixed-point';
import { measure } from '@/lib/divisions/measures';
import { createEngine } from '@/lib/engine';
import sequences from '../reference/divisions-sequences.json';

const ONE: Radius = { n: 1n, d: 1n, unit: 'm' };
const measuresOf = (n: number, radius: string): Measures => {
  const outcome = divide(n, radius);
  if (outcome.kind !== 'value' || outcome.value.measures === null) throw new Error('no measures');
  return outcome.value.measures;
};
const size = (x: bigint) => (x < 0n ? -x : x);

describe('sizes of the polygon', () => {
  test.each(Object.entries(sequences.sides.values))(
    'the side of %s parts on the unit circle is %s',
    (n, side) => {
      const { decimal } = measure(Number(n), ONE, 20).side;
      const places = side.split('.')[1]?.length ?? 0;
      const [a = 0n, b = 0n] = [decimal, side].map((text) => scaled(text, Math.max(places, 25)));
      // The list is rounded at 20 digits, trailing zeros kept.
      expect(size(a - b) <= 10n ** BigInt(Math.max(places, 25) - places)).toBe(true);
    },
  );

  test('at the yard: seventeen lights on 1500, ten sides on 2400, fifteen on 6000', () => {
    // Worked at 60 digits outside the engine, then rounded to 12.
    const sizes = (n: number, mm: bigint) => measure(n, { n: mm, d: 1n, unit: 'mm' }, 12);
    expect(sizes(17, 1500n).side.decimal).toBe('551.24855345');
    expect(sizes(10, 2400n).side.decimal).toBe('1483.281573');
    expect(sizes(10, 2400n).apothem.decimal).toBe('2282.53563911');
    expect(sizes(15, 6000n).side.decimal).toBe('2494.94028981');
    expect(sizes(7, 450n).side.decimal).toBe('390.495365206');
  });

  test('exact forms are those of a handbook', () => {
    expect(measuresOf(3, '1 m').side.exact?.text).toBe('sqrt(3)');
    expect(measuresOf(4, '1 m').area).toEqual({ decimal: '2', exact: { text: '2', tex: '2' } });
    expect(measuresOf(6, '1 m').side.exact?.text).toBe('1');
    expect(measuresOf(5, '2 m').side.exact?.text).toBe('sqrt(10-2*sqrt(5))');
    expect(measuresOf(10, '2 m').side.exact?.text).toMatch(/^(-1\+sqrt\(5\)|sqrt\(5\)-1)$/);
    expect(measuresOf(12, '1 m').area).toMatchObject({ decimal: '3', exact: { text: '3' } });
  });

  test('what is not reached, or too long to read, has decimals alone', () => {
    for (const n of [7, 9, 257, 65537, 1_000_000]) {
      const { side, apothem, area } = measuresOf(n, '1200 mm');
      expect([side.exact, apothem.exact, area.exact]).toEqual([null, null, null]);
      expect(side.decimal).toMatch(/^\d+\.\d{11,}$/);
    }
  });

  test('exact and decimal agree wherever both are given', () => {
    const engine = createEngine();
    for (const n of [3, 5, 8, 15, 16, 17, 20, 34]) {
      const { side, apothem } = measure(n, { n: 7n, d: 3n, unit: 'm' }, 30);
      const parts = BigInt(n);
      const outcome = engine.attempt(() => [
        engine.decimal(engine.mul(engine.rational(14n, 3n), engine.sinTurn(1n, 2n * parts)), 30).re,
        engine.decimal(engine.mul(engine.rational(7n, 3n), engine.cosTurn(1n, 2n * parts)), 30).re,
      ]);
      if (outcome.kind !== 'value') throw new Error(outcome.message);
      const [a, b] = outcome.value.map((text) => scaled(text, 40));
      expect([scaled(side.decimal, 40), scaled(apothem.decimal, 40)]).toEqual([a, b]);
    }
  });

  test('area is half of perimeter times apothem, and side and apothem make a right triangle with R', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 3, max: 1_000_000 }),
        fc.integer({ min: 1, max: 99999 }),
        (n, r) => {
          const sizes = measure(n, { n: BigInt(r), d: 7n, unit: 'mm' }, 60);
          const [side = 0n, apothem = 0n, area = 0n] = [sizes.side, sizes.apothem, sizes.area].map(
            ({ decimal }) => scaled(decimal, 60),
          );
          const unit = 10n ** 60n;
          const slack = unit / 10n ** 40n;
          expect(size(BigInt(n) * side * apothem - 2n * area * unit) / unit < slack).toBe(true);
          const radius = (BigInt(r) * unit) / 7n;
          const left = (side * side) / 4n + apothem * apothem - radius * radius;
          expect(size(left) / unit < slack).toBe(true);
        },
      ),
      { numRuns: 60 },
    );
  });
});

describe('corners', () => {
  test('lie on the circle, in order, mirrored in the datum', () => {
    for (const n of [5, 7, 17, 24]) {
      const points = vertices(n, { n: 10n, d: 1n, unit: 'm' }, { digits: 40 }).map((v) => ({
        x: scaled(v.x.decimal, 45),
        y: scaled(v.y.decimal, 45),
      }));
      const hundred = 100n * 10n ** 90n;
      for (const [k, { x, y }] of points.entries()) {
        expect(size(x * x + y * y - hundred) < 10n ** 58n).toBe(true);
        const mirror = points[(n - k) % n];
        expect([mirror?.x, mirror?.y]).toEqual([x, 0n - y]);
      }
      const sum = points.reduce((total, { x }) => total + x, 0n);
      expect(size(sum) < 10n ** 9n).toBe(true);
    }
  });

  test('of a square are exact', () => {
    const points = vertices(4, { n: 3n, d: 2n, unit: 'm' }).map(({ x, y }) => [
      x.decimal,
      y.decimal,
    ]);
    expect(points).toEqual([
      ['1.5', '0'],
      ['0', '1.5'],
      ['-1.5', '0'],
      ['0', '-1.5'],
    ]);
  });

  test('can be had from any number on', () => {
    const radius: Radius = { n: 1200n, d: 1n, unit: 'mm' };
    const all = vertices(17, radius);
    expect(vertices(17, radius, { first: 5, count: 3 })).toEqual(all.slice(5, 8));
    expect(vertices(1_000_000, radius, { first: 999_999, count: 1 })[0]?.y.decimal).toMatch(
      /^-0\.0075398/,
    );
  });
});

describe('fixed point', () => {
  test('π and cosines at one precision agree with a higher one to a unit', () => {
    for (const bits of [64, 200, 3400]) {
      expect(size(piFixed(bits) - (piFixed(bits + 100) >> 100n)) <= 1n).toBe(true);
      for (const k of [0n, 1n, 3n, 11n, 12n, 25n, 49n, 77n, 99n]) {
        const near = cosineFixed(k, 100n, bits) - (cosineFixed(k, 100n, bits + 90) >> 90n);
        expect(size(near) <= 2n).toBe(true);
      }
    }
  });

  test('π begins with the decimals of DLMF 3.12.1', () => {
    const digits = ((piFixed(200) * 10n ** 40n) >> 200n).toString();
    expect(digits).toBe('31415926535897932384626433832795028841971');
  });

  test('cos² + sin² is 1 for any part of a turn', () => {
    fc.assert(
      fc.property(fc.bigInt(-(10n ** 9n), 10n ** 9n), fc.bigInt(1n, 10n ** 6n), (k, n) => {
        const [c, s] = [cosineFixed(k, n, 128), sineFixed(k, n, 128)];
        expect(size(c * c + s * s - (1n << 256n)) < 1n << 132n).toBe(true);
      }),
    );
  });
});

describe('decimals', () => {
  test.each([
    [1n, 3n, 5, '0.33333'],
    [2n, 3n, 5, '0.66667'],
    [-1n, 8n, 2, '-0.12'],
    [-3n, 8n, 2, '-0.38'],
    [999_999n, 1n, 3, '1000000'],
    [999_999n, 1000n, 3, '1000'],
    [1n, 1_000_000n, 4, '0.000001'],
    [1200n, 1n, 12, '1200'],
    [0n, 7n, 4, '0'],
    [5n, 2n, 12, '2.5'],
  ] as const)('%i/%i to %i digits is %s', (n, d, digits, text) => {
    expect(rationalDecimal(n, d, digits)).toBe(text);
  });

  test('are rounded as the engine rounds', () => {
    const engine = createEngine();
    fc.assert(
      fc.property(
        fc.bigInt(-(10n ** 12n), 10n ** 12n),
        fc.bigInt(1n, 10n ** 9n),
        fc.integer({ min: 1, max: 25 }),
        (n, d, digits) => {
          const outcome = engine.attempt(() => engine.decimal(engine.rational(n, d), digits).re);
          if (outcome.kind !== 'value') throw new Error(outcome.message);
          expect(scaled(rationalDecimal(n, d, digits), 60)).toBe(scaled(outcome.value, 60));
        },
      ),
    );
  });

  test('that never settle are a fault and no hang', () => {
    const wide = (bits: number) => ({ low: -1n, high: 1n, scale: 1n << BigInt(bits) });
    expect(() => settledDecimal(wide, 5)).toThrow('A decimal did not settle.');
  });
});

/** A decimal, with or without an exponent, as an integer of units of 10^−places; cut off where it goes on. */
function scaled(text: string, places: number): bigint {
  const [mantissa = '', exponent = '0'] = text.split('e');
  const negative = mantissa.startsWith('-');
  const [whole = '', fraction = ''] = mantissa.replace('-', '').split('.');
  const shift = places + Number(exponent) - fraction.length;
  const digits = BigInt(whole + fraction);
  const value = shift >= 0 ? digits * 10n ** BigInt(shift) : digits / 10n ** BigInt(-shift);
  return negative ? -value : value;
}
