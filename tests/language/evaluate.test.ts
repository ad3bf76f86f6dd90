import { describe, expect, it } from 'vitest';
import {
  type Result,
  type Settings,
  evaluateCells,
  evaluateExpression,
  MOST_DIGITS,
  completeSettings,
  evaluateSource,
} from '@/lib/language/index';
import { LANGUAGE_LIMITS } from '@/lib/language/limits';

const errorOf = (source: string, settings?: Partial<Settings>) => {
  const result = evaluateExpression(source, settings);
  return result.kind === 'error'
    ? { code: result.error.code, at: source.slice(result.error.from, result.error.to) }
    : result.kind;
};
const brief = (result: Result) =>
  result.kind === 'error'
    ? result.error.code
    : result.kind === 'number'
      ? result.exact.text
      : result.kind === 'truth'
        ? String(result.truth.value)
        : result.kind === 'function'
          ? result.signature
          : result.exact.text;
const evaluateAll = (...sources: string[]) =>
  evaluateCells(sources.map((source, index) => ({ id: `c${index}`, source }))).map(({ results }) =>
    results.map(brief),
  );

describe('results by the schema', () => {
  it('a number has every field of the schema', () => {
    expect(evaluateExpression('x = sqrt(5+2*sqrt(6))')).toEqual({
      line: 1,
      source: 'x = sqrt(5+2*sqrt(6))',
      mark: 'x',
      typeset: 'x=\\sqrt{5+2\\cdot \\sqrt{6}}',
      notices: [],
      kind: 'number',
      exact: { text: 'sqrt(2)+sqrt(3)', tex: '\\sqrt{2}+\\sqrt{3}', staged: false },
      unit: null,
      real: true,
      decimal: { re: '3.14626436994197234232913506572', im: null, digits: 30, terminates: false },
      degree: 4,
      minimalPolynomial: ['1', '0', '-10', '0', '1'],
      tower: [
        { name: 'r1', radicand: '2', tex: '2' },
        { name: 'r2', radicand: '3', tex: '3' },
      ],
      reach: {
        straightedgeAndCompass: true,
        withTrisector: true,
        reason:
          'It is built from rational numbers by 2 square roots, so straightedge and compass reach it.',
      },
    });
  });

  it('π is transcendental: no degree, no polynomial, no tower, out of reach', () => {
    expect(evaluateExpression('pi')).toMatchObject({
      exact: { text: 'pi' },
      decimal: { re: '3.14159265358979323846264338328', terminates: false },
      degree: null,
      minimalPolynomial: null,
      tower: null,
      reach: { straightedgeAndCompass: false, withTrisector: false },
    });
  });

  it('an angle has its exact part of a turn, its degrees and its reach', () => {
    expect(evaluateExpression('3 turn/34')).toMatchObject({
      kind: 'angle',
      exact: { text: '3 turn/34' },
      reach: { straightedgeAndCompass: true },
    });
    expect(evaluateExpression('24°')).toMatchObject({
      kind: 'angle',
      exact: { text: '24 deg' },
      decimal: { re: '24', terminates: true },
    });
    expect(evaluateExpression('turn/7')).toMatchObject({
      reach: { straightedgeAndCompass: false, withTrisector: true },
    });
    expect(evaluateExpression('turn/11')).toMatchObject({
      reach: { straightedgeAndCompass: false, withTrisector: false },
    });
  });

  it('an ended decimal is the value itself', () => {
    const decimal = (source: string) => {
      const result = evaluateExpression(source);
      return result.kind === 'number'
        ? [result.decimal.re, result.decimal.terminates]
        : result.kind;
    };
    expect(decimal('500')).toEqual(['500', true]);
    expect(decimal('3/4')).toEqual(['0.75', true]);
    expect(decimal('0.1 + 0.2')).toEqual(['0.3', true]);
    expect(decimal('2 - 2')).toEqual(['0', true]);
    expect(decimal('1/3')).toEqual(['0.333333333333333333333333333333', false]);
  });

  it('keeps line numbers and sources of lines with blanks and remarks between them', () => {
    const [cell] = evaluateCells([{ id: 'a', source: 'a = 1\r\n\r\n# note\n  b = 2 # two' }]);
    expect(cell?.results.map(({ line, source, mark }) => [line, source, mark])).toEqual([
      [1, 'a = 1', 'a'],
      [4, '  b = 2 # two', 'b'],
    ]);
  });

  it('takes an expression of one line only', () => {
    expect(brief(evaluateExpression('1 + 1\n'))).toBe('2');
    expect(errorOf('1\n2')).toMatchObject({ code: 'syntax' });
    expect(errorOf('')).toMatchObject({ code: 'syntax' });
  });

  it('throws for settings that no schema lets through', () => {
    expect(() => evaluateExpression('1', { digits: 0 })).toThrow(RangeError);
    expect(() => evaluateExpression('1', { step: 'half' })).toThrow(RangeError);
  });
});

