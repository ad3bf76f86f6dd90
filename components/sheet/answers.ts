import 'server-only';
import { evaluate } from '@/lib/evaluation';
import type { NotebookContent } from '@/lib/notebooks/content';
import { evaluationRequest } from './state/evaluation-request';
import type { CellAnswer } from './state/shown';

/** The figures of a whole notebook, or null when they cannot be had just now: the page shows anyway. */
export async function answersFor(content: NotebookContent): Promise<CellAnswer[] | null> {
  const { cells, settings } = evaluationRequest(content);
  if (cells.length === 0) return [];
  try {
    const answer = await evaluate({ cells, settings });
    return answer.cells ?? null;
  } catch {
    return null;
  }
}
