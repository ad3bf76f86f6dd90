import type { NotebookContent } from '@/lib/notebooks/content';
import { mergeContents } from '@/lib/notebooks/merge';
import { applyChange, type Change } from './changes';

/** What came from the server while one was writing: it turned one content into another. */
interface Shift {
  readonly from: NotebookContent;
  readonly to: NotebookContent;
}

/** A step back or forward, and how many shifts it has been through; the later ones are applied when it is taken. */
interface Step {
  readonly content: NotebookContent;
  readonly shifts: number;
}

/** One history for the whole notebook: typing, inserting, moving, deleting and settings alike. */
export interface History {
  readonly past: readonly Step[];
  readonly present: NotebookContent;
  readonly future: readonly Step[];
  readonly shifts: readonly Shift[];
  /** The cell last typed into and when, so that one burst of typing is one step back. */
  readonly typing: { readonly id: string; readonly at: number } | null;
  /** Cells that the last step took away; 0 when it did something else. */
  readonly removed: number;
}

/** Steps kept; contents share their untouched cells, so a step costs one array. */
const DEPTH = 400;
/** Shifts kept; steps that lie further back are forgotten. */
const MOST_SHIFTS = 200;
/** A pause longer than this, in milliseconds, begins a new step. */
const PAUSE = 1200;

export type HistoryAction =
  | { kind: 'change'; change: Change; at: number }
  /** What others made of `from` comes into the present and into every step, and is no step of one's own. */
  | { kind: 'shift'; from: NotebookContent; to: NotebookContent }
  | { kind: 'undo' }
  | { kind: 'redo' };

export function beginHistory(present: NotebookContent): History {
  return { past: [], present, future: [], shifts: [], typing: null, removed: 0 };
}

export function historyReducer(history: History, action: HistoryAction): History {
  switch (action.kind) {
    case 'change':
      return change(history, action.change, action.at);
    case 'shift':
      return shift(history, { from: action.from, to: action.to });
    case 'undo': {
      const before = history.past.at(-1);
      if (!before) return history;
      return {
        ...history,
        past: history.past.slice(0, -1),
        present: caughtUp(history, before),
        future: [stepOf(history), ...history.future],
        typing: null,
        removed: 0,
      };
    }
    case 'redo': {
      const [after, ...rest] = history.future;
      if (!after) return history;
      return {
        ...history,
        past: [...history.past, stepOf(history)],
        present: caughtUp(history, after),
        future: rest,
        typing: null,
        removed: 0,
      };
    }
  }
}

const stepOf = ({ present, shifts }: History): Step => ({
  content: present,
  shifts: shifts.length,
});

const caughtUp = ({ shifts }: History, step: Step): NotebookContent =>
  shifts
    .slice(step.shifts)
    .reduce((content, { from, to }) => mergeContents(from, content, to).content, step.content);

function shift(history: History, { from, to }: Shift): History {
  const present = mergeContents(from, history.present, to).content;
  const shifts = [...history.shifts, { from, to }];
  const over = shifts.length - MOST_SHIFTS;
  if (over <= 0) return { ...history, present, shifts };
  const kept = (steps: readonly Step[]) =>
    steps.flatMap((step) => (step.shifts < over ? [] : [{ ...step, shifts: step.shifts - over }]));
  return {
    ...history,
    present,
    past: kept(history.past),
    future: kept(history.future),
    shifts: shifts.slice(over),
  };
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
  const past = goesOn ? history.past : [...history.past, stepOf(history)].slice(-DEPTH);
  const removed = made.kind === 'delete' ? history.present.cells.length - present.cells.length : 0;
  return { ...history, past, present, future: [], typing, removed };
}
