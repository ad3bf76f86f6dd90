import { describe, expect, test } from 'vitest';
import { cosineDegree, decideDivision, divide, factorise, FERMAT_PRIMES } from '@/lib/divisions';
import sequences from '../reference/divisions-sequences.json';

const upTo = (last: number) => Array.from({ length: last }, (_, index) => index + 1);
const byCompass = (n: number) => decideDivision(BigInt(n)).compass;

describe('straightedge and compass', () => {
  test('reach the divisions that OEIS lists, and no others', () => {
    const { terms } = sequences.A003401;
    expect(upTo(terms.at(-1) ?? 0).filter(byCompass)).toEqual(terms);
    const not = sequences.A004169.terms;
    expect(upTo(not.at(-1) ?? 0).filter((n) => !byCompass(n))).toEqual(not);
  });

  test('reach every odd product of distinct Fermat primes, none else up to 100 000, and all below 10⁶', () => {
    const terms = sequences.A045544.terms.filter((n) => n <= 1_000_000);
    const found = upTo(100_000).filter((n) => n % 2 === 1 && n > 1 && byCompass(n));
    expect(found).toEqual(terms.filter((n) => n <= 100_000));
    expect(terms.filter((n) => !byCompass(n))).toEqual([]);
    expect(FERMAT_PRIMES.map(Number)).toEqual(sequences.A019434.terms);
  });

  test('with an angle trisector reach what Gleason says, up to 28', () => {
    const { trisectorOnly, neither } = sequences.gleason;
    const missed = upTo(28).filter((n) => !byCompass(n));
    const withTrisector = (n: number) => decideDivision(BigInt(n)).trisector === true;
    expect(missed.filter(withTrisector)).toEqual(trisectorOnly);
    expect(missed.filter((n) => !withTrisector(n))).toEqual(neither);
  });

  test('say which Fermat primes they are made of', () => {
    const why = [16n, 17n, 34n, 68n, 51n, 60n, 255n].map((n) => decideDivision(n).why);
    expect(why).toEqual([
      '16 is a power of two',
      '17 is a Fermat prime',
      '34 is twice the Fermat prime 17',
      '68 is 2^2 times the Fermat prime 17',
      '51 is the product of the distinct Fermat primes 3 and 17',
      '60 is 2^2 times the product of the distinct Fermat primes 3 and 5',
      '255 is the product of the distinct Fermat primes 3, 5 and 17',
    ]);
  });

  test('doubling the parts changes nothing', () => {
    for (const n of upTo(3000)) {
      const { compass, trisector } = decideDivision(BigInt(n));
      expect(decideDivision(BigInt(2 * n))).toMatchObject({ compass, trisector });
    }
  });

  test('are reached exactly where the degree is a power of two', () => {
    const isPower = (x: number) => 2 ** Math.round(Math.log2(x)) === x;
    expect(upTo(20_000).filter((n) => byCompass(n) !== isPower(cosineDegree(n)))).toEqual([]);
  });
});

describe('numbers', () => {
  test('the degree of 2cos(π/n) is that of OEIS A055034', () => {
    const { terms } = sequences.A055034;
    expect(terms.map((_, index) => cosineDegree(2 * (index + 1)))).toEqual(terms);
  });

  test('factors multiply back, ascend and are prime', () => {
    for (const n of [...upTo(2000), 999_983, 1_000_000, 999_999, 510_510, 2 ** 19]) {
      const factors = factorise(n);
      expect(factors.reduce((product, f) => product * f.prime ** f.exponent, 1)).toBe(n);
      expect(factors.every(({ prime }) => factorise(prime).length === 1)).toBe(true);
      expect(factors.map(({ prime }) => prime)).toEqual(
        factors.map(({ prime }) => prime).sort((a, b) => a - b),
      );
    }
  });
});

