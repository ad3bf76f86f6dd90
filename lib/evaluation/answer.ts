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

/**
 * Puts the outcomes of all lines in their places, cell by cell; a line that was not come to is answered all the same.
 * Cells whose digest the client has, by `have`, are left out.
 */
export function answerCells(
  cells: readonly CellSource[],
  plan: Plan,
  fates: ReadonlyMap<string, Fate>,
  have: Readonly<Record<string, string>> = {},
): AnsweredCell[] {
  const byCell = cells.map((): AnsweredLine[] => []);
  plan.graph.lines.forEach((line, index) => {
    byCell[line.cell]?.push(answerLine(plan, index, fates));
  });
  return cells.flatMap(({ id }, cell) => {
    const lines = byCell[cell] ?? [];
    const digest = digestOf(lines.map(({ key }) => key).join('\n'));
    return have[id] === digest ? [] : [{ id, results: lines.map(({ give }) => give()), digest }];
  });
}

interface AnsweredLine {
  /** Tells the whole result. */
  readonly key: string;
  readonly give: () => Result;
}

const digestOf = (key: string): string => hash('sha256', key, 'base64url').slice(0, 16);

function answerLine(plan: Plan, index: number, fates: ReadonlyMap<string, Fate>): AnsweredLine {
  const { graph, lines } = plan;
  const name = lines[index]?.outcome ?? '';
  const fate = fates.get(name);
  const line = graph.lines[index]?.line ?? 0;
  if (fate?.kind === 'outcome' && isPlaceless(fate))
    // The name tells the whole result but for its place in the cell, so that most results need not be put together.
    return { key: `${line} ${name}`, give: () => resultOf(graph, index, fate.outcome) };
  const result = refusedOrPlaced(plan, index, fate);
  return { key: `${line} ${JSON.stringify(result)}`, give: () => result };
}

function refusedOrPlaced({ graph, problems }: Plan, index: number, fate: Fate | undefined): Result {
  const problem = problems[index];
  if (problem !== null && problem !== undefined) return refusedResult(graph, index, problem);
  if (fate?.kind === 'outcome') return resultOf(graph, index, fate.outcome);
  const { code, message } = fate?.refusal ?? OUT_OF_TIME;
  const { from, to } = graph.lines[index]?.statement ?? { from: 0, to: 0 };
  const error: Problem = { code, message, from, to };
  return refusedResult(graph, index, error);
}

const isPlaceless = ({ outcome, lasting }: { outcome: Outcome; lasting: boolean }): boolean =>
  lasting && outcome.kind !== 'missing';

const OUT_OF_TIME: Refusal = {
  code: 'limit-time',
  message: `The time of the whole request was used up before this line had an answer; it is ${EVALUATION_LIMITS.requestTime} milliseconds, and ${EVALUATION_LIMITS.requestTimePerLine} more for each line.`,
};
