import type { NotebookCell } from '@/lib/notebooks/content';
import { findPlaces } from '@/lib/language/rename';

/** One place where what is looked for stands: offsets into the source of its cell. */
export interface Hit {
  id: string;
  kind: NotebookCell['kind'];
  /** From 0. */
  line: number;
  from: number;
  to: number;
  /** Offset of `from` within its line. */
  column: number;
}

export interface Query {
  text: string;
  /** Only places where a mark of just this name is defined or read. */
  marksOnly: boolean;
}

/** More than anyone steps through; it keeps a single letter from filling the memory. */
const MOST = 5_000;

const escape = (text: string) => text.replace(/[.*+?^${}()|[\]\\/]/g, String.raw`\$&`);

/** What is looked for as a pattern: capital or small letters alike. Null for nothing. */
export function patternOf(text: string): RegExp | null {
  return text === '' ? null : new RegExp(escape(text), 'giu');
}

/** Every place of a query in the cells, in the order of the sheet, `MOST` at most. Cost: linear in the text. */
export function findHits(cells: readonly NotebookCell[], { text, marksOnly }: Query): Hit[] {
  const pattern = patternOf(text);
  if (pattern === null) return [];
  const hits: Hit[] = [];
  for (const cell of cells) {
    const { id, kind, source } = cell;
    if (marksOnly && kind !== 'dimension') continue;
    const places = marksOnly ? findPlaces([cell], text) : textPlaces(source, pattern);
    for (const { from, to } of places) {
      const lineStart = Math.max(
        source.lastIndexOf('\n', from - 1),
        source.lastIndexOf('\r', from - 1),
      );
      const line = source.slice(0, from).split(/\r\n|\n|\r/).length - 1;
      hits.push({ id, kind, line, from, to, column: from - (from === 0 ? 0 : lineStart + 1) });
      if (hits.length === MOST) return hits;
    }
  }
  return hits;
}

function textPlaces(source: string, pattern: RegExp): { from: number; to: number }[] {
  return [...source.matchAll(pattern)].map(({ 0: { length }, index }) => ({
    from: index,
    to: index + length,
  }));
}

/** The sources with some hits of one search replaced; cells without any stay the same objects. */
export function replaceHits(
  cells: readonly NotebookCell[],
  hits: readonly Hit[],
  text: string,
): NotebookCell[] {
  return cells.map((cell) => {
    const own = hits.filter(({ id }) => id === cell.id);
    if (own.length === 0) return cell;
    let source = '';
    let done = 0;
    for (const { from, to } of own) {
      source += cell.source.slice(done, from) + text;
      done = to;
    }
    return { ...cell, source: source + cell.source.slice(done) };
  });
}

/** The hit to show first: the first one in or after a cell, counted from the start where none follows. */
export function firstFrom(
  hits: readonly Hit[],
  cells: readonly NotebookCell[],
  cell: string | null,
): number {
  if (cell === null) return 0;
  const order = new Map(cells.map(({ id }, index) => [id, index]));
  const start = order.get(cell) ?? 0;
  const at = hits.findIndex(({ id }) => (order.get(id) ?? 0) >= start);
  return Math.max(0, at);
}
