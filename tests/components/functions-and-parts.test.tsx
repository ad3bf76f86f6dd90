import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { copyForms } from '@/components/sheet/copy-forms';
import { EntryLine } from '@/components/sheet/entry-line';
import { FunctionPart, ListReachPart, RulePart } from '@/components/sheet/proof/kind-parts';
import type { Result } from '@/components/sheet/result';
import { speakDms, speakInches } from '@/components/sheet/say-parts';
import { compartmentsOf, sayBriefly, sayDimension, sayResult } from '@/components/sheet/wording';
import { evaluateCells, evaluateExpression } from '@/lib/language/index';

const of = (source: string, unit: 'mm' | 'in' | 'ft' = 'mm'): Result =>
  evaluateExpression(source, { unit });
const only = <K extends Result['kind']>(result: Result | undefined, kind: K) => {
  if (result?.kind !== kind) throw new Error(`${kind} expected, not ${String(result?.kind)}`);
  return result as Extract<Result, { kind: K }>;
};
const valueAt = (result: Result, label: string, full = false) =>
  compartmentsOf(result, full).find((item) => item.label === label)?.value;

const [RADIUS, WAVE] = evaluateCells(
  [{ id: 'a', source: 'R = 2\nf(x, y) = R x + y # a wave' }],
  {},
).flatMap(({ results }) => results);
const FUNCTION = only(WAVE, 'function');

describe('a function on the sheet', () => {
  it('stands typeset as it is defined, with what it takes and what it reads, and no drawn dimension', () => {
    expect(RADIUS?.kind).toBe('number');
    const { container } = render(<EntryLine line={{ result: FUNCTION, before: null }} />);
    expect(container.querySelector('math')).not.toBeNull();
    expect(valueAt(FUNCTION, 'Takes')).toBe('x, y');
    expect(valueAt(FUNCTION, 'Reads')).toBe('R');
    expect(sayDimension(FUNCTION)).toBeNull();
    expect(screen.queryByRole('figure')).toBeNull();
  });

  it('that reads no mark says so', () => {
    expect(valueAt(of('g(x) = x^2 + 1'), 'Reads')).toBe('nothing else');
  });

  it('is said by what it takes and reads, and copied as its definition without the remark', () => {
    expect(sayResult(FUNCTION)).toBe('f(x, y) is a function of x and y, reading R.');
    const forms = Object.fromEntries(copyForms(FUNCTION).map(({ label, text }) => [label, text]));
    expect(forms['Definition']).toBe('f(x, y) = R x + y');
    expect(forms['TeX']).toBe(FUNCTION.typeset);
  });

  it('has its compartments in the proof', () => {
    render(<FunctionPart result={FUNCTION} />);
    expect(screen.getByText('x, y')).toBeInTheDocument();
  });
});

describe('a length in feet and inches', () => {
  // 4√2 ft = 67.88225… in; the nearest 1/64 is 67 7/8 in = 67.875 in, 0.00725 in = 0.184 mm less.
  const DIAGONAL = only(of('s = 4 ft sqrt(2)', 'ft'), 'number');

  it('says what the rule shows, how far that is off and on which side', () => {
    expect(valueAt(DIAGONAL, 'Feet and inches')).toBe('5 ft 7 7/8 in');
    expect(valueAt(DIAGONAL, 'Nearest 1/64 in')).toBe('0.184175 mm below the exact length');
    expect(valueAt(of('1/3 in', 'in'), 'Nearest 1/64 in')).toContain('mm below');
    expect(valueAt(of('2/3 in', 'in'), 'Nearest 1/64 in')).toContain('mm above');
    expect(valueAt(of('7/8 in', 'in'), 'Nearest 1/64 in')).toBe('exactly');
    expect(valueAt(of('1 mm'), 'Inches')).toBeUndefined();
  });

  it('stands so on its drawn dimension where there is no cutting step', () => {
    expect(sayDimension(DIAGONAL)).toEqual({
      figure: '5 ft 7 7/8 in',
      below: 'rounded down to 1/64 in',
      spoken: '5 feet 7 inches and 7 eighths',
    });
    expect(sayDimension(of('3/8 in', 'in'))).toMatchObject({ figure: '3/8 in', below: 'exact' });
    expect(sayBriefly(DIAGONAL)).toBe('5 ft 7 7/8 in');
  });

  it('is read out in words in place of its signs', () => {
    render(<EntryLine line={{ result: DIAGONAL, before: null }} />);
    // On the drawn dimension and in the compartments.
    const signs = screen.getAllByText('5 ft 7 7/8 in');
    const words = screen.getAllByText('5 feet 7 inches and 7 eighths');
    expect(signs.map((one) => one.getAttribute('aria-hidden'))).toEqual(['true', 'true']);
    expect(words.map(({ className }) => className)).toEqual(['sr-only', 'sr-only']);
    expect(sayResult(DIAGONAL)).toContain('s is 5 feet 7 inches and 7 eighths, degree 2');
  });

  it.each([
    ['1 ft', '1 foot'],
    ['1/2 in', '1 half of an inch'],
    ['-3 1/64 in', 'minus 3 inches and 1 sixty-fourth'],
    ['2 ft 0 in', '2 feet 0 inches'],
    ['2 ft 3/4 in', '2 feet 3 quarters of an inch'],
    ['0 in', '0 inches'],
    ['as it stands', 'as it stands'],
  ])('%s is read as %s', (text, words) => {
    expect(speakInches(text)).toBe(words);
  });

  it('stands in the proof with a sentence on the rounding', () => {
    render(<RulePart result={DIAGONAL} />);
    expect(
      screen.getByText(
        'Rounded to the nearest 1/64 in: the length on the rule is 0.184175 mm below the exact length.',
      ),
    ).toBeInTheDocument();
  });
});

describe('an angle in degrees, minutes and seconds', () => {
  it('says them with the rounding, and nothing where they are whole degrees', () => {
    const label = 'Degrees, minutes, seconds';
    expect(valueAt(of(`51° 30' 15.5"`), label)).toBe('51° 30′ 15.5″, exact');
    expect(valueAt(of('turn/7'), label)).toBe('51° 25′ 42.9″, rounded up to 0.1″');
    expect(valueAt(of('30°'), label)).toBeUndefined();
    expect(valueAt(of('30°'), label, true)).toBe('30° 0′ 0″, exact');
  });

  it.each([
    ['51° 30′ 15.5″', '51 degrees, 30 minutes, 15.5 seconds'],
    ['-1° 1′ 1″', 'minus 1 degree, 1 minute, 1 second'],
    ['30° 0′ 0″', '30 degrees'],
    ['0° 0′ 0.1″', '0.1 seconds'],
    ['0° 0′ 0″', '0 degrees'],
  ])('%s is read as %s', (text, words) => {
    expect(speakDms(text)).toBe(words);
  });

  it('stands in the proof, with the error where it is rounded', () => {
    render(<RulePart result={only(of('turn/7'), 'angle')} />);
    expect(screen.getByText(/at most a twentieth/)).toBeInTheDocument();
  });
});

describe('the reach of a list in the proof', () => {
  it('is told once where the items are alike, and else is left to their table', () => {
    render(<ListReachPart list={only(of('[sqrt(2), sqrt(3)]'), 'list')} />);
    expect(screen.getByText('Straightedge and compass')).toBeInTheDocument();
    render(<ListReachPart list={only(of('[sqrt(2), cbrt(2)]'), 'list')} />);
    expect(screen.getByText(/The items differ/)).toBeInTheDocument();
  });
});
