import 'server-only';
import { Failure } from '@/lib/access';
import { TryRequest, answerTo, tryLines } from '@/lib/notebooks';
import { TRIAL_SETTINGS } from '@/lib/notebooks/trial-limits';
import type { Result } from '@/components/sheet/result';
import { FIRST } from './samples';

/** What the live cell shows when the page is drawn. */
export interface Trial {
  source: string;
  results: Result[];
  /** Why there are no results. */
  fault: string | null;
}

/**
 * The lines that came with the address, as a browser without scripts sends them, worked out under the
 * same limits as any other trial; without such lines our own example.
 */
export async function trialFor(lines: string | null, address: string): Promise<Trial> {
  if (lines === null) return firstTrial();
  const source = lines.replace(/\r\n/g, '\n');
  const read = TryRequest.safeParse({ source });
  if (!read.success) {
    return { source, results: [], fault: read.error.issues[0]?.message ?? null };
  }
  try {
    const { results } = await tryLines(read.data, address);
    return { source, results, fault: null };
  } catch (fault) {
    if (!(fault instanceof Failure)) throw fault;
    return { source, results: [], fault: fault.message };
  }
}

async function firstTrial(): Promise<Trial> {
  const source = FIRST.lines;
  const cells = [{ id: 'try', source }];
  try {
    const answer = await answerTo({ cells, settings: TRIAL_SETTINGS });
    return { source, results: answer.cells?.[0]?.results ?? [], fault: null };
  } catch {
    return { source, results: [], fault: null };
  }
}
