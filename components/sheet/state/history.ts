import type { NotebookContent } from '@/lib/notebooks/content';
import { applyChange, type Change } from './changes';

/** One history for the whole notebook: typing, inserting, moving, deleting and settings alike. */
export interface History {
  readonly past: readonly NotebookContent[];
  readonly present: NotebookContent;
  readonly future: readonly NotebookContent[];
  /** The cell last typed into and when, so that one burst of typing is one step back. */
  readonly typing: { readonly id: string; readonly at: number } | null;
  /** Cells that the last step took away; 0 when it did something else. */
  readonly removed: number;
}

/** Steps kept; contents share their untouched cells, so a step costs one array. */
const DEPTH = 400;
/** A pause longer than this, in milliseconds, begins a new step. */
const PAUSE = 1200;

export type HistoryAction =
  { kind: 'change'; change: Change; at: number } | { kind: 'undo' } | { kind: 'redo' };

export function beginHistory(present: NotebookContent): History {
  return { past: [], present, future: [], typing: null, removed: 0 };
}

export function historyReducer(history: History, action: HistoryAction): History {
  switch (action.kind) {
    case 'change':
      return change(history, action.change, action.at);
    case 'undo': {
      const before = history.past.at(-1);
      if (!before) return history;
      return {
        past: history.past.slice(0, -1),
        present: before,
        future: [history.present, ...history.future],
        typing: null,
        removed: 0,
      };
    }
    case 'redo': {
      const [after, ...rest] = history.future;
      if (!after) return history;
      return {
        past: [...history.past, history.present],
        present: after,
        future: rest,
        typing: null,
        removed: 0,
      };
    }
  }
}

/** A line broken or joined begins a new step, however fast it was typed. */
function linesOf({ cells }: NotebookContent, id: string): number {
  return cells.find((cell) => cell.id === id)?.source.split('\n').length ?? 0;
}

function change(history: History, made: Change, at: number): History {
  const present = applyChange(history.present, made);
  if (present === history.present) return history;
  const typing = made.kind === 'write' ? { id: made.id, at } : null;
  const goesOn =
    typing !== null &&
    history.typing?.id === typing.id &&
    at - history.typing.at < PAUSE &&
    linesOf(history.present, typing.id) === linesOf(present, typing.id);
  const past = goesOn ? history.past : [...history.past, history.present].slice(-DEPTH);
  const removed = made.kind === 'delete' ? history.present.cells.length - present.cells.length : 0;
  return { past, present, future: [], typing, removed };
}
