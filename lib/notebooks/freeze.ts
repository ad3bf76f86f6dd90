import { createHash } from 'node:crypto';
import type { NewRevision } from '@/db/queries/revisions';
import { Failure } from '@/lib/access';
import type { CellAnswer } from '@/lib/evaluation';
import { answerTo, isHurried, questionOf } from './answers';
import type { NotebookContent } from './content';

/** Results of the dimension cells, as they are frozen. */
export type FrozenResults = Pick<CellAnswer, 'id' | 'results'>[];

export interface Settled {
  engine: string;
  results: FrozenResults;
}

/**
 * Evaluates for keeping: an answer that the clock cut short is asked for once more, as what has been
 * worked out by then is remembered, and is never kept.
 * @throws Failure `not-settled` naming the first line that had no answer in time; `busy`
 */
export async function settledResults(content: NotebookContent): Promise<Settled> {
  const question = questionOf(content);
  let answer = await answerTo(question);
  if (isHurried(answer.cells ?? [])) answer = await answerTo(question);
  const results = (answer.cells ?? []).map(({ id, results: lines }) => ({ id, results: lines }));
  if (isHurried(results)) throw hurried(results);
  return { engine: answer.engine, results };
}

function hurried(results: FrozenResults): Failure {
  const [first] = results
    .flatMap(({ results: lines }) => lines)
    .filter((line) => line.kind === 'error' && line.error.code === 'limit-time');
  return new Failure(
    'not-settled',
    `Not everything could be worked out in time, so nothing was issued; the first such line is ` +
      `“${(first?.source ?? '').trim().slice(0, 80)}”. Try again in a moment, or make the line lighter.`,
    { retryAfter: 5 },
  );
}

/** Lines that have a fault instead of a value. */
export function countFaults(results: FrozenResults): number {
  const lines = results.flatMap(({ results: of }) => of);
  return lines.filter(({ kind }) => kind === 'error').length;
}

export const sayFaults = (count: number): string =>
  count === 1 ? '1 line has a fault' : `${count} lines have faults`;

/** SHA-256 over all that is frozen, in hexadecimal. */
export function frozenHashOf(frozen: Omit<NewRevision, 'frozenHash'>): string {
  const { letter, version, purpose, note, issuedBy, issuedAt, checkedBy } = frozen;
  const { engine, contentHash, titleBlock, results, notebookId } = frozen;
  const names = [issuedBy.name, checkedBy?.name ?? null];
  const when = issuedAt.toISOString();
  const deed = { notebookId, letter, version, purpose, note, names, when };
  const text = JSON.stringify({ ...deed, engine, contentHash, titleBlock, results });
  return createHash('sha256').update(text).digest('hex');
}

/** The check code on paper: short enough to compare by eye, and another one for every revision. */
export const checkCodeOf = (frozenHash: string): string =>
  `${frozenHash.slice(0, 4)}-${frozenHash.slice(4, 8)}`.toUpperCase();
