import type { NotebookCell } from '@/lib/notebooks/content';
import { newCellId } from './changes';
import { findUses, NAME_OR_REMARK } from './uses';

const marksOf = (cells: readonly NotebookCell[]) => [...findUses(cells).definitions.keys()];

/**
 * Copies of cells, with ids of their own. A mark has one definition on a sheet, so each mark that the
 * copies define gets a fresh name there, and the copies read one another under the fresh names; what
 * they read from elsewhere they go on reading.
 */
export function copiesOf(
  cells: readonly NotebookCell[],
  sheet: readonly NotebookCell[],
): NotebookCell[] {
  const taken = new Set(marksOf(sheet));
  const fresh = new Map<string, string>();
  for (const mark of marksOf(cells)) {
    let count = 2;
    while (taken.has(`${mark}_${count}`)) count += 1;
    taken.add(`${mark}_${count}`);
    fresh.set(mark, `${mark}_${count}`);
  }
  return cells.map((cell) => ({
    ...cell,
    id: newCellId(),
    source:
      cell.kind === 'dimension'
        ? cell.source.replace(NAME_OR_REMARK, (found) => fresh.get(found) ?? found)
        : cell.source,
  }));
}
