import { describe, expect, test } from 'vitest';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { keyOfConflict, mergeContents, settle, withhold } from '@/lib/notebooks/merge';

const settings: NotebookContent['settings'] = {
  digits: 30,
  unit: 'mm',
  step: null,
  rounding: 'half-even',
};
const dimension = (id: string, ...lines: string[]): NotebookCell => ({
  id,
  kind: 'dimension',
  source: lines.join('\n'),
});
const contentOf = (...cells: NotebookCell[]): NotebookContent => ({ format: 1, settings, cells });

/** Three texts of one cell; the lines of the result, and both readings where there is a conflict. */
function merged(base: string[], mine: string[], theirs: string[]) {
  const [b, m, t] = [base, mine, theirs].map((lines) => contentOf(dimension('c', ...lines)));
  if (!b || !m || !t) throw new Error('There are three texts.');
  const { content, conflicts } = mergeContents(b, m, t);
  const [conflict] = conflicts;
  const lines = (cell: NotebookCell | null | undefined) => cell?.source.split('\n') ?? null;
  return {
    lines: lines(content.cells[0]),
    readings:
      conflict?.kind === 'cell' ? [lines(conflict.mine), lines(conflict.theirs)] : conflicts,
  };
}

describe('two people in one cell', () => {
  test.each([
    [
      'different lines',
      ['R = 1', 'n = 8'],
      ['R = 2', 'n = 8'],
      ['R = 1', 'n = 9'],
      ['R = 2', 'n = 9'],
    ],
    [
      'added lines at its end',
      ['R = 1'],
      ['R = 1', 's = 2'],
      ['R = 1', 't = 3'],
      ['R = 1', 't = 3', 's = 2'],
    ],
    ['lines written into an empty cell', [''], ['s = 2'], ['t = 3'], ['t = 3', 's = 2']],
    ['the same line added', ['R = 1'], ['R = 1', 's = 2'], ['R = 1', 's = 2'], ['R = 1', 's = 2']],
    [
      'a line common to both additions',
      ['R = 1'],
      ['R = 1', 's', 'k'],
      ['R = 1', 's', 't'],
      ['R = 1', 's', 't', 'k'],
    ],
    [
      'a line changed, one added after it',
      ['R = 1'],
      ['R = 2'],
      ['R = 1', 's = 3'],
      ['R = 2', 's = 3'],
    ],
    [
      'a line added before one that is changed',
      ['a', 'R = 1'],
      ['a', 'b', 'R = 1'],
      ['a', 'R = 2'],
      ['a', 'b', 'R = 2'],
    ],
    [
      'a line taken away, another changed',
      ['a = 1', 'R = 1'],
      ['R = 1'],
      ['a = 1', 'R = 2'],
      ['R = 2'],
    ],
    ['different lines taken away', ['a', 'b', 'c', 'd'], ['a', 'd'], ['a', 'b'], ['a']],
  ])('%s: both survive', (_, base, mine, theirs, result) => {
    expect(merged(base, mine, theirs)).toEqual({ lines: result, readings: [] });
  });

  test('the same line changed differently: two readings, each with all that is agreed', () => {
    const result = merged(
      ['R = 1200 mm', 'n = 8', 's = R/n'],
      ['R = 1150 mm', 'n = 9', 's = R/n'],
      ['R = 1100 mm', 'n = 8', 's = 2 R/n'],
    );
    expect(result).toEqual({
      lines: ['R = 1150 mm', 'n = 9', 's = 2 R/n'],
      readings: [
        ['R = 1150 mm', 'n = 9', 's = 2 R/n'],
        ['R = 1100 mm', 'n = 9', 's = 2 R/n'],
      ],
    });
  });

  test('a line that one took away and the other changed: two readings', () => {
    expect(merged(['a = 1', 'b = 2'], ['b = 2'], ['a = 7', 'b = 2'])).toEqual({
      lines: ['b = 2'],
      readings: [['b = 2'], ['a = 7', 'b = 2']],
    });
  });

  test('a cell that one took away and the other changed stays until it is answered', () => {
    const base = contentOf(dimension('a', '1'), dimension('b', '2'));
    const mine = contentOf(dimension('a', '1'));
    const theirs = contentOf(dimension('a', '1'), dimension('b', '3'));
    const { content, conflicts } = mergeContents(base, mine, theirs);
    expect(content).toEqual(theirs);
    expect(conflicts).toEqual([{ kind: 'cell', id: 'b', mine: null, theirs: theirs.cells[1] }]);
    const answered = conflicts.reduce((held, one) => settle(held, one, 'mine'), content);
    expect(answered).toEqual(mine);
  });
});

