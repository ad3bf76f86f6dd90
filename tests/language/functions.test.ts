import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Result, evaluateCells } from '@/lib/language/index';
import { LANGUAGE_LIMITS } from '@/lib/language/limits';
import { fewValues as values } from './arbitraries';

const resultsOf = (...cells: string[]): Result[] =>
  evaluateCells(
    cells.map((source, index) => ({ id: String(index), source })),
    { digits: 5 },
  ).flatMap(({ results }) => results);

function holds(...lines: string[]): boolean {
  const last = resultsOf(lines.join('\n')).at(-1);
  if (last?.kind !== 'truth') throw new Error(`${lines.join(' | ')}: ${JSON.stringify(last)}`);
  return last.truth.value;
}

const errorsOf = (...cells: string[]) =>
  resultsOf(...cells).flatMap((result) =>
    result.kind === 'error'
      ? [
          `${result.error.code} at ${result.source.slice(result.error.from, result.error.to)}: ${result.error.message}`,
        ]
      : [],
  );

/** Bodies in two names, as they are written in a function, after `where`, or with values in brackets in their place. */
const bodies = fc.constantFrom<(x: string, y: string) => string>(
  (x, y) => `${x}^2 + ${y}`,
  (x, y) => `2 ${x} ${y} - 3`,
  (x, y) => `√(${x}^2) + ${y}`,
  (x, y) => `[${x}, ${y}, ${x} ${y}][3]`,
  (x, y) => `sum(each(k, 1, 3, k ${x} + ${y}))`,
  (x, y) => `-${x}^2/(1 + ${y}^2)`,
);
const RUNS = { numRuns: 15 };

