import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  blocksOf,
  hiddenBy,
  placeBeyond,
  sectionOf,
  sectionSizes,
} from '@/components/sheet/state/blocks';
import { applyChange } from '@/components/sheet/state/changes';
import { copiesOf } from '@/components/sheet/state/copies';
import type { NotebookCell } from '@/lib/notebooks/content';
import { contentOf, dimension, note } from './sample';

const section = (id: string): NotebookCell => ({ id, kind: 'section', source: `Section ${id}` });
const sheet = [
  dimension('a', 'R = 1 mm'),
  section('s'),
  dimension('b', 'S = R'),
  note('n', 'text'),
  section('t'),
  dimension('c', 'T = S'),
];
const anySheet = fc
  .array(fc.constantFrom('dimension' as const, 'note' as const, 'section' as const))
  .map((kinds) => kinds.map((kind, at): NotebookCell => ({ id: `c${at}`, kind, source: '' })));
const ids = (cells: readonly NotebookCell[]) => cells.map(({ id }) => id).join('');

describe('the sheet as it is seen', () => {
  it('has every cell in one block, in order, whatever is folded', () => {
    fc.assert(
      fc.property(anySheet, fc.infiniteStream(fc.boolean()), (cells, coin) => {
        const folds = new Set(cells.filter(() => coin.next().value).map(({ id }) => id));
        const blocks = blocksOf(cells, folds);
        expect(blocks.flatMap((block) => block.cells)).toEqual(cells);
        for (const { from, cells: own } of blocks) expect(cells[from]).toBe(own[0]);
        const hidden = blocks.flatMap((block) => block.cells.slice(1)).map(({ id }) => id);
        for (const { id } of cells)
          expect(hiddenBy(cells, folds, id) !== null).toBe(hidden.includes(id));
      }),
    );
  });

  it('hides beneath a folded section what follows up to the next section', () => {
    const blocks = blocksOf(sheet, new Set(['s', 'c']));
    expect(blocks.map((block) => ids(block.cells))).toEqual(['a', 'sbn', 't', 'c']);
    expect(sectionSizes(sheet)).toEqual(
      new Map([
        ['s', 2],
        ['t', 1],
      ]),
    );
    expect([...'asbntc'].map((id) => sectionOf(sheet, id)?.id ?? '-').join('')).toBe('--ss-t');
  });

  it('moves a folded section whole, and others past it whole', () => {
    const move = (folds: string[], id: string, by: -1 | 1) => {
      const blocks = blocksOf(sheet, new Set(folds));
      const at = blocks.findIndex(({ cells: [cell] }) => cell?.id === id);
      const place = placeBeyond(blocks, at, by);
      if (place === null) return null;
      const moved = blocks[at]?.cells.map((cell) => cell.id) ?? [];
      return ids(applyChange(contentOf(...sheet), { kind: 'move', ids: moved, at: place }).cells);
    };
    expect(move(['s'], 's', -1)).toBe('sbnatc');
    expect(move(['s'], 's', 1)).toBe('atsbnc');
    expect(move(['s'], 'a', 1)).toBe('sbnatc');
    expect(move([], 's', 1)).toBe('absntc');
    expect(move([], 'a', -1)).toBeNull();
    expect(move([], 'c', 1)).toBeNull();
  });
});

describe('copies of cells', () => {
  const copy = (...sources: string[]) => {
    const cells = sources.map((source, at) => dimension(`d${at}`, source));
    return copiesOf(cells, [...sheet, ...cells]).map(({ source }) => source);
  };

  it('define fresh marks, read one another under them, and read the rest as before', () => {
    expect(copy('p = 2R\nq = p + R  # p is the pitch', 'pp = q/p')).toEqual([
      'p_2 = 2R\nq_2 = p_2 + R  # p is the pitch',
      'pp_2 = q_2/p_2',
    ]);
  });

  it('take a name that nobody has', () => {
    expect(copy('R_2 = 1', 'k = 2', 'k_2 = 3')).toEqual(['R_2_2 = 1', 'k_3 = 2', 'k_2_2 = 3']);
  });

  it('leave decisions and notes as they are, and have ids of their own', () => {
    expect(copy('p == 2R')).toEqual(['p == 2R']);
    const [copied] = copiesOf([note('n', 'p = 1')], sheet);
    expect(copied).toMatchObject({ kind: 'note', source: 'p = 1' });
    expect(copied?.id).not.toBe('n');
  });
});
