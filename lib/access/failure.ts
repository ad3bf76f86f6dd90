/**
 * Every way in which a service declines what it was asked, as one closed list of codes.
 * `lib/http/problem.ts` holds the only table from code to HTTP status.
 */
export const FAILURE_CODES = [
  'sign-in-needed',
  'bad-credentials',
  'unconfirmed',
  'bad-key',
  'forbidden',
  'not-found',
  'invalid',
  'unreadable',
  'wrong-type',
  'too-large',
  'foreign-origin',
  'method-not-allowed',
  'still-needed',
  'stale-version',
  'archived',
  'resolved',
  'last-owner',
  'last-admin',
  'successor-needed',
  'link-over',
  'other-address',
  'unknown-email',
  'already-added',
  'too-many',
  'limit-reached',
  'busy',
  'check-needed',
  'faulty-lines',
  'not-settled',
  'nothing-issued',
  'link-expired',
  'passphrase-needed',
] as const;

export type FailureCode = (typeof FAILURE_CODES)[number];

/** One field of the request that was not as expected: its path and a plain sentence about it. */
export interface FieldFault {
  field: string;
  message: string;
}

/** What may accompany a failure; it reaches the asking person, so nothing secret goes in. */
export interface FailureExtra {
  fields?: FieldFault[];
  head?: unknown;
  /** Notebooks that stand in the way of what was asked. */
  notebooks?: readonly { id: string; title: string }[];
  conflicts?: unknown;
  retryAfter?: number;
}

/**
 * A request that a service declines, for a reason the asking person may read.
 * `message` is one plain sentence: what was met and what was expected. Anything else that is
 * thrown is a fault of ours and is masked before it leaves the server.
 */
export class Failure extends Error {
  override readonly name = 'Failure';

  constructor(
    readonly code: FailureCode,
    message: string,
    readonly extra: FailureExtra = {},
  ) {
    super(message);
  }
}
