import {
  EvaluateRequest,
  PoolBusy,
  certify,
  evaluate,
  storeOutcomesIn,
  type CellAnswer,
  type CertificateAnswer,
  type CertificateRequest,
  type EvaluateAnswer,
} from '@/lib/evaluation';
import { databaseStore } from '@/lib/evaluation/database-store';
import { Failure } from '@/lib/access';
import type { NotebookContent } from './content';
import { settingsField } from './content-values';

const holder = globalThis as typeof globalThis & { surdworkAnswersKept?: true };

/**
 * Evaluates for the application: what has been evaluated before, by any instance, comes from the
 * database. @throws Failure `busy` when too many evaluations wait already
 */
export async function answerTo(request: EvaluateRequest): Promise<EvaluateAnswer> {
  if (holder.surdworkAnswersKept === undefined) {
    storeOutcomesIn(databaseStore());
    holder.surdworkAnswersKept = true;
  }
  return await whenFree(evaluate(request));
}

/** The certificate of one line. @throws Failure `busy` when too many evaluations wait already */
export function certificateFor(request: CertificateRequest): Promise<CertificateAnswer> {
  return whenFree(certify(request));
}

async function whenFree<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (!(error instanceof PoolBusy)) throw error;
    throw new Failure('busy', 'Too many evaluations are waiting; try again in a moment.', {
      retryAfter: 1,
    });
  }
}

/** The question that a notebook's dimension cells put together, under the notebook's settings and their own. */
export function questionOf(content: NotebookContent): EvaluateRequest {
  const dimensions = content.cells.filter(({ kind }) => kind === 'dimension');
  return {
    cells: dimensions.map(({ id, source, settings }) => ({
      id,
      source,
      ...settingsField(settings),
    })),
    settings: content.settings,
  };
}

/** Whether the server was too busy to finish: worth asking again instead of showing or keeping. */
export function isHurried(answers: readonly Pick<CellAnswer, 'results'>[]): boolean {
  return answers.some(({ results }) =>
    results.some((result) => result.kind === 'error' && result.error.code === 'limit-time'),
  );
}
