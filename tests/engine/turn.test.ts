import { describe, expect, it } from 'vitest';
import { createEngine } from '../../lib/engine/index';
import { evaluateWith } from './expression';

/** NIST Digital Library of Mathematical Functions, Table 4.17.1. */
const DLMF: [string, string, string, string | null][] = [
  ['pi/12', 'sqrt(2)*(sqrt(3)-1)/4', 'sqrt(2)*(sqrt(3)+1)/4', '2-sqrt(3)'],
  ['pi/6', '1/2', 'sqrt(3)/2', 'sqrt(3)/3'],
  ['pi/4', 'sqrt(2)/2', 'sqrt(2)/2', '1'],
  ['pi/3', 'sqrt(3)/2', '1/2', 'sqrt(3)'],
  ['5*pi/12', 'sqrt(2)*(sqrt(3)+1)/4', 'sqrt(2)*(sqrt(3)-1)/4', '2+sqrt(3)'],
  ['pi/2', '1', '0', null],
  ['7*pi/12', 'sqrt(2)*(sqrt(3)+1)/4', '-sqrt(2)*(sqrt(3)-1)/4', '-(2+sqrt(3))'],
  ['2*pi/3', 'sqrt(3)/2', '-1/2', '-sqrt(3)'],
  ['3*pi/4', 'sqrt(2)/2', '-sqrt(2)/2', '-1'],
  ['5*pi/6', '1/2', '-sqrt(3)/2', '-sqrt(3)/3'],
  ['11*pi/12', 'sqrt(2)*(sqrt(3)-1)/4', '-sqrt(2)*(sqrt(3)+1)/4', '-(2-sqrt(3))'],
];

/** Short forms as handbooks print them (common practice; the seventeenth part after Gauss, Disquisitiones, art. 365). */
const SHORT: [string, string][] = [
  ['cos(2*pi/3)', '-1/2'],
  ['cos(2*pi/5)', '(sqrt(5)-1)/4'],
  ['cos(pi/5)', '(1+sqrt(5))/4'],
  ['sin(2*pi/5)', 'sqrt(10+2*sqrt(5))/4'],
  ['cos(pi/8)', 'sqrt(2+sqrt(2))/2'],
  ['cos(pi/10)', 'sqrt(10+2*sqrt(5))/4'],
  ['cos(pi/12)', '(sqrt(2)+sqrt(6))/4'],
  ['sin(pi/12)', '(sqrt(6)-sqrt(2))/4'],
  ['cos(2*pi/15)', '(1+sqrt(5)+sqrt(30-6*sqrt(5)))/8'],
  ['cos(pi/15)', '(-1+sqrt(5)+sqrt(30+6*sqrt(5)))/8'],
  ['cos(pi/16)', 'sqrt(2+sqrt(2+sqrt(2)))/2'],
  [
    'cos(2*pi/17)',
    '(-1+sqrt(17)+sqrt(34-2*sqrt(17))+2*sqrt(17+3*sqrt(17)-sqrt(34-2*sqrt(17))-2*sqrt(34+2*sqrt(17))))/16',
  ],
];

