import { describe, expect, it } from 'vitest';
import { certificateQuestion, questionOfLine } from '@/components/sheet/proof/question-of-line';
import { filterMarks, listHeadings, listMarks } from '@/components/sheet/state/index-entries';
import { foldAnswer } from '@/components/sheet/state/shown';
import {
  findUses,
  linesNeededBy,
  markDefinedIn,
  marksReadIn,
  namesReadIn,
} from '@/components/sheet/state/uses';
import { evaluateCells } from '@/lib/language/index';
import type { NotebookContent } from '@/lib/notebooks/content';
import { contentOf, dimension, note } from './sample';

const sheet: NotebookContent = {
  ...contentOf(
    dimension('a', 'R = 1200 mm\n# R = 5\np = 2R sin(turn/34)  # not q'),
    note('n', '## Beds\n\nR = 1'),
    { id: 's', kind: 'section', source: 'Stones' },
    { ...dimension('b', 'q = p/3\np == 2 q'), settings: { unit: 'cm' } },
    dimension('c', 'other = 7'),
  ),
};

describe('what a line defines and reads', () => {
  it.each([
    ['R = 1', 'R'],
    ['  k_2= R', 'k_2'],
    ['f(x) = x^2', 'f'],
    ['R == 1', null],
    ['2R = 1', null],
    ['# R = 1', null],
    ['', null],
  ])('%j defines %j', (line, mark) => {
    expect(markDefinedIn(line)).toBe(mark);
  });

  it('never takes a part of a longer name, a remark or its own definition for a use', () => {
    expect([...namesReadIn('p = 2R + Rx - k2 # and q')]).toEqual(['R', 'Rx', 'k2']);
  });

  it.each([
    ['v = 2 r sin(a) + R where r = 2 mm, a = b/2', ['sin', 'R', 'where', 'mm', 'b']],
    ['f(x, y) = x y + R', ['R']],
    ['L = each(k, 2, n, k R)', ['each', 'n', 'R']],
    ['h = solve(R == y^2/2, y)', ['solve', 'R']],
    ['root(x^2 - c, 1)', ['root', 'c']],
    ['x + y where_1', ['x', 'y', 'where_1']],
  ])('in %s are not the names of the line alone', (line, names) => {
    expect([...marksReadIn(line)]).toEqual(names);
  });

  it('is found across the sheet, notes left alone', () => {
    const { definitions, readers } = findUses(sheet.cells);
    expect([...definitions.keys()]).toEqual(['R', 'p', 'q', 'other']);
    expect(readers.get('p')).toEqual([
      { id: 'b', line: 0 },
      { id: 'b', line: 1 },
    ]);
    expect(readers.get('other')).toBeUndefined();
  });
});

describe('a line asked for by itself', () => {
  it('takes along what it needs through others, in order of the sheet, and nothing else', () => {
    expect(linesNeededBy(sheet.cells, { id: 'b', line: 0 })).toEqual([
      'R = 1200 mm',
      'p = 2R sin(turn/34)  # not q',
    ]);
    expect(linesNeededBy(sheet.cells, { id: 'c', line: 0 })).toEqual([]);
  });

  it('ends where marks go round in a circle', () => {
    const { cells } = contentOf(dimension('a', 'u = v\nv = u'));
    expect(linesNeededBy(cells, { id: 'a', line: 0 })).toEqual(['v = u']);
  });

  it('has the value that it has on the sheet, in the settings of its cell and the digits asked for', () => {
    const whole = evaluateCells(
      sheet.cells.filter(({ kind }) => kind === 'dimension'),
      { ...sheet.settings, digits: 50 },
    );
    const asked = questionOfLine(sheet, { id: 'b', line: 0 }, 50);
    const alone = evaluateCells(asked.cells, asked.settings).at(-1)?.results[0];
    expect(alone).toEqual({ ...whole[1]?.results[0], line: 1 });
    expect(alone).toMatchObject({ unit: 'cm', decimal: { digits: 50 } });
  });

  it('is the line that its certificate is asked for', () => {
    const { cells, at } = certificateQuestion(sheet, { id: 'b', line: 0 });
    expect(cells.find(({ id }) => id === at.cell)?.source).toBe('q = p/3');
  });
});

describe('the index of marks', () => {
  const shown = foldAnswer(
    new Map(),
    evaluateCells(
      sheet.cells.filter(({ kind }) => kind === 'dimension'),
      sheet.settings,
    ),
  );
  const marks = listMarks(sheet, shown);

  it('says of each mark its size, its exact value in short, its section and who reads it', () => {
    expect(marks.map(({ mark, exact, section }) => [mark, exact, section])).toEqual([
      ['R', null, null],
      ['p', 'exact, degree 16', null],
      ['q', 'exact, degree 16', 'Stones'],
      ['other', null, 'Stones'],
    ]);
    expect(marks[1]?.usedBy.map(({ mark }) => mark)).toEqual(['q', null]);
  });

  it('is looked through by name, size, value and section, whatever the case', () => {
    const found = (text: string) => filterMarks(marks, text).map(({ mark }) => mark);
    expect(found('')).toHaveLength(4);
    expect(found(' OTH ')).toEqual(['other']);
    expect(found('stones')).toEqual(['q', 'other']);
    expect(found('1200')).toEqual(['R']);
    expect(found('nothing')).toEqual([]);
  });

  it('lists sections and the headings of notes in order', () => {
    expect(listHeadings(sheet).map(({ text, level }) => [text, level])).toEqual([
      ['Beds', 2],
      ['Stones', 1],
    ]);
  });
});
