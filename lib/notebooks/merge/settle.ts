import type { NotebookCell, NotebookContent } from '../content';
import { findBefore } from './order';
import type { Conflict } from './merge';

export type Side = 'mine' | 'theirs';

/**
 * The content after one conflict of it has been answered. `mine` leaves what stands there, which may have been written on
 * since, or takes away what I took away; `theirs` puts their reading in its place.
 */
export function settle(content: NotebookContent, conflict: Conflict, side: Side): NotebookContent {
  switch (conflict.kind) {
    case 'cell':
      if (side === 'mine') {
        return conflict.mine === null ? withoutCell(content, conflict.id) : content;
      }
      return conflict.theirs === null
        ? withoutCell(content, conflict.id)
        : withCell(content, conflict.theirs, null);
    case 'setting':
      return side === 'mine'
        ? content
        : { ...content, settings: { ...content.settings, [conflict.name]: conflict.theirs } };
    case 'place':
      return side === 'mine' ? content : placed(content, conflict.id, conflict.theirs);
  }
}

/**
 * What of a content may be stored while questions are open: whatever they are about stays as the stored content has
 * it, so that nobody's text is overwritten by an answer that was not given.
 */
export function withhold(
  content: NotebookContent,
  open: readonly Conflict[],
  stored: NotebookContent,
): NotebookContent {
  return open.reduce((held, conflict) => {
    if (conflict.kind === 'setting') {
      const { name } = conflict;
      return { ...held, settings: { ...held.settings, [name]: stored.settings[name] } };
    }
    const { id } = conflict;
    const cell = stored.cells.find((one) => one.id === id);
    const order = stored.cells.map((one) => one.id);
    if (conflict.kind === 'cell') {
      if (cell === undefined) return withoutCell(held, id);
      return withCell(held, cell, findBefore(order, id, idsOf(held)));
    }
    return cell === undefined ? held : placed(held, id, findBefore(order, id, idsOf(held)));
  }, content);
}

const idsOf = (content: NotebookContent) => new Set(content.cells.map(({ id }) => id));

function withoutCell(content: NotebookContent, id: string): NotebookContent {
  return { ...content, cells: content.cells.filter((cell) => cell.id !== id) };
}

/** The cell in its place, or, where there is none of its id, after another. */
function withCell(
  content: NotebookContent,
  cell: NotebookCell,
  after: string | null,
): NotebookContent {
  const at = content.cells.findIndex(({ id }) => id === cell.id);
  if (at >= 0) return { ...content, cells: content.cells.with(at, cell) };
  const before = content.cells.findIndex(({ id }) => id === after);
  return { ...content, cells: content.cells.toSpliced(before + 1, 0, cell) };
}

function placed(content: NotebookContent, id: string, after: string | null): NotebookContent {
  const cell = content.cells.find((one) => one.id === id);
  if (cell === undefined) return content;
  const others = content.cells.filter((one) => one.id !== id);
  const before = others.findIndex((one) => one.id === after);
  if (after !== null && before < 0) return content;
  return { ...content, cells: others.toSpliced(before + 1, 0, cell) };
}