describe('parts of a turn', () => {
  it.each(DLMF)('sin, cos and tan of %s are those of the DLMF', (angle, sin, cos, tan) => {
    const e = createEngine();
    const same = (a: string, b: string): boolean => e.equal(evaluateWith(e, a), evaluateWith(e, b));
    expect(same(`sin(${angle})`, sin)).toBe(true);
    expect(same(`cos(${angle})`, cos)).toBe(true);
    if (tan !== null) expect(same(`tan(${angle})`, tan)).toBe(true);
  });

  it.each(SHORT)('%s is written %s', (source, text) => {
    const e = createEngine();
    expect(e.write(evaluateWith(e, source)).text).toBe(text);
  });

  it.each([3, 5, 15, 16, 17, 24, 51, 60, 85])('the %i-th root of unity has that order', (n) => {
    const e = createEngine();
    const z = e.rootOfUnity(1n, BigInt(n));
    const one = e.integer(1);
    expect(e.equal(e.pow(z, BigInt(n)), one)).toBe(true);
    for (const p of [2, 3, 5, 17]) {
      if (n % p === 0) expect(e.equal(e.pow(z, BigInt(n / p)), one)).toBe(false);
    }
  });

  it('all cosines of seventeenths and of 257ths agree with integer arithmetic at 30 digits', () => {
    const e = createEngine();
    // cos(2π/17) and cos(2π/257) to 30 digits, by PARI/GP 2.15.2.
    expect(e.decimal(e.cosTurn(1n, 17n), 30).re).toBe('0.932472229404355804573115891822');
    expect(e.decimal(e.cosTurn(1n, 257n), 30).re).toBe('0.999701157843093660155784149448');
    // The sum of all cosines but the first is −1.
    let sum = e.integer(0);
    for (let k = 1n; k < 17n; k++) sum = e.add(sum, e.cosTurn(k, 17n));
    expect(e.asRational(sum)).toEqual({ n: -1n, d: 1n });
  });

  it('the order of the cosines falls from 0 to half a turn', () => {
    const e = createEngine();
    for (let k = 0n; k < 8n; k++)
      expect(e.compare(e.cosTurn(k, 17n), e.cosTurn(k + 1n, 17n))).toBe(1);
  });

  it.each([7n, 9n, 11n, 13n, 14n, 25n, 49n, 289n])(
    'a turn over %i has no tower and keeps its exact value',
    (n) => {
      const e = createEngine();
      const cosine = e.cosTurn(1n, n);
      expect(e.tower(cosine)).toBeNull();
      expect(e.reach(cosine)).toMatchObject({ kind: 'degree', division: n });
      expect(e.equal(cosine, e.cosTurn(n - 1n, n))).toBe(true);
    },
  );

  it('a division beyond the closed forms is a named limit', () => {
    const e = createEngine();
    expect(e.attempt(() => e.cosTurn(1n, 65539n))).toMatchObject({
      kind: 'over-limit',
      limit: 'degree',
    });
  });

  describe('of a division whose square roots are too long to be written', () => {
    const e = createEngine();
    const long = e.cosTurn(1n, 65537n);

    it('has its degree, its reach, its digits and its order at once', () => {
      // PARI/GP 2.15.2: cos(2*Pi/65537), sin(2*Pi/4369), cos(2*Pi/65535), 800*sin(Pi/65537).
      expect(e.decimal(long, 30).re).toBe('0.999999995404247565194868824412');
      expect(e.decimal(e.sinTurn(1n, 4369n), 30).re).toBe('0.00143812843702227238382300242995');
      expect(e.decimal(e.cosTurn(1n, 65535n), 30).re).toBe('0.999999995403967054166687135828');
      expect(e.degree(long)).toBe(32768);
      expect(e.reach(long)).toEqual({ kind: 'constructible' });
      expect([e.isZero(long), e.isReal(long), e.isRational(long)]).toEqual([false, true, false]);
      expect(e.compare(long, e.integer(1))).toBe(-1);
      expect(e.compare(e.rational(1n, 2n), long)).toBe(-1);
      expect(e.floor(e.neg(long))).toBe(-1n);
    });

    it('is taken times a rational number, and written by its name', () => {
      const chord = e.mul(e.integer(-2400), e.sinTurn(1n, 131074n));
      expect(e.write(chord).text).toBe('-2400*sin(pi/65537)');
      expect(e.decimal(e.div(chord, e.integer(-3)), 15).re).toBe('0.0383489345241513');
      expect(e.roundToMultiple(e.abs(chord), { n: 1n, d: 10n }, 'up').multiple).toBe(2n);
    });

    it('names the limit, and where its quadratics stand, when more is asked', () => {
      for (const ask of [
        () => e.add(long, e.integer(1)),
        () => e.sqrt(long),
        () => e.tower(long),
      ]) {
        const outcome = e.attempt<unknown>(ask);
        expect(outcome).toMatchObject({ kind: 'over-limit', code: 'limit-size', limit: 'degree' });
        if (outcome.kind !== 'over-limit') continue;
        expect(outcome.message).toContain('the division page gives its chain of quadratics');
      }
    });
  });

  it('negative counts and counts beyond a turn are taken modulo a turn', () => {
    const e = createEngine();
    expect(e.equal(e.cosTurn(-7n, 5n), e.cosTurn(3n, 5n))).toBe(true);
    expect(e.equal(e.sinTurn(-1n, 12n), e.neg(e.sinTurn(1n, 12n)))).toBe(true);
    expect(e.equal(e.sinTurn(1n, -12n), e.neg(e.sinTurn(1n, 12n)))).toBe(true);
    expect(e.attempt(() => e.cosTurn(1n, 0n))).toMatchObject({ code: 'division-by-zero' });
  });
});
