import type { Problem } from './failure';
import { classOfWord } from './names';
import { orderByDependence } from './graph';
import { attachOnce, readLineOnce } from './read-once';
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

/** Reads all lines of all cells and orders them so that what a line reads comes before it. */
export function readCells(cells: readonly CellSource[]): LineGraph {
  const plain = cells.flatMap((cell, index) => readCell(cell.source, index));
  const functions = functionsIn(plain);
  const lines = plain.map((line) =>
    line.statement === null ? line : { ...line, ...attachOnce(line.statement, functions) },
  );
  const definitions = new Map<string, number[]>();
  lines.forEach(({ mark }, index) => {
    if (mark === null) return;
    const known = definitions.get(mark);
    if (known === undefined) definitions.set(mark, [index]);
    else known.push(index);
  });
  const reads = lines.map((line) => line.reads.flatMap(({ name }) => definitions.get(name) ?? []));
  return { lines, definitions, functions, ...orderByDependence(reads) };
}

/** Also of lines that do not parse: what such a line means to define is no product elsewhere. */
function functionsIn(lines: readonly SourceLine[]): Set<string> {
  return new Set(
    lines.flatMap(({ source, mark, statement }) => {
      if (mark === null) return [];
      const isFunction = statement === null ? HEAD.test(source) : statement.kind === 'function';
      return isFunction ? [mark] : [];
    }),
  );
}

function readCell(source: string, cell: number): SourceLine[] {
  return source.split(/\r\n|\n|\r/).flatMap((text, index): SourceLine[] => {
    const reading = readLineOnce(text);
    const common = { cell, line: index + 1, source: text };
    switch (reading.kind) {
      case 'blank':
        return [];
      case 'problem':
        return [
          {
            ...common,
            mark: markOfLine(text),
            statement: null,
            problem: reading.problem,
            reads: [],
          },
        ];
      case 'statement': {
        const { statement } = reading;
        const mark = markDefinedBy(statement);
        return [{ ...common, mark, statement, problem: null, reads: [] }];
      }
    }
  });
}

/** A mark, or a function with its parameters, before the sign of a definition. */
const DEFINED = /^\s*(\p{L}[\p{L}\d_]*)\s*(?:\([^()=]*\)\s*)?=(?!=)/u;
const HEAD = /^\s*\p{L}[\p{L}\d_]*\s*\([^()=]*\)\s*=(?!=)/u;

/** The mark or function that a line means to define, told without parsing it: also for one that does not parse. */
export function markOfLine(text: string): string | null {
  const name = DEFINED.exec(text.slice(0, 200))?.[1];
  return name === undefined || classOfWord(name) !== null ? null : name;
}
