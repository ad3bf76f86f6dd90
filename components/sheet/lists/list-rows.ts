import { isFigure, partsOf, sayFigureBriefly } from '../figure-wording';
import type { Item, ListResult, SingleItem } from '../result';
import { DIRECTIONS, sayDecimal, sayUnit } from '../say-number';

/** What stands in one place of the table of a list. */
export type ListCell =
  | { kind: 'exact'; item: SingleItem }
  | { kind: 'reach'; item: SingleItem }
  /** A figure, in words how it was rounded, and characters before it that bring the points of a column under another. */
  | { kind: 'figure'; text: string; rounded: string | null; indent: number };

export type ListRow =
  | { kind: 'single'; number: string; cells: ListCell[] }
  /** The head of the rows of a list within the list. */
  | { kind: 'list'; number: string; count: number };

export interface ListTableRows {
  heads: string[];
  /** Whether the exact values are so long that paper has no room for them. */
  isWideForPaper: boolean;
  rows: ListRow[];
}

type Numbered =
  | { kind: 'single'; number: string; item: SingleItem }
  | { kind: 'list'; number: string; count: number };

/** All items in order with their running numbers: `3`, and `3.1` for the first one of a list that is the third item. */
function numbered(items: readonly Item[], before = ''): Numbered[] {
  return items.flatMap((item, index): Numbered[] => {
    const number = `${before}${index + 1}`;
    return item.kind === 'list'
      ? [{ kind: 'list', number, count: item.items.length }, ...numbered(item.items, `${number}.`)]
      : [{ kind: 'single', number, item }];
  });
}

/** The values of a list and of the lists within it, in order. */
export function singlesOf({ items }: Pick<ListResult, 'items'>): SingleItem[] {
  return items.flatMap((item) => (item.kind === 'list' ? singlesOf(item) : [item]));
}

/** From here on an exact value is so wide that the sizes stand before it, to be seen without scrolling. */
export const WIDE = 60;
/** So long a value would leave no room for the sizes on an A4 sheet. */
const WIDE_FOR_PAPER = 120;

interface Column {
  head: string;
  cell: (item: SingleItem) => ListCell;
}

const NOTHING = '–';
const figure = (text: string, rounded: string | null = null): ListCell => ({
  kind: 'figure',
  text,
  rounded,
  indent: 0,
});

/** The table of a list: which columns its items need, and what each item has in them. */
export function listRows(list: Pick<ListResult, 'items'>): ListTableRows {
  const singles = singlesOf(list);
  const columns = columnsFor(singles);
  return {
    heads: columns.map(({ head }) => head),
    isWideForPaper: singles.some((item) => item.exact.text.length > WIDE_FOR_PAPER),
    rows: alignPoints(
      numbered(list.items).map((row) =>
        row.kind === 'list' ? row : { ...row, cells: columns.map(({ cell }) => cell(row.item)) },
      ),
    ),
  };
}

function columnsFor(singles: readonly SingleItem[]): Column[] {
  const exact: Column = { head: 'Exact', cell: (item) => ({ kind: 'exact', item }) };
  const isWide = singles.some((item) => item.exact.text.length > WIDE);
  const sizes = haveSameParts(singles) ? partColumns(singles) : sizeColumns(singles);
  if (commonReach(singles) === null)
    sizes.push({ head: 'Reach', cell: (item) => ({ kind: 'reach', item }) });
  return isWide ? [...sizes, exact] : [exact, ...sizes];
}

/** Whether all are figures of one kind, so that each number that fixes them has a column of its own. */
const haveSameParts = (singles: readonly SingleItem[]) =>
  singles.every((item) => isFigure(item) && item.kind === singles[0]?.kind);

type Part = ReturnType<typeof partsOf>[number][1];

const partAt = (item: SingleItem, index: number): Part | null =>
  isFigure(item) ? (partsOf(item)[index]?.[1] ?? null) : null;

function partColumns(singles: readonly SingleItem[]): Column[] {
  const [first] = singles;
  const labels =
    first !== undefined && isFigure(first) ? partsOf(first).map(([label]) => label) : [];
  return labels.flatMap((label, index) =>
    numberColumns(singles, (item) => partAt(item, index), label, `${label}, cut`),
  );
}

