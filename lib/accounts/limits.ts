import { createHash } from 'node:crypto';
import { database } from '@/db/client';
import { clearHits, countHit, findHits, pruneHits, takeHitBack } from '@/db/queries/rate-limits';
import { Failure } from '@/lib/access';

/** How often something may happen: `hits` in each window of `seconds`. */
export interface Limit {
  name: string;
  hits: number;
  seconds: number;
  /** What has been done too often, as the sentence to the asking person begins. */
  what: string;
}

/** All limits, kept in MariaDB so that instances share them. */
export const LIMITS = {
  signInAddress: { name: 'sign-in-address', hits: 60, seconds: 900, what: 'attempts to sign in' },
  signInEmail: { name: 'sign-in-email', hits: 10, seconds: 900, what: 'attempts to sign in' },
  signUp: { name: 'sign-up', hits: 30, seconds: 3600, what: 'new accounts from this address' },
  signUpEmail: { name: 'sign-up-email', hits: 6, seconds: 3600, what: 'letters to this address' },
  forgotAddress: {
    name: 'forgot-address',
    hits: 30,
    seconds: 3600,
    what: 'new passwords asked for from this address',
  },
  forgotEmail: { name: 'forgot-email', hits: 5, seconds: 3600, what: 'letters to this address' },
  badToken: { name: 'bad-token', hits: 60, seconds: 900, what: 'links that are not valid' },
  password: { name: 'password', hits: 10, seconds: 900, what: 'tries at your password' },
  accountExport: {
    name: 'account-export',
    hits: 10,
    seconds: 3600,
    what: 'exports of the account',
  },
  addPerson: { name: 'add-person', hits: 60, seconds: 3600, what: 'people looked up by e-mail' },
  makeWorkshop: { name: 'make-workshop', hits: 10, seconds: 3600, what: 'new workshops' },
  invite: { name: 'invite', hits: 60, seconds: 3600, what: 'invitations' },
  inviteEmail: {
    name: 'invite-email',
    hits: 10,
    seconds: 24 * 3600,
    what: 'invitations to this address',
  },
  logo: { name: 'logo', hits: 20, seconds: 3600, what: 'uploads of a logo' },
  badKey: { name: 'bad-key', hits: 60, seconds: 900, what: 'requests with an unknown key' },
  evaluatePerson: { name: 'evaluate-person', hits: 600, seconds: 60, what: 'evaluations' },
  evaluateKey: { name: 'evaluate-key', hits: 300, seconds: 60, what: 'evaluations with this key' },
  tryAddress: { name: 'try-address', hits: 60, seconds: 60, what: 'tries from this address' },
  tryAll: { name: 'try-all', hits: 600, seconds: 60, what: 'tries by all visitors together' },
  comment: { name: 'comment', hits: 120, seconds: 600, what: 'comments' },
  linkPassphrase: {
    name: 'link-passphrase',
    hits: 60,
    seconds: 900,
    what: 'passphrases tried for this link',
  },
  linkPassphraseAddress: {
    name: 'link-passphrase-address',
    hits: 8,
    seconds: 900,
    what: 'passphrases tried for this link from this address',
  },
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
 * before the work it guards, so that many requests at once cannot all pass the check. Of the window
 * before, the share counts that still lies within one window's length, so that no seam between two
 * windows lets twice the number through.
 * @throws Failure `too-many`, with the seconds to wait
 */
export async function countAgainst(limit: Limit, subject: string): Promise<Hit> {
  const db = database();
  const span = limit.seconds * 1000;
  const now = Date.now();
  const elapsed = now % span;
  const windowStart = new Date(now - elapsed);
  const hit = { bucket: bucketOf(limit, subject), windowStart };
  const hits = await countHit(db, hit.bucket, windowStart);
  if (hits === 1) await pruneHits(db, new Date(now - KEEP_MS));
  const before = await findHits(db, hit.bucket, new Date(windowStart.getTime() - span));
  if (hits + Math.ceil(before * (1 - elapsed / span)) > limit.hits) {
    throw tooMany(limit, secondsToWait(limit, hits, before, elapsed));
  }
  return hit;
}

/** How long until the next hit passes, if nothing else happens meanwhile. */
function secondsToWait(limit: Limit, hits: number, before: number, elapsed: number): number {
  const span = limit.seconds * 1000;
  /** The moment in a window at which this many hits of the window before leave room for `free`. */
  const fadedTo = (free: number, earlier: number) => span * Math.max(0, 1 - free / earlier);
  const wait =
    hits < limit.hits
      ? fadedTo(limit.hits - hits - 1, before) - elapsed
      : span - elapsed + fadedTo(limit.hits - 1, hits);
  return Math.max(1, Math.ceil(wait / 1000));
}

function tooMany(limit: Limit, retryAfter: number): Failure {
  return new Failure(
    'too-many',
    `Too many ${limit.what}: ${limit.hits} are allowed in ${inWords(limit.seconds)}. ` +
      `Try again in ${inWords(retryAfter)}.`,
    { retryAfter },
  );
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
  if (seconds < 120) return seconds === 1 ? '1 second' : `${seconds} seconds`;
  return `${Math.ceil(seconds / 60)} minutes`;
}
