import { render, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { splitMark } from '@/components/drawing/balloon';
import { zoneLetter } from '@/components/drawing/zones';
import { placedFaults } from '@/components/sheet/editor/source-editor';
import { smallestChange } from '@/components/sheet/editor/make-editor';
import { EntryLine } from '@/components/sheet/entry-line';
import { renderNote } from '@/components/sheet/note';
import { headingsOf } from '@/components/sheet/note-headings';
import { readStep } from '@/components/sheet/read-step';
import { piecesOf } from '@/components/sheet/source-text';
import { isSum, stepTex, valueTex } from '@/components/sheet/value-tex';
import { errorResult, numberResult, SUM_OF_ROOTS } from './sample-results';

describe('an entry', () => {
  it('shows balloon, value with MathML, drawn dimension and compartments', () => {
    const { container } = render(<EntryLine line={{ result: numberResult(), before: null }} />);
    expect(screen.getByTitle('R')).toBeInTheDocument();
    expect(container.querySelector('math')).not.toBeNull();
    expect(within(screen.getByRole('figure')).getByText('500 mm')).toBeInTheDocument();
    expect(screen.getByText('straightedge and compass')).toBeInTheDocument();
  });

  it('shows what went wrong as a sentence, and the last good value with it', () => {
    render(<EntryLine line={{ result: errorResult(3, 'R = (', 5, 5), before: SUM_OF_ROOTS }} />);
    expect(screen.getByText('A closing bracket was expected here.')).toBeInTheDocument();
    expect(screen.getByRole('group', { name: 'Last good value' })).toBeInTheDocument();
    expect(screen.queryByText('Degree')).toBeNull();
  });
});

describe('the value on the sheet', () => {
  it('carries its unit, in brackets where the value is a sum', () => {
    expect(
      valueTex(
        numberResult({ exact: { text: '5+3*sqrt(2)', tex: '5+3\\sqrt{2}', staged: false } }),
      ),
    ).toBe('\\left(5+3\\sqrt{2}\\right)\\,\\mathrm{mm}');
    expect(
      valueTex(
        numberResult({ unit: 'mm^2', exact: { text: 'sqrt(2)', tex: '\\sqrt{2}', staged: false } }),
      ),
    ).toBe('\\sqrt{2}\\,\\mathrm{mm}^{2}');
    expect(valueTex(SUM_OF_ROOTS)).toBe('\\sqrt{2}+\\sqrt{3}');
  });

  it.each([
    ['-5', false],
    ['(1+i)/2', false],
    ['300*sqrt(34-2*sqrt(17))', false],
    ['1-sqrt(2)', true],
    ['-1+2', true],
  ])('takes %s for a sum: %s', (text, sum) => {
    expect(isSum(text)).toBe(sum);
  });

  it('writes the roots of a tower with their names below', () => {
    expect(stepTex({ name: 'r12', tex: '2' })).toBe('r_{12}=\\sqrt{2}');
  });
});

describe('the place of an error', () => {
  it('cuts the line where the error begins and ends', () => {
    expect(piecesOf('R = 1 ++ 2', { from: 6, to: 8 })).toEqual([
      { text: 'R = 1 ', faulty: false },
      { text: '++', faulty: true },
      { text: ' 2', faulty: false },
    ]);
  });

  it('marks the last character for an error at the end, and never loses or doubles text', () => {
    expect(piecesOf('R = (', { from: 5, to: 5 }).at(-1)).toEqual({ text: '(', faulty: true });
    for (const [from, to] of [
      [0, 0],
      [2, 99],
      [50, 60],
      [-3, 1],
    ] as const) {
      expect(
        piecesOf('R = (', { from, to })
          .map((piece) => piece.text)
          .join(''),
      ).toBe('R = (');
    }
  });

  it('is handed to the editor with its sentence', () => {
    expect(placedFaults(errorResult(2, 'x', 0, 1))).toEqual([
      { from: 0, to: 1, message: 'A closing bracket was expected here.', severity: 'error' },
    ]);
    const notices = [{ message: 'Read as half of R.', from: 2, to: 4 }];
    expect(placedFaults(numberResult({ notices }))).toEqual([
      { ...notices[0], severity: 'warning' },
    ]);
  });
});

describe('a change from outside the editor', () => {
  it.each([
    ['R = 12', 'R = 120', { from: 6, to: 6, insert: '0' }],
    ['aaa', 'aa', { from: 2, to: 3, insert: '' }],
    ['', 'x', { from: 0, to: 0, insert: 'x' }],
    ['abc', 'axc', { from: 1, to: 2, insert: 'x' }],
  ])('from %j to %j touches only what differs', (old, next, expected) => {
    const change = smallestChange(old, next);
    expect(change).toEqual(expected);
    expect(old.slice(0, change.from) + change.insert + old.slice(change.to)).toBe(next);
  });
});

describe('a note', () => {
  it('sets TeX between dollar signs and leaves prices alone', () => {
    expect(renderNote('side $\\sqrt{2}$')).toContain('<math');
    expect(renderNote('from $5 to $6')).not.toContain('<math');
    expect(renderNote('half of `$x$`')).not.toContain('<math');
  });

  it.each([
    ['<script>alert(1)</script>', '<script'],
    ['<img src=x onerror=alert(1)>', '<img'],
    ['[x](javascript:alert(1))', 'href'],
    ['![x](https://example.org/x.png)', '<img'],
    ['$\\href{javascript:alert(1)}{x}$', 'href="javascript'],
    ['$\\htmlData{x=1}{y}$', 'data-x'],
  ])('never lets %j through as %j', (source, forbidden) => {
    expect(renderNote(source)).not.toContain(forbidden);
  });

  it('begins its headings one level below that of the page, and lists them', () => {
    expect(renderNote('# Ring')).toBe('<h2>Ring</h2>\n');
    expect(headingsOf('# Ring\n\ntext\n\n## *Foils*')).toEqual([
      { level: 1, text: 'Ring' },
      { level: 2, text: 'Foils' },
    ]);
  });

  it('stays on the page whatever TeX is written', () => {
    expect(() => renderNote('$\\frac{1}{$ and $\\def\\a{\\a\\a}\\a$')).not.toThrow();
  });
});

describe('a cutting step', () => {
  it.each([
    ['', { step: null }],
    ['0.5 mm', { step: '0.5 mm' }],
    ['0.5', { step: '0.5 mm' }],
    ['1/64 in', { step: '1/64 in' }],
  ])('reads %j', (text, expected) => {
    expect(readStep(text, 'mm')).toEqual(expected);
  });

  it.each(['0', '0.0 mm', '-1 mm', '1/0 in', 'half', '5 kg', '1e3'])(
    'refuses %j in a sentence',
    (text) => {
      const read = readStep(text, 'mm');
      expect('fault' in read && read.fault).toContain('is not a length');
    },
  );
});

describe('the drawing', () => {
  it('letters zones without I and O, and goes on after Z', () => {
    const letters = Array.from({ length: 50 }, (_, zone) => zoneLetter(zone));
    expect(letters.slice(7, 15)).toEqual(['H', 'J', 'K', 'L', 'M', 'N', 'P', 'Q']);
    expect(letters[24]).toBe('AA');
    expect(new Set(letters).size).toBe(50);
  });

  it('hangs the figures of a mark below its letter', () => {
    expect(splitMark('k_12')).toEqual({ stem: 'k', below: '12' });
    expect(splitMark('pitch')).toEqual({ stem: 'pitch', below: '' });
  });
});
