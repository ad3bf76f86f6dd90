import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, it } from 'vitest';
import { type Result, type Settings, evaluateCells } from '@/lib/language/index';

/** The results of the lines of one cell. */
function lines(source: string, settings: Partial<Settings> = {}): Result[] {
  const [cell] = evaluateCells([{ id: 'a', source }], settings);
  return cell?.results ?? [];
}

const last = (source: string, settings: Partial<Settings> = {}): Result =>
  lines(source, settings).at(-1) as Result;

type OfKind<K extends Result['kind']> = Extract<Result, { kind: K }>;

function get<K extends Result['kind']>(kind: K, source: string, settings = {}): OfKind<K> {
  const result = last(source, settings);
  if (result.kind !== kind) throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result as OfKind<K>;
}

const holds = (source: string): boolean => get('truth', source).truth.value;
const codeOf = (source: string): string => {
  const result = last(source);
  return result.kind === 'error' ? result.error.code : result.kind;
};
const messageOf = (source: string): string => get('error', source).error.message;

describe('results of figures', () => {
  it('a point gives both coordinates as numbers of their own, with cut sizes', () => {
    const result = get('point', 'P = polar(1200 mm, turn/12)', { step: '0.5 mm' });
    expect(result.mark).toBe('P');
    expect(result.unit).toBe('mm');
    expect(result.exact.text).toBe('point(600*sqrt(3) mm, 600 mm)');
    const { x, y } = result.coordinates;
    expect(x.exact.text).toBe('600*sqrt(3)');
    expect(x.degree).toBe(2);
    expect(x.decimal.re.startsWith('1039.2304845413')).toBe(true);
    expect(x.cut).toMatchObject({ value: '1039', direction: 'down' });
    expect(y.cut).toMatchObject({ value: '600', direction: 'exact' });
    expect(result.reach.straightedgeAndCompass).toBe(true);
  });

  it('a point is reached only when both coordinates are, and the reason names the one that is not', () => {
    const result = get('point', 'polar(450 mm, turn/7)');
    expect(result.reach).toMatchObject({ straightedgeAndCompass: false, withTrisector: true });
    expect(result.reach.reason).toContain('Of its parts, x decides. Its degree is 3');
    const eleven = get('point', 'point(1, cos(turn/11))');
    expect(eleven.reach).toMatchObject({ straightedgeAndCompass: false, withTrisector: false });
    expect(eleven.reach.reason).toContain('y decides');
  });

  it('a line is given by its equation, with the first coefficient 1', () => {
    const result = get('line', 'line(point(0, 3 mm), point(4 mm, 0))', { step: '1 mm' });
    expect(result.exact.text).toBe('line(1, 4/3, -4 mm)');
    expect(result.exact.tex).toBe('x+\\frac{4}{3}y-4\\,\\mathrm{mm}=0');
    expect(result.coefficients.b.exact.text).toBe('4/3');
    expect(result.coefficients.c.unit).toBe('mm');
    expect(result.coefficients.c.cut).toBeUndefined();
  });

  it('a circle is given by centre and radius', () => {
    const result = get('circle', 'circle(point(1 in, 0), 2 in)', { unit: 'in' });
    expect(result.exact.text).toBe('circle(point(1 in, 0 in), 2 in)');
    expect(result.radius.exact.text).toBe('2');
    expect(result.centre.x.decimal.re).toBe('1');
  });

  const coordinate = fc.constantFrom(
    '3',
    '-7/2',
    'sqrt(2)',
    '(sqrt(5)-1)/2',
    'sqrt(3)/7',
    '-sqrt(2+sqrt(2))/3',
    'cos(turn/7)',
    '0',
  );
  const unit = fc.constantFrom('', ' mm', ' in');

  it('what is written reads back as the same figure, in whatever unit, and is TeX', () => {
    fc.assert(
      fc.property(
        coordinate,
        coordinate,
        unit,
        fc.constantFrom<Settings['unit']>('mm', 'in', 'm'),
        fc.constantFrom('point', 'line', 'circle'),
        (x, y, u, settings, kind) => {
          const length = (text: string) => `(${text})${u}`;
          const p = `point(${length(x)}, ${length(y)})`;
          const source = {
            point: p,
            line: `line(${x}, 2, ${length(y)})`,
            circle: `circle(${p}, 3${u})`,
          }[kind];
          const first = last(source, { unit: settings });
          if (!('exact' in first)) throw new Error(JSON.stringify(first));
          expect(holds(`${first.exact.text} == ${source}`)).toBe(true);
          katex.renderToString(first.exact.tex, { throwOnError: true, strict: 'ignore' });
        },
      ),
      { numRuns: 30 },
    );
  });

  it('a value of many stages has one chain of named roots before the point, each named once', () => {
    const { exact } = get('point', 'polar(1, turn/255)');
    expect(exact.staged).toBe(true);
    const stages = exact.text.split('; ');
    const names = stages.slice(0, -1).map((stage) => stage.split(' = ')[0]);
    expect(names).toEqual(names.map((_, index) => `r${index + 1}`));
    expect(stages.at(-1)).toMatch(/^point\(.*r\d+.*, .*r\d+.*\)$/);
    for (const [index, stage] of stages.entries())
      for (const [, used] of stage.slice(stage.indexOf('=')).matchAll(/r(\d+)/g))
        expect(Number(used)).toBeLessThanOrEqual(index);
    katex.renderToString(exact.tex, { throwOnError: true, strict: 'ignore' });
  });
});

