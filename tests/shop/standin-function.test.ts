import { describe, expect, it } from 'vitest';
import {
  type Result,
  type Settings,
  evaluateCells,
  evaluateExpression,
} from '@/lib/language/index';
import { compareFractions, fractionOf } from './targets';

const numberOf = (source: string, settings?: Partial<Settings>) => {
  const result = evaluateExpression(source, settings);
  if (result.kind !== 'number') throw new Error(`${source}: a number was expected.`);
  return result;
};
const errorOf = (source: string) => {
  const result = evaluateExpression(source);
  return result.kind === 'error' ? result.error : { code: result.kind, message: '' };
};
const standInOf = (result: Result) => {
  const standIn = 'standIn' in result ? result.standIn : undefined;
  if (standIn === undefined) throw new Error('A stand-in was expected.');
  return standIn;
};

describe('standin in a cell', () => {
  it('gives Kochański for half a circumference, exact, with its error (1685; -5.9315e-5 of the radius)', () => {
    const result = numberOf('standin(pi * 450 mm, 0.2 mm, 450 mm)');
    const standIn = standInOf(result);
    expect(result.exact.text).toBe('150*sqrt(120-18*sqrt(3))');
    expect(result.unit).toBe('mm');
    expect(result.reach.straightedgeAndCompass).toBe(true);
    expect(standIn).toMatchObject({
      of: '(450*pi) mm',
      tolerance: '1/5 mm',
      family: 'classical',
      source: 'Kochański, Acta Eruditorum, 1685',
      text: '450 mm*sqrt(40/3-2*sqrt(3))',
      error: { bound: '0.0266916981144', direction: 'below' },
      stepped: null,
    });
    expect(standIn.others.map(({ text }) => text)).toContain('159750/113 mm');
  });

  it('is exact where the value is reached, however long its own form', () => {
    const result = numberOf('standin(2*1500 mm*sin(turn/34), 0.5 mm, 1500 mm, 17)');
    const standIn = standInOf(result);
    // PARI/GP 2.15: 3000*sin(Pi/17).
    expect(result.decimal.re).toBe('551.248553449710994723226518862');
    expect(standIn.error).toEqual({ bound: '0', direction: 'exact' });
    expect(standIn.strikes).toEqual({ total: 45, counts: '8S1+4S2+22C1+11C3' });
    expect(standIn.others).toEqual([]);
  });

  it('offers only what parses back to a value inside the tolerance', () => {
    for (const source of [
      'standin(pi * 450 mm, 0.2 mm, 450 mm)',
      'standin(chord(1500 mm, turn/17), 0.5 mm)',
      'standin(pi * sqrt(2) * 100 mm, 0.01 mm, 100 sqrt(2) mm)',
      'standin(pi, 1/1000)',
      'standin(pi * 1 m^2, 5 mm^2)',
    ]) {
      const standIn = standInOf(evaluateExpression(source));
      for (const { text } of [standIn, ...standIn.others]) {
        const within = `abs((${text}) - (${standIn.of})) <= ${standIn.tolerance}`;
        const side = evaluateExpression(within);
        expect(side.kind === 'truth' && side.truth.value).toBe(true);
      }
      const same = evaluateExpression(`${standIn.text} == ${source}`);
      expect(same.kind === 'truth' && same.truth.value).toBe(true);
    }
  });

  it('gives figures in the unit of the settings', () => {
    const source = 'standin(pi * 450 mm, 0.2 mm, 450 mm, 9)';
    const [mm, inch] = (['mm', 'in'] as const).map((unit) => standInOf(numberOf(source, { unit })));
    const bound = (standIn: typeof mm) => fractionOf(standIn?.error.bound ?? '0');
    const inMillimetres = { n: bound(inch).n * 254n, d: bound(inch).d * 10n };
    expect(compareFractions(inMillimetres, bound(mm))).toBeGreaterThanOrEqual(0);
    expect(
      compareFractions(inMillimetres, { n: bound(mm).n * 1_000_001n, d: bound(mm).d * 1_000_000n }),
    ).toBe(-1);
    expect(inch?.tolerance).toBe('1/127 in');
  });

  it('steps round the parts that are given', () => {
    const standIn = standInOf(numberOf('standin(chord(1500 mm, turn/17), 2 mm, 1500 mm, 17)'));
    for (const { stepped, error } of [standIn, ...standIn.others]) {
      if (stepped?.kind !== 'ring') throw new Error('A ring was expected.');
      expect(stepped.parts).toBe(17);
      if (error.direction === 'exact') continue;
      expect(stepped.gap.low.startsWith('-')).toBe(error.direction === 'above');
    }
  });

  it('stands in for an angle by a part of a turn', () => {
    const result = evaluateExpression('standin(turn/7, 0.1 deg)');
    expect(result.kind).toBe('angle');
    const standIn = standInOf(result);
    expect(standIn).toMatchObject({ text: '137 turn/960', error: { direction: 'below' } });
    expect(result.kind === 'angle' && result.reach.straightedgeAndCompass).toBe(true);
    expect(standInOf(evaluateExpression('standin(turn/17, 0.01 deg)')).error).toMatchObject({
      direction: 'exact',
    });
  });

  it('is a value like others: marks read it and arithmetic goes on, without the addition', () => {
    const [cell] = evaluateCells([{ id: 'a', source: 's = standin(pi, 0.01)\n2 s\ns\ns < pi' }]);
    const [definition, twice, again, decided] = cell?.results ?? [];
    if (!definition || !twice || !again || !decided) throw new Error('Four results were expected.');
    expect(standInOf(definition).text).toBe('(8-sqrt(3))/2');
    expect('standIn' in twice).toBe(false);
    expect(standInOf(again)).toEqual(standInOf(definition));
    expect(decided).toMatchObject({ kind: 'truth', truth: { value: true } });
  });

  it('is the same at every asking', () => {
    const source = 'standin(pi * 450 mm, 0.2 mm, 450 mm, 5)';
    expect(evaluateExpression(source)).toEqual(evaluateExpression(source));
  });
});

