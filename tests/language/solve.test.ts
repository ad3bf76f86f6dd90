import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { proposeSolutions } from '@/lib/evaluation/propose';
import { type Result, evaluateCells, evaluateExpression } from '@/lib/language/index';

const solveLine = (source: string, propose?: (equation: string) => readonly string[]): Result =>
  evaluateExpression(source, { digits: 12 }, propose === undefined ? {} : { propose });

/** The exact texts of a result that is one value or a list. */
function textsOf(result: Result): string[] {
  if (result.kind === 'list')
    return result.items.map((item) => ('exact' in item ? item.exact.text : ''));
  if ('exact' in result) return [result.exact.text];
  throw new Error(`${result.source}: ${JSON.stringify(result)}`);
}

const codeOf = (result: Result): string =>
  result.kind === 'error' ? result.error.code : result.kind;

/** Lines of one cell; the last one is a decision that must hold. */
function holds(lines: readonly string[]): boolean {
  const [cell] = evaluateCells([{ id: 'a', source: lines.join('\n') }], { digits: 5 });
  const last = cell?.results.at(-1);
  if (last?.kind !== 'truth') throw new Error(`${lines.join(' | ')}: ${JSON.stringify(last)}`);
  return last.truth.value;
}

const whole = fc.integer({ min: -9, max: 9 });
const positive = fc.integer({ min: 1, max: 9 });
/** Coefficients of several kinds, written out. */
const coefficient = fc.oneof(
  whole.map(String),
  fc.tuple(whole, positive).map(([n, d]) => `(${n}/${d})`),
  fc.tuple(whole, positive).map(([a, r]) => `(${a} + sqrt(${r}))`),
  fc.tuple(whole, positive).map(([a, r]) => `(${a} - sqrt(2 + sqrt(${r})))`),
  fc.constantFrom('cos(turn/5)', 'sin(turn/16)', '(1/3)', 'sqrt(3)'),
);

