import { randomUUID } from 'node:crypto';
import { Failure } from '@/lib/access';
import { finish } from './answer';
import { SMALL_BODY } from './body';
import { logFault } from './faults';
import { faultResponse, problemResponse } from './problem';

/**
 * Runs the work of one request: a failure becomes a problem document; whatever else is thrown is
 * logged under the request's number and answered without a word of its cause.
 */
export async function answered(request: Request, work: () => Promise<Response>): Promise<Response> {
  const requestId = randomUUID();
  try {
    return finish(await work(), requestId);
  } catch (error) {
    if (error instanceof Failure) return finish(problemResponse(error, requestId), requestId);
    logFault(error, request, requestId);
    return finish(faultResponse(requestId), requestId);
  }
}

/** Wraps a handler that reads and answers by itself; the size of the body is bounded before. */
export function guarded<C>(
  handler: (request: Request, context: C) => Promise<Response>,
): (request: Request, context: C) => Promise<Response> {
  return (request, context) =>
    answered(request, () => {
      const length = request.headers.get('content-length');
      const unbounded = request.body !== null && length === null;
      if (unbounded || Number(length ?? 0) > SMALL_BODY) {
        const met = unbounded ? 'a body of unknown length' : `${length} bytes`;
        throw new Failure(
          'too-large',
          `The request has ${met}; at most ${SMALL_BODY} are allowed.`,
        );
      }
      return handler(request, context);
    });
}