describe('standin that has nothing to give', () => {
  it('names the nearest and its error when none is inside', () => {
    const { code, message } = errorOf('standin(pi, 1/10^40)');
    expect(code).toBe('not-exact');
    expect(message).toMatch(
      /^None of the \d+ stand-ins looked at lies inside the tolerance; the nearest, `[^`]+`, is 0\.0+\d+ below the value\.$/,
    );
    expect(errorOf('standin(turn/7, 1 deg / 10^9)')).toMatchObject({ code: 'not-exact' });
    expect(errorOf('standin(turn/7, 1 deg / 10^9)').message).toMatch(
      / deg (above|below) the value/,
    );
  });

  it.each([
    ['standin(pi, 0)', 'domain', 'tolerance above 0'],
    ['standin(pi, -0.1)', 'domain', 'tolerance above 0'],
    ['standin(pi, sqrt(2))', 'domain', 'rational tolerance'],
    ['standin(pi, pi)', 'domain', 'rational tolerance'],
    ['standin(3 mm, 0.2)', 'unit-mismatch', 'which is a length; this one is a plain number'],
    ['standin(3, 0.2 mm)', 'unit-mismatch', 'which is a plain number; this one is a length'],
    ['standin(turn/7, 0.1)', 'unit-mismatch', 'which is an angle; this one is a plain number'],
    ['standin(3 mm, 1 deg)', 'unit-mismatch', 'which is a length; this one is an angle'],
    ['standin(3 mm, 0.2 mm, 3)', 'unit-mismatch', 'a radius of the kind of the value'],
    ['standin(turn/7, 1 deg, 3 mm)', 'unit-mismatch', 'takes a tolerance only'],
    ['standin(i, 0.1)', 'domain', 'value that is real'],
    ['standin(pi + i, 0.1)', 'domain', 'value that is real'],
    ['standin(-3, 0.1)', 'domain', 'value above 0'],
    ['standin(0, 0.1)', 'domain', 'value above 0'],
    ['standin(pi, 0.1, 0)', 'domain', 'radius above 0'],
    ['standin(pi, 0.1, 1, 2.5)', 'domain', 'whole number of parts'],
    ['standin(pi, 0.1, 1, 3 mm)', 'domain', 'whole number of parts'],
    ['standin(pi, 1/10^900)', 'limit-digits', 'the limit is 2048'],
    ['standin(pi)', 'syntax', 'takes 2 to 4 arguments'],
    ['standin = 3', 'syntax', 'standin'],
  ])('%s is %s', (source, code, part) => {
    const error = errorOf(source);
    expect(error.code).toBe(code);
    expect(error.message).toContain(part);
  });
});
