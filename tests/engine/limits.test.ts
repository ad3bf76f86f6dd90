import { describe, expect, it } from 'vitest';
import { createEngine, DEFAULT_LIMITS, type Engine, type Num } from '../../lib/engine/index';

function sum(e: Engine, terms: Num[]): Num {
  return terms.reduce((a, b) => e.add(a, b));
}

describe('limits', () => {
  const over: [string, keyof typeof DEFAULT_LIMITS, string, (e: Engine) => unknown][] = [
    ['2^(10^9)', 'integerBits', 'limit-size', (e) => e.pow(e.integer(2), 10n ** 9n)],
    [
      '(1/3)^(−10^12)',
      'integerBits',
      'limit-size',
      (e) => e.pow(e.rational(1n, 3n), -(10n ** 12n)),
    ],
    [
      '(1+√2)^(10^9)',
      'integerBits',
      'limit-size',
      (e) => e.pow(e.add(e.integer(1), e.sqrt(e.integer(2))), 10n ** 9n),
    ],
    ['an integer of 400 000 bits', 'integerBits', 'limit-size', (e) => e.integer(1n << 400_000n)],
    [
      'roots nested 60 deep',
      'towerHeight',
      'limit-tower',
      (e) => {
        let v = e.integer(2);
        for (let i = 0; i < 60; i++) v = e.sqrt(e.add(e.integer(1), v));
        return v;
      },
    ],
    [
      'a 60-fold root of 2',
      'towerHeight',
      'limit-tower',
      (e) => {
        let v = e.integer(2);
        for (let i = 0; i < 60; i++) v = e.sqrt(v);
        return v;
      },
    ],
    ['10 001 digits', 'digits', 'limit-digits', (e) => e.decimal(e.sqrt(e.integer(2)), 10_001)],
  ];

  it.each(over)('%s goes over %s', (_, limit, code, work) => {
    const e = createEngine();
    const outcome = e.attempt(() => {
      work(e);
    });
    expect(outcome).toMatchObject({
      kind: 'over-limit',
      code,
      limit,
      allowed: DEFAULT_LIMITS[limit],
    });
    if (outcome.kind === 'over-limit') {
      expect(outcome.met).toBeGreaterThan(outcome.allowed);
      expect(outcome.message).toContain(String(outcome.allowed));
    }
  });

  it('the inverse of a sum of 40 independent roots would have 2^40 terms and is refused', () => {
    const e = createEngine({ steps: 400_000 });
    const outcome = e.attempt(() => {
      e.inverse(
        sum(
          e,
          Array.from({ length: 60 }, (_, i) => e.sqrt(e.integer(i + 2))),
        ),
      );
    });
    expect(outcome.kind).toBe('over-limit');
  });

  it('a sum of 200 roots costs what its terms cost', () => {
    const e = createEngine();
    const outcome = e.attempt(() => {
      const v = sum(
        e,
        Array.from({ length: 200 }, (_, i) => e.sqrt(e.integer(i + 2))),
      );
      return [e.sign(v), e.decimal(v, 20).re, e.degree(v)];
    });
    // 46 primes lie below 202; the decimal by decimal.js.
    expect(outcome).toEqual({ kind: 'value', value: [1, '1905.6616579071069144', 2 ** 46] });
  });

  it('integers of 5000 digits are no obstacle', () => {
    const e = createEngine();
    const n = 10n ** 5000n + 7n;
    const outcome = e.attempt(() => {
      const r = e.sqrt(e.integer(n));
      return [
        e.equal(e.mul(r, r), e.integer(n)),
        e.asRational(e.sqrt(e.integer(n * n)))?.n === n,
        e.compare(r, e.integer(10n ** 2500n)),
        e.floor(r) === 10n ** 2500n,
      ];
    });
    expect(outcome).toEqual({ kind: 'value', value: [true, true, 1, true] });
  });

  it('powers of 0, 1, −1 and i have no limit', () => {
    const e = createEngine();
    const n = 10n ** 30n + 3n;
    expect(e.write(e.pow(e.integer(1), n)).text).toBe('1');
    expect(e.write(e.pow(e.integer(-1), n)).text).toBe('-1');
    expect(e.write(e.pow(e.i, n)).text).toBe('-i');
    expect(e.write(e.pow(e.integer(0), n)).text).toBe('0');
    expect(e.write(e.pow(e.integer(0), 0n)).text).toBe('1');
  });

  it('each attempt has a fresh budget, and nested ones share it', () => {
    const e = createEngine({ steps: 50_000 });
    const some = (): Num => e.pow(e.add(e.integer(1), e.sqrt(e.integer(2))), 300n);
    for (let i = 0; i < 30; i++) expect(e.attempt(some).kind).toBe('value');
    const all = e.attempt(() => {
      for (let i = 0; i < 3000; i++) {
        const inner = e.attempt(some);
        if (inner.kind === 'over-limit') return inner.limit;
      }
      return 'none';
    });
    expect(all).toEqual({ kind: 'value', value: 'steps' });
  });

  it('must be named and positive', () => {
    expect(() => createEngine({ digits: 0 })).toThrow(RangeError);
    expect(() => createEngine({ steps: 1.5 })).toThrow(RangeError);
    expect(() => createEngine({ speed: 3 } as never)).toThrow(TypeError);
  });
});
