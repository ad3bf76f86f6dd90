const MINUTE = 60;
const HOUR = 3600;

/** Seconds to wait after each failed attempt; after one more failure than there are waits, no more. */
const WAITS = [30, 2 * MINUTE, 10 * MINUTE, HOUR, 6 * HOUR, 12 * HOUR, 24 * HOUR] as const;

/** How often a letter is tried at most. */
export const MOST_ATTEMPTS = WAITS.length + 1;

/** Seconds until the next attempt after `attempts` of them failed; null when that was the last. */
export function waitAfter(attempts: number): number | null {
  return WAITS[attempts - 1] ?? null;
}