describe('units of figures', () => {
  it('lengths go with lengths, and a coordinate 0 with both', () => {
    expect(codeOf('point(1, 2 mm)')).toBe('unit-mismatch');
    expect(codeOf('point(0, 2 mm)')).toBe('point');
    expect(codeOf('circle(point(0, 0), 5 mm)')).toBe('circle');
    expect(codeOf('circle(point(1, 0), 5 mm)')).toBe('unit-mismatch');
    expect(codeOf('mid(point(1, 1), point(1 mm, 1 mm))')).toBe('unit-mismatch');
    expect(codeOf('point(1 mm, 2 mm) == point(1, 2)')).toBe('unit-mismatch');
    expect(holds('point(0, 0) == point(0 mm, 0 mm)')).toBe(true);
    expect(messageOf('point(1, 2 mm)')).toBe(
      '`point` was given a plain number together with a length; lengths go with lengths and plain numbers with plain numbers.',
    );
  });

  it.each([
    ['point(1 mm^2, 0)', 'unit-mismatch'],
    ['point(turn, 0)', 'unit-mismatch'],
    ['point(pi, 0)', 'not-exact'],
    ['point(i, 0)', 'domain'],
    ['line(1 mm, 2, 3)', 'unit-mismatch'],
    ['line(0, 0, 3)', 'domain'],
    ['circle(point(0, 0), -1 mm)', 'domain'],
    ['circle(1 mm, 1 mm)', 'unit-mismatch'],
    ['foot(point(0, 0), point(1, 1))', 'unit-mismatch'],
    ['centre(point(0, 0))', 'unit-mismatch'],
    ['rotate(5, turn/4)', 'unit-mismatch'],
    ['rotate(point(1, 0), 1)', 'not-exact'],
    ['reflect(point(1, 0), circle(point(0, 0), 1))', 'unit-mismatch'],
    ['meet(point(1, 0), line(1, 0, 0))', 'unit-mismatch'],
    ['meet(line(1, 0, 0), circle(point(0, 0), 1), 3)', 'domain'],
    ['dist(circle(point(0, 0), 1), point(0, 0))', 'unit-mismatch'],
    ['angle(point(0, 0), line(1, 0, 0))', 'unit-mismatch'],
    ['point(1)', 'syntax'],
    ['point = 3', 'syntax'],
  ])('`%s` fails with %s', (source, code) => {
    expect(codeOf(source)).toBe(code);
  });
});

