import { z } from 'zod';
import { Failure } from '@/lib/access';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { PoolBusy, evaluate, type EvaluateAnswer } from '@/lib/evaluation';
import { TRIAL_LIMITS, TRIAL_SETTINGS } from './trial-limits';

const linesOf = (text: string) => text.split(/\r\n|\n|\r/).length;

/** A few lines of a dimension cell, written by somebody without an account. */
export const TryRequest = z.strictObject({
  source: z
    .string()
    .max(TRIAL_LIMITS.length, {
      error: (issue) =>
        `The lines have ${(issue.input as string).length} characters together; ` +
        `at most ${TRIAL_LIMITS.length} are taken here. A notebook takes more.`,
    })
    .refine((text) => linesOf(text) <= TRIAL_LIMITS.lines, {
      error: (issue) =>
        `There are ${linesOf(issue.input as string)} lines; ` +
        `at most ${TRIAL_LIMITS.lines} are taken here. A notebook takes more.`,
    }),
});
export type TryRequest = z.infer<typeof TryRequest>;

/** Results of the lines, under the settings of the live cell. */
export type Tried = Pick<EvaluateAnswer, 'schema' | 'engine'> & Pick<Cell, 'results'>;
type Cell = NonNullable<EvaluateAnswer['cells']>[number];

let running = 0;

/**
 * Evaluates a visitor's lines and keeps nothing of them. Counted before the work, per address and for
 * all visitors together: an address can be made up where no proxy stands before the server.
 * @throws Failure `too-many`, `busy`
 */
export async function tryLines({ source }: TryRequest, address: string): Promise<Tried> {
  await countAgainst(LIMITS.tryAddress, address);
  await countAgainst(LIMITS.tryAll, 'everybody');
  if (running >= TRIAL_LIMITS.atOnce) throw busy();
  running += 1;
  try {
    const cells = [{ id: 'try', source }];
    const answer = await evaluate({ cells, settings: TRIAL_SETTINGS }, { keep: false });
    const { schema, engine } = answer;
    return { schema, engine, results: answer.cells?.[0]?.results ?? [] };
  } catch (error) {
    throw error instanceof PoolBusy ? busy() : error;
  } finally {
    running -= 1;
  }
}

const busy = () =>
  new Failure('busy', 'Too many visitors are trying just now; try again in a moment.', {
    retryAfter: 1,
  });
