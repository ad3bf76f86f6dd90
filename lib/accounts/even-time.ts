/**
 * Does the work and answers no sooner than after so many milliseconds, so that the time an answer
 * takes does not tell whether there was anything to do.
 */
export async function inNoLessThan(milliseconds: number, work: () => Promise<void>): Promise<void> {
  const pause = new Promise<void>((resolve) => setTimeout(resolve, milliseconds));
  await Promise.all([work(), pause]);
}