describe('points as vectors', () => {
  it('are added, turned round and scaled; a plain point takes a unit', () => {
    expect(holds('point(1, 2) + 2 point(3, 4) - point(1, 0)/2 == point(13/2, 10)')).toBe(true);
    expect(holds('-point(1 mm, 2 mm) == point(-1 mm, -2 mm)')).toBe(true);
    expect(holds('point(1/2, sqrt(3)/2) * 1200 mm == polar(1200 mm, turn/6)')).toBe(true);
  });

  it.each([
    'point(1, 2) + 3',
    'point(1, 2) * point(1, 2)',
    'point(1 mm, 2 mm) * 3 mm',
    '3 / point(1, 2)',
    'line(1, 0, 0) + point(1, 2)',
    '2 circle(point(0, 0), 1)',
    '-line(1, 0, 0)',
    'sqrt(point(1, 2))',
    'point(1, 2)^2',
    'sin(point(1, 2))',
    'floor(point(1, 2))',
    'standin(point(1, 2), 1)',
  ])('`%s` has no meaning and says so', (source) => {
    expect(codeOf(source)).toBe('unit-mismatch');
    expect(messageOf(source)).toMatch(/point|line|circle/);
  });

  it('figures are equal or not, and have no order', () => {
    expect(holds('line(point(0, 0), point(1, 1)) == line(point(3, 3), point(-1, -1))')).toBe(true);
    expect(holds('circle(point(0, 0), point(3, 4)) == circle(point(0, 0), 5)')).toBe(true);
    expect(holds('point(sqrt(5+2 sqrt(6)), 0) != point(sqrt(2)+sqrt(3), 0)')).toBe(false);
    expect(codeOf('point(0, 0) < point(1, 1)')).toBe('domain');
    expect(codeOf('min(point(0, 0), point(1, 1))')).toBe('domain');
    expect(codeOf('point(0, 0) == line(1, 0, 0)')).toBe('unit-mismatch');
    expect(get('truth', 'point(0, 0) == point(3 mm, 4 mm)').truth.reason).toBe(
      'The points lie 5 mm apart.',
    );
  });
});

describe('rings', () => {
  it('are lists of points, anticlockwise from the top or from the angle that is given', () => {
    expect(get('list', 'ring(point(0, 0), 1, 4)').exact.text).toBe(
      '[point(0, 1), point(-1, 0), point(0, -1), point(1, 0)]',
    );
    expect(holds('ring(point(0, 0), 2 mm, 3, 0)[1] == point(2 mm, 0)')).toBe(true);
    expect(holds('ring(point(1, 1), 1, 6) == ring(point(0, 0), 1, 6) + point(1, 1)')).toBe(true);
    expect(holds('ring(point(0, 0), 1, 5)[2] == rotate(point(0, 1), turn/5)')).toBe(true);
    expect(holds('count(ring(point(0, 0), 1, 12)) == 12')).toBe(true);
  });

  it.each([
    ['ring(point(0, 0), 0, 4)', 'domain'],
    ['ring(point(0, 0), 1, 0)', 'domain'],
    ['ring(point(0, 0), 1, 5/2)', 'domain'],
    ['ring(point(0, 0), 1, 3 mm)', 'domain'],
    ['ring(point(0, 0), 1, 1001)', 'limit-size'],
    ['ring(point(1, 0), 1 mm, 4)', 'unit-mismatch'],
    ['ring(1, 1, 4)', 'unit-mismatch'],
    ['ring(point(0, 0), 1, 4, 1)', 'not-exact'],
    ['ring(point(0, 0), 1)', 'syntax'],
  ])('`%s` fails with %s', (source, code) => {
    expect(codeOf(source)).toBe(code);
  });
});

describe('sentences of the constructions', () => {
  it('tell which point is asked for and how far figures miss each other', () => {
    const c = 'circle(point(0, 0), 5 mm)';
    expect(messageOf(`meet(${c}, circle(point(12 mm, 0), 5 mm))`)).toBe(
      'The circles lie apart by 2 mm, so they do not meet.',
    );
    expect(messageOf(`meet(${c}, line(1, 1, -10 mm))`)).toBe(
      'The line passes the circle at a distance of about 2.071 mm, so they do not meet.',
    );
    expect(messageOf(`meet(${c}, line(1, 1, 0))`)).toContain('1 for the left one');
    expect(get('error', `meet(${c}, line(1, 1, 0))`).error).toMatchObject({
      code: 'domain',
      from: 0,
    });
  });

  it('an angle that is no part of a turn is not exact, and its cosine is given', () => {
    const right = 'point(3, 4), point(0, 0), point(1, 0)';
    expect(codeOf(`angle(${right})`)).toBe('not-exact');
    expect(messageOf(`angle(${right})`)).toBe(
      'This angle, about 53.1301 deg, is not a rational part of a turn, so it has no exact measure; its cosine is `3/5`.',
    );
    // arccos(3/5) = 53.13010…°, arccos(-3/5) = 126.8699…° and arcsin(9/16) = 34.22887…°, computed in double precision.
    const unit = 'circle(point(0, 0), 1)';
    expect(messageOf(`angle(point(-3, 4), point(0, 0), point(1, 0))`)).toContain('126.870 deg');
    expect(
      messageOf(`angle(meet(${unit}, line(0, 1, -9/16), 2), point(0, 0), point(1, 0))`),
    ).toContain('about 34.2289 deg');
  });
});
