import type { KeyboardEvent } from 'react';
import { focusNeighbour, type SheetActions } from './cells';

/** The keys of the sheet, as the help page lists them; `Mod` is Ctrl, or Cmd on a Mac. */
export const KEYS = [
  {
    keys: ['Enter'],
    does: 'Open the source of the line that has the focus; in the source, begin a new line',
  },
  { keys: ['Esc'], does: 'Close the source' },
  { keys: ['↑', '↓'], does: 'Go to the line above or below' },
  { keys: ['Mod+Enter'], does: 'Add a dimension cell below' },
  { keys: ['Mod+Shift+Enter'], does: 'Add a note below' },
  { keys: ['Alt+↑', 'Alt+↓'], does: 'Move the cell up or down' },
  { keys: ['Delete'], does: 'Delete the cell that has the focus (undo brings it back)' },
  {
    keys: ['Mod+Z', 'Mod+Shift+Z'],
    does: 'Undo, redo: typing, moving, deleting and settings alike',
  },
  { keys: ['Mod+S'], does: 'Keep a version' },
] as const;

const isMod = (event: KeyboardEvent) => event.ctrlKey || event.metaKey;

/** Keys pressed anywhere within a cell, its source open or not. */
export function onCellKey(event: KeyboardEvent, id: string, actions: SheetActions) {
  if (event.defaultPrevented) return;
  const handled = handle(event, id, actions);
  if (handled) {
    event.preventDefault();
    event.stopPropagation();
  }
}

function handle(event: KeyboardEvent, id: string, actions: SheetActions): boolean {
  if (event.key === 'Enter' && isMod(event)) {
    actions.insert(event.shiftKey ? 'note' : 'dimension', id, 'after');
    return true;
  }
  const by = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : null;
  if (by !== null && event.altKey) {
    actions.move(id, by);
    return true;
  }
  if (!(event.target instanceof HTMLElement) || event.target.dataset.entry !== id) return false;
  if (by !== null && !isMod(event) && !event.shiftKey) return focusNeighbour(event.target, by);
  if (event.key === 'Delete') {
    actions.remove(id);
    return true;
  }
  return false;
}
