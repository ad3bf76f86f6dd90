import type { NotebookContent } from '@/lib/notebooks/content';
import { keyOfConflict, mergeContents, sameCell, type Conflict } from '@/lib/notebooks/merge';
import type { Kept } from './use-notebook';

/** What two people made of the same and only a person can decide; asked until it is answered. */
export interface Questions {
  /** Who saved the version that it is about, and which that is. */
  author: string;
  number: number;
  savedAt: string;
  conflicts: readonly Conflict[];
}

/** The questions after a newer version came in: those still open, as that version has them, and the new ones. */
export function askOn(
  before: Questions | null,
  from: NotebookContent,
  head: Kept,
  fresh: readonly Conflict[],
): Questions | null {
  const asked = new Set(fresh.map(keyOfConflict));
  const still = (before?.conflicts ?? [])
    .filter((conflict) => !asked.has(keyOfConflict(conflict)))
    .map((conflict) => movedOn(conflict, from, head.content));
  const conflicts = [...still, ...fresh];
  if (conflicts.length === 0) return null;
  if (fresh.length === 0 && before !== null) return { ...before, conflicts };
  const { savedBy: author, number, savedAt } = head;
  return { author, number, savedAt, conflicts };
}

/** Their reading with what was changed in it since. */
function movedOn(conflict: Conflict, from: NotebookContent, to: NotebookContent): Conflict {
  if (conflict.kind === 'setting') return { ...conflict, theirs: to.settings[conflict.name] };
  if (conflict.kind === 'place') return conflict;
  const only = (content: NotebookContent) => ({
    ...content,
    cells: content.cells.filter(({ id }) => id === conflict.id),
  });
  const theirs = { ...from, cells: conflict.theirs === null ? [] : [conflict.theirs] };
  const moved = mergeContents(only(from), theirs, only(to)).content;
  return { ...conflict, theirs: moved.cells[0] ?? null };
}

/** The conflicts on which the sheet and the version still differ: one may have written the same meanwhile. */
export function openConflicts(
  questions: Questions | null,
  present: NotebookContent,
  stored: NotebookContent,
): readonly Conflict[] {
  if (questions === null) return NONE;
  const cellOf = (content: NotebookContent, id: string) =>
    content.cells.find((cell) => cell.id === id) ?? null;
  const open = questions.conflicts.filter((conflict) => {
    if (conflict.kind === 'setting')
      return present.settings[conflict.name] !== stored.settings[conflict.name];
    const here = cellOf(present, conflict.id);
    if (conflict.kind === 'place') return here !== null && cellOf(stored, conflict.id) !== null;
    // What I took away stays on the sheet until I say so again.
    return conflict.mine === null ? here !== null : !sameCell(here, cellOf(stored, conflict.id));
  });
  return open.length === questions.conflicts.length ? questions.conflicts : open;
}

const NONE: readonly Conflict[] = [];
