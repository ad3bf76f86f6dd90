import { type CellSource, type LineGraph, readCells } from '@/lib/language/index';

/** A line that defines a mark, as text. */
export interface Definition {
  readonly mark: string;
  /** What stands after the sign of definition, without remark and outer blanks. */
  readonly text: string;
  readonly cell: string;
}

/** What cells say before any arithmetic. */
export interface Outline {
  readonly definitions: readonly Definition[];
  /** Lines that define nothing, as they are written. */
  readonly others: readonly string[];
  readonly graph: LineGraph;
}

/** Reads which line defines what. Cost: reading the lines once; what was read before is remembered. */
export function outlineOf(cells: readonly CellSource[]): Outline {
  const graph = readCells(cells);
  const definitions: Definition[] = [];
  const others: string[] = [];
  for (const { mark, source, cell } of graph.lines) {
    const written = (source.split('#', 1)[0] ?? '').trim();
    if (mark === null) {
      if (written !== '') others.push(written);
      continue;
    }
    const text = written.slice(written.indexOf('=') + 1).trim();
    definitions.push({ mark, text, cell: cells[cell]?.id ?? '' });
  }
  return { definitions, others, graph };
}

/**
 * How many lines follow when the lines that define these marks change: those that read one of them, at any remove, the
 * changed lines themselves not counted. Cost: lines plus readings.
 */
export function countFollowing({ graph }: Outline, marks: ReadonlySet<string>): number {
  const follows = graph.lines.map(({ mark }) => mark !== null && marks.has(mark));
  const isChanged = [...follows];
  for (const index of graph.order) {
    const line = graph.lines[index];
    if (line === undefined || follows[index] === true) continue;
    follows[index] = line.reads.some(({ name }) =>
      (graph.definitions.get(name) ?? []).some((definition) => follows[definition]),
    );
  }
  return follows.filter((follow, index) => follow && isChanged[index] !== true).length;
}
