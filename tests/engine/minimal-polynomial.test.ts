import { describe, expect, it } from 'vitest';
import { createEngine } from '../../lib/engine/index';
import { powerRoot, squarefreeModulo } from '../../lib/engine/polynomial';
import { evaluateWith } from './expression';

/** Found by algdep at 600 digits in PARI/GP 2.15.2 (Debian package pari-gp), recorded once. */
const PARI: [string, number[]][] = [
  ['1/(1+sqrt(2)+sqrt(3))', [8, -16, 4, 4, -1]],
  ['sqrt(2+sqrt(3+sqrt(5)))', [1, 0, -8, 0, 18, 0, -8, 0, -4]],
  [
    'sqrt(1+sqrt(2))+sqrt(1+sqrt(3))',
    [1, 0, -16, 0, 76, 0, -176, 0, -90, 0, 1040, 0, -2228, 0, -80, 0, 1],
  ],
  ['cos(2*pi/17)', [256, 128, -448, -192, 240, 80, -40, -8, 1]],
  [
    'sin(2*pi/17)',
    [65536, 0, -278528, 0, 487424, 0, -452608, 0, 239360, 0, -71808, 0, 11424, 0, -816, 0, 17],
  ],
  [
    'cos(2*pi/51)',
    [
      65536, -32768, -262144, 131072, 421888, -210944, -347136, 173568, 152576, -76288, -33664,
      16832, 3008, -1504, -64, 32, 1,
    ],
  ],
  [
    'sqrt(2)+sqrt(3)+sqrt(5)+sqrt(7)',
    [1, 0, -136, 0, 6476, 0, -141912, 0, 1513334, 0, -7453176, 0, 13950764, 0, -5596840, 0, 46225],
  ],
  ['sqrt(10+2*sqrt(5))/4+i*(sqrt(5)-1)/4', [1, 0, -1, 0, 1, 0, -1, 0, 1]],
  ['sqrt(2+i*sqrt(3))', [1, 0, -4, 0, 7]],
];

describe('minimal polynomials', () => {
  it.each(PARI)('of %s agree with PARI/GP', (source, expected) => {
    const e = createEngine();
    const outcome = e.attempt(() => e.minimalPolynomial(evaluateWith(e, source)).map(Number));
    expect(outcome).toEqual({ kind: 'value', value: expected });
  });

  it('of a sum of 16 independent roots is beyond the limit, its degree is not', () => {
    const e = createEngine();
    const primes = [2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53];
    const sum = (): ReturnType<typeof e.integer> =>
      primes.map((p) => e.sqrt(e.integer(p))).reduce((a, b) => e.add(a, b));
    expect(e.attempt(() => e.degree(sum()))).toEqual({ kind: 'value', value: 65536 });
    expect(e.attempt(() => e.minimalPolynomial(sum()))).toMatchObject({
      kind: 'over-limit',
      code: 'limit-size',
      limit: 'degree',
      allowed: 256,
      met: 65536,
    });
  });

  it('of degree 256 is found', () => {
    const e = createEngine();
    const outcome = e.attempt(() => {
      const s = e.sinTurn(1n, 257n);
      return { degree: e.degree(s), constant: e.minimalPolynomial(s).at(-1) };
    });
    // ∏ 2sin(2πk/257) over half the units is √257, so the primitive polynomial of sin ends in 257 (from memory: ∏ 2 sin(πk/n) = n).
    expect(outcome).toEqual({ kind: 'value', value: { degree: 256, constant: 257n } });
  });

  it.each([3, 5, 8, 12, 15, 16, 17, 20, 24, 30, 34, 51, 60, 64, 85, 96, 257])(
    'of cos(2π/%i) is the same by cyclotomic polynomials as by norms',
    (n) => {
      const e = createEngine({ steps: 100_000_000 });
      const c = e.cosTurn(1n, BigInt(n));
      const direct = e.minimalPolynomial(c);
      const byNorms = e.minimalPolynomial(e.sub(e.add(c, e.integer(1)), e.integer(1)));
      expect(direct.join()).toBe(byNorms.join());
      expect(e.degree(c)).toBe(direct.length - 1);
    },
  );

  it('of a nest of complex roots is found although its tower of real roots is far larger', () => {
    const e = createEngine();
    // ((x² − 1)² − 1)² − 1 = i
    const outcome = e.attempt(() => {
      const x = evaluateWith(e, 'sqrt(1+sqrt(1+sqrt(1+i)))');
      const p = e.minimalPolynomial(x);
      let v = x;
      for (let j = 0; j < 3; j++) v = e.sub(e.mul(v, v), e.integer(1));
      return [e.degree(x), p.length, e.equal(v, e.i)];
    });
    expect(outcome).toEqual({ kind: 'value', value: [16, 17, true] });
  });

  it('take roots of powers only of powers', () => {
    expect(powerRoot([1n, 2n, 1n], 2)).toEqual([1n, 1n]);
    expect(powerRoot([1n, 2n, 2n], 2)).toBeNull();
    expect(powerRoot([1n, 4n, 6n, 4n, 1n], 4)).toEqual([1n, 1n]);
    expect(squarefreeModulo([1n, 2n, 1n])).toBe(false);
    expect(squarefreeModulo([1n, 0n, -2n])).toBe(true);
  });
});
