import type { NotebookCell } from '@/lib/notebooks/content';

/**
 * Which line defines a mark and which read it, told by their text: what the sheet points to while one
 * types, and what is sent along when one line is asked for by itself. Whether a line makes sense is
 * for the evaluation to say.
 */
export interface Place {
  id: string;
  /** From 0. */
  line: number;
}

export interface MarkUses {
  definitions: ReadonlyMap<string, readonly Place[]>;
  /** Lines that read a mark, its own definition not among them. */
  readers: ReadonlyMap<string, readonly Place[]>;
}

/** `mark =` or `mark(…) =` at the beginning of a line, but not a statement `==`. */
const DEFINITION = /^\s*(\p{L}[\p{L}\d_]*)\s*(?:\([^()]*\)\s*)?=(?!=)/u;
/** A name or a remark, the longest at each place: what stands within a longer name is another name. */
export const NAME_OR_REMARK = /#.*|\p{L}[\p{L}\d_]*/gu;

/** The mark that a line defines, or null. */
export function markDefinedIn(line: string): string | null {
  return DEFINITION.exec(line)?.[1] ?? null;
}

/** Every name that stands in a line after its definition, units and functions among them. */
export function namesReadIn(line: string): Set<string> {
  const defined = DEFINITION.exec(line);
  const rest = defined ? line.slice(defined[0].length) : line;
  return new Set(
    [...rest.matchAll(NAME_OR_REMARK)].flatMap(([name]) => (name.startsWith('#') ? [] : [name])),
  );
}

const HEAD = /^\s*\p{L}[\p{L}\d_]*\s*\(([^()]*)\)\s*=(?!=)/u;
const WHERE = /\bwhere\b([^#]*)/u;
const LOCAL = /(?:^|,)\s*(\p{L}[\p{L}\d_]*)\s*=(?!=)/gu;
const COUNTER = /\beach\s*\(\s*(\p{L}[\p{L}\d_]*)\s*,/gu;
const UNKNOWN = /\bsolve\s*\([^#]*?==[^#]*?,\s*(\p{L}[\p{L}\d_]*)\s*(?=[,)])/gu;
const POLYNOMIAL = /\broot\s*\(/u;

/** Names that mean something of the line's own: parameters, counters, unknowns and what stands after `where`. */
function localNamesIn(line: string): Set<string> {
  const names = new Set(
    HEAD.exec(line)?.[1]
      ?.split(',')
      .map((name) => name.trim()),
  );
  for (const pattern of [COUNTER, UNKNOWN])
    for (const [, name] of line.matchAll(pattern)) names.add(name ?? '');
  for (const [, name] of (WHERE.exec(line)?.[1] ?? '').matchAll(LOCAL)) names.add(name ?? '');
  if (POLYNOMIAL.test(line)) names.add('x');
  return names;
}

/** The names that a line reads from the sheet, as far as its text tells. */
export function marksReadIn(line: string): Set<string> {
  const local = localNamesIn(line);
  return new Set([...namesReadIn(line)].filter((name) => !local.has(name)));
}

interface CellUses {
  line: number;
  defines: string | null;
  /** Every name, so that what is sent along is never too little. */
  reads: ReadonlySet<string>;
  readsMarks: ReadonlySet<string>;
}

/** Untouched cells stay the same object from one change to the next, so each is read once. */
const known = new WeakMap<NotebookCell, CellUses[]>();

function usesInCell(cell: NotebookCell): CellUses[] {
  const found = known.get(cell);
  if (found) return found;
  const uses =
    cell.kind === 'dimension'
      ? cell.source.split(/\r?\n/).map((text, line) => ({
          line,
          defines: markDefinedIn(text),
          reads: namesReadIn(text),
          readsMarks: marksReadIn(text),
        }))
      : [];
  known.set(cell, uses);
  return uses;
}

export function findUses(cells: readonly NotebookCell[]): MarkUses {
  const definitions = new Map<string, Place[]>();
  const readers = new Map<string, Place[]>();
  const add = (to: Map<string, Place[]>, mark: string, place: Place) => {
    const places = to.get(mark);
    if (places) places.push(place);
    else to.set(mark, [place]);
  };
  for (const cell of cells) {
    for (const { line, defines } of usesInCell(cell)) {
      if (defines !== null) add(definitions, defines, { id: cell.id, line });
    }
  }
  for (const cell of cells) {
    for (const { line, defines, readsMarks } of usesInCell(cell)) {
      for (const name of readsMarks) {
        if (name !== defines && definitions.has(name)) add(readers, name, { id: cell.id, line });
      }
    }
  }
  return { definitions, readers };
}

/** The lines that a line needs, directly or through others, in order of the sheet; not itself. */
export function linesNeededBy(cells: readonly NotebookCell[], at: Place): string[] {
  const { definitions } = findUses(cells);
  const byId = new Map(cells.map((cell) => [cell.id, usesInCell(cell)]));
  const needed = new Set<string>();
  const waiting = [at];
  for (let place = waiting.pop(); place; place = waiting.pop()) {
    const { id, line } = place;
    for (const name of byId.get(id)?.[line]?.reads ?? []) {
      for (const definition of definitions.get(name) ?? []) {
        const key = `${definition.id}:${definition.line}`;
        if (needed.has(key) || (definition.id === at.id && definition.line === at.line)) continue;
        needed.add(key);
        waiting.push(definition);
      }
    }
  }
  return cells.flatMap(({ id, source }) =>
    source.split(/\r?\n/).filter((_, line) => needed.has(`${id}:${line}`)),
  );
}
