import { hash } from 'node:crypto';
import {
  type CellSource,
  type LineGraph,
  type Problem,
  type Settings,
  type SourceLine,
  DEFAULT_SETTINGS,
  findDefinition,
  findPlaceProblem,
  readCells,
} from '@/lib/language/index';
import type { Task } from './messages';

/** A line that is to be evaluated: its task, and the name of its outcome in every store. */
export interface PlannedLine {
  readonly task: Task & { readonly settings: number };
  readonly outcome: string;
}

/** Cells that have been read, with what each line depends on. */
export interface Plan {
  readonly graph: LineGraph;
  /** What is wrong with a line before any arithmetic, by its position; null for the others. */
  readonly problems: readonly (Problem | null)[];
  /** By position; undefined for lines with a problem. */
  readonly lines: readonly (PlannedLine | undefined)[];
  readonly settings: readonly Settings[];
}

const digest = (text: string): string => hash('sha256', text, 'hex');

/**
 * Reads cells and names the outcome of every line by all that it depends on: the program, the settings of its cell, its
 * text, and in the same way what it reads. A mark without a value stands as null, whatever the reason: the message that
 * tells the reason is no part of an outcome. So equal names have equal outcomes, in this notebook and in all others.
 * Cost: one digest for each value and outcome.
 */
export function planCells(
  program: string,
  cells: readonly CellSource[],
  given: Partial<Settings>,
): Plan {
  const graph = readCells(cells);
  const problems = graph.lines.map((_, index) => findPlaceProblem(graph, index));
  const settings = new DistinctSettings(given);
  const ofCell = cells.map((cell) => settings.indexOf(cell.settings));
  const heads = settings.all.map((one) => JSON.stringify([program, one]));
  const lines = graph.lines.map((): PlannedLine | undefined => undefined);
  for (const index of graph.order) {
    const line = graph.lines[index];
    if (line === undefined || problems[index] !== null) continue;
    const reads = new Map<string, string | null>();
    for (const { name } of line.reads) {
      const definition = findDefinition(graph, name, problems);
      const read = definition === null ? undefined : lines[definition];
      reads.set(name, read?.task.value ?? null);
      // Who calls a function reads what the function reads.
      if (read !== undefined && graph.functions.has(name))
        for (const [inner, value] of read.task.reads) reads.set(inner, value);
    }
    const which = ofCell[line.cell] ?? 0;
    lines[index] = nameLine(line, [...reads], graph.functions, which, heads[which] ?? '');
  }
  return { graph, problems, lines, settings: settings.all };
}

/** The name given last to a line, by its statement, with all that it was made of. */
const named = new WeakMap<
  NonNullable<SourceLine['statement']>,
  { readonly head: string; readonly line: PlannedLine }
>();

/**
 * The task of a line and its names. Most lines of a notebook read the same values as in the request before; a name is
 * made anew only where one of them, or the settings, changed.
 */
function nameLine(
  { source, statement }: SourceLine,
  reads: Task['reads'],
  functionsOfAll: ReadonlySet<string>,
  settings: number,
  head: string,
): PlannedLine {
  const functions =
    functionsOfAll.size === 0
      ? []
      : reads.flatMap(([name]) => (functionsOfAll.has(name) ? [name] : []));
  const before = statement === null ? undefined : named.get(statement);
  const { task } = before?.line ?? {};
  const isSame =
    task !== undefined &&
    task.source === source &&
    task.functions.length === functions.length &&
    task.functions.every((name, place) => name === functions[place]) &&
    areEqualReads(task.reads, reads);
  if (isSame && before?.head === head && task.settings === settings) return before.line;
  const value = isSame ? task.value : digest(JSON.stringify([source, reads, functions]));
  const line = {
    task: { source, value, reads, functions, settings },
    outcome: digest(`${head}${value}`),
  };
  if (statement !== null) named.set(statement, { head, line });
  return line;
}

function areEqualReads(some: Task['reads'], others: Task['reads']): boolean {
  return (
    some.length === others.length &&
    some.every((read, place) => {
      const other = others[place];
      return other !== undefined && read[0] === other[0] && read[1] === other[1];
    })
  );
}

/** The settings of the notebook and those that differ from them in some cell, each once. */
class DistinctSettings {
  readonly all: Settings[];
  private readonly known = new Map<string, number>();
  private readonly base: Settings;

  constructor(given: Partial<Settings>) {
    this.base = { ...DEFAULT_SETTINGS, ...given };
    this.all = [this.base];
    this.known.set(JSON.stringify(this.base), 0);
  }

  indexOf(own: Partial<Settings> | undefined): number {
    if (own === undefined) return 0;
    const settings = { ...this.base, ...own };
    const text = JSON.stringify(settings);
    const known = this.known.get(text) ?? this.all.push(settings) - 1;
    this.known.set(text, known);
    return known;
  }
}
