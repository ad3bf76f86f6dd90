import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { findHunks, keyOfConflict, mergeContents, sameCell, settle } from '@/lib/notebooks/merge';
import { anyContent, source, threeContents } from './arbitraries';

/** Its lines that hold anything: an empty text and one empty line are the same text. */
const linesOf = (cell: NotebookCell | null | undefined) =>
  (cell?.source ?? '').split('\n').filter((text) => text !== '');
const cellOf = (content: NotebookContent, id: string) =>
  content.cells.find((cell) => cell.id === id) ?? null;
const idsOf = (...contents: NotebookContent[]) =>
  new Set(contents.flatMap(({ cells }) => cells.map(({ id }) => id)));
const runs = { numRuns: 400 };

describe('merging', () => {
  test('where only one side changed anything, gives that side as it is', () => {
    fc.assert(
      fc.property(anyContent, anyContent, (base, x) => {
        for (const merge of [
          mergeContents(base, x, base),
          mergeContents(base, base, x),
          mergeContents(base, x, x),
        ])
          expect(merge).toEqual({ content: x, conflicts: [] });
      }),
      runs,
    );
  });

  test('has no id twice, and loses a cell only when one side took it away and the other left it', () => {
    fc.assert(
      fc.property(threeContents, ({ base, mine, theirs }) => {
        const { content } = mergeContents(base, mine, theirs);
        const ids = content.cells.map(({ id }) => id);
        expect(new Set(ids).size).toBe(ids.length);
        for (const id of idsOf(mine, theirs)) {
          const was = cellOf(base, id);
          const [my, their] = [cellOf(mine, id), cellOf(theirs, id)];
          const isLeft = (one: NotebookCell | null) => one === null || sameCell(one, was);
          const goes =
            was !== null && (my === null || their === null) && isLeft(my) && isLeft(their);
          expect(ids.includes(id)).toBe(!goes);
        }
      }),
      runs,
    );
  });

  test('has every line that a side added, or gives it as that side’s reading of a conflict', () => {
    fc.assert(
      fc.property(threeContents, ({ base, mine, theirs }) => {
        const { content, conflicts } = mergeContents(base, mine, theirs);
        for (const id of idsOf(mine, theirs)) {
          const conflict = conflicts.find((one) => one.kind === 'cell' && one.id === id);
          for (const [side, cell] of [
            ['mine', cellOf(mine, id)],
            ['theirs', cellOf(theirs, id)],
          ] as const) {
            const old = new Set(linesOf(cellOf(base, id)));
            const reading = conflict?.kind === 'cell' ? conflict[side] : cellOf(content, id);
            const there = new Set(linesOf(reading));
            const missing = linesOf(cell).filter((text) => !old.has(text) && !there.has(text));
            expect(missing).toEqual([]);
          }
        }
      }),
      runs,
    );
  });

  test('has every line that all three have once, or has it in a reading of a conflict', () => {
    fc.assert(
      fc.property(threeContents, ({ base, mine, theirs }) => {
        const { content, conflicts } = mergeContents(base, mine, theirs);
        for (const cell of base.cells) {
          const sides = [cell, cellOf(mine, cell.id), cellOf(theirs, cell.id)];
          const conflict = conflicts.find((one) => one.kind === 'cell' && one.id === cell.id);
          const readings =
            conflict?.kind === 'cell'
              ? [conflict.mine, conflict.theirs]
              : [cellOf(content, cell.id)];
          const there = readings.flatMap(linesOf);
          const kept = linesOf(cell).filter((text) =>
            sides.every((side) => linesOf(side).filter((other) => other === text).length === 1),
          );
          expect(kept.filter((text) => !there.includes(text))).toEqual([]);
        }
      }),
      runs,
    );
  });

  test('is the same from the other side: equal lines where it is clean, and conflicts turned round', () => {
    fc.assert(
      fc.property(threeContents, ({ base, mine, theirs }) => {
        const here = mergeContents(base, mine, theirs);
        const there = mergeContents(base, theirs, mine);
        expect(here.conflicts.map(keyOfConflict).sort()).toEqual(
          there.conflicts.map(keyOfConflict).sort(),
        );
        for (const conflict of here.conflicts) {
          const other = there.conflicts.find(
            (one) => keyOfConflict(one) === keyOfConflict(conflict),
          );
          const inOrder = (one: unknown) =>
            typeof one === 'object' && one !== null && 'source' in one
              ? { ...one, source: String(one.source).split('\n').sort() }
              : one;
          if (conflict.kind === 'place') continue;
          expect([inOrder(other?.mine), inOrder(other?.theirs)]).toEqual([
            inOrder(conflict.theirs),
            inOrder(conflict.mine),
          ]);
        }
        if (here.conflicts.length > 0) return;
        expect(here.content.settings).toEqual(there.content.settings);
        for (const id of idsOf(here.content, there.content))
          expect(linesOf(cellOf(here.content, id)).sort()).toEqual(
            linesOf(cellOf(there.content, id)).sort(),
          );
      }),
      runs,
    );
  });

  test('keeps the cells that one side left in order as the other side has them', () => {
    fc.assert(
      fc.property(threeContents, ({ base, theirs }) => {
        const mine = { ...base, cells: base.cells.filter((_, place) => place % 2 === 0) };
        const { content } = mergeContents(base, mine, theirs);
        const ids = content.cells.map(({ id }) => id);
        expect(theirs.cells.map(({ id }) => id).filter((id) => ids.includes(id))).toEqual(ids);
      }),
      runs,
    );
  });

  test('answered throughout for one side has that side’s cells wherever the two contradicted', () => {
    fc.assert(
      fc.property(threeContents, fc.constantFrom('mine', 'theirs'), (three, side) => {
        const { content, conflicts } = mergeContents(three.base, three.mine, three.theirs);
        const answered = conflicts.reduce((held, one) => settle(held, one, side), content);
        for (const conflict of conflicts) {
          if (conflict.kind === 'cell')
            expect(cellOf(answered, conflict.id)).toEqual(conflict[side]);
          if (conflict.kind === 'setting')
            expect(answered.settings[conflict.name]).toBe(conflict[side]);
        }
      }),
      runs,
    );
  });

  test('on a merge that was stored merges again to the same: a lost answer is no second edit', () => {
    fc.assert(
      fc.property(threeContents, ({ base, mine, theirs }) => {
        const once = mergeContents(base, mine, theirs);
        if (once.conflicts.length > 0) return;
        const again = mergeContents(theirs, once.content, theirs);
        expect(again).toEqual({ content: once.content, conflicts: [] });
      }),
      runs,
    );
  });
});

test('hunks turn one text into the other, and there are none between equal texts', () => {
  fc.assert(
    fc.property(source, source, (one, other) => {
      const [before, after] = [one.split('\n'), other.split('\n')];
      const hunks = findHunks(before, after);
      const made = hunks.reduceRight(
        (lines, hunk) => lines.toSpliced(hunk.from, hunk.to - hunk.from, ...hunk.with),
        before,
      );
      expect(made).toEqual(after);
      expect(findHunks(before, before)).toEqual([]);
    }),
    runs,
  );
});
