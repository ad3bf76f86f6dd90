import type { KeyboardEvent } from 'react';
import type { CellCommand, EntryCommand } from '../cell-keys';
import { AT_END, cellAnchor, focusNeighbour, lineOfEntry, type SheetActions } from '../cells';
import { findCommand } from './chord';

/** The cell and the element in which a key was pressed. */
export interface KeyPlace {
  id: string;
  target: HTMLElement;
}

type Run = (place: KeyPlace, actions: SheetActions) => boolean;

/** A command that always does something. */
const always =
  (run: (place: KeyPlace, actions: SheetActions) => void): Run =>
  (place, actions) => {
    run(place, actions);
    return true;
  };

/** Opens the choice of forms of the value in whose row the focus is. */
function openCopies({ target }: KeyPlace): boolean {
  const button = target.closest('[data-row]')?.querySelector<HTMLElement>('[data-copy] button');
  button?.focus();
  button?.click();
  return button !== null && button !== undefined;
}

/** The line, from 0, in which a key was pressed: its entry says so, an open source stands in its row. */
function lineOf({ id, target }: KeyPlace): number {
  if (target.dataset.entry === id) return lineOfEntry(target);
  const rows = [...document.querySelectorAll(`#${cellAnchor(id)} [data-row]`)];
  return Math.max(
    0,
    rows.findIndex((row) => row.contains(target)),
  );
}

function focusEnd(by: -1 | 1): boolean {
  const entries = [...document.querySelectorAll<HTMLElement>('[data-entry]')];
  const end = by < 0 ? entries[0] : entries.at(-1);
  end?.focus();
  return end !== undefined;
}

export const CELL_COMMANDS: Record<CellCommand, Run> = {
  dimensionBelow: always(({ id }, actions) => actions.insert('dimension', id, 'after')),
  noteBelow: always(({ id }, actions) => actions.insert('note', id, 'after')),
  dimensionAbove: always(({ id }, actions) => actions.insert('dimension', id, 'before')),
  noteAbove: always(({ id }, actions) => actions.insert('note', id, 'before')),
  sectionBelow: always(({ id }, actions) => actions.insert('section', id, 'after')),
  sectionAbove: always(({ id }, actions) => actions.insert('section', id, 'before')),
  moveUp: always(({ id }, actions) => actions.move(id, -1)),
  moveDown: always(({ id }, actions) => actions.move(id, 1)),
  duplicate: always(({ id }, actions) => actions.duplicate(id)),
  fold: always(({ id }, actions) => actions.fold(id)),
  copy: openCopies,
  proof: always((place, actions) => actions.details(place.id, lineOf(place))),
  comment: always(({ id }, actions) => actions.comment(id)),
  remove: always(({ id }, actions) => actions.remove(id)),
  cellBefore: ({ id }, actions) => actions.jump(id, -1, 'cell'),
  cellAfter: ({ id }, actions) => actions.jump(id, 1, 'cell'),
  headingBefore: ({ id }, actions) => actions.jump(id, -1, 'heading'),
  headingAfter: ({ id }, actions) => actions.jump(id, 1, 'heading'),
};

export const ENTRY_COMMANDS: Record<EntryCommand, Run> = {
  open: always(({ id, target }, actions) =>
    actions.take({ id, line: lineOfEntry(target), column: AT_END }),
  ),
  entryBefore: ({ target }) => focusNeighbour(target, -1),
  entryAfter: ({ target }) => focusNeighbour(target, 1),
  firstEntry: () => focusEnd(-1),
  lastEntry: () => focusEnd(1),
  remove: always(({ id }, actions) => actions.remove(id)),
  rename: ({ id, target }, actions) => {
    const mark = actions.markOf(id, lineOfEntry(target));
    return mark !== null && actions.rename(mark);
  },
  keys: always((_, actions) => actions.showKeys()),
};

/** Keys pressed anywhere within a cell, its source open or not; what is done here goes no further. */
export function onCellKey(event: KeyboardEvent, id: string, actions: SheetActions) {
  if (event.defaultPrevented || !(event.target instanceof HTMLElement)) return;
  const place: KeyPlace = { id, target: event.target };
  const inCell = findCommand('cell', event);
  const onEntry = place.target.dataset.entry === id ? findCommand('entry', event) : null;
  const handled =
    inCell !== null
      ? CELL_COMMANDS[inCell](place, actions)
      : onEntry !== null && ENTRY_COMMANDS[onEntry](place, actions);
  if (!handled) return;
  event.preventDefault();
  event.stopPropagation();
}
