import type { Failure, FailureCode } from '@/lib/access';

/** The only table from a service's failure code to HTTP: the status, and the problem's title. */
export const PROBLEMS: Readonly<Record<FailureCode | 'fault', { status: number; title: string }>> =
  {
    'sign-in-needed': { status: 401, title: 'Sign-in needed' },
    'bad-credentials': { status: 401, title: 'Wrong e-mail address or password' },
    unconfirmed: { status: 403, title: 'E-mail address not confirmed' },
    'bad-key': { status: 401, title: 'Key not accepted' },
    forbidden: { status: 403, title: 'Not allowed' },
    'foreign-origin': { status: 403, title: 'Request from another site' },
    'not-found': { status: 404, title: 'Not found' },
    'method-not-allowed': { status: 405, title: 'Method not allowed' },
    'still-needed': { status: 409, title: 'Still needed by others' },
    'already-added': { status: 409, title: 'Already added' },
    'stale-version': { status: 409, title: 'Saved meanwhile by somebody else' },
    resolved: { status: 409, title: 'Thread resolved' },
    archived: { status: 409, title: 'Notebook archived' },
    'last-owner': { status: 409, title: 'Last owner' },
    'last-admin': { status: 409, title: 'Last admin' },
    'successor-needed': { status: 409, title: 'Successor needed' },
    'link-over': { status: 410, title: 'Link not valid any more' },
    'other-address': { status: 403, title: 'Meant for another address' },
    'limit-reached': { status: 409, title: 'Limit reached' },
    'too-large': { status: 413, title: 'Request too large' },
    'wrong-type': { status: 415, title: 'Content type not accepted' },
    unreadable: { status: 400, title: 'Request not readable' },
    invalid: { status: 422, title: 'Request not valid' },
    'unknown-email': { status: 422, title: 'No such account' },
    'too-many': { status: 429, title: 'Too many requests' },
    'check-needed': { status: 409, title: 'Check needed' },
    'faulty-lines': { status: 409, title: 'Lines with faults' },
    'not-settled': { status: 503, title: 'Not worked out in time' },
    'nothing-issued': { status: 404, title: 'Nothing issued yet' },
    'link-expired': { status: 410, title: 'Link expired' },
    'passphrase-needed': { status: 401, title: 'Passphrase needed' },
    busy: { status: 503, title: 'Busy' },
    fault: { status: 500, title: 'A fault of ours' },
  };

/**
 * A problem document (RFC 9457). `type` is a tag URI, which names the kind of problem and is not
 * meant to be opened; `code` is its last part, for programs.
 */
export function problemResponse(failure: Failure, requestId: string): Response {
  const { code, message, extra } = failure;
  const headers = new Headers();
  if (extra.retryAfter !== undefined) headers.set('retry-after', String(extra.retryAfter));
  if (code === 'bad-key') headers.set('www-authenticate', 'Bearer');
  return write(code, message, requestId, headers, {
    ...(extra.fields === undefined ? {} : { fields: extra.fields }),
    ...(extra.head === undefined ? {} : { head: extra.head }),
    ...(extra.notebooks === undefined ? {} : { notebooks: extra.notebooks }),
    ...(extra.conflicts === undefined ? {} : { conflicts: extra.conflicts }),
  });
}

/** What leaves the server when something broke: nothing of the cause, only where to look it up. */
export function faultResponse(requestId: string): Response {
  return write(
    'fault',
    `Something went wrong on the server, and the request could not be answered. Its number is ${requestId}.`,
    requestId,
    new Headers(),
    {},
  );
}

function write(
  code: FailureCode | 'fault',
  detail: string,
  requestId: string,
  headers: Headers,
  extra: Record<string, unknown>,
): Response {
  const { status, title } = PROBLEMS[code];
  headers.set('content-type', 'application/problem+json; charset=utf-8');
  headers.set('cache-control', 'no-store');
  const type = `tag:surdwork.example,2026:problem/${code}`;
  const body = JSON.stringify({ type, title, status, detail, code, requestId, ...extra });
  return new Response(body, { status, headers });
}
