import type { NotebookCell } from '@/lib/notebooks/content';
import type { SheetNames } from './editor/names';
import type { Change } from './state/changes';

/** What is in hand: a cell, one of its lines, and where in that line the cursor begins. */
export interface Hand {
  id: string;
  /** Of a dimension cell, from 0; a note or a heading is taken in hand as a whole (line 0). */
  line: number;
  /** UTF-16 units into the line; beyond its end means the end. */
  column: number;
}

export const AT_END = Number.MAX_SAFE_INTEGER;

/** What a cell may ask of its sheet for itself; one stable object, so that cells are drawn only when they change. */
export interface CellActions extends Pick<SheetNames, 'marks'> {
  dispatch: (change: Change) => void;
  /** Takes a line in hand (its source opens), or puts down whatever was. */
  take: (hand: Hand | null) => void;
  /** Goes from the line in hand to the one above or below, into the next cell if need be. */
  step: (hand: Hand, by: -1 | 1) => boolean;
  /** Puts an empty cell beside another, or at the end, and takes it in hand. */
  insert: (kind: NotebookCell['kind'], beside: string | null, where: 'before' | 'after') => void;
  /** Past the cell above or below; a folded section goes with all that it hides, here and below. */
  move: (id: string, by: -1 | 1) => void;
  /** To a place among the cells, counted before the cell is taken out. */
  place: (id: string, at: number) => void;
  /** A copy below; marks that it defines get fresh names. */
  duplicate: (id: string) => void;
  /** Folds what is open and opens what is folded. */
  fold: (id: string) => void;
  /** Opens whatever is folded over a cell, so that it can be seen. */
  reveal: (id: string) => void;
  remove: (id: string) => void;
  /** Shows all that is known of the value of a line, counted from 0. */
  details: (id: string, line: number) => void;
  /** Brings a line into sight, whatever is folded over it, and gives it the focus. */
  showLine: (id: string, line: number) => void;
}

/** Everything a cell may ask of its sheet. */
export interface SheetActions extends CellActions, SheetNames {
  /** The mark that a line defines as it is written, or null. */
  markOf: (id: string, line: number) => string | null;
  /** Puts the focus on the cell before or after, or on the nearest heading that way. */
  jump: (id: string, by: -1 | 1, to: 'cell' | 'heading') => boolean;
  showKeys: () => void;
  /** Shows the comments on a cell. */
  comment: (id: string) => void;
}

export const cellAnchor = (id: string) => `cell-${id}`;

/** The element that takes the focus for a line while its source is closed. */
export const entryId = (id: string, line: number) => `entry-${id}-${line}`;

/** The line, from 0, that such an element stands for. */
export const lineOfEntry = (entry: HTMLElement): number =>
  Number(/-(\d+)$/.exec(entry.id)?.[1] ?? 0);

export function focusEntry(id: string, line = 0) {
  document.getElementById(entryId(id, line))?.focus();
}

/** Gives the focus back to a line: to its source where that is open, else to its entry. */
export function focusLine(id: string, line: number) {
  const open = document.querySelector<HTMLElement>(`#${cellAnchor(id)} .cm-content`);
  if (open) open.focus();
  else focusEntry(id, line);
}

/** Puts the focus on the entry before or after the one that has it, in the order of the sheet. */
export function focusNeighbour(from: Element, by: -1 | 1): boolean {
  const entries = [...document.querySelectorAll<HTMLElement>('[data-entry]')];
  const next = entries[entries.findIndex((entry) => entry === from) + by];
  next?.focus();
  return next !== undefined;
}