describe('decisions', () => {
  it.each([
    ['sqrt(2)+sqrt(3) == sqrt(5+2*sqrt(6))', true, 'Both sides are sqrt(2)+sqrt(3).'],
    ['0.1 + 0.2 == 0.3', true, 'Both sides are 3/10.'],
    ['25.4 mm == 1 in', true, 'Both sides are 127/5 mm.'],
    ['sqrt(2) > 1.4142', true, 'The left side is greater by about 0.00001356.'],
    ['3 mm < 2 mm', false, 'The left side is greater by 1 mm.'],
    [
      'sqrt(33)+sqrt(74) <= sqrt(28)+sqrt(82)',
      false,
      'The left side is greater by about 0.0000001533.',
    ],
    ['pi < 22/7', true, 'The left side is less by about 0.001264.'],
    ['pi^2 == 10', false, 'The left side is less by about 0.1304.'],
    ['2 pi - pi == pi', true, 'Both sides are pi.'],
    ['30 deg == turn/12', true, 'Both sides are 30 deg.'],
    ['i == 1', false, 'The sides differ by -1 + 1 i.'],
    ['i^2 != -1', false, 'Both sides are -1.'],
    ['1 < 2 <= 2 < 3', true, 'All 3 relations hold.'],
    ['1 < 3 < 2', false, 'Relation 2 fails. The left side is greater by 1.'],
  ])('%s', (source, value, reason) => {
    expect(evaluateExpression(source)).toMatchObject({ kind: 'truth', truth: { value, reason } });
  });
});

describe('values that straightedge and compass do not reach', () => {
  it.each([
    ['cos(2*pi/7)', 'cos(2*pi/7)', 3, false, true],
    ['cbrt(2)', 'cbrt(2)', 3, false, false],
    ['cos(20 deg)', 'cos(pi/9)', 3, false, true],
    ['2^(1/5)', '2^(1/5)', 5, false, false],
    ['root(x^4 - x - 1, 1.2)', 'root(x^4-x-1, 1.22)', 4, false, false],
    ['sqrt(pi)', 'sqrt(pi)', null, false, false],
  ])('%s', (source, text, degree, compass, trisector) => {
    const result = evaluateExpression(source);
    expect(result).toMatchObject({
      kind: 'number',
      exact: { text },
      degree,
      tower: null,
      reach: { straightedgeAndCompass: compass, withTrisector: trisector },
    });
    expect(evaluateExpression(`(${source}) == ${text}`)).toMatchObject({ truth: { value: true } });
  });

  it('keep the polynomial of the result schema', () => {
    expect(evaluateExpression('cos(2*pi/7)')).toMatchObject({
      minimalPolynomial: ['8', '4', '-4', '-1'],
    });
  });

  it('name a root of unity by its part of a turn', () => {
    expect(evaluateExpression('cos(2*pi/7)+i*sin(2*pi/7)')).toMatchObject({ partOfTurn: '1/7' });
    expect(evaluateExpression('(1+i)/sqrt(2)')).toMatchObject({ partOfTurn: '1/8' });
    expect(evaluateExpression('1+i')).not.toHaveProperty('partOfTurn');
  });

  it('give square roots back where an expression comes out in them', () => {
    for (const [source, text] of [
      ['cbrt(2+sqrt(5)) + cbrt(2-sqrt(5))', '1'],
      ['cos(2*pi/7)*cos(4*pi/7)*cos(6*pi/7)', '1/8'],
      ['root(x^4 - 10 x^2 + 1, 3)', 'sqrt(2)+sqrt(3)'],
      ['sqrt(pi)^2/pi', '1'],
    ] as const) {
      expect(evaluateExpression(source)).toMatchObject({ kind: 'number', exact: { text } });
    }
  });
});

