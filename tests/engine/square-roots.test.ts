import { describe, expect, it } from 'vitest';
import { createEngine, type Engine, type Num } from '../../lib/engine/index';
import { evaluateWith } from './expression';

function inside<T>(work: (e: Engine) => T): T {
  const e = createEngine();
  const outcome = e.attempt(() => work(e));
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return outcome.value;
}

const same = (e: Engine, a: string, b: string): boolean =>
  e.equal(evaluateWith(e, a), evaluateWith(e, b));

describe('square roots across towers', () => {
  const equalities: [string, string][] = [
    ['sqrt(34-2*sqrt(17))*sqrt(34+2*sqrt(17))', '8*sqrt(17)'],
    ['sqrt(2+sqrt(2+sqrt(2)))*sqrt(2-sqrt(2+sqrt(2)))', 'sqrt(2-sqrt(2))'],
    ['sqrt(1+sqrt(2))*sqrt(sqrt(2)-1)', '1'],
    ['sqrt(11+2*sqrt(29))*sqrt(11-2*sqrt(29))', 'sqrt(5)'],
    ['sqrt(2+sqrt(3))+sqrt(2-sqrt(3))', 'sqrt(6)'],
    ['sqrt(sqrt(2)+sqrt(3))*sqrt(sqrt(3)-sqrt(2))', '1'],
    ['sqrt((1+sqrt(2))*(1+sqrt(3)))*sqrt(1+sqrt(2))', '(1+sqrt(2))*sqrt(1+sqrt(3))'],
    ['sqrt(7+4*sqrt(3))*sqrt(7-4*sqrt(3))', '1'],
  ];

  it.each(equalities)('%s = %s, whichever side comes first', (a, b) => {
    expect(inside((e) => same(e, a, b))).toBe(true);
    expect(inside((e) => same(e, b, a))).toBe(true);
  });

  it('an integer root that comes after two conjugate roots is found among them', () => {
    inside((e) => {
      const product = e.mul(
        evaluateWith(e, 'sqrt(11+2*sqrt(29))'),
        evaluateWith(e, 'sqrt(11-2*sqrt(29))'),
      );
      const sum = e.add(
        evaluateWith(e, 'sqrt(11+2*sqrt(29))'),
        evaluateWith(e, 'sqrt(11-2*sqrt(29))'),
      );
      expect(e.equal(product, e.sqrt(e.integer(5)))).toBe(true);
      expect(e.write(sum).text).toBe('sqrt(22+2*sqrt(5))');
    });
  });

  it('the root of a sum of 40 surds is adjoined without their 2^17 coordinates', () => {
    inside((e) => {
      let sum: Num = e.integer(0);
      for (let i = 2; i < 60; i++) sum = e.add(sum, e.sqrt(e.integer(i)));
      const r = e.sqrt(sum);
      expect(e.equal(e.mul(r, r), sum)).toBe(true);
      expect(e.tower(r)).toHaveLength(18);
    });
  });

  it('integers that could not be factored at first are split when a factor turns up', () => {
    inside((e) => {
      const p = e.integer(2n ** 107n - 1n);
      const q = e.integer(2n ** 127n - 1n);
      const early = e.add(e.sqrt(e.mul(p, q)), e.sqrt(e.integer(3)));
      const late = e.add(e.mul(e.sqrt(p), e.sqrt(q)), e.sqrt(e.integer(3)));
      expect(e.equal(early, late)).toBe(true);
      expect(e.isZero(e.sub(e.mul(early, late), e.mul(early, early)))).toBe(true);
      const square = e.mul(e.mul(p, p), q);
      expect(e.equal(e.sqrt(square), e.mul(p, e.sqrt(q)))).toBe(true);
    });
  });

  it('hidden squares with large denominators are found', () => {
    inside((e) => {
      const x = evaluateWith(
        e,
        '229049/35280+sqrt(2)/12+sqrt(3)/15+sqrt(5)/14-2*sqrt(6)/5-sqrt(10)/5-4*sqrt(30)/35',
      );
      expect(e.equal(e.sqrt(e.mul(x, x)), e.abs(x))).toBe(true);
    });
  });

  it('a sum of nested roots of many fields is still a sum of its terms', () => {
    inside((e) => {
      let sum: Num = e.integer(0);
      for (const n of [2, 3, 5, 7, 11, 13])
        sum = e.add(sum, e.sqrt(e.add(e.integer(1), e.sqrt(e.integer(n)))));
      expect(e.sign(sum)).toBe(1);
      for (const n of [13, 11, 7, 5, 3, 2])
        sum = e.sub(sum, e.sqrt(e.add(e.integer(1), e.sqrt(e.integer(n)))));
      expect(e.isZero(sum)).toBe(true);
    });
  });
});
