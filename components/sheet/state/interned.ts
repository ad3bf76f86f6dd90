import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { sameCell } from '@/lib/notebooks/merge';

/** The content with the very cells that are known already where they are equal: what is the same is not drawn again. */
export function interned(
  content: NotebookContent,
  ...known: readonly NotebookContent[]
): NotebookContent {
  const cells = new Map<string, NotebookCell[]>();
  for (const cell of known.flatMap((one) => one.cells)) {
    const same = cells.get(cell.id);
    if (same) same.push(cell);
    else cells.set(cell.id, [cell]);
  }
  return {
    ...content,
    cells: content.cells.map(
      (cell) => cells.get(cell.id)?.find((one) => sameCell(one, cell)) ?? cell,
    ),
  };
}

/** The cells that one content has otherwise than another, or only it has. */
export function changedCells(before: NotebookContent, after: NotebookContent): string[] {
  const known = new Map(before.cells.map((cell) => [cell.id, cell]));
  return after.cells.flatMap((cell) => (sameCell(known.get(cell.id), cell) ? [] : [cell.id]));
}
