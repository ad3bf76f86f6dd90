import type { Limits } from '../engine/index';
import { evaluateLine } from './evaluate-line';
import type { Problem } from './failure';
import { type CellSource, readCells } from './lines';
import type { PackedValue } from './packed-value';
import { findDefinition, findPlaceProblem, refusedResult, resultOf } from './place';
import type { Result } from './result';
import type { Proposer } from './solve/proposal';
import { type Settings, completeSettings } from './settings';

export interface EvaluationOptions {
  /** Asked for what an equation that is not solved exactly might have as solutions. */
  readonly propose?: Proposer;
  readonly engineLimits?: Partial<Limits>;
}

export interface CellResults {
  id: string;
  results: Result[];
}

/**
 * Evaluates cells that share marks: one result for each line that is not blank or a remark, in order of the page.
 * Accepts any text as source; everything that can be wrong with it is a result of kind `error`, and the other lines
 * still answer. A cell's own settings go before those given for all. Throws a RangeError for settings that do not make
 * sense. Each line is evaluated in an engine of its own from the values that it reads, so a result depends on those,
 * the line and its settings alone. Cost: reading is linear; arithmetic is bounded line by line by the engine's limits.
 */
export function evaluateCells(
  cells: readonly CellSource[],
  settings: Partial<Settings> = {},
  options: EvaluationOptions = {},
): CellResults[] {
  const graph = readCells(cells);
  const ofCell = cells.map((cell) => completeSettings({ ...settings, ...cell.settings }));
  const problems = graph.lines.map((_, index) => findPlaceProblem(graph, index));
  const values = new Map<number, PackedValue | null>();
  const results: Result[] = [];
  const find = (name: string): PackedValue | null => {
    const definition = findDefinition(graph, name, problems);
    return definition === null ? null : (values.get(definition) ?? null);
  };
  for (const index of graph.order) {
    const line = graph.lines[index];
    const given = ofCell[line?.cell ?? 0];
    if (line === undefined || given === undefined) continue;
    const known = problems[index] ?? null;
    if (known !== null || line.statement === null) {
      if (known !== null) results[index] = refusedResult(graph, index, known);
      continue;
    }
    const { outcome, value } = evaluateLine(line.statement, line.source, given, find, options);
    values.set(index, value);
    results[index] = resultOf(graph, index, outcome);
  }
  const byCell = cells.map((cell): CellResults => ({ id: cell.id, results: [] }));
  graph.lines.forEach((line, index) => {
    const result = results[index];
    if (result !== undefined) byCell[line.cell]?.results.push(result);
  });
  return byCell;
}

/** What is wrong with a text that is to be one expression; null when it is one line that is not blank. */
export function findExpressionProblem(source: string): Problem | null {
  const firstBreak = source.search(/[\r\n]/);
  if (firstBreak !== -1 && source.slice(firstBreak).trim() !== '') {
    const message =
      'An expression is a single line, and this text has several; give several lines as cells.';
    return { code: 'syntax', message, from: firstBreak, to: source.length };
  }
  const line = firstLine(source);
  if (readCells([{ id: '', source: line }]).lines.length > 0) return null;
  const message = 'An expression was expected, and there is none.';
  return { code: 'syntax', message, from: 0, to: line.length };
}

/** The text up to the first end of a line. */
export const firstLine = (source: string): string => source.split(/[\r\n]/, 1)[0] ?? '';

/** The result of a text that is no expression. */
export function expressionResult(source: string, error: Problem): Result {
  return { line: 1, source, mark: null, kind: 'error', typeset: null, error };
}

/** Evaluates one line on its own. A text of several lines, and a blank one, is answered with `syntax`. */
export function evaluateExpression(
  source: string,
  settings: Partial<Settings> = {},
  options: EvaluationOptions = {},
): Result {
  const problem = findExpressionProblem(source);
  if (problem !== null) return expressionResult(source, problem);
  const [cell] = evaluateCells([{ id: '', source: firstLine(source) }], settings, options);
  const [result] = cell?.results ?? [];
  if (result === undefined) throw new Error('A line that is not blank has a result.');
  return result;
}
