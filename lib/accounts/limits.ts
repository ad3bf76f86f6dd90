import { createHash } from 'node:crypto';
import { database } from '@/db/client';
import { clearHits, countHit, pruneHits, takeHitBack } from '@/db/queries/rate-limits';
import { Failure } from '@/lib/access';

/** How often something may happen: `hits` in each window of `seconds`. */
export interface Limit {
  name: string;
  hits: number;
  seconds: number;
  /** What has been done too often, as the sentence to the asking person begins. */
  what: string;
}

/**
 * All limits, kept in MariaDB so that instances share them. Windows are fixed, so at the seam of
 * two windows up to twice the number may pass; the numbers are chosen with that in mind.
 */
export const LIMITS = {
  signInAddress: { name: 'sign-in-address', hits: 60, seconds: 900, what: 'attempts to sign in' },
  signInEmail: { name: 'sign-in-email', hits: 10, seconds: 900, what: 'attempts to sign in' },
  signUp: { name: 'sign-up', hits: 30, seconds: 3600, what: 'new accounts from this address' },
  addPerson: { name: 'add-person', hits: 60, seconds: 3600, what: 'people looked up by e-mail' },
  badKey: { name: 'bad-key', hits: 60, seconds: 900, what: 'requests with an unknown key' },
  evaluatePerson: { name: 'evaluate-person', hits: 600, seconds: 60, what: 'evaluations' },
  evaluateKey: { name: 'evaluate-key', hits: 300, seconds: 60, what: 'evaluations with this key' },
  export: { name: 'export', hits: 60, seconds: 60, what: 'exports' },
} as const satisfies Record<string, Limit>;

/** One counted hit, which can be taken back when it turns out to have been rightful. */
export interface Hit {
  bucket: string;
  windowStart: Date;
}

/** Windows older than this are dropped whenever a new window begins. */
const KEEP_MS = 24 * 3600 * 1000;

/**
 * Counts one hit of `subject` (an address, an e-mail, a person's id) against a limit. Counting comes
 * before the work it guards, so that many requests at once cannot all pass the check.
 * @throws Failure `too-many`, with the seconds to wait
 */
export async function countAgainst(limit: Limit, subject: string): Promise<Hit> {
  const db = database();
  const span = limit.seconds * 1000;
  const now = Date.now();
  const windowStart = new Date(Math.floor(now / span) * span);
  const hit = { bucket: bucketOf(limit, subject), windowStart };
  const hits = await countHit(db, hit.bucket, windowStart);
  if (hits === 1) await pruneHits(db, new Date(now - KEEP_MS));
  if (hits > limit.hits) {
    const retryAfter = Math.ceil((windowStart.getTime() + span - now) / 1000);
    throw new Failure(
      'too-many',
      `Too many ${limit.what}: ${limit.hits} are allowed in ${inWords(limit.seconds)}. ` +
        `Try again in ${retryAfter === 1 ? '1 second' : inWords(retryAfter)}.`,
      { retryAfter },
    );
  }
  return hit;
}

export async function takeBack(hit: Hit): Promise<void> {
  await takeHitBack(database(), hit.bucket, hit.windowStart);
}

export async function forget(limit: Limit, subject: string): Promise<void> {
  await clearHits(database(), bucketOf(limit, subject));
}

/** Hashed, so that the table neither lists who tried to sign in nor takes a name of any length. */
function bucketOf(limit: Limit, subject: string): string {
  return `${limit.name}:${createHash('sha256').update(subject).digest('hex')}`;
}

function inWords(seconds: number): string {
  if (seconds < 120) return `${seconds} seconds`;
  return `${Math.ceil(seconds / 60)} minutes`;
}
