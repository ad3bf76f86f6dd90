import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type LengthUnit, evaluateExpression } from '@/lib/language/index';
import { noticesOf } from '@/lib/language/notices';
import { readLine } from '@/lib/language/read';

function holds(source: string): boolean {
  const result = evaluateExpression(source, { digits: 5 });
  if (result.kind !== 'truth') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result.truth.value;
}

function numberIn(source: string, unit: LengthUnit) {
  const result = evaluateExpression(source, { digits: 5, unit });
  if (result.kind !== 'number') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result;
}

function angleOf(source: string) {
  const result = evaluateExpression(source, { digits: 5 });
  if (result.kind !== 'angle') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result;
}

const RUNS = { numRuns: 40 };
const sixtyFourths = fc.integer({ min: -100_000, max: 100_000 });

describe('feet and inches', () => {
  it('a size in several units is the sum of its parts, and its opposite that of all of them', () => {
    fc.assert(
      fc.property(
        fc.nat(50),
        fc.nat(11),
        fc.integer({ min: 1, max: 15 }),
        fc.constantFrom('in', 'ft'),
        (feet, inches, part, unit) => {
          const compound = `${feet} ft ${inches} ${part}/16 in`;
          expect(holds(`${compound} == ${feet} ft + (${inches} + ${part}/16) in`)).toBe(true);
          expect(holds(`-${compound} == 0 mm - (${compound})`)).toBe(true);
          expect(holds(`${feet} ${part}/16 ${unit} == (${feet} + ${part}/16) ${unit}`)).toBe(true);
        },
      ),
      RUNS,
    );
  });

  it('whole sixty-fourths are given exactly, and the text parses back to the same length', () => {
    fc.assert(
      fc.property(sixtyFourths, fc.constantFrom<LengthUnit>('in', 'ft'), (count, unit) => {
        const { inches } = numberIn(`${count}/64 * in`, unit);
        expect(inches).toMatchObject({ denominator: 64, error: '0', direction: 'exact' });
        expect(holds(`${inches?.text ?? ''} == ${count}/64 * in`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('the error is what the rounded length is more than the exact one, and half a part at most', () => {
    fc.assert(
      fc.property(sixtyFourths, fc.integer({ min: 1, max: 97 }), (n, d) => {
        const exact = `(${n}/${d} * mm)`;
        const { inches } = numberIn(exact, 'in');
        if (inches === undefined) throw new Error('There are no inches.');
        const gap = `((${inches.text}) - ${exact})`;
        expect(holds(`abs(${gap} - (${inches.error}) * mm) <= 0.0000005 mm`)).toBe(true);
        expect(holds(`abs(${gap}) <= 1/128 in`)).toBe(true);
        const sign = { up: '>', down: '<', exact: '==' }[inches.direction];
        expect(holds(`${gap} ${sign} 0 mm`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('gives the size that was computed for the trade with 60 digits', () => {
    // 551.248553450 mm is 21 45/64 in, 0.010822 mm more: computed apart from this program.
    const { inches } = numberIn('551.248553450 mm', 'in');
    expect(inches).toEqual({
      text: '21 45/64 in',
      denominator: 64,
      error: '+0.010822',
      direction: 'up',
    });
    expect(numberIn('551.248553450 mm', 'ft').inches?.text).toBe('1 ft 9 45/64 in');
  });

  it('has no inches where the unit is metric or the value is no length', () => {
    expect(numberIn('2 in', 'mm').inches).toBeUndefined();
    expect(numberIn('2 in^2', 'in').inches).toBeUndefined();
  });
});

describe('degrees, minutes and seconds', () => {
  it('an angle is the sum of its parts, in signs and in words', () => {
    fc.assert(
      fc.property(fc.nat(400), fc.nat(59), fc.nat(599), (deg, min, tenths) => {
        const sec = `${Math.floor(tenths / 10)}.${tenths % 10}`;
        const sum = `(${deg} + ${min}/60 + ${sec}/3600) * deg`;
        expect(holds(`${deg}° ${min}′ ${sec}″ == ${sum}`)).toBe(true);
        expect(holds(`${deg} deg ${min} min ${sec} sec == ${sum}`)).toBe(true);
        expect(holds(`-${deg}° ${min}' ${sec}" == -(${sum})`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('whole tenths of a second are given exactly, and the text parses back to the same angle', () => {
    fc.assert(
      fc.property(fc.integer({ min: -20_000_000, max: 20_000_000 }), (tenths) => {
        const source = `${tenths}/12960000 * turn`;
        const { dms } = angleOf(source);
        expect(dms.direction).toBe('exact');
        expect(holds(`${dms.text} == ${source}`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('rounds to the nearest tenth, a tie to the even one, and says which way', () => {
    expect(angleOf('turn/17').dms).toEqual({ text: '21° 10′ 35.3″', direction: 'up' });
    expect(angleOf('turn/7').dms).toEqual({ text: '51° 25′ 42.9″', direction: 'up' });
    expect(angleOf('0.05 deg / 3600').dms).toEqual({ text: '0° 0′ 0″', direction: 'down' });
    expect(angleOf('0.15 deg / 3600').dms).toEqual({ text: '0° 0′ 0.2″', direction: 'up' });
    expect(angleOf('59° 59′ 59.96″').dms.text).toBe('60° 0′ 0″');
  });
});

describe('units in products, quotients and powers', () => {
  const exponents = fc.integer({ min: -4, max: 4 });
  const units = fc.constantFrom('mm', 'cm', 'm', 'in', 'ft');

  it('a quotient has the difference of the exponents, and a reciprocal the opposite one', () => {
    fc.assert(
      fc.property(exponents, exponents, units, units, (p, q, a, b) => {
        const unitOf = (n: number) => (n === 0 ? null : n === 1 ? 'mm' : `mm^${n}`);
        expect(numberIn(`${a}^${p} / ${b}^${q}`, 'mm').unit).toBe(unitOf(p - q));
        expect(numberIn(`1/${a}^${p}`, 'mm').unit).toBe(unitOf(-p));
        expect(holds(`(1/${a}^${p}) * ${a}^${p} == 1`)).toBe(true);
        expect(holds(`(${a}/${b})^${p} == ${a}^${p} / ${b}^${p}`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('only values of one dimension are added or compared', () => {
    fc.assert(
      fc.property(exponents, exponents, units, (p, q, unit) => {
        const sum = evaluateExpression(`${unit}^${p} + 2 ${unit}^${q}`, { digits: 5 });
        expect(sum.kind).toBe(p === q ? 'number' : 'error');
        if (sum.kind === 'error') expect(sum.error.code).toBe('unit-mismatch');
      }),
      RUNS,
    );
  });
});

describe('readings that a person may not expect are noticed', () => {
  it.each([
    ['1/2R', '/ 2 R'],
    ['1/2 R', '/ 2 R'],
    ['a/b c d', '/ b c'],
    ['R/2 sqrt(3)', '/ 2 sqrt(3)'],
    ['R/2(1 + k)', '/ 2 (1 + k)'],
    ['1/√2 R', '/ √2 R'],
    ['√2R', '√(2 R)'],
    ['x^1/2', 'x^(1/2)'],
    ['√x^2', 'put the power in brackets'],
    ['sqrt(2)/5 ft 3 in', 'divides by `5 ft 3 in`'],
    ['5 ft 13 in', 'a whole foot or more'],
    ['5° 60′', 'a whole degree or more'],
    ['v where v = 1/2R', '/ 2 R'],
  ])('%s', (source, part) => {
    const reading = readLine(source);
    if (reading.kind !== 'statement') throw new Error(reading.kind);
    const notices = noticesOf(reading.statement, source);
    expect(notices.map(({ message }) => message).join(' ')).toContain(part);
    for (const { from, to } of notices)
      expect(0 <= from && from < to && to <= source.length).toBe(true);
  });

  it.each(['R/2 * k', '(1/2) R', '1/(2R)', '√2 R', 'x^(1/2)', 'x^1 / 2', '3/4 in', '5 ft 11.5 in'])(
    'nothing is noticed at %s',
    (source) => {
      const reading = readLine(source);
      if (reading.kind !== 'statement') throw new Error(reading.kind);
      expect(noticesOf(reading.statement, source)).toEqual([]);
    },
  );
});