describe('errors of a line, at their place', () => {
  it.each([
    ['1/0', 'division-by-zero', '0'],
    [
      '2 + 1/(sqrt(2)+sqrt(3)-sqrt(5+2*sqrt(6)))',
      'division-by-zero',
      '(sqrt(2)+sqrt(3)-sqrt(5+2*sqrt(6)))',
    ],
    ['0^-1', 'division-by-zero', '0^-1'],
    ['30 deg / (0 deg)', 'division-by-zero', '(0 deg)'],
    ['1 + (sqrt(2) < i)', 'syntax', '<'],
    ['sqrt(2) < i', 'domain', 'sqrt(2) < i'],
    ['2 + max(1, i)', 'domain', 'max(1, i)'],
    ['1 + tan(90°)', 'domain', 'tan(90°)'],
    ['cot(0 deg)', 'domain', 'cot(0 deg)'],
    ['sec(270°)', 'domain', 'sec(270°)'],
    ['csc(turn/2)', 'domain', 'csc(turn/2)'],
    ['acos(2)', 'domain', 'acos(2)'],
    ['chord(1, 400 deg)', 'domain', 'chord(1, 400 deg)'],
    ['chord(-1, 40 deg)', 'domain', 'chord(-1, 40 deg)'],
    ['3 mm + 2 deg', 'unit-mismatch', '3 mm + 2 deg'],
    ['1 + 2 + 3 mm + 4', 'unit-mismatch', '1 + 2 + 3 mm'],
    ['2 mm == 2', 'unit-mismatch', '2 mm == 2'],
    ['2 * sqrt(4 mm)', 'unit-mismatch', 'sqrt(4 mm)'],
    ['√(4 mm)', 'unit-mismatch', '√(4 mm)'],
    ['cbrt(8 mm^2)', 'unit-mismatch', 'cbrt(8 mm^2)'],
    ['2^(1 mm)', 'unit-mismatch', '2^(1 mm)'],
    ['sin(2 mm)', 'unit-mismatch', 'sin(2 mm)'],
    ['(2 mm) (3 deg)', 'unit-mismatch', '(2 mm) (3 deg)'],
    ['round(2.5 mm)', 'unit-mismatch', 'round(2.5 mm)'],
    ['1 + sin(1)', 'not-exact', 'sin(1)'],
    ['root(x^2 - 2, 0)', 'domain', 'root(x^2 - 2, 0)'],
    ['2^sqrt(2)', 'not-exact', '2^sqrt(2)'],
    ['1/(1 + pi)', 'not-exact', '(1 + pi)'],
    ['sqrt(1 + pi)', 'not-exact', 'sqrt(1 + pi)'],
    ['1 + sqtr', 'unknown-name', 'sqtr'],
    ['9^9^9', 'limit-size', '9^9^9'],
    ['2^(10^30)', 'limit-size', '2^(10^30)'],
    ['mm^61', 'limit-size', 'mm^61'],
    ['pi^101', 'limit-size', 'pi^101'],
    ['sqrt(1, 2)', 'syntax', 'sqrt(1, 2)'],
    ['chord(1)', 'syntax', 'chord(1)'],
  ])('%s', (source, code, at) => {
    expect(errorOf(source)).toEqual({ code, at });
  });

  it('asks for more digits than the limit', () => {
    expect(errorOf('sqrt(2)', { digits: 10_001 })).toMatchObject({ code: 'limit-digits' });
    expect(errorOf('pi', { digits: 10_001 })).toMatchObject({ code: 'limit-digits' });
  });

  it('a chain of roots too high is a limit of the tower', () => {
    expect(errorOf('sqrt(1+'.repeat(30) + '1' + ')'.repeat(30))).toMatchObject({
      code: 'limit-tower',
    });
  });

  it('suggests the nearest name', () => {
    const message = (source: string) => {
      const result = evaluateExpression(source);
      return result.kind === 'error' ? result.error.message : '';
    };
    expect(message('versin(1)')).toBe('No mark `versin` is defined; did you mean `versine`?');
    expect(message('2 sagita(1, 2)')).toBe(
      'There is no function `sagita`; did you mean `sagitta`?',
    );
    expect(errorOf('2 sagita(1, 2)')).toEqual({ code: 'unknown-name', at: 'sagita' });
    expect(message('2 MM')).toContain('did you mean `mm`?');
    expect(message('quoin')).toBe('No mark `quoin` is defined.');
    expect(message('1e3')).toContain('10^3');
  });
});

