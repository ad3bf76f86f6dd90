import 'server-only';
import { answerTo, questionOf } from '@/lib/notebooks';
import type { NotebookContent } from '@/lib/notebooks/content';
import type { CellAnswer } from './state/shown';

/** The figures of a whole notebook, or null when they cannot be had just now: the page shows anyway. */
export async function answersFor(content: NotebookContent): Promise<CellAnswer[] | null> {
  try {
    // With digests, so that the first edit need not bring everything again.
    const { cells } = await answerTo({ ...questionOf(content), have: {} });
    return cells ?? null;
  } catch {
    return null;
  }
}
