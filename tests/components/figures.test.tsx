import { render, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { copyForms } from '@/components/sheet/copy-forms';
import { EntryLine } from '@/components/sheet/entry-line';
import { valueTex } from '@/components/sheet/value-tex';
import { compartmentsOf, sayBriefly, sayDimension, sayResult } from '@/components/sheet/wording';
import { type Result, evaluateExpression } from '@/lib/language/index';

const of = (source: string, step: string | null = '0.5 mm'): Result =>
  evaluateExpression(source, { step });

const POINT = of('P = polar(1200 mm, turn/12)');
const LINE = of('g = line(point(0, 3 mm), point(4 mm, 0))');
const CIRCLE = of('c = circle(point(0, 0), 600 mm sqrt(2))');
const BEYOND = of('polar(450 mm, turn/7)');

const labels = (result: Result, full = false): string[] =>
  compartmentsOf(result, full).map(({ label }) => label);
const valueAt = (result: Result, label: string, full = false) =>
  compartmentsOf(result, full).find((item) => item.label === label)?.value;

describe('a point on the sheet', () => {
  it('stands typeset as a pair, with x and y and their cut sizes in compartments', () => {
    const { container } = render(<EntryLine line={{ result: POINT, before: null }} />);
    expect(screen.getByTitle('P')).toBeInTheDocument();
    expect(within(screen.getByRole('group')).getAllByText(/./).length).toBeGreaterThan(0);
    expect(container.querySelector('math')).not.toBeNull();
    expect(screen.getByText('1039.2304845413… mm')).toBeInTheDocument();
    expect(screen.getByText('1039 mm, rounded down')).toBeInTheDocument();
    expect(screen.getByText('600 mm, exact')).toBeInTheDocument();
    expect(screen.getByText('straightedge and compass')).toBeInTheDocument();
    expect(valueTex(POINT)).toBe('\\left(600\\sqrt{3},\\;600\\right)\\,\\mathrm{mm}');
  });

  it('has no drawn dimension, as it is no length', () => {
    expect(sayDimension(POINT)).toBeNull();
  });

  it('in hand shows every digit, both degrees, and why a part is not reached', () => {
    expect(labels(POINT)).toEqual(['x', 'x, cut', 'y', 'Reach']);
    expect(valueAt(POINT, 'x', true)).toBe('1039.23048454132637611646780490 mm');
    expect(valueAt(POINT, 'Degree of x', true)).toBe('2');
    expect(valueAt(BEYOND, 'Because', true)).toContain('x decides');
    expect(labels(POINT, true)).not.toContain('Because');
  });

  it('without a step has no cut sizes, and without a unit none is said', () => {
    expect(labels(of('point(1 mm, 2 mm)', null))).toEqual(['x', 'y', 'Reach']);
    expect(valueAt(of('point(1/4, 2)'), 'x')).toBe('0.25');
  });
});

describe('lines and circles on the sheet', () => {
  it('show the numbers that fix them', () => {
    expect(labels(LINE)).toEqual(['a', 'b', 'c', 'Reach']);
    expect(valueAt(LINE, 'c')).toBe('-4 mm');
    expect(valueTex(LINE)).toBe('x+\\frac{4}{3}y-4\\,\\mathrm{mm}=0');
    expect(labels(CIRCLE)).toEqual(['Centre x', 'Centre y', 'Radius', 'Radius, cut', 'Reach']);
    expect(valueAt(CIRCLE, 'Centre x')).toBe('0 mm, exact');
    expect(valueAt(CIRCLE, 'Radius, cut')).toBe('848.5 mm, rounded down');
  });
});

describe('figures in words', () => {
  it('are said for whoever listens, and briefly in the index', () => {
    expect(sayResult(POINT)).toBe(
      'P is the point (1039, 600) mm, reached with straightedge and compass.',
    );
    expect(sayResult(BEYOND)).toContain('not reached with straightedge and compass');
    expect(sayResult(CIRCLE)).toBe(
      'c is a circle about (0, 0) mm with the radius 848.5 mm, reached with straightedge and compass.',
    );
    expect(sayResult(LINE)).toContain('g is the line a x + b y + c = 0 with a 1, b 1.333333…');
    expect([POINT, CIRCLE, LINE].map(sayBriefly)).toEqual([
      '(1039, 600) mm',
      'circle, r 848.5 mm',
      'line',
    ]);
  });
});

describe('figures copied', () => {
  it('leave as text that reads back, as TeX, and as coordinates with a tab between', () => {
    const texts = (result: Result) =>
      copyForms(result).filter(({ label }) => label !== 'MathML' && label !== 'JSON');
    expect(texts(POINT)).toEqual([
      { label: 'Exact text', text: 'point(600*sqrt(3) mm, 600 mm)' },
      { label: 'TeX', text: '\\left(600\\sqrt{3},\\;600\\right)\\,\\mathrm{mm}' },
      { label: 'x and y', text: '1039.23048454132637611646780490\t600' },
      { label: 'x and y, cut', text: '1039\t600' },
    ]);
    expect(copyForms(LINE).map(({ label }) => label)).toEqual([
      'Exact text',
      'TeX',
      'MathML',
      'JSON',
    ]);
  });
});
