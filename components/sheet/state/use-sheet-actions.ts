'use client';

import { useEffect, useState } from 'react';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { AT_END, cellAnchor, focusEntry, type CellActions, type Hand } from '../cells';
import { knownMarks } from '../editor/names';
import { linesOf } from '../source-text';
import { blocksOf, hiddenBy, placeBeyond, type Folds } from './blocks';
import { newCellId } from './changes';
import { copiesOf } from './copies';
import type { Shown } from './shown';
import type { Place } from './uses';

export interface Sheeted {
  content: NotebookContent;
  shown: Shown;
  folds: Folds;
  dispatch: CellActions['dispatch'];
  setFold: (id: string, folded: boolean) => void;
  setHand: (hand: Hand | null) => void;
  setDetails: (line: Place | null) => void;
  /** Tells whoever listens what has just been done. */
  say: (words: string) => void;
}

const lastLine = (cell: NotebookCell) =>
  cell.kind === 'dimension' ? linesOf(cell.source).length - 1 : 0;

const cellsInWords = (count: number) => (count === 1 ? 'Cell' : `${count} cells`);

/** The actions of the cells: one object for as long as the sheet is on the screen. */
export function useSheetActions(sheeted: Sheeted): CellActions {
  const [{ actions, follow }] = useState(() => makeActions(sheeted));
  useEffect(() => follow(sheeted));
  return actions;
}

/** Actions on the sheet as it was last followed to. */
function makeActions(first: Sheeted): {
  actions: CellActions;
  follow: (sheeted: Sheeted) => void;
} {
  let latest = first;
  const now = () => latest;
  const seen = () => blocksOf(now().content.cells, now().folds);
  const seenAt = (id: string) => seen().findIndex(({ cells: [cell] }) => cell?.id === id);
  const placeOf = (id: string) => now().content.cells.findIndex((cell) => cell.id === id);

  /** Opens whatever is folded over a cell, and the cell itself unless it is a section. */
  const reveal = (id: string) => {
    const { content, folds, setFold } = now();
    const section = hiddenBy(content.cells, folds, id);
    if (section !== null) setFold(section, false);
    const own = content.cells.find((cell) => cell.id === id);
    if (own && own.kind !== 'section' && folds.has(id)) setFold(id, false);
  };

  const take = (hand: Hand | null) => {
    if (hand) reveal(hand.id);
    now().setHand(hand);
  };

  const place = (id: string, at: number) => {
    const block = seen()[seenAt(id)];
    if (!block) return;
    const { content, folds, dispatch, setFold, say } = now();
    const ids = block.cells.map((cell) => cell.id);
    const focused = document.activeElement;
    dispatch({ kind: 'move', ids, at });
    // A cell that is put beneath a folded section stands in it from now on, and is to be seen there.
    const above = content.cells.slice(0, at).findLast((cell) => cell.kind === 'section');
    if (above && !ids.includes(above.id) && folds.has(above.id)) setFold(above.id, false);
    const standing = content.cells.slice(0, at).filter((cell) => !ids.includes(cell.id)).length + 1;
    say(`${cellsInWords(ids.length)} moved to place ${standing} of ${content.cells.length}.`);
    requestAnimationFrame(() => {
      if (focused instanceof HTMLElement) focused.focus();
      document.getElementById(cellAnchor(id))?.scrollIntoView({ block: 'nearest' });
    });
  };

  const actions: CellActions = {
    dispatch: (change) => now().dispatch(change),
    take,
    reveal,
    place,
    marks: () => knownMarks(now().content.cells, now().shown),
    step({ id, line, column }, by) {
      const own = now().content.cells[placeOf(id)];
      if (own?.kind === 'dimension' && linesOf(own.source)[line + by] !== undefined) {
        take({ id, line: line + by, column });
        return true;
      }
      // What is folded stays folded; the cursor goes on to what can be seen.
      const { folds } = now();
      const open = seen().filter(
        ({ cells: [cell] }) => cell && (cell.kind === 'section' || !folds.has(cell.id)),
      );
      const next = open[open.findIndex(({ cells: [cell] }) => cell?.id === id) + by]?.cells[0];
      if (!next) return false;
      take({ id: next.id, line: by < 0 ? lastLine(next) : 0, column });
      return true;
    },
    insert(kind, beside, where) {
      const cell = { id: newCellId(), kind, source: '' };
      const block = beside === null ? undefined : seen()[seenAt(beside)];
      const { content, dispatch } = now();
      const end = content.cells.length;
      const at = block ? (where === 'after' ? block.from + block.cells.length : block.from) : end;
      dispatch({ kind: 'insert', cells: [cell], at });
      const above = content.cells.slice(0, at).findLast((one) => one.kind === 'section');
      if (above && kind !== 'section' && now().folds.has(above.id)) now().setFold(above.id, false);
      now().setHand({ id: cell.id, line: 0, column: AT_END });
    },
    move(id, by) {
      const at = placeBeyond(seen(), seenAt(id), by);
      if (at === null) now().say(by < 0 ? 'This is the first cell.' : 'This is the last cell.');
      else place(id, at);
    },
    duplicate(id) {
      const block = seen()[seenAt(id)];
      if (!block) return;
      const { content, dispatch, say } = now();
      const copies = copiesOf(block.cells, content.cells);
      dispatch({ kind: 'insert', cells: copies, at: block.from + block.cells.length });
      say(`${cellsInWords(copies.length)} duplicated.`);
      const first = copies[0];
      if (first && copies.length > 1) now().setFold(first.id, true);
      if (first) now().setHand({ id: first.id, line: 0, column: AT_END });
    },
    fold(id) {
      const folded = !now().folds.has(id);
      now().setFold(id, folded);
      if (folded) now().setHand(null);
      now().say(folded ? 'Folded.' : 'Opened.');
      requestAnimationFrame(() => focusEntry(id));
    },
    remove(id) {
      const blocks = seen();
      const at = seenAt(id);
      const block = blocks[at];
      if (!block) return;
      const next = (blocks[at + 1] ?? blocks[at - 1])?.cells[0];
      now().dispatch({ kind: 'delete', ids: block.cells.map((cell) => cell.id) });
      now().setHand(null);
      requestAnimationFrame(() => {
        if (next) focusEntry(next.id);
      });
    },
    details: (id, line) => now().setDetails({ id, line }),
    showLine(id, line) {
      reveal(id);
      requestAnimationFrame(() => {
        document.getElementById(cellAnchor(id))?.scrollIntoView({ block: 'center' });
        focusEntry(id, line);
      });
    },
  };
  const follow = (sheeted: Sheeted) => {
    latest = sheeted;
  };
  return { actions, follow };
}
