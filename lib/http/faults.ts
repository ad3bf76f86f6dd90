/**
 * Writes a fault to the log: one JSON line with the request's number. Messages of the database are
 * left out, because they quote the values of the failed statement; so are the tokens of client links and invitations.
 */
export function logFault(error: unknown, request: Request, requestId: string): void {
  const path = new URL(request.url).pathname.replace(/(\/(?:client|invitations)\/)[^/]+/, '$1…');
  console.error(
    JSON.stringify({ fault: describe(error), requestId, method: request.method, path }),
  );
}

function describe(error: unknown): { message: string; stack: string[] } {
  if (!(error instanceof Error)) return { message: typeof error, stack: [] };
  const number = 'errno' in error && 'sql' in error ? Number(error.errno) : null;
  const message = number === null ? `${error.name}: ${error.message}` : `database error ${number}`;
  const stack = (error.stack ?? '').split('\n').filter((line) => /^\s+at /.test(line));
  return { message, stack: stack.slice(0, 12).map((line) => line.trim()) };
}
