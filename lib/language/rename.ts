import type { SyntaxNode } from '@lezer/common';
import { type CellSource, markOfLine } from './lines';
import { classOfWord } from './names';
import { parser } from './parser/cell.parser';
import { readLine } from './read';
import { marksReadBy } from './syntax';
import { describeWord, suggestMark } from './words';

/** One place where a mark stands as a name: offsets into the source of its cell. */
export interface MarkPlace {
  readonly cell: string;
  /** From 0. */
  readonly line: number;
  readonly from: number;
  readonly to: number;
  readonly defines: boolean;
}

export type Renaming<C extends CellSource> =
  | {
      readonly kind: 'renamed';
      /** All cells in their order; one without the mark is the very same object. */
      readonly cells: readonly C[];
      readonly places: number;
      readonly changed: number;
    }
  | {
      readonly kind: 'refused';
      readonly reason: 'same' | 'not-a-name' | 'kept-word' | 'taken' | 'captured' | 'unknown';
      /** One sentence, source between backticks. */
      readonly message: string;
      readonly suggestion: string | null;
    };

const LINE_BREAK = /\r\n|\n|\r/g;

/**
 * Every place where a mark is defined or read, in the order of the page, told by the syntax tree: remarks and names that
 * mean something else where they stand (the `x` of a polynomial) are none. In a line that does not parse, what its
 * parser could make out counts, so that nothing is left behind under the old name. Cost: reads the lines that hold the text.
 */
export function findPlaces(cells: readonly CellSource[], mark: string): MarkPlace[] {
  return cells.flatMap(({ id, source }) =>
    linesWithOffsets(source).flatMap(({ text, offset }, line) =>
      placesInLine(text, mark).map(({ from, to, defines }) => ({
        cell: id,
        line,
        from: offset + from,
        to: offset + to,
        defines,
      })),
    ),
  );
}

/**
 * Gives a mark another name wherever it stands. Refused, with a sentence and a free name where there is one, when the new
 * name is no name, is kept by the language, stands on the sheet already (defined or only read), or would mean something
 * else at one of the places. What is renamed can be renamed back to the same text. Cost: as `findPlaces`, twice.
 */
export function renameMark<C extends CellSource>(
  cells: readonly C[],
  mark: string,
  name: string,
): Renaming<C> {
  const refusal = refuseName(cells, mark, name);
  if (refusal !== null) return refusal;
  const places = findPlaces(cells, mark);
  if (places.length === 0) {
    return refused('unknown', `Nothing on the sheet is called \`${mark}\`.`, null);
  }
  const byCell = new Map<string, MarkPlace[]>();
  for (const place of places) byCell.set(place.cell, [...(byCell.get(place.cell) ?? []), place]);
  const renamed = cells.map((cell) => {
    const own = byCell.get(cell.id);
    return own === undefined ? cell : { ...cell, source: replaceAt(cell.source, own, name) };
  });
  // Read again: a place where the new name means something else would not be among them.
  if (findPlaces(renamed, name).length !== places.length) {
    const free = suggestFree(cells, name);
    const message = `\`${name}\` means something else in a line that reads \`${mark}\`.`;
    return refused('captured', message, free);
  }
  return { kind: 'renamed', cells: renamed, places: places.length, changed: byCell.size };
}

function refuseName(cells: readonly CellSource[], mark: string, name: string) {
  if (name === mark) return refused('same', `It is called \`${mark}\` already.`, null);
  if (classOfWord(name) !== null) {
    const message = `\`${name}\` is ${describeWord(name)} and cannot be a mark.`;
    return refused('kept-word', message, suggestFree(cells, suggestMark(name)));
  }
  if (!isName(name)) {
    const message =
      name.trim() === ''
        ? 'A mark needs a name.'
        : `\`${name}\` is not a name: it begins with a letter and goes on with letters, figures and \`_\`.`;
    return refused('not-a-name', message, null);
  }
  const [first] = findPlaces(cells, name);
  if (first === undefined) return null;
  const message = first.defines
    ? `\`${name}\` is another mark of this sheet.`
    : `\`${name}\` is read on this sheet already, though no line defines it.`;
  return refused('taken', message, suggestFree(cells, name));
}

