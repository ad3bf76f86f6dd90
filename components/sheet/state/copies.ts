import type { NotebookCell } from '@/lib/notebooks/content';
import { newCellId } from './changes';

/** A mark that a line defines; told by its text, as the copy is made before any evaluation. */
const DEFINITION = /^\s*(\p{L}[\p{L}\d_]*)\s*=(?!=)/gmu;
/** A name or a remark, the longest at each place: what stands within a longer name is never touched. */
const NAME_OR_REMARK = /#.*|\p{L}[\p{L}\d_]*/gu;

const marksOf = (cells: readonly NotebookCell[]) =>
  cells.flatMap(({ kind, source }) =>
    kind === 'dimension' ? [...source.matchAll(DEFINITION)].map(([, mark = '']) => mark) : [],
  );

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
  for (const mark of new Set(marksOf(cells))) {
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