describe('solving an equation', () => {
  it('a linear one has the solution that satisfies it, with the unknown on both sides', () => {
    fc.assert(
      fc.property(coefficient, coefficient, coefficient, coefficient, (a, b, c, d) => {
        const result = solveLine(`solve(${a} x + ${b} == ${c} x + ${d}, x)`);
        if (result.kind === 'error') {
          expect(result.error.code).toBe('domain');
          return holds([`${a} == ${c}`]);
        }
        return holds([
          `y = solve(${a} x + ${b} == ${c} x + ${d}, x)`,
          `${a} y + ${b} == ${c} y + ${d}`,
        ]);
      }),
      { numRuns: 60 },
    );
  });

  it('a quadratic one made from two values gives these, the lesser first', () => {
    fc.assert(
      fc.property(coefficient, coefficient, (r, s) => {
        const equation = `x^2 + ${r} * ${s} == (${r} + ${s}) x`;
        if (holds([`${r} == ${s}`])) return holds([`solve(${equation}, x) == ${r}`]);
        return holds([`L = solve(${equation}, x)`, `L == [min(${r}, ${s}), max(${r}, ${s})]`]);
      }),
      { numRuns: 60 },
    );
  });

  it('under one square root, what squaring adds is left out', () => {
    fc.assert(
      fc.property(positive, whole, positive, whole, (a, b, c, d) => {
        const equation = `sqrt(${a} x + ${b}) == ${c} x + ${d}`;
        const result = solveLine(`solve(${equation}, x)`);
        if (result.kind === 'error') return result.error.code === 'domain';
        return textsOf(result).every((root) =>
          holds([`sqrt(${a} (${root}) + ${b}) == ${c} (${root}) + ${d}`]),
        );
      }),
      { numRuns: 60 },
    );
    // x = -1 satisfies the squared equation only.
    expect(textsOf(solveLine('solve(sqrt(x + 2) == x, x)'))).toEqual(['2']);
  });

  it('finds what the trade asks for, in the unit of the unknown', () => {
    // Radius from chord and rise, R = c²/8h + h/2; c = 2000 and h = 50 give 10025 (computed).
    for (const decision of [
      'solve(10025 mm == (2000 mm)^2/(8 h) + h/2, h) == [50 mm, 20000 mm]',
      'solve(2 r sin(turn/24) == 100 mm, r) == 50 mm (sqrt(2) + sqrt(6))',
      'solve(2 pi r == 600 mm, r) == 300 mm/pi',
      'solve(3 a + 20 deg == turn/4, a) == 7 turn/108',
      'solve(A/(40 mm) == 3 cm + 1 in, A) == 2216 mm^2',
    ])
      expect(holds([decision]), decision).toBe(true);
  });

  it('takes the solution nearest to a third value', () => {
    expect(textsOf(solveLine('solve(x^2 == 2, x, 1)'))).toEqual(['sqrt(2)']);
    expect(codeOf(solveLine('solve(x^2 == 2, x, 0)'))).toBe('domain');
  });

  it('solves polynomials of higher degree with roots beyond square roots', () => {
    expect(textsOf(solveLine('solve(x^3 == 8, x)'))).toEqual(['2']);
    expect(holds(['t = solve(x^3 + x^2 == 2 x + 1, x)', 't[3] == 2 cos(turn/7)'])).toBe(true);
    expect(holds(['t = solve(x^4 == sqrt(2) x^2 + 1, x)', 't[1]^4 == sqrt(2) t[1]^2 + 1'])).toBe(
      true,
    );
  });

  it('reads marks and functions of the notebook, and its unknown is a local name', () => {
    expect(
      holds([
        'h = 7 mm',
        'R = 100 mm',
        'f(x) = x^2',
        'r = solve(f(h) + f(R) == f(2 R), h)',
        'r[2] == sqrt(3) R',
      ]),
    ).toBe(true);
  });

  it('says when nothing or everything satisfies the equation', () => {
    expect(codeOf(solveLine('solve(x == x + 1, x)'))).toBe('domain');
    expect(codeOf(solveLine('solve(2 x == x + x, x)'))).toBe('domain');
    expect(codeOf(solveLine('solve(sqrt(x) == -1, x)'))).toBe('domain');
    expect(codeOf(solveLine('solve(r^2 == -(1 mm)^2, r)'))).toBe('domain');
    expect(textsOf(solveLine('solve(x^2 == -1, x)')).sort()).toEqual(['-i', 'i']);
  });

  it('refuses what is no equation in an unknown', () => {
    expect(codeOf(solveLine('solve(2 x, x)'))).toBe('syntax');
    expect(codeOf(solveLine('solve(x == 2, 3)'))).toBe('syntax');
    expect(codeOf(solveLine('solve(x < 2, x)'))).toBe('syntax');
    expect(codeOf(solveLine('solve(x == 2, y)'))).toBe('unknown-name');
    expect(codeOf(solveLine('solve(3 == 2, y)'))).toBe('domain');
    expect(codeOf(solveLine('solve(x + 1 mm == x^2, x)'))).toBe('unit-mismatch');
  });
});

describe('the search', () => {
  it('is asked only where fractions and square roots do not reach, with known parts as names', () => {
    const asked: string[] = [];
    const propose = (equation: string) => {
      asked.push(equation);
      return ['asin(k2/k1)'];
    };
    expect(textsOf(solveLine('solve(2 sin(a) == 1, a)', propose))).toEqual(['30 deg']);
    expect(asked).toEqual(['(k1)*(sin(x))=k2']);
    solveLine('solve(x^2 == 2, x)', propose);
    expect(asked).toHaveLength(1);
  });

  it('shows nothing that does not satisfy the equation exactly', () => {
    const lies = ['131836323/93222358', 'asin(1)', '1', 'nonsense(', 'x', '', 'k9', '0.5236'];
    expect(codeOf(solveLine('solve(sin(a) == 1/2, a)', () => lies))).toBe('not-exact');
    expect(textsOf(solveLine('solve(sin(a) == 1/2, a)', () => [...lies, 'pi/6']))).toEqual([
      '30 deg',
    ]);
  });

  it('says that there may be more solutions', () => {
    const result = solveLine('solve(cos(a) == 1/2, a)', () => ['acos(k1)']);
    expect(result.kind).toBe('angle');
    expect('notices' in result && result.notices.map(({ message }) => message).join()).toMatch(
      /may be others/,
    );
  });

  it('proposes for circular functions, sizes and powers', () => {
    expect(
      textsOf(solveLine('solve(100 mm (1 - cos(a/2)) == 50 mm, a)', proposeSolutions)),
    ).toEqual(['120 deg']);
    expect(textsOf(solveLine('solve(2^n == 32, n)', proposeSolutions))).toEqual(['5']);
    expect(codeOf(solveLine('solve(cos(x) == x, x)', proposeSolutions))).toBe('not-exact');
  });
});