describe('marks across cells', () => {
  it('finds marks whatever their order on the page', () => {
    expect(evaluateAll('c = a b\nb = a + 1', 'a = 2')).toEqual([['6', '3'], ['2']]);
  });

  it('names a cycle at each of its lines and depends-on-error at what reads it', () => {
    const cells = evaluateCells([
      { id: 'x', source: 'a = b + 1\nb = c\nc = 2 a\nd = a + 1\ne = 5' },
    ]);
    expect(cells[0]?.results.map(brief)).toEqual([
      'cycle',
      'cycle',
      'cycle',
      'depends-on-error',
      '5',
    ]);
    const [first] = cells[0]?.results ?? [];
    expect(first?.kind === 'error' && first.error).toEqual({
      code: 'cycle',
      message:
        'These names are defined by one another in a circle: `a`, `b`, `c`; one of them must not read the others.',
      from: 4,
      to: 5,
    });
  });

  it('a mark defined by itself is a cycle', () => {
    expect(evaluateAll('a = a + 1')).toEqual([['cycle']]);
  });

  it('a mark defined twice is an error at both places and for its readers', () => {
    const [results] = evaluateCells([{ id: 'x', source: 'R = 1\ns = R\nR = 2' }]);
    expect(results?.results.map(brief)).toEqual([
      'duplicate-mark',
      'depends-on-error',
      'duplicate-mark',
    ]);
    const [first] = results?.results ?? [];
    expect(first?.kind === 'error' && first.error.message).toBe(
      '`R` is defined here and also in line 3 of this cell; a mark has one definition.',
    );
  });

  it('two definitions that read each other under one name are duplicates, not a cycle', () => {
    expect(evaluateAll('a = b', 'a = 2\nb = 1')).toEqual([
      ['duplicate-mark'],
      ['duplicate-mark', '1'],
    ]);
  });

  it('a mark whose line does not parse is an error upstream, not an unknown name', () => {
    expect(evaluateAll('R = (2\ns = R + 1')).toEqual([['syntax', 'depends-on-error']]);
  });

  it('the reader of an erroneous mark says where the error is', () => {
    const [, second] = evaluateCells([
      { id: 'x', source: '\nR = 1/0' },
      { id: 'y', source: 's = R + 1' },
    ]);
    const [result] = second?.results ?? [];
    expect(result?.kind === 'error' && result.error).toEqual({
      code: 'depends-on-error',
      message: '`R` has no value, as its definition in line 2 of another cell has an error.',
      from: 4,
      to: 5,
    });
  });

  it('follows a chain of thousands of marks without running out of stack', () => {
    const length = 3_000;
    const lines = Array.from(
      { length },
      (_, index) => `a${index} = ${index === length - 1 ? '1' : `a${index + 1} + 1`}`,
    );
    const [cell] = evaluateCells([{ id: 'x', source: lines.join('\n') }], { digits: 5 });
    expect(brief(cell?.results[0] as Result)).toBe('3000');
  });

  it('evaluates lines up to the limit and says so at those beyond', () => {
    const [cell] = evaluateCells(
      [
        {
          id: 'x',
          source: Array(LANGUAGE_LIMITS.lines + 2)
            .fill('1')
            .join('\n'),
        },
      ],
      {
        digits: 1,
      },
    );
    expect(cell?.results).toHaveLength(LANGUAGE_LIMITS.lines + 2);
    expect(cell?.results.slice(LANGUAGE_LIMITS.lines - 1).map(brief)).toEqual([
      '1',
      'limit-size',
      'limit-size',
    ]);
  });

  it('the variable of a polynomial is no mark, and a mark named x is one elsewhere', () => {
    expect(evaluateAll('root(x^2 - 2, 1)')).toEqual([['sqrt(2)']]);
    expect(evaluateAll('x = 3\nroot(x^2 - x - 1, 2) + x')).toEqual([['3', '(7+sqrt(5))/2']]);
  });
});