describe('the order of cells', () => {
  const order = (text: string) => contentOf(...[...text].map((id) => dimension(id, id)));
  const orderOf = (base: string, mine: string, theirs: string) => {
    const { content, conflicts } = mergeContents(order(base), order(mine), order(theirs));
    return [content.cells.map(({ id }) => id).join(''), conflicts.map(keyOfConflict)];
  };

  test.each([
    ['moves of both sides', 'abcdef', 'bcadef', 'abcfde', 'bcafde'],
    ['a move and an addition after what moved', 'abcd', 'bcda', 'abxcd', 'bxcda'],
    ['additions at one place, theirs first', 'ab', 'amb', 'atb', 'atmb'],
    ['additions at the beginning', 'ab', 'mab', 'tab', 'tmab'],
    ['the same move', 'abcd', 'dabc', 'dabc', 'dabc'],
    ['an addition after what the other took away', 'abc', 'abmc', 'ac', 'amc'],
  ])('has %s', (_, base, mine, theirs, result) => {
    expect(orderOf(base, mine, theirs)).toEqual([result, []]);
  });

  test('asks about a cell that both moved to different places, and loses it in neither case', () => {
    const [base, mine, theirs] = [order('abcd'), order('bcda'), order('bcad')];
    const { content, conflicts } = mergeContents(base, mine, theirs);
    expect(content.cells.map(({ id }) => id).join('')).toBe('bcda');
    expect(conflicts).toEqual([{ kind: 'place', id: 'a', mine: 'd', theirs: 'c' }]);
    const answered = conflicts.reduce((held, one) => settle(held, one, 'theirs'), content);
    expect(answered.cells.map(({ id }) => id).join('')).toBe('bcad');
  });
});

describe('settings', () => {
  test('are merged field by field, and asked about where both set one', () => {
    const set = (changed: Partial<NotebookContent['settings']>): NotebookContent => ({
      ...contentOf(),
      settings: { ...settings, ...changed },
    });
    const both = mergeContents(
      set({}),
      set({ unit: 'cm', digits: 9 }),
      set({ unit: 'in', step: '1 mm' }),
    );
    expect(both.content.settings).toEqual({ ...settings, unit: 'cm', digits: 9, step: '1 mm' });
    expect(both.conflicts).toEqual([{ kind: 'setting', name: 'unit', mine: 'cm', theirs: 'in' }]);
  });

  test('of a cell are merged field by field too', () => {
    const own = (set: NotebookCell['settings']) =>
      contentOf({ ...dimension('c', 'R'), ...(set ? { settings: set } : {}) });
    const { content, conflicts } = mergeContents(
      own({ digits: 8 }),
      own({ digits: 8, unit: 'cm' }),
      own({ step: '1 mm' }),
    );
    expect(conflicts).toEqual([]);
    expect(content.cells[0]?.settings).toEqual({ unit: 'cm', step: '1 mm' });
  });
});

test('while a question is open, what it is about is stored as it was, and everything else as written', () => {
  const stored = contentOf(dimension('a', 'R = 3'), dimension('b', 'n = 8'));
  const present = contentOf(dimension('a', 'R = 2'), dimension('b', 'n = 9'));
  const { conflicts } = mergeContents(contentOf(dimension('a', 'R = 1')), present, stored);
  const open = conflicts
    .filter(({ kind }) => kind === 'cell')
    .filter((one) => keyOfConflict(one) === 'cell:a');
  expect(open).toHaveLength(1);
  expect(withhold(present, open, stored)).toEqual(
    contentOf(dimension('a', 'R = 3'), dimension('b', 'n = 9')),
  );
});

test('a long cell that two people rewrote altogether is one question, soon', () => {
  const many = (word: string) => Array.from({ length: 4000 }, (_, at) => `${word}${at}`);
  const { readings } = merged(many('a'), many('b'), many('c'));
  expect(readings).toEqual([many('b'), many('c')]);
});
