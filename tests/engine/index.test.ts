import { describe, expect, it } from 'vitest';
import { createEngine, ENGINE_VERSION, type Engine, type Outcome } from '../../lib/engine/index';
import { evaluateWith } from './expression';

const e = createEngine();
const value = (source: string): ReturnType<Engine['integer']> => evaluateWith(e, source);

function code(outcome: Outcome<unknown>): string {
  return outcome.kind === 'value' ? 'value' : outcome.code;
}

describe('the interface', () => {
  it('has a version', () => {
    expect(ENGINE_VERSION).toMatch(/^\d+\.\d+\.\d+$/);
  });

  it('keeps the three ends apart: a value, outside the domain, over a limit', () => {
    expect(
      e.attempt(() => e.div(e.integer(1), value('sqrt(2)+sqrt(3)-sqrt(5+2*sqrt(6))'))),
    ).toEqual({
      kind: 'outside-domain',
      code: 'division-by-zero',
      message: 'The divisor is exactly 0.',
    });
    expect(code(e.attempt(() => e.div(e.integer(0), e.integer(0))))).toBe('division-by-zero');
    expect(code(e.attempt(() => e.rational(1n, 0n)))).toBe('division-by-zero');
    expect(code(e.attempt(() => e.pow(e.integer(0), -1n)))).toBe('division-by-zero');
    expect(code(e.attempt(() => e.compare(e.sqrt(e.integer(2)), e.i)))).toBe('domain');
    expect(code(e.attempt(() => e.sign(e.i)))).toBe('domain');
    expect(code(e.attempt(() => e.floor(e.i)))).toBe('domain');
    expect(code(e.attempt(() => e.certificate(e.cosTurn(1n, 7n))))).toBe('not-exact');
  });

  it('throws for mistakes of the program', () => {
    expect(() => e.integer(0.5)).toThrow(TypeError);
    expect(() => e.integer(2 ** 60)).toThrow(TypeError);
    expect(() => e.add(e.integer(1), createEngine().integer(1))).toThrow(TypeError);
    expect(() => e.decimal(e.integer(1), 0)).toThrow(RangeError);
    expect(() => e.roundToMultiple(e.integer(1), { n: 0n, d: 1n }, 'up')).toThrow(RangeError);
    expect(() =>
      e.attempt(() => {
        throw new SyntaxError('mine');
      }),
    ).toThrow(SyntaxError);
  });

  it('never changes a value that was handed out', () => {
    const a = value('sqrt(2)+sqrt(1+sqrt(3))');
    const before = e.write(a).text;
    e.add(a, value('sqrt(5)'));
    e.mul(a, a);
    e.sqrt(a);
    e.inverse(a);
    e.minimalPolynomial(a).fill(0n);
    expect(e.write(a).text).toBe(before);
    expect(e.minimalPolynomial(a)[0]).toBe(1n);
  });

  it('answers is-rational, is-integer, is-real exactly', () => {
    const rows: [string, boolean, boolean, boolean][] = [
      ['sqrt(2)*sqrt(8)', true, true, true],
      ['sqrt(1/4)', true, false, true],
      ['sqrt(2)', false, false, true],
      ['sqrt(-4)', false, false, false],
      ['(1+i)^8', true, true, true],
      ['sqrt(9-4*sqrt(5))-sqrt(5)', true, true, true],
    ];
    for (const [source, rational, integer, real] of rows) {
      const v = value(source);
      expect([source, e.isRational(v), e.isInteger(v), e.isReal(v)]).toEqual([
        source,
        rational,
        integer,
        real,
      ]);
    }
    expect(e.asRational(value('sqrt(50)/sqrt(8)'))).toEqual({ n: 5n, d: 2n });
    expect(e.asRational(value('sqrt(2)'))).toBeNull();
  });

  it('floors and rounds exactly, ties to even', () => {
    expect(
      ['7/2', '5/2', '-5/2', '-7/2', '-1/2', '1/2', 'sqrt(2)', '-sqrt(2)'].map((s) =>
        e.round(value(s)),
      ),
    ).toEqual([4n, 2n, -2n, -4n, 0n, 0n, 1n, -1n]);
    expect(['7/2', '-7/2', 'sqrt(2)', '-sqrt(2)', '3'].map((s) => e.floor(value(s)))).toEqual([
      3n,
      -4n,
      1n,
      -2n,
      3n,
    ]);
    expect(e.floor(value('sqrt(10^40+1)'))).toBe(10n ** 20n);
    expect(e.floor(value('sqrt(10^40-1)'))).toBe(10n ** 20n - 1n);
  });

  it('rounds to multiples of a step and says on which side the multiple lies', () => {
    const half = { n: 1n, d: 2n };
    const v = value('1200*sqrt(2-sqrt(2))');
    // 918.44035… by PARI/GP 2.15.2
    expect(e.roundToMultiple(v, half, 'half-even')).toEqual({ multiple: 1837n, direction: 'up' });
    expect(e.roundToMultiple(v, half, 'down')).toEqual({ multiple: 1836n, direction: 'down' });
    expect(e.roundToMultiple(v, half, 'up')).toEqual({ multiple: 1837n, direction: 'up' });
    expect(e.roundToMultiple(value('3/4'), half, 'half-even')).toEqual({
      multiple: 2n,
      direction: 'up',
    });
    expect(e.roundToMultiple(value('1/4'), half, 'half-even')).toEqual({
      multiple: 0n,
      direction: 'down',
    });
    expect(e.roundToMultiple(value('1/4'), half, 'half-up')).toEqual({
      multiple: 1n,
      direction: 'up',
    });
    expect(e.roundToMultiple(value('-1/4'), half, 'half-up')).toEqual({
      multiple: 0n,
      direction: 'up',
    });
    expect(e.roundToMultiple(value('5/2'), half, 'up')).toEqual({
      multiple: 5n,
      direction: 'exact',
    });
  });

  it('parts, conjugates and absolute values of complex numbers', () => {
    const z = value('3+4*i');
    expect(e.write(e.abs(z)).text).toBe('5');
    expect(e.write(e.re(z)).text).toBe('3');
    expect(e.write(e.im(z)).text).toBe('4');
    expect(e.write(e.conj(z)).text).toBe('3-4*i');
    expect(e.write(e.sqrt(z)).text).toBe('2+i');
    expect(e.write(e.abs(value('1+i*sqrt(2)'))).text).toBe('sqrt(3)');
  });
});
