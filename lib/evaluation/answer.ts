import { hash } from 'node:crypto';
import {
  type CellSource,
  type Outcome,
  type Problem,
  type Result,
  refusedResult,
  resultOf,
} from '@/lib/language/index';
import { EVALUATION_LIMITS } from './limits';
import type { Refusal } from './messages';
import type { Plan } from './plan';
import type { Fate } from './run';

/** The results of one cell, and a word for them by which a client can say that it has them. */
export interface AnsweredCell {
  id: string;
  results: Result[];
  digest: string;
}

/** Puts the outcomes of all lines in their places, cell by cell; a line that was not come to is answered all the same. */
export function answerCells(
  cells: readonly CellSource[],
  plan: Plan,
  fates: ReadonlyMap<string, Fate>,
): AnsweredCell[] {
  const answered = cells.map(({ id }) => ({ id, results: [] as Result[], hash: [] as string[] }));
  plan.graph.lines.forEach((line, index) => {
    const cell = answered[line.cell];
    if (cell === undefined) return;
    const { result, name } = answerLine(plan, index, fates);
    cell.results.push(result);
    cell.hash.push(`${line.line} ${name ?? JSON.stringify(result)}`);
  });
  return answered.map(({ id, results, hash }) => ({ id, results, digest: digestOf(hash) }));
}

function digestOf(parts: readonly string[]): string {
  return hash('sha256', parts.join('\n'), 'base64url').slice(0, 16);
}

/** `name` is there when it tells the whole result but for its place in the cell. */
function answerLine(
  { graph, problems, lines }: Plan,
  index: number,
  fates: ReadonlyMap<string, Fate>,
): { result: Result; name?: string } {
  const problem = problems[index];
  if (problem !== null && problem !== undefined)
    return { result: refusedResult(graph, index, problem) };
  const name = lines[index]?.outcome ?? '';
  const fate = fates.get(name);
  if (fate?.kind === 'outcome') {
    const result = resultOf(graph, index, fate.outcome);
    return isPlaceless(fate) ? { result, name } : { result };
  }
  const { code, message } = fate?.refusal ?? OUT_OF_TIME;
  const { from, to } = graph.lines[index]?.statement ?? { from: 0, to: 0 };
  const error: Problem = { code, message, from, to };
  return { result: refusedResult(graph, index, error) };
}

const isPlaceless = ({ outcome, lasting }: { outcome: Outcome; lasting: boolean }): boolean =>
  lasting && outcome.kind !== 'missing';

const OUT_OF_TIME: Refusal = {
  code: 'limit-time',
  message: `The time of the whole request was used up before this line had an answer; it is ${EVALUATION_LIMITS.requestTime} milliseconds, and ${EVALUATION_LIMITS.requestTimePerLine} more for each line.`,
};
