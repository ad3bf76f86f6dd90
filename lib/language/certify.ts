import { createEngine, type Certificate } from '../engine/index';
import { attemptOrFail } from './attempt';
import { Evaluator } from './evaluator';
import { type ErrorCode, Failure, fail } from './failure';
import { inUnit, unitName } from './give-value';
import { type CellSource, type LineGraph, readCells } from './lines';
import { asAlgebraic } from './pi-sum';
import { completeSettings, type Settings } from './settings';
import type { DefinitionStatement, ValueStatement } from './syntax';
import type { LineValue } from './values';

/** A line by the id of its cell and its 1-based number there. */
export interface CertifiedLine {
  readonly cell: string;
  readonly line: number;
}

/** The certificate of the number of units that a line is worth, or why there is none. */
export type Certified =
  | {
      readonly kind: 'certificate';
      readonly unit: string | null;
      readonly certificate: Certificate;
    }
  | { readonly kind: 'none'; readonly code: ErrorCode; readonly message: string };

/**
 * The certificate of the value of one line among cells that share marks. Only what the line reads is evaluated. None
 * for a line that is no number, has an error or reads one, or whose value square roots do not reach; the message says
 * which. Cost: the values it needs, and the minimal polynomial of its own.
 */
export function certifyLine(
  cells: readonly CellSource[],
  at: CertifiedLine,
  settings: Partial<Settings> = {},
): Certified {
  const graph = readCells(cells);
  const index = cells.findIndex(({ id }) => id === at.cell);
  const asked = graph.lines.findIndex((one) => one.cell === index && one.line === at.line);
  const statement = graph.lines[asked]?.statement;
  if (!statement || statement.kind === 'decision' || statement.kind === 'function') {
    return none('domain', 'A certificate was asked for a line that has no value of its own.');
  }
  const engine = createEngine();
  const values = new Map<string, LineValue>();
  const evaluator = new Evaluator(engine, (name, place) => {
    const message = `\`${name}\` has no value of its own that can be read.`;
    return values.get(name) ?? fail('depends-on-error', message, place);
  });
  const valueOf = (line: DefinitionStatement | ValueStatement) =>
    attemptOrFail(engine, () => evaluator.lineValue(line));
  const { unit } = completeSettings({ ...settings, ...cells[index]?.settings });
  try {
    for (const line of linesReadBy(graph, asked)) {
      const { statement: read, mark } = graph.lines[line] ?? {};
      const alone = mark && graph.definitions.get(mark)?.length === 1 && !graph.cycles.has(line);
      if (!read || !mark || !alone) continue;
      if (read.kind === 'definition') values.set(mark, valueOf(read));
      if (read.kind === 'function') values.set(mark, { kind: 'function', definition: read });
    }
    const value = valueOf(statement);
    if (value.kind !== 'number') {
      return none('domain', 'A certificate is of a number, and the value of this line is none.');
    }
    const number = asAlgebraic(
      engine,
      attemptOrFail(engine, () => inUnit(engine, value, unit)),
    );
    if (number === null) {
      return none('not-exact', 'This value is transcendental; no polynomial certifies it.');
    }
    const certificate = attemptOrFail(engine, () => engine.certificate(number));
    return { kind: 'certificate', unit: unitName(unit, value.length), certificate };
  } catch (failure) {
    if (!(failure instanceof Failure)) throw failure;
    return none(failure.code, failure.message);
  }
}

/** The lines that a line reads, directly or through others, in an order in which they can be evaluated. */
function linesReadBy(graph: LineGraph, asked: number): number[] {
  const needed = new Set<number>();
  const waiting = [asked];
  for (let index = waiting.pop(); index !== undefined; index = waiting.pop()) {
    for (const { name } of graph.lines[index]?.reads ?? []) {
      for (const definition of graph.definitions.get(name) ?? []) {
        if (!needed.has(definition)) waiting.push(definition);
        needed.add(definition);
      }
    }
  }
  return graph.order.filter((index) => needed.has(index));
}

const none = (code: ErrorCode, message: string): Certified => ({ kind: 'none', code, message });
