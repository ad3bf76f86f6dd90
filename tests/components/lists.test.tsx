import { render, screen, within } from '@testing-library/react';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { copyForms } from '@/components/sheet/copy-forms';
import { EntryLine } from '@/components/sheet/entry-line';
import { listRows, singlesOf } from '@/components/sheet/lists/list-rows';
import type { Item, ListResult, Result } from '@/components/sheet/result';
import { isLongList, largeTex } from '@/components/sheet/value-tex';
import { compartmentsOf, sayBriefly, sayDimension, sayResult } from '@/components/sheet/wording';
import { evaluateExpression } from '@/lib/language/index';
import { numberResult } from './sample-results';

function listOf(source: string, step: string | null = '0.5 mm', unit: 'mm' | 'ft' = 'mm') {
  const result = evaluateExpression(source, { step, unit });
  if (result.kind !== 'list') throw new Error(`${source} gives no list but ${result.kind}`);
  return result;
}

const CHORDS = listOf('L = each(k, 2, 8, 2*1500 mm sin(k turn/34))');
const RING = listOf('P = ring(point(0 mm, 0 mm), 1500 mm, 17)');
const NESTED = listOf('[1, [2, sqrt(3)]]', null);
const UNLIKE = listOf('[cos(turn/7), cos(turn/17)]', null);

const show = (result: Result) => render(<EntryLine line={{ result, before: null }} />);
const heads = (list: ListResult) => listRows(list).heads;
const textOf = (row: HTMLElement | undefined) =>
  [...(row?.children ?? [])].map(({ textContent }) => textContent);
const copied = (result: Result, label: string) =>
  copyForms(result).find((form) => form.label === label)?.text;
const wordings = (result: Result, full = false) =>
  compartmentsOf(result, full).map(
    ({ label, value }) => `${label}: ${typeof value === 'string' ? value : ''}`,
  );

