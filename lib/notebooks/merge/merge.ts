import type { CellSettings, NotebookCell, NotebookContent, NotebookSettings } from '../content';
import { settingsField } from '../content-values';
import { mergeText } from './lines';
import { findBefore, mergeOrder } from './order';
import { sameCell } from './same';

export const SETTINGS = ['digits', 'unit', 'step', 'rounding'] as const;
type Setting = (typeof SETTINGS)[number];
export type SettingValue = NotebookSettings[Setting];

/** What two sides made of one thing and cannot both have. */
export type Conflict =
  /**
   * Lines that both changed, or a cell that one took away and the other changed (null). Each reading has all lines on
   * which the sides agree, and its own where they do not.
   */
  | {
      readonly kind: 'cell';
      readonly id: string;
      readonly mine: NotebookCell | null;
      readonly theirs: NotebookCell | null;
    }
  | {
      readonly kind: 'setting';
      readonly name: Setting;
      readonly mine: SettingValue;
      readonly theirs: SettingValue;
    }
  /** Moved by both: the cell it stands after on either side, null at the top. */
  | {
      readonly kind: 'place';
      readonly id: string;
      readonly mine: string | null;
      readonly theirs: string | null;
    };

export interface Merge {
  /** Everything on which the sides agree; mine where they do not, and no cell that either still writes in is missing. */
  readonly content: NotebookContent;
  readonly conflicts: readonly Conflict[];
}

/** Names a conflict: at most one of a kind for each cell or setting. */
export const keyOfConflict = (conflict: Conflict): string =>
  `${conflict.kind}:${conflict.kind === 'setting' ? conflict.name : conflict.id}`;

/**
 * Brings together what two sides made of one content. Pure and deterministic. Each cell by line, settings field by
 * field, the order by moves. Keeps: `merge(b, x, b)`, `merge(b, b, x)` and `merge(b, x, x)` are x without conflicts; no
 * id stands twice; a cell goes only when one side took it away and the other left it as it was. Cost: that of
 * comparing each cell that both changed.
 */
export function mergeContents(
  base: NotebookContent,
  mine: NotebookContent,
  theirs: NotebookContent,
): Merge {
  const conflicts: Conflict[] = [];
  const [inBase, inMine, inTheirs] = [cellsOf(base), cellsOf(mine), cellsOf(theirs)];

  const merged = new Map<string, NotebookCell>();
  for (const id of new Set([...inMine.keys(), ...inTheirs.keys()])) {
    const was = inBase.get(id) ?? null;
    const my = inMine.get(id) ?? null;
    const their = inTheirs.get(id) ?? null;
    const cell = mergeCell(was, my, their);
    if (!sameCell(cell.mine, cell.theirs)) conflicts.push({ kind: 'cell', id, ...cell });
    const stands = cell.mine ?? cell.theirs;
    if (stands !== null) merged.set(id, stands);
  }

  const ids = (content: NotebookContent) => content.cells.map(({ id }) => id);
  const order = mergeOrder(ids(base), ids(mine), ids(theirs), new Set(merged.keys()));
  for (const id of order.contested) {
    const [before, after] = [
      findBefore(ids(mine), id, merged),
      findBefore(ids(theirs), id, merged),
    ];
    if (merged.has(id)) conflicts.push({ kind: 'place', id, mine: before, theirs: after });
  }

  const settings = { ...mine.settings };
  for (const name of SETTINGS) {
    const value = mergeValue(base.settings[name], mine.settings[name], theirs.settings[name]);
    if (value.clean) Object.assign(settings, { [name]: value.value });
    else {
      conflicts.push({
        kind: 'setting',
        name,
        mine: mine.settings[name],
        theirs: theirs.settings[name],
      });
    }
  }
  const cells = order.ids.flatMap((id) => merged.get(id) ?? []);
  return { content: { format: 1, settings, cells }, conflicts };
}

const cellsOf = ({ cells }: NotebookContent): ReadonlyMap<string, NotebookCell> =>
  new Map(cells.map((cell) => [cell.id, cell]));

interface Readings<T> {
  mine: T;
  theirs: T;
}

const agreed = <T>(value: T): Readings<T> => ({ mine: value, theirs: value });

/** The cell as either side would have it; the same twice where they agree, null where it is to go. */
function mergeCell(
  base: NotebookCell | null,
  mine: NotebookCell | null,
  theirs: NotebookCell | null,
): Readings<NotebookCell | null> {
  if (sameCell(mine, theirs) || sameCell(base, theirs)) return agreed(mine);
  if (sameCell(base, mine)) return agreed(theirs);
  if (base === null || mine === null || theirs === null) {
    // New on one side: there is nothing to contradict.
    if (base === null && (mine === null || theirs === null)) return agreed(mine ?? theirs);
    return { mine, theirs };
  }
  // Lines of different kinds cannot be mixed, and a heading is one line.
  const isOneKind = mine.kind === theirs.kind && mine.kind === base.kind;
  if (!isOneKind || mine.kind === 'section') return { mine, theirs };
  const text = mergeText(base.source, mine.source, theirs.source);
  const settings = mergeOwnSettings(base.settings, mine.settings, theirs.settings);
  const reading = (source: string, own: CellSettings): NotebookCell => ({
    id: mine.id,
    kind: mine.kind,
    source,
    ...settingsField(own),
  });
  const merged = reading(text.mine, settings.mine);
  if (
    sameCell(merged, mine) &&
    text.clean &&
    sameCell(merged, reading(text.theirs, settings.theirs))
  )
    return agreed(mine);
  return { mine: merged, theirs: reading(text.theirs, settings.theirs) };
}

function mergeOwnSettings(
  base: CellSettings = {},
  mine: CellSettings = {},
  theirs: CellSettings = {},
): Readings<CellSettings> {
  const [forMine, forTheirs]: CellSettings[] = [{}, {}];
  for (const name of SETTINGS) {
    const value = mergeValue<SettingValue | undefined>(base[name], mine[name], theirs[name]);
    Object.assign(forMine ?? {}, { [name]: value.clean ? value.value : mine[name] });
    Object.assign(forTheirs ?? {}, { [name]: value.clean ? value.value : theirs[name] });
  }
  return { mine: forMine ?? {}, theirs: forTheirs ?? {} };
}

function mergeValue<T>(base: T, mine: T, theirs: T): { clean: true; value: T } | { clean: false } {
  if (mine === theirs || theirs === base) return { clean: true, value: mine };
  return mine === base ? { clean: true, value: theirs } : { clean: false };
}
