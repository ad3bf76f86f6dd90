import type { Problem } from './failure';
import { classOfWord } from './names';
import { orderByDependence } from './graph';
import { attachOnce, readLineOnce } from './read-once';
import { rememberByText } from './remember-by-text';
import type { Settings } from './settings';
import { type MarkNode, type Statement, markDefinedBy } from './syntax';

export interface CellSource {
  readonly id: string;
  readonly source: string;
  /** In what its results are given, where that differs from the settings of the whole. */
  readonly settings?: Partial<Settings> | undefined;
}

/** A line that is not blank, with what is known of it before any arithmetic. */
export interface SourceLine {
  /** Position of its cell among the cells. */
  readonly cell: number;
  /** 1-based line in the cell. */
  readonly line: number;
  readonly source: string;
  readonly mark: string | null;
  /** Null when the line has a problem of its own. */
  readonly statement: Statement | null;
  readonly problem: Problem | null;
  readonly reads: readonly MarkNode[];
}

export interface LineGraph {
  readonly lines: readonly SourceLine[];
  /** Lines that define a mark, in order of the page; more than one is an error at each. */
  readonly definitions: ReadonlyMap<string, readonly number[]>;
  /** Names that some line defines as a function; a bracket after them holds arguments. */
  readonly functions: ReadonlySet<string>;
  /** Order in which to evaluate. */
  readonly order: readonly number[];
  readonly cycles: ReadonlyMap<number, readonly number[]>;
}

/** What a line says by itself, wherever it stands. */
interface PlainLine {
  readonly line: number;
  readonly source: string;
  readonly mark: string | null;
  readonly statement: Statement | null;
  readonly problem: Problem | null;
  /** Also of a line that does not parse: what it means to define is no product elsewhere. */
  readonly isFunction: boolean;
}

/** Reads all lines of all cells and orders them so that what a line reads comes before it. */
export function readCells(cells: readonly CellSource[]): LineGraph {
  const plain = cells.map(({ source }) => readCellOnce(source));
  const functions = new Set<string>();
  for (const cell of plain)
    for (const { mark, isFunction } of cell) if (isFunction && mark !== null) functions.add(mark);
  const lines: SourceLine[] = [];
  const definitions = new Map<string, number[]>();
  plain.forEach((ofCell, cell) => {
    for (const { line, source, mark, statement: read, problem } of ofCell) {
      if (mark !== null) {
        const known = definitions.get(mark);
        if (known === undefined) definitions.set(mark, [lines.length]);
        else known.push(lines.length);
      }
      const { statement, reads } = read === null ? UNREAD : attachOnce(read, functions);
      lines.push({ cell, line, source, mark, statement, problem, reads });
    }
  });
  const reads = lines.map((line) => definitionsOf(line.reads, definitions));
  return { lines, definitions, functions, ...orderByDependence(reads) };
}

const NONE: readonly number[] = [];

/** The lines that define what is read. Few lines read more than one mark, and only for those a list is made. */
function definitionsOf(
  reads: readonly MarkNode[],
  definitions: ReadonlyMap<string, readonly number[]>,
): readonly number[] {
  const [first] = reads;
  if (first === undefined) return NONE;
  return reads.length === 1
    ? (definitions.get(first.name) ?? NONE)
    : reads.flatMap(({ name }) => definitions.get(name) ?? NONE);
}

const UNREAD = { statement: null, reads: [] } as const;

const readCellOnce = rememberByText((source) =>
  source.split(/\r\n|\n|\r/).flatMap((text, index): PlainLine[] => {
    const reading = readLineOnce(text);
    const line = index + 1;
    switch (reading.kind) {
      case 'blank':
        return [];
      case 'problem': {
        const { problem } = reading;
        const mark = markOfLine(text);
        return [
          { line, source: text, mark, statement: null, problem, isFunction: HEAD.test(text) },
        ];
      }
      case 'statement': {
        const { statement } = reading;
        const mark = markDefinedBy(statement);
        const isFunction = statement.kind === 'function';
        return [{ line, source: text, mark, statement, problem: null, isFunction }];
      }
    }
  }),
);

/** A mark, or a function with its parameters, before the sign of a definition. */
const DEFINED = /^\s*(\p{L}[\p{L}\d_]*)\s*(?:\([^()=]*\)\s*)?=(?!=)/u;
const HEAD = /^\s*\p{L}[\p{L}\d_]*\s*\([^()=]*\)\s*=(?!=)/u;

/** The mark or function that a line means to define, told without parsing it: also for one that does not parse. */
export function markOfLine(text: string): string | null {
  const name = DEFINED.exec(text.slice(0, 200))?.[1];
  return name === undefined || classOfWord(name) !== null ? null : name;
}
