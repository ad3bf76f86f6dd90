import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { sameCell, sameContent } from './changes';

export type Side = 'mine' | 'theirs';

/** A cell on which the two texts differ; null where a side does not have it. */
export interface Difference {
  id: string;
  mine: NotebookCell | null;
  theirs: NotebookCell | null;
  /** Which sides changed it since the version that both began from. */
  changed: 'mine' | 'theirs' | 'both';
  /** What is proposed: the side that changed it, mine where both did. */
  proposed: Side;
}

interface Texts {
  base: NotebookContent;
  mine: NotebookContent;
  theirs: NotebookContent;
}

const byId = (content: NotebookContent) => new Map(content.cells.map((cell) => [cell.id, cell]));

/** Every cell on which mine and theirs differ, in the order of mine, then what only theirs has. */
export function findDifferences({ base, mine, theirs }: Texts): Difference[] {
  const [inBase, inMine, inTheirs] = [byId(base), byId(mine), byId(theirs)];
  const ids = new Set([...inMine.keys(), ...inTheirs.keys()]);
  const found: Difference[] = [];
  for (const id of ids) {
    const [was, my, their] = [inBase.get(id), inMine.get(id), inTheirs.get(id)];
    if (sameCell(my, their)) continue;
    const myChange = !sameCell(was, my);
    const theirChange = !sameCell(was, their);
    found.push({
      id,
      mine: my ?? null,
      theirs: their ?? null,
      changed: myChange && theirChange ? 'both' : myChange ? 'mine' : 'theirs',
      proposed: myChange ? 'mine' : 'theirs',
    });
  }
  return found;
}

/**
 * The two texts brought together by one choice per difference. Cells stand in the order of mine;
 * a cell that only theirs has comes after the cell it follows in theirs.
 */
export function bringTogether(texts: Texts, choices: ReadonlyMap<string, Side>): NotebookContent {
  const { base, mine, theirs } = texts;
  const inTheirs = byId(theirs);
  const inMine = byId(mine);
  const chosen = (id: string): NotebookCell | undefined =>
    (choices.get(id) ?? 'mine') === 'mine' ? inMine.get(id) : inTheirs.get(id);

  const order = mine.cells.map((cell) => cell.id);
  theirs.cells.forEach((cell, index) => {
    if (inMine.has(cell.id)) return;
    const before = theirs.cells[index - 1];
    order.splice(before ? order.indexOf(before.id) + 1 : 0, 0, cell.id);
  });
  const mySettings = sameContent(
    { ...base, cells: [] },
    { ...base, settings: mine.settings, cells: [] },
  )
    ? theirs.settings
    : mine.settings;
  return {
    format: 1,
    settings: mySettings,
    cells: order.map(chosen).filter((cell) => cell !== undefined),
  };
}
