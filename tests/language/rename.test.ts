import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluateCells, type CellSource, type Result } from '@/lib/language/index';
import { classOfWord } from '@/lib/language/names';
import { findPlaces, renameMark } from '@/lib/language/rename';
import { statements, values } from './arbitraries';

const cell = (id: string, ...lines: string[]): CellSource => ({ id, source: lines.join('\n') });

function renamed(cells: readonly CellSource[], mark: string, name: string) {
  const renaming = renameMark(cells, mark, name);
  if (renaming.kind !== 'renamed') throw new Error(renaming.message);
  return renaming;
}

function refused(cells: readonly CellSource[], mark: string, name: string) {
  const renaming = renameMark(cells, mark, name);
  if (renaming.kind !== 'refused') throw new Error('It was renamed.');
  return renaming;
}

/** A sheet of marks that read earlier ones, with remarks that name them too. */
const sheets = fc
  .array(fc.tuple(values, fc.nat(9), fc.constantFrom('+', '*', '-'), fc.boolean()), {
    minLength: 2,
    maxLength: 6,
  })
  .map((lines) =>
    lines.map(([value, read, sign, remark], index) => {
      const other = index === 0 ? '' : ` ${sign} a${read % index}`;
      return cell(`c${index}`, `a${index} = ${value}${other}${remark ? ` # as a${read}` : ''}`);
    }),
  );

/** What a line says apart from the names in it. */
function withoutNames(result: Result) {
  const kept: Record<string, unknown> = { ...result, mark: null, source: '', typeset: '' };
  if (result.kind === 'error') kept.error = result.error.code;
  return kept;
}

describe('renaming a mark', () => {
  it('and renaming it back gives the very same text', () => {
    fc.assert(
      fc.property(fc.array(statements, { minLength: 1, maxLength: 4 }), (lines) => {
        const cells = lines.map((line, index) => cell(`c${index}`, line, `${line} # R_1`));
        fc.pre(findPlaces(cells, 'R_1').length > 0);
        const there = renamed(cells, 'R_1', 'sill');
        expect(renamed(there.cells, 'sill', 'R_1').cells).toEqual(cells);
        expect(findPlaces(there.cells, 'R_1')).toEqual([]);
        expect(findPlaces(there.cells, 'sill')).toHaveLength(there.places);
      }),
    );
  });

  it('leaves every result as it was but for the name', () => {
    fc.assert(
      fc.property(sheets, fc.nat(5), (cells, pick) => {
        const mark = `a${pick % cells.length}`;
        const there = renamed(cells, mark, 'springing').cells;
        const before = evaluateCells(cells, { digits: 8 }).flatMap(({ results }) => results);
        const after = evaluateCells(there, { digits: 8 }).flatMap(({ results }) => results);
        expect(after.map(withoutNames)).toEqual(before.map(withoutNames));
        expect(after.map(({ mark: name }) => name)).toEqual(
          before.map(({ mark: name }) => (name === mark ? 'springing' : name)),
        );
      }),
      { numRuns: 40 },
    );
  });

  it('changes definitions and readings, counts them, and leaves other cells the same objects', () => {
    const cells = [
      cell('a', 'R = 1200 mm', 's = 2R sin(turn/34)'),
      cell('b', 'x = 1'),
      cell('c', 's/R'),
    ];
    const { cells: after, places, changed } = renamed(cells, 'R', 'outer');
    expect(after.map(({ source }) => source)).toEqual([
      'outer = 1200 mm\ns = 2outer sin(turn/34)',
      'x = 1',
      's/outer',
    ]);
    expect([places, changed]).toEqual([3, 2]);
    expect(after[1]).toBe(cells[1]);
  });

  it('leaves remarks, longer names and the unknown of a polynomial alone', () => {
    const cells = [cell('a', 'x = 2 # x is given', 'x_1 = x', 'root(x^2 - 2, x)')];
    expect(renamed(cells, 'x', 'w').cells[0]?.source).toBe(
      'w = 2 # x is given\nx_1 = w\nroot(x^2 - 2, w)',
    );
  });

  it('keeps every kind of line break', () => {
    const cells = [{ id: 'a', source: 'R = 1\r\nR + 1\r2R\n\nR' }];
    expect(renamed(cells, 'R', 'S').cells[0]?.source).toBe('S = 1\r\nS + 1\r2S\n\nS');
  });

  it('reaches into lines that do not parse', () => {
    const cells = [cell('a', 'R = 1200 mm', 's = (R + ', 'R = ', 'root(x^2 - R', 'R R 2 3')];
    expect(renamed(cells, 'R', 'S').cells[0]?.source).toBe(
      'S = 1200 mm\ns = (S + \nS = \nroot(x^2 - S\nS S 2 3',
    );
  });

  it('renames a function where it is defined and called, and leaves parameters and local names alone', () => {
    const cells = [
      cell('a', 'f(r) = 2r + k', 'r = 600 mm', 'f(r) + f(2r)'),
      cell('b', 's = r + h where h = r/2', 't = r where r = 5 mm', 't = (r where r = 5 mm'),
    ];
    expect(renamed(cells, 'f', 'girth').cells[0]?.source).toBe(
      'girth(r) = 2r + k\nr = 600 mm\ngirth(r) + girth(2r)',
    );
    expect(renamed(cells, 'r', 'w').cells.map(({ source }) => source)).toEqual([
      'f(r) = 2r + k\nw = 600 mm\nf(w) + f(2w)',
      's = w + h where h = w/2\nt = r where r = 5 mm\nt = (r where r = 5 mm',
    ]);
    expect(refused(cells, 'r', 'h')).toMatchObject({ reason: 'captured' });
    expect(refused(cells, 'k', 'r')).toMatchObject({ reason: 'taken' });
  });

  it('does not take the unknown of an unfinished polynomial for a mark', () => {
    const cells = [cell('a', 'x = 1', 'root(x^2 - 2')];
    expect(renamed(cells, 'x', 'w').cells[0]?.source).toBe('w = 1\nroot(x^2 - 2');
  });
});

describe('a new name is refused', () => {
  const cells = [cell('a', 'R = 1200 mm', 'S = R/2', 'S_2 = 1', 't = u + 1', 'root(x^2 - t, 1)')];

  it.each([
    ['R', 'same', null],
    ['S', 'taken', 'S_3'],
    ['u', 'taken', 'u_2'],
    ['chord', 'kept-word', 'Chord'],
    ['m', 'kept-word', 'M'],
    ['i', 'kept-word', 'I'],
    ['2R', 'not-a-name', null],
    ['R 2', 'not-a-name', null],
    ['R#', 'not-a-name', null],
    ['', 'not-a-name', null],
    ['R=1\nQ', 'not-a-name', null],
  ])('%j: %s', (name, reason, suggestion) => {
    expect(refused(cells, 'R', name)).toMatchObject({ reason, suggestion });
    expect(refused(cells, 'R', name).message).toMatch(/^[A-Z`].*\.$/s);
  });

  it('where it would mean something else', () => {
    expect(refused(cells, 't', 'x')).toMatchObject({ reason: 'captured' });
  });

  it('when nothing has the old one', () => {
    expect(refused(cells, 'nowhere', 'N')).toMatchObject({ reason: 'unknown' });
  });

  it('and what is suggested instead is always accepted', () => {
    fc.assert(
      fc.property(fc.constantFrom('S', 'u', 'chord', 'm', 'deg', 'pi', 'sqrt', 'S_2'), (name) => {
        const { suggestion } = refused(cells, 'R', name);
        expect(suggestion !== null && classOfWord(suggestion) === null).toBe(true);
        expect(renameMark(cells, 'R', suggestion ?? '').kind).toBe('renamed');
      }),
    );
  });
});
