import { createInterface } from 'node:readline';
import { EvaluateRequest, closePool, describeIssues, evaluate } from './index';

/**
 * `npm run -s evaluate`: one request in JSON per line of standard input, one answer per line of standard output, in
 * the same order. Blank lines are no requests. Nothing else is written to standard output.
 */

const IN_FLIGHT = 4;

async function answer(line: string): Promise<unknown> {
  let request: unknown;
  try {
    request = JSON.parse(line);
  } catch (error) {
    const message = `The line is not JSON: ${error instanceof Error ? error.message : 'it cannot be read'}.`;
    return { id: null, problem: { code: 'syntax', message } };
  }
  const id = idOf(request);
  const checked = EvaluateRequest.safeParse(request);
  if (!checked.success)
    return { id, problem: { code: 'bad-request', message: describeIssues(checked.error) } };
  try {
    return await evaluate(checked.data);
  } catch (error) {
    return {
      id,
      problem: { code: 'fault', message: error instanceof Error ? error.message : String(error) },
    };
  }
}

function idOf(request: unknown): string | number | null {
  const id: unknown =
    typeof request === 'object' && request !== null && 'id' in request ? request.id : null;
  return typeof id === 'string' || typeof id === 'number' ? id : null;
}

function write(value: unknown): Promise<void> {
  return new Promise((resolve, reject) => {
    process.stdout.write(`${JSON.stringify(value)}\n`, (error) =>
      error ? reject(error) : resolve(),
    );
  });
}

let written: Promise<void> = Promise.resolve();
const inFlight = new Set<Promise<unknown>>();
for await (const line of createInterface({ input: process.stdin, crlfDelay: Infinity })) {
  if (line.trim() === '') continue;
  const next = answer(line);
  inFlight.add(next);
  void next.finally(() => inFlight.delete(next));
  // Each answer is written as soon as it and all before it are there, whether or not more requests come.
  written = written.then(async () => write(await next));
  if (inFlight.size >= IN_FLIGHT) await Promise.race(inFlight);
}
await written;
await closePool();
