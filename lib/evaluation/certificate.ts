import { z } from 'zod';
import type { Certified } from '@/lib/language/index';
import type { Ending } from './child-process';
import { EVALUATION_LIMITS } from './limits';
import type { CertifyJob } from './messages';
import type { Pool } from './pool';
import { EvaluateRequest } from './request';

/** Cells that share marks, and the line among them whose value is to be certified. */
export const CertificateRequest = z
  .strictObject({
    cells: EvaluateRequest.shape.cells.unwrap(),
    settings: EvaluateRequest.shape.settings,
    at: z.strictObject({
      cell: z.string().max(200),
      line: z.int().min(1, { error: 'Lines are counted from 1.' }),
    }),
  })
  .superRefine(({ cells }, context) => {
    const total = cells.reduce((sum, cell) => sum + cell.source.length, 0);
    if (total <= EVALUATION_LIMITS.totalLength) return;
    const message = `The cells have ${total} characters together; the limit is ${EVALUATION_LIMITS.totalLength}.`;
    context.addIssue({ code: 'custom', path: ['cells'], message });
  });
export type CertificateRequest = z.infer<typeof CertificateRequest>;

export type CertificateAnswer = { schema: 1; engine: string } & Certified;

let jobs = 0;

/** Asks one child of the pool, whose turn the caller holds. A child that takes too long is ended. */
export async function runCertificate(
  pool: Pool,
  { cells, settings = {}, at }: CertificateRequest,
): Promise<Certified> {
  jobs -= 1;
  const job: CertifyJob = { job: jobs, certify: at, cells, settings };
  const child = pool.take();
  await child.prepare();
  let timer: NodeJS.Timeout | undefined;
  const answer = await new Promise<Certified | null>((resolve) => {
    timer = setTimeout(() => resolve(null), EVALUATION_LIMITS.requestTime);
    void child.ended.then((ending) => resolve(explain(ending)));
    child.start(job, (report) => {
      if (report.kind === 'certified') resolve(report.answer);
      if (report.kind === 'fault') resolve({ kind: 'none', ...report.refusal });
    });
  });
  clearTimeout(timer);
  if (answer === null) pool.discard(child);
  else pool.give(child);
  return answer ?? explain('stopped');
}

function explain(ending: Ending): Certified {
  switch (ending) {
    case 'memory':
      return {
        kind: 'none',
        code: 'limit-memory',
        message: 'The certificate of this line needs more memory than an evaluation may use.',
      };
    case 'crash':
      return {
        kind: 'none',
        code: 'fault',
        message: 'The certificate was not made because of a mistake in the program.',
      };
    case 'stopped':
    case 'processor-time':
      return {
        kind: 'none',
        code: 'limit-time',
        message: `The certificate took more than ${EVALUATION_LIMITS.requestTime} milliseconds, which is the limit for it.`,
      };
  }
}