/** A decimal for each item, and its cut size where there are any; a unit that all have stands in the head alone. */
function numberColumns(
  singles: readonly SingleItem[],
  find: (item: SingleItem) => Part | null,
  decimalHead: string,
  cutHead: string,
): Column[] {
  const units = new Set(singles.map((item) => find(item)?.unit ?? null));
  const [common = null] = units.size === 1 ? units : [];
  const inHead = common === null ? '' : `, ${sayUnit(common)}`;
  const withUnit = (text: string, { unit }: Part) =>
    unit === null || common !== null ? text : `${text} ${sayUnit(unit)}`;
  const decimal: Column = {
    head: `${decimalHead}${inHead}`,
    cell: (item) => {
      const part = find(item);
      return figure(part === null ? sayOther(item) : withUnit(sayDecimal(part, false), part));
    },
  };
  if (!singles.some((item) => find(item)?.cut)) return [decimal];
  const cut: Column = {
    head: `${cutHead}${inHead}`,
    cell: (item) => {
      const part = find(item);
      if (!part?.cut) return figure(NOTHING);
      return figure(withUnit(part.cut.value, part), DIRECTIONS[part.cut.direction]);
    },
  };
  return [decimal, cut];
}

/** The decimal of what has no unit of its own: an angle in degrees, a figure in brief. */
function sayOther(item: SingleItem): string {
  if (item.kind === 'angle') return `${sayDecimal(item, false)}°`;
  return item.kind === 'number' ? sayDecimal(item, false) : sayFigureBriefly(item);
}

function sizeColumns(singles: readonly SingleItem[]): Column[] {
  const columns = numberColumns(
    singles,
    (item) => (item.kind === 'number' ? item : null),
    'Decimal',
    'Cut size',
  );
  const inches = singles.find((item) => item.kind === 'number' && item.inches);
  if (inches?.kind === 'number')
    columns.push({
      head: inches.unit === 'ft' ? 'Feet and inches' : 'Inches',
      cell: (item) =>
        item.kind === 'number' && item.inches
          ? figure(item.inches.text, DIRECTIONS[item.inches.direction])
          : figure(NOTHING),
    });
  if (singles.some(({ kind }) => kind === 'angle'))
    columns.push({
      head: 'Degrees, minutes, seconds',
      cell: (item) =>
        item.kind === 'angle'
          ? figure(item.dms.text, DIRECTIONS[item.dms.direction])
          : figure(NOTHING),
    });
  return columns;
}

const wholeLength = (text: string) => /^-?\d+/.exec(text)?.[0].length ?? 0;

/** Brings the decimal points of each column under one another. */
function alignPoints(rows: readonly ListRow[]): ListRow[] {
  const widest: number[] = [];
  for (const row of rows)
    if (row.kind === 'single')
      row.cells.forEach((cell, at) => {
        const length = cell.kind === 'figure' ? wholeLength(cell.text) : 0;
        widest[at] = Math.max(widest[at] ?? 0, length);
      });
  const indented = (cell: ListCell, at: number): ListCell => {
    const length = cell.kind === 'figure' ? wholeLength(cell.text) : 0;
    return cell.kind === 'figure' && length > 0
      ? { ...cell, indent: (widest[at] ?? 0) - length }
      : cell;
  };
  return rows.map((row) =>
    row.kind === 'single' ? { ...row, cells: row.cells.map(indented) } : row,
  );
}

/** The verdict that all items have alike; null where they differ. */
export function commonReach(
  singles: readonly SingleItem[],
): Omit<SingleItem['reach'], 'reason'> | null {
  const [first] = singles;
  if (first === undefined) return null;
  const { straightedgeAndCompass, withTrisector } = first.reach;
  return singles.every(
    ({ reach }) =>
      reach.straightedgeAndCompass === straightedgeAndCompass &&
      reach.withTrisector === withTrisector,
  )
    ? { straightedgeAndCompass, withTrisector }
    : null;
}