describe('what cannot be divided', () => {
  test.each([
    [0, 'parts-zero'],
    [-0, 'parts-zero'],
    ['0', 'parts-zero'],
    [-3, 'parts-negative'],
    ['−3', 'parts-negative'],
    [2.5, 'parts-not-whole'],
    ['17.25', 'parts-not-whole'],
    [1e30, 'parts-too-many'],
    [10n ** 30n, 'parts-too-many'],
    ['10^30', 'parts-too-many'],
    [1_000_001, 'parts-too-many'],
    [Infinity, 'parts-too-many'],
    [NaN, 'parts-not-a-number'],
    ['seven', 'parts-not-a-number'],
    ['10³⁰', 'parts-not-a-number'],
    ['17 mm', 'parts-not-a-number'],
    ['1 2', 'parts-not-a-number'],
    ['', 'parts-missing'],
    ['  ', 'parts-missing'],
  ] as const)('%s is %s, and the sentence says what to give', (given, code) => {
    const outcome = divide(given);
    expect(outcome).toMatchObject({ kind: 'outside-domain', code });
    if (outcome.kind === 'value') throw new Error('a value');
    expect(outcome.message).toContain('Give a whole number from 1 to 1 000 000.');
  });

  test('a number that is far too long is cut in the sentence', () => {
    const outcome = divide('9'.repeat(5000));
    if (outcome.kind === 'value') throw new Error('a value');
    expect(outcome.code).toBe('parts-too-many');
    expect(outcome.message.length).toBeLessThan(140);
  });

  test.each([
    ['', 'radius-not-a-length'],
    ['wide', 'radius-not-a-length'],
    ['1,5 m', 'radius-not-a-length'],
    ['1 20 mm', 'radius-not-a-length'],
    ['5 km', 'radius-not-a-length'],
    ['1/0 m', 'radius-not-a-length'],
    ['1.5/2', 'radius-not-a-length'],
    ['0 mm', 'radius-not-positive'],
    ['0.000', 'radius-not-positive'],
    ['-5 mm', 'radius-not-positive'],
    ['1234567890123456789012 mm', 'radius-too-long'],
  ])('the radius “%s” is %s', (radius, code) => {
    expect(divide(5, radius)).toMatchObject({ kind: 'outside-domain', code });
  });
});

describe('what is asked', () => {
  test.each([
    ['17', 17],
    [' 1 000 000 ', 1_000_000],
    ['10^6', 1_000_000],
    ['1e3', 1000],
    ['12.0', 12],
    [65537n, 65537],
  ] as const)('%s parts are read as %i', (given, parts) => {
    expect(divide(given)).toMatchObject({ kind: 'value', value: { parts } });
  });

  test.each([
    ['1200 mm', 1200n, 1n, 'mm'],
    ['1200', 1200n, 1n, 'mm'],
    ['1.25m', 5n, 4n, 'm'],
    ['47 1/4 in', 189n, 4n, 'in'],
    ['3/8 in', 3n, 8n, 'in'],
    ['1 200 mm', 1200n, 1n, 'mm'],
    ['12 000 000', 12_000_000n, 1n, 'mm'],
    ['1 200 1/2 mm', 2401n, 2n, 'mm'],
    ['47 125/1000 in', 377n, 8n, 'in'],
    ['.5 ft', 1n, 2n, 'ft'],
  ] as const)('the radius %s is %i/%i %s', (text, n, d, unit) => {
    expect(divide(5, text)).toMatchObject({ value: { radius: { n, d, unit } } });
  });

  test('one and two parts are reached and have no polygon', () => {
    for (const n of [1, 2]) {
      expect(divide(n, '1 m')).toMatchObject({
        value: { reach: { compass: true }, degree: 1, measures: null },
      });
    }
  });

  test('all Fermat primes together, once each, are struck, and a division twice by one of them is not', () => {
    const product = 3n * 5n * 17n * 257n * 65537n;
    expect(decideDivision(2n ** 20n * product).compass).toBe(true);
    expect(decideDivision(257n * product)).toMatchObject({
      compass: false,
      why: expect.stringContaining('the prime 257 more than once') as string,
    });
  });

  test('what trial division does not settle is left open', () => {
    const large = 1_000_003n * 1_000_033n;
    expect(decideDivision(large)).toMatchObject({ compass: false, trisector: null });
  });
});
