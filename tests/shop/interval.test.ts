import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createEngine } from '@/lib/engine/index';
import { encloseArcsine, enclosePi, encloseSine } from '@/lib/shop/circular';
import { directedDecimal } from '@/lib/shop/decimals';
import { type Interval, IntervalArithmetic, ceilDiv, floorDiv } from '@/lib/shop/interval';
import { PI_DIGITS, compareFractions, fractionOf } from './targets';

const arithmetic = new IntervalArithmetic(256);
const part = fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n });
const divisor = fc.bigInt({ min: 1n, max: 10n ** 9n });
const fraction = fc.record({ n: part, d: divisor });
const holds = ({ low, high }: Interval, n: bigint, d: bigint): boolean =>
  low * d <= n << arithmetic.shift && n << arithmetic.shift <= high * d;

describe('interval arithmetic', () => {
  it('keeps the true sum, difference, product and quotient of any two fractions inside', () => {
    fc.assert(
      fc.property(fraction, fraction, (a, b) => {
        const [x, y] = [arithmetic.fraction(a), arithmetic.fraction(b)];
        const d = a.d * b.d;
        expect(holds(arithmetic.add(x, y), a.n * b.d + b.n * a.d, d)).toBe(true);
        expect(holds(arithmetic.subtract(x, y), a.n * b.d - b.n * a.d, d)).toBe(true);
        expect(holds(arithmetic.multiply(x, y), a.n * b.n, d)).toBe(true);
        if (b.n > 0n) expect(holds(arithmetic.divide(x, y), a.n * b.d, a.d * b.n)).toBe(true);
      }),
    );
  });

  it('keeps a factor inside and is at most one unit wider for a division', () => {
    fc.assert(
      fc.property(fraction, part, divisor, (a, n, d) => {
        const scaled = arithmetic.scale(arithmetic.fraction(a), n, d);
        expect(holds(scaled, a.n * n, a.d * d)).toBe(true);
      }),
    );
  });

  it('takes the root back to the number by squaring, and is exact at squares', () => {
    fc.assert(
      fc.property(fc.record({ n: fc.bigInt({ min: 0n, max: 10n ** 20n }), d: divisor }), (a) => {
        const root = arithmetic.root(arithmetic.fraction(a));
        expect(holds(arithmetic.multiply(root, root), a.n, a.d)).toBe(true);
      }),
    );
    expect(arithmetic.rootOf(49n)).toEqual(arithmetic.fraction({ n: 7n, d: 1n }));
  });

  it('refuses to divide by what may be 0', () => {
    const one = arithmetic.fraction({ n: 1n, d: 1n });
    expect(() => arithmetic.divide(one, { low: 0n, high: 1n })).toThrow(RangeError);
    expect(() => new IntervalArithmetic(0)).toThrow(RangeError);
  });

  it('divides downwards and upwards on both sides of 0', () => {
    expect([floorDiv(-7n, 2n), ceilDiv(-7n, 2n), floorDiv(7n, 2n), ceilDiv(7n, 2n)]).toEqual([
      -4n,
      -3n,
      3n,
      4n,
    ]);
  });
});

describe('the circle', () => {
  it('encloses π at every precision (OEIS A000796)', () => {
    const { n, d } = fractionOf(PI_DIGITS);
    for (const bits of [1, 8, 64, 200, 600]) {
      const at = new IntervalArithmetic(bits);
      const { low, high } = enclosePi(at);
      expect(low * d <= n << at.shift && (n << at.shift) - d <= high * d).toBe(true);
      expect(high - low).toBeLessThanOrEqual(3n);
    }
  });

  it('agrees with the exact sines of reachable parts of a turn', () => {
    const engine = createEngine();
    for (const [k, n] of [
      [1n, 12n],
      [1n, 10n],
      [7n, 24n],
      [1n, 34n],
      [5n, 16n],
      [3n, 4n],
      [17n, 20n],
      [-7n, 20n],
      [61n, 12n],
    ] as const) {
      const angle = arithmetic.scale(enclosePi(arithmetic), 2n * k, n);
      const { low, high } = encloseSine(arithmetic, angle);
      const sine = engine.mul(engine.sinTurn(k, n), engine.integer(arithmetic.one));
      const floor = engine.floor(sine);
      expect(low <= floor && floor <= high).toBe(true);
      expect(high - low).toBeLessThan(2000n);
    }
  });

  it('finds the angle back from its sine, from 0 to a quarter turn', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 0n, max: 10n ** 9n }), (k) => {
        const angle = arithmetic.scale(enclosePi(arithmetic), k, 2n * 10n ** 9n);
        const back = encloseArcsine(arithmetic, encloseSine(arithmetic, angle));
        expect(back.low <= angle.high && angle.low <= back.high).toBe(true);
        // Near the quarter turn the sine hardly moves, so half the places are lost there at worst.
        expect(back.high - back.low).toBeLessThan(1n << 136n);
      }),
    );
  });

  it('knows the arcsine of 0, 1/2 and 1', () => {
    const pi = enclosePi(arithmetic);
    const of = (n: bigint, d: bigint) => encloseArcsine(arithmetic, arithmetic.fraction({ n, d }));
    expect(of(0n, 1n).low).toBe(0n);
    const half = of(1n, 2n);
    expect(half.low <= pi.high / 6n && pi.low / 6n <= half.high).toBe(true);
    const one = of(1n, 1n);
    expect(one.low <= pi.high / 2n && pi.low / 2n <= one.high).toBe(true);
    expect(one.high - one.low).toBeLessThan(16n);
  });
});

describe('directed decimals', () => {
  it('never passes the value on the wrong side, and is off by less than a unit of the last digit', () => {
    fc.assert(
      fc.property(fraction, fc.integer({ min: 1, max: 20 }), (a, digits) => {
        const [down, up] = (['down', 'up'] as const).map((side) =>
          fractionOf(directedDecimal(a, digits, side)),
        );
        if (down === undefined || up === undefined) throw new Error('Two decimals were expected.');
        expect(compareFractions(down, a)).toBeLessThanOrEqual(0);
        expect(compareFractions(a, up)).toBeLessThanOrEqual(0);
        const width = { n: up.n * down.d - down.n * up.d, d: up.d * down.d };
        const size = a.n < 0n ? -a.n : a.n;
        const unit = { n: size, d: a.d * 10n ** BigInt(digits - 1) };
        expect(compareFractions(width, unit)).toBeLessThanOrEqual(0);
      }),
    );
  });

  it('writes as a person would', () => {
    const up = (n: bigint, d: bigint, digits: number) => directedDecimal({ n, d }, digits, 'up');
    expect(up(1n, 3n, 4)).toBe('0.3334');
    expect(up(-1n, 3n, 4)).toBe('-0.3333');
    expect(up(9999n, 10n, 3)).toBe('1000');
    expect(up(1n, 10n ** 15n, 3)).toBe('1e-15');
    expect(up(0n, 7n, 3)).toBe('0');
    expect(directedDecimal({ n: 123456n, d: 1n }, 2, 'down')).toBe('120000');
    expect(up(25n, 10n ** 20n, 3)).toBe('2.5e-19');
  });
});
