import Decimal from 'decimal.js';
import { describe, expect, it } from 'vitest';
import { createEngine } from '../../lib/engine/index';
import { evaluateWith } from './expression';

const e = createEngine();
const decimal = (source: string, digits: number): string =>
  e.decimal(evaluateWith(e, source), digits).re;

describe('decimals', () => {
  it('of a rational are the value itself where it ends, without trailing zeros', () => {
    expect(e.decimal(evaluateWith(e, '500'), 30)).toEqual({
      re: '500',
      im: null,
      digits: 30,
      terminates: true,
    });
    expect(e.decimal(evaluateWith(e, '3/4'), 30)).toEqual({
      re: '0.75',
      im: null,
      digits: 30,
      terminates: true,
    });
    expect(e.decimal(evaluateWith(e, '-1/8'), 3)).toEqual({
      re: '-0.125',
      im: null,
      digits: 3,
      terminates: true,
    });
    expect(e.decimal(evaluateWith(e, '1/3'), 4)).toEqual({
      re: '0.3333',
      im: null,
      digits: 4,
      terminates: false,
    });
    expect(e.decimal(evaluateWith(e, '0'), 4)).toEqual({
      re: '0',
      im: null,
      digits: 4,
      terminates: true,
    });
    expect(e.decimal(evaluateWith(e, '10^40'), 30)).toMatchObject({ re: '1e40', terminates: true });
  });

  it('round half to even at a tie, and only there', () => {
    expect(decimal('5/4', 2)).toBe('1.2');
    expect(decimal('27/20', 2)).toBe('1.4');
    expect(decimal('-5/4', 2)).toBe('-1.2');
    expect(decimal('1250000001/1000000000', 2)).toBe('1.3');
    expect(decimal('999/1000', 2)).toBe('1.0');
    expect(e.decimal(evaluateWith(e, '999/1000'), 2).terminates).toBe(false);
  });

  it('choose positional writing or a power of ten by the size', () => {
    expect(decimal('sqrt(2)/1000', 5)).toBe('0.0014142');
    expect(decimal('sqrt(2)/10^9', 5)).toBe('1.4142e-9');
    expect(decimal('sqrt(2)*10^3', 5)).toBe('1414.2');
    expect(decimal('sqrt(2)*10^4', 5)).toBe('14142');
    expect(decimal('sqrt(2)*10^5', 5)).toBe('1.4142e5');
  });

  it.each([30, 200, 1000])('agree with decimal.js at %i digits', (digits) => {
    const D = Decimal.clone({ precision: digits + 40, toExpNeg: -8, toExpPos: digits });
    const expected: [string, Decimal][] = [
      ['sqrt(2)', new D(2).sqrt()],
      ['sqrt(2+sqrt(3+sqrt(5)))', new D(5).sqrt().add(3).sqrt().add(2).sqrt()],
      ['1/(1+sqrt(2)+sqrt(3))', new D(1).div(new D(2).sqrt().add(new D(3).sqrt()).add(1))],
      ['(sqrt(17)-4)/3', new D(17).sqrt().sub(4).div(3)],
      ['-sqrt(10^21+1)', new D('1e21').add(1).sqrt().neg()],
    ];
    for (const [source, d] of expected) {
      expect(
        new D(decimal(source, digits)).eq(d.toSignificantDigits(digits, Decimal.ROUND_HALF_EVEN)),
      ).toBe(true);
    }
  });

  it('of 10 000 digits are found, and their square is near the radicand', () => {
    const D = Decimal.clone({ precision: 20_010 });
    const r = new D(decimal('sqrt(2)', 10_000));
    expect(r.mul(r).sub(2).abs().lt(new D(10).pow(-9998))).toBe(true);
  });

  it('see a value that nine digits of a tie hide', () => {
    // √(10⁴⁰+1) − 10²⁰ = 5·10⁻²¹ − 1.25·10⁻⁶¹ + …
    expect(decimal('sqrt(10^40+1)-10^20', 12)).toBe('5.00000000000e-21');
    expect(decimal('sqrt(10^40+1)-10^20', 45)).toBe(
      '4.99999999999999999999999999999999999999987500e-21',
    );
  });

  it('of complex numbers give both parts', () => {
    expect(e.decimal(evaluateWith(e, 'sqrt(-2)+1/2'), 6)).toEqual({
      re: '0.5',
      im: '1.41421',
      digits: 6,
      terminates: false,
    });
    expect(e.decimal(evaluateWith(e, '1/2-i/4'), 6)).toEqual({
      re: '0.5',
      im: '-0.25',
      digits: 6,
      terminates: true,
    });
  });
});