function refused(
  reason: Extract<Renaming<CellSource>, { kind: 'refused' }>['reason'],
  message: string,
  suggestion: string | null,
) {
  return { kind: 'refused', reason, message, suggestion } as const;
}

/** The parser is asked, so that what it would not read as a mark is never put in a sheet. */
function isName(name: string): boolean {
  if (/\s/.test(name)) return false;
  const reading = readLine(`${name} = 1`);
  return (
    reading.kind === 'statement' &&
    reading.statement.kind === 'definition' &&
    reading.statement.mark === name
  );
}

/** The name itself where it is free, or with the least figure that makes it so: `R_2`, `R_3`, … */
function suggestFree(cells: readonly CellSource[], name: string): string {
  const stem = name.replace(/_\d+$/, '');
  let free = name;
  for (let count = 2; classOfWord(free) !== null || findPlaces(cells, free).length > 0; count += 1)
    free = `${stem}_${count}`;
  return free;
}

function replaceAt(source: string, places: readonly MarkPlace[], name: string): string {
  let text = '';
  let done = 0;
  for (const { from, to } of places) {
    text += source.slice(done, from) + name;
    done = to;
  }
  return text + source.slice(done);
}

function linesWithOffsets(source: string): { text: string; offset: number }[] {
  const lines: { text: string; offset: number }[] = [];
  let offset = 0;
  for (const { 0: ending, index } of source.matchAll(LINE_BREAK)) {
    lines.push({ text: source.slice(offset, index), offset });
    offset = index + ending.length;
  }
  lines.push({ text: source.slice(offset), offset });
  return lines;
}

interface Place {
  from: number;
  to: number;
  defines: boolean;
}

function placesInLine(text: string, mark: string): Place[] {
  if (!text.includes(mark)) return [];
  const reading = readLine(text);
  if (reading.kind === 'blank') return [];
  if (reading.kind === 'problem') return placesInBrokenLine(text, mark);
  const { statement } = reading;
  const places: Place[] = marksReadBy(statement)
    .filter(({ name }) => name === mark)
    .map(({ from, to }) => ({ from, to, defines: false }));
  const defines = statement.kind === 'definition' || statement.kind === 'function';
  if (defines && statement.mark === mark) {
    places.unshift({ ...statement.markSpan, defines: true });
  }
  return places;
}

const DEFINING = new Set(['Target', 'FunctionTarget']);

function placesInBrokenLine(text: string, mark: string): Place[] {
  const places: Place[] = [];
  let isLocal = false;
  parser.parse(text).iterate({
    enter: ({ node, name, type, from, to }) => {
      const named = name === 'Mark' || name === 'Parameter' || DEFINING.has(name) || type.isError;
      if (!named || text.slice(from, to) !== mark || isUnknown(node, text, mark)) return;
      if (name === 'Parameter' || node.parent?.name === 'Local') isLocal = true;
      else places.push({ from, to, defines: DEFINING.has(name) });
      return false;
    },
  });
  // Where the line has a name of its own that reads the same, only what it defines is the sheet's.
  const own = isLocal ? places.filter(({ defines }) => defines) : places;
  if (markOfLine(text) !== mark) return own;
  const from = text.indexOf(mark);
  const rest = own.filter((place) => place.from !== from);
  return [{ from, to: from + mark.length, defines: true }, ...rest];
}

/** Whether a node is the unknown of a polynomial: an `x` in the first place of `root`. */
function isUnknown(node: SyntaxNode, text: string, mark: string): boolean {
  if (mark !== 'x') return false;
  for (let at: SyntaxNode | null = node; at !== null; at = at.parent) {
    const list: SyntaxNode | null = at.parent;
    if (list?.name !== 'Arguments' || list.parent === null) continue;
    const isRoot = /^root\b/.test(text.slice(list.parent.from));
    if (isRoot && list.getChildren('Comma').every((comma) => comma.from >= at.to)) return true;
  }
  return false;
}