describe('a list on the sheet', () => {
  it('has its items in a table with a name, heads of columns and running numbers', () => {
    show(CHORDS);
    const table = screen.getByRole('table', { name: 'Items of L' });
    const columns = within(table).getAllByRole('columnheader');
    expect(columns.map(({ textContent }) => textContent)).toEqual([
      'No.',
      'Decimal, mm',
      'Cut size, mm',
      'Exact',
    ]);
    expect(
      within(table)
        .getAllByRole('rowheader')
        .map((cell) => cell.textContent),
    ).toEqual([...'1234567']);
    const [, first] = within(table).getAllByRole('row');
    expect(textOf(first).slice(0, 3)).toEqual(['1', '1083.7249985614…', '1083.5rounded down']);
    expect(first?.querySelector('math')).not.toBeNull();
  });

  it('can be scrolled by keyboard within its own frame', () => {
    show(CHORDS);
    expect(screen.getByRole('group', { name: 'Items of L' })).toHaveAttribute('tabindex', '0');
  });

  it('has no drawn dimension', () => {
    expect(sayDimension(CHORDS)).toBeNull();
    show(CHORDS);
    expect(screen.queryByRole('figure')).toBeNull();
  });

  it('stands large as it was written where its items are long, else item by item', () => {
    expect(isLongList(CHORDS)).toBe(true);
    expect(largeTex(CHORDS)).toBe(CHORDS.typeset);
    expect(largeTex(NESTED)).toBe(NESTED.exact.tex);
    show(CHORDS);
    expect(screen.getByRole('group', { name: 'As written' })).toBeInTheDocument();
    const some = listOf(
      '[sqrt(2) mm, sqrt(3) mm, sqrt(5) mm, sqrt(7) mm, sqrt(11) mm, sqrt(13) mm]',
    );
    show(some);
    const value = screen.getByRole('group', { name: 'Exact value' });
    expect(value.querySelectorAll('.katex')).toHaveLength(some.items.length);
  });

  it('folds a long table without a script, and names the whole count', () => {
    show(RING);
    const table = screen.getByRole('table', { name: 'Items of P' });
    const rows = [...table.querySelectorAll('tbody tr')];
    expect(rows).toHaveLength(17);
    expect(rows.filter(({ className }) => /(^| )hidden( |$)/.test(className))).toHaveLength(9);
    expect(screen.getByText('All 17 items').closest('summary')).not.toBeNull();
    show(CHORDS);
    expect(screen.queryByText('All 7 items')).toBeNull();
  });

  it('of points has a column for x and one for y, each with its cut sizes', () => {
    expect(heads(RING)).toEqual(['x, mm', 'x, cut, mm', 'y, mm', 'y, cut, mm', 'Exact']);
    const [first] = listRows(RING).rows;
    expect(first).toMatchObject({
      number: '1',
      cells: [
        { text: '0', rounded: null },
        { text: '0', rounded: 'exact' },
        { text: '1500', rounded: null },
        { text: '1500', rounded: 'exact' },
        { kind: 'exact' },
      ],
    });
  });

  it('has the decimal points of a column under one another', () => {
    const list = listOf('[sqrt(2) mm, -1200 mm sqrt(2), 30 mm sqrt(3)]');
    for (const at of [1, 2]) {
      const points = listRows(list).rows.map((row) => {
        const cell = row.kind === 'single' ? row.cells[at] : undefined;
        if (cell?.kind !== 'figure') throw new Error('A figure was expected.');
        return cell.indent + (/\.|$/.exec(cell.text)?.index ?? 0);
      });
      expect(points).toEqual([5, 5, 5]);
    }
  });

  it('numbers the items of a list within it below the number of that list', () => {
    const { rows } = listRows(NESTED);
    expect(rows.map(({ number, kind }) => [number, kind])).toEqual([
      ['1', 'single'],
      ['2', 'list'],
      ['2.1', 'single'],
      ['2.2', 'single'],
    ]);
    show(NESTED);
    expect(screen.getByText('a list of 2')).toBeInTheDocument();
  });

  it('says what reaches its items once, and item by item only where they differ', () => {
    expect(heads(CHORDS)).not.toContain('Reach');
    expect(wordings(CHORDS)).toEqual(['Items: 7', 'Reach: straightedge and compass']);
    expect(heads(UNLIKE)).toEqual(['Decimal', 'Reach', 'Exact']);
    expect(wordings(UNLIKE)).toContain('Reach: 1 of 2 with straightedge and compass');
    show(UNLIKE);
    expect(screen.getByText('with an angle trisector')).toBeInTheDocument();
  });

  it('of angles gives degrees, minutes and seconds, and of lengths in feet what a rule shows', () => {
    const angles = listOf('[turn/7, turn/17]');
    expect(heads(angles)).toContain('Degrees, minutes, seconds');
    expect(listRows(angles).rows[0]).toMatchObject({
      cells: [{ kind: 'exact' }, { text: '51.428571428571…°' }, { text: '51° 25′ 42.9″' }, {}],
    });
    const feet = listOf('[1 ft, 2 ft sqrt(3)]', null, 'ft');
    expect(heads(feet)).toEqual(['Exact', 'Decimal, ft', 'Feet and inches']);
  });

  it('writes each unit beside its number where the items differ in it', () => {
    const mixed = listOf('[1, 2 mm, turn/7]');
    expect(heads(mixed)).toContain('Decimal');
    expect(listRows(mixed).rows[1]).toMatchObject({
      cells: [{}, { text: '2 mm' }, { text: '2 mm', rounded: 'exact' }, { text: '–' }, {}],
    });
  });

  it('has as many rows as values and lists, and a cell for each head, however lists are nested', () => {
    const number: Item = numberResult();
    const { items } = fc.letrec<{ items: Item[] }>((tie) => ({
      items: fc.array(
        fc.oneof(
          { depthSize: 'small' },
          fc.constant(number),
          tie('items').map((inner): Item => ({ ...NESTED, items: inner })),
        ),
        { minLength: 1, maxLength: 4 },
      ),
    }));
    const count = (list: readonly Item[]): number =>
      list.reduce((sum, item) => sum + 1 + (item.kind === 'list' ? count(item.items) : 0), 0);
    fc.assert(
      fc.property(items, (list) => {
        const table = listRows({ items: list });
        expect(table.rows).toHaveLength(count(list));
        expect(new Set(table.rows.map((row) => row.number)).size).toBe(table.rows.length);
        for (const row of table.rows)
          if (row.kind === 'single') expect(row.cells).toHaveLength(table.heads.length);
        expect(table.rows.filter(({ kind }) => kind === 'single')).toHaveLength(
          singlesOf({ items: list }).length,
        );
      }),
    );
  });
});

describe('a list in words', () => {
  it('is counted in the index and said with its first items', () => {
    expect(sayBriefly(RING)).toBe('17 items');
    expect(sayBriefly(listOf('[4]'))).toBe('1 item');
    expect(sayResult(CHORDS)).toBe(
      'L is a list of 7: 1083.5 mm; 1579.5 mm; 2021 mm; 2394 mm; 2685.5 mm; 2885.5 mm; and 1 more.',
    );
  });
});

describe('a list that is copied', () => {
  it('gives its decimals and its cut sizes one to a line', () => {
    expect(copied(NESTED, 'Decimals, one a line')).toBe('1\n2\n1.73205080756887729352744634151');
    expect(copied(CHORDS, 'Cut sizes, one a line')).toMatch(/^1083\.5\n1579\.5\n2021\n/);
    expect(copied(RING, 'Cut sizes, one a line')).toMatch(/^0\t1500\n/);
    expect(String(copied(RING, 'Decimals, one a line')).split('\n')).toHaveLength(17);
  });

  it('gives no column where an item would be missing in it', () => {
    expect(copied(listOf('[1, 2 mm]'), 'Cut sizes, one a line')).toBeUndefined();
    expect(copied(listOf('[1, circle(point(0, 0), 1)]'), 'Decimals, one a line')).toBeUndefined();
  });

  it('gives text, TeX and JSON as other values do', () => {
    expect(copied(NESTED, 'Exact text')).toBe('[1, [2, sqrt(3)]]');
    expect(copied(NESTED, 'TeX')).toBe(NESTED.exact.tex);
    expect(JSON.parse(String(copied(NESTED, 'JSON')))).toEqual(NESTED);
  });
});