describe('a line without its place', () => {
  const NONE = new Set<string>();
  const settings = completeSettings({ digits: 10 });
  const value = (source: string) => evaluateSource(source, NONE, null, () => null).value;

  it('says the same as among all others, from the value alone that it reads', () => {
    const a = value('a = sqrt(2) + 3 mm/(1 mm)');
    const { outcome } = evaluateSource('b = a^2', NONE, settings, (name) =>
      name === 'a' ? a : null,
    );
    const [cell] = evaluateCells([{ id: '', source: 'a = sqrt(2) + 3\nb = a^2' }], { digits: 10 });
    expect({ line: 2, source: 'b = a^2', mark: 'b', ...outcome }).toEqual(cell?.results[1]);
  });

  it('names the first mark that has no value, and not the reason', () => {
    const { outcome, value: none } = evaluateSource('c = 2 p + q', NONE, settings, () => null);
    expect(outcome).toMatchObject({ kind: 'missing', name: 'p', at: { from: 6, to: 7 } });
    expect(none).toBeNull();
  });

  it('is worth its value without settings, and none when it fails or decides', () => {
    expect(value('a = 1/0')).toBeNull();
    expect(value('1 < 2')).toBeNull();
    expect(evaluateSource('a = 1', NONE, null, () => null)).toMatchObject({ outcome: null });
    expect(value('a = 1')).not.toBeNull();
  });

  it('leaves out degree, polynomial and tower when told so, with the reason, and keeps its value', () => {
    const brief = { code: 'limit-time' as const, message: 'Too long.' };
    const { outcome, value: kept } = evaluateSource('c = 7', NONE, settings, () => null, { brief });
    expect(outcome).toMatchObject({
      exact: { text: '7' },
      degree: null,
      minimalPolynomial: null,
      tower: null,
      reach: { straightedgeAndCompass: true },
      omitted: [
        { field: 'degree', ...brief },
        { field: 'minimalPolynomial', ...brief },
        { field: 'tower', ...brief },
      ],
    });
    expect(kept).toEqual(value('c = 7'));
  });
});

describe('settings of a cell', () => {
  it('go before those of the notebook, and only for that cell', () => {
    const cells = [
      { id: 'a', source: 'R = 1 in', settings: { unit: 'in' as const, step: '1/64 in' } },
      { id: 'b', source: '2 R' },
    ];
    const [a, b] = evaluateCells(cells, { unit: 'mm', digits: 12 }).map(({ results }) => results);
    expect(a?.[0]).toMatchObject({ unit: 'in', cut: { value: '1' }, decimal: { digits: 12 } });
    expect(b?.[0]).toMatchObject({ unit: 'mm', exact: { text: '254/5' } });
    expect(b?.[0]).not.toHaveProperty('cut');
  });

  it('a mark that cannot be written with them has its value all the same', () => {
    const cells = [
      { id: 'a', source: 'a = sqrt(2)', settings: { digits: MOST_DIGITS + 1 } },
      { id: 'b', source: 'a^2' },
    ];
    const all = evaluateCells(cells).flatMap(({ results }) => results.map(brief));
    expect(all).toEqual(['limit-digits', '2']);
  });
});

describe('the settings of a cell', () => {
  const whole = { digits: 6, unit: 'mm', step: '1 mm', rounding: 'up' } as const;
  const given = (settings: Partial<Settings> | undefined) => {
    const cells = evaluateCells(
      [
        { id: 'a', source: 'R = 100 mm' },
        { id: 'b', source: 'R/3', ...(settings === undefined ? {} : { settings }) },
      ],
      whole,
    );
    return cells.map(({ results: [result] }) =>
      result?.kind === 'number' ? `${result.decimal.re} ${result.unit} ${result.cut?.value}` : '',
    );
  };

  it('stand before those of the whole, in that cell alone and only where they say something', () => {
    expect(given(undefined)).toEqual(['100 mm 100', '33.3333 mm 34']);
    expect(given({})).toEqual(given(undefined));
    expect(given({ digits: 3 })).toEqual(['100 mm 100', '33.3 mm 34']);
    expect(given({ unit: 'cm', rounding: 'down' })).toEqual(['100 mm 100', '3.33333 cm 3.3']);
    expect(given({ step: null })).toEqual(['100 mm 100', '33.3333 mm undefined']);
  });

  it('change nothing of the value that other cells read', () => {
    const read = (settings: Partial<Settings>) =>
      evaluateCells([
        { id: 'a', source: 'R = 1 ft', settings },
        { id: 'b', source: 'R/2' },
      ])[1]?.results.map(brief);
    expect(read({ unit: 'in', digits: 1, step: '1 in' })).toEqual(read({}));
  });

  it('that make no sense are refused like those of the whole', () => {
    expect(() => given({ digits: 0 })).toThrow(RangeError);
    expect(() => given({ step: 'half' })).toThrow(RangeError);
  });
});
