import 'server-only';
import type { Result } from '@/components/sheet/result';
import { answerTo } from '@/lib/notebooks';
import { TRIAL_SETTINGS } from '@/lib/notebooks/trial-limits';

/** So many samples are worked out at once; the rest of the children are for people at work. */
const AT_ONCE = 2;

/**
 * The results of each sample by itself, so that marks of one mean nothing to another. Kept like all
 * answers, so that only the first visitor after a change of the program waits for them. A sample that
 * has no answer just now is left out.
 */
export async function answersTo(samples: readonly string[]): Promise<Map<string, Result[]>> {
  const waiting = [...new Set(samples)];
  const answers = new Map<string, Result[]>();
  const work = async () => {
    for (let source = waiting.pop(); source !== undefined; source = waiting.pop()) {
      const results = await resultsOf(source);
      if (results !== null) answers.set(source, results);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, work));
  return answers;
}

async function resultsOf(source: string): Promise<Result[] | null> {
  try {
    const cells = [{ id: 'sample', source }];
    const answer = await answerTo({ cells, settings: TRIAL_SETTINGS });
    return answer.cells?.[0]?.results ?? null;
  } catch {
    return null;
  }
}
