import type { NotebookCell } from '@/lib/notebooks/content';
import type { Change } from './state/changes';

/** What a cell may ask of its sheet; one stable object, so that cells are drawn only when they change. */
export interface SheetActions {
  dispatch: (change: Change) => void;
  /** Takes a cell in hand (its source opens), or puts down whatever was. */
  take: (id: string | null) => void;
  /** Puts the focus on a cell's neighbour; false when there is none. */
  step: (id: string, by: -1 | 1) => boolean;
  insert: (kind: NotebookCell['kind'], beside: string, where: 'before' | 'after') => void;
  move: (id: string, by: -1 | 1) => void;
  remove: (id: string) => void;
}

/** The element of a cell that takes the focus while its source is closed. */
export const cellFocusId = (id: string) => `entry-${id}`;
export const cellAnchor = (id: string) => `cell-${id}`;

export function focusCell(id: string) {
  document.getElementById(cellFocusId(id))?.focus();
}