describe('laws of functions and local names', () => {
  it('a call is the value of the function with the arguments in place of its parameters', () => {
    fc.assert(
      fc.property(bodies, values, values, (body, a, b) => {
        const definition = `f(x, y) = ${body('x', 'y')}`;
        expect(holds(definition, `f(${a}, ${b}) == ${body(a, b)}`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('where is the value with what the names stand for in their place', () => {
    fc.assert(
      fc.property(bodies, values, values, (body, a, b) => {
        const plain = body(a, `(${a} + ${b})`);
        expect(holds(`v = ${body('x', 'y')} where x = ${a}, y = x + ${b}`, `v == ${plain}`)).toBe(
          true,
        );
        expect(holds(`f(x) = ${body('x', 'y')} where y = x + ${b}`, `f(${a}) == ${plain}`)).toBe(
          true,
        );
      }),
      RUNS,
    );
  });

  it('a function of one parameter works on a list item by item where its value does', () => {
    fc.assert(
      fc.property(values, values, (a, b) => {
        expect(holds('f(x) = x^2 - 3 x', `f([${a}, ${b}]) == [f(${a}), f(${b})]`)).toBe(true);
      }),
      RUNS,
    );
  });

  it('order on the page does not matter, and a function reads the marks of other cells', () => {
    const lines = ['s = f(2)', 'f(x) = g(x) + R', 'R = 3 mm', 'g(x) = x R'];
    fc.assert(
      fc.property(fc.shuffledSubarray(lines, { minLength: lines.length }), (shuffled) => {
        const found = resultsOf(...shuffled).find(({ mark }) => mark === 's');
        expect(found?.kind === 'number' && found.exact.text).toBe('9');
      }),
      { numRuns: 10 },
    );
  });

  it('a parameter or a local name hides a mark, and no name of a line is seen in what it calls', () => {
    expect(holds('x = 100', 'f(x) = x + 1', 'f(1) == 2')).toBe(true);
    expect(holds('x = 100', 'f(t) = t + x', 'g(x) = f(x)', 'g(1) == 101')).toBe(true);
    expect(holds('x = 100', 'f(t) = t + x', 'f(1) + x == 102 where x = 1')).toBe(true);
    expect(holds('r = 5', 'r == 6 where r = r + 1')).toBe(true);
    expect(holds('k = 7', 'each(k, 1, 2, k) + k == [8, 9]')).toBe(true);
  });

  it('a polynomial may be a function of the notebook', () => {
    expect(holds('f(t) = t^2 - c where c = 2', 'root(f(x), 1) == sqrt(2)')).toBe(true);
    expect(holds('f(t) = t^2', 'root(f(x)^2 - 4 f(x) + 1, 2) == √(2 + √3)')).toBe(true);
  });
});

describe('the result of a function', () => {
  it('says how it is called and what it reads, and is set as it is typed', () => {
    const [result] = resultsOf('f(x, y) = R x + g(y) + R where z = x', 'R = 2', 'g(y) = y');
    expect(result).toMatchObject({
      kind: 'function',
      mark: 'f',
      signature: 'f(x, y)',
      parameters: ['x', 'y'],
      reads: ['R', 'g'],
      typeset: 'f\\left(x,\\,y\\right)=R\\,x+g\\left(y\\right)+R\\quad\\text{where }z=x',
    });
  });
});

describe('what is wrong with a function is said at its place', () => {
  it.each([
    [['f(x) = x', 'f(1, 2)'], 'syntax at f(1, 2): `f(x)` takes 1 argument; 2 were given.'],
    [['f(x, y) = x', 'f(1)'], 'syntax at f(1): `f(x, y)` takes 2 arguments; 1 was given.'],
    [
      ['f(x) = x', 'f + 1'],
      'syntax at f: `f` is a function; its arguments were expected in brackets, as in `f(x)`.',
    ],
    [
      ['R = 3', 'R(1, 2)'],
      'syntax at R(1, 2): `R` is a mark and no function; a bracket after it multiplies and holds one value.',
    ],
    [['f(1, 2)'], 'unknown-name at f: There is no function `f`.'],
    [['f(x) = x + y'], 'unknown-name at y: No mark `y` is defined.'],
    [['f(x) = chord(x)'], 'syntax at chord(x): `chord(R, angle)` takes 2 arguments; 1 was given.'],
    [
      ['f(x, x) = x'],
      'duplicate-mark at x: `x` is given twice in this line; a local name has one meaning.',
    ],
    [
      ['f(x) = 1/x', 'f(0)'],
      'division-by-zero at f(0): In `f`: The divisor is exactly 0; a value other than 0 was expected.',
    ],
    [
      ['f(x) = x + 1 mm', 'g(x) = f(x)', '2 g(3)'],
      'unit-mismatch at g(3): In `g`: The left side is a plain number and the right side is a length; a sum needs two values of one kind (a length needs its unit, as in `12 mm`).',
    ],
    [['f(x) = f(x - 1)'], 'cycle at f: `f` is defined by itself; a definition reads only others.'],
    [
      ['a where a = b, b = 2'],
      'unknown-name at b: No mark `b` is defined; a local name is read only by those that stand after it in `where`.',
    ],
    [
      ['5 inches'],
      'unknown-name at inches: No mark `inches` is defined; the unit is written `in`.',
    ],
    [
      ['20 °C'],
      'unknown-name at C: No mark `C` is defined; `°` is a degree of angle, and temperatures have no unit here.',
    ],
    [
      ['Q == 1200 mm'],
      'unknown-name at Q: No mark `Q` is defined; to define it write `Q = …` with one `=`.',
    ],
  ])('%s', (lines, error) => {
    expect(errorsOf(...lines)).toEqual([error]);
  });

  it('a circle of functions and marks is named at each of them, and what calls them depends on an error', () => {
    expect(errorsOf('f(x) = a + x', 'a = f(1)', 'f(2)')).toEqual([
      'cycle at a: These names are defined by one another in a circle: `f`, `a`; one of them must not read the others.',
      'cycle at f: These names are defined by one another in a circle: `f`, `a`; one of them must not read the others.',
      'depends-on-error at f: `f` has no value, as its definition in line 1 of another cell has an error.',
    ]);
  });

  it('a function and a mark cannot have one name', () => {
    expect(errorsOf('f(x) = x', 'f = 3')).toEqual([
      'duplicate-mark at f: `f` is defined here and also in line 1 of another cell; a mark has one definition.',
      'duplicate-mark at f: `f` is defined here and also in line 1 of another cell; a mark has one definition.',
    ]);
  });
});

describe('hostile functions end in a named limit', () => {
  const chain = (length: number, value: (before: string) => string) => [
    'f0(x) = x + 1',
    ...Array.from({ length }, (_, k) => `f${k + 1}(x) = ${value(`f${k}(x)`)}`),
  ];

  it('a function that doubles its calls at every step is stopped by the count of operations', () => {
    const lines = chain(60, (before) => `${before} + ${before}`);
    const [error] = errorsOf([...lines, 'f60(1)'].join('\n'));
    expect(error).toContain(
      `limit-time at f60(1): In \`f60\`: The line takes more than ${LANGUAGE_LIMITS.operations} operations`,
    );
    const [inPolynomial] = errorsOf([...lines, 'root(f60(x), 1)'].join('\n'));
    expect(inPolynomial).toContain(`more than ${LANGUAGE_LIMITS.operations} operations`);
  });

  it('a chain of thousands of functions is stopped by the depth', () => {
    const lines = chain(2000, (before) => before);
    const errors = errorsOf([...lines, 'f300(1)', 'f2000(1)', 'root(f2000(x), 1)'].join('\n'));
    expect(errors).toHaveLength(2);
    for (const error of errors)
      expect(error).toContain(`nested more than ${LANGUAGE_LIMITS.depth} deep`);
  });

  it('functions whose values are themselves nested to the limit are stopped by the depth', () => {
    const deep = (before: string) => `${'√('.repeat(90)}${before}${')'.repeat(90)}`;
    const [error] = errorsOf([...chain(20, deep), 'f20(0)'].join('\n'));
    expect(error).toContain(`nested more than ${LANGUAGE_LIMITS.depth} deep`);
  });

  it('a line nested to the limit of the reader alone is not stopped', () => {
    const line = `${'(1*-'.repeat(99)}1${')'.repeat(99)}`;
    expect(errorsOf(line)).toEqual([]);
  });
});
