import type { NotebookCell } from '@/lib/notebooks/content';

/**
 * What is folded on a sheet. A folded section hides what follows it up to the next section; a folded
 * cell of another kind shows one line of itself. Folds are a way of looking: they are never saved.
 */
export type Folds = ReadonlySet<string>;

/** A cell that can be seen, with those that its fold hides: they move, are copied and go together. */
export interface Block {
  /** Place of the seen cell among all cells. */
  from: number;
  cells: readonly NotebookCell[];
}

/** The sheet as it is seen: every cell is in one block, in order. */
export function blocksOf(cells: readonly NotebookCell[], folds: Folds): Block[] {
  const blocks: { from: number; cells: NotebookCell[] }[] = [];
  let hiding: NotebookCell[] | null = null;
  cells.forEach((cell, from) => {
    if (cell.kind === 'section') hiding = null;
    if (hiding) {
      hiding.push(cell);
      return;
    }
    const own = [cell];
    blocks.push({ from, cells: own });
    if (cell.kind === 'section' && folds.has(cell.id)) hiding = own;
  });
  return blocks;
}

/** How many cells stand in each section, by the id of its heading. */
export function sectionSizes(cells: readonly NotebookCell[]): ReadonlyMap<string, number> {
  const sizes = new Map<string, number>();
  let section: string | null = null;
  for (const { id, kind } of cells) {
    if (kind === 'section') sizes.set((section = id), 0);
    else if (section !== null) sizes.set(section, (sizes.get(section) ?? 0) + 1);
  }
  return sizes;
}

/** The heading of the section in which a cell stands; null before the first, and for a section itself. */
export function sectionOf(cells: readonly NotebookCell[], id: string): NotebookCell | null {
  let section: NotebookCell | null = null;
  for (const cell of cells) {
    if (cell.id === id) return cell.kind === 'section' ? null : section;
    if (cell.kind === 'section') section = cell;
  }
  return null;
}

/** The section whose fold hides a cell, if one does. */
export function hiddenBy(cells: readonly NotebookCell[], folds: Folds, id: string): string | null {
  const section = sectionOf(cells, id);
  return section !== null && folds.has(section.id) ? section.id : null;
}

/** Where a block goes when it changes places with its neighbour; null at the end of the sheet. */
export function placeBeyond(blocks: readonly Block[], at: number, by: -1 | 1): number | null {
  const beyond = blocks[at + by];
  if (!beyond) return null;
  return by < 0 ? beyond.from : beyond.from + beyond.cells.length;
}
