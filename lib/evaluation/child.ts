import './compile-late';
import { writeSync } from 'node:fs';
import { certifyLine, evaluateCells } from '@/lib/language/index';
import { KnownValues } from './known-values';
import { EVALUATION_LIMITS } from './limits';
import type { CertifyJob, Job, Refusal, Report, SentReport } from './messages';
import { proposeSolutions } from './propose';
import { runJob } from './run-job';

/**
 * The program of a child process: takes one job after another and reports line by line.
 * Reports go out by a blocking write, so that a report stands even if the next line never ends or ends the process.
 */
function report(message: Report): void {
  const { user, system } = process.cpuUsage();
  const sent: SentReport = { ...message, spent: (user + system) / 1e3 };
  const bytes = Buffer.from(`${JSON.stringify(sent)}\n`);
  for (let written = 0; written < bytes.length;) written += writeSync(1, bytes, written);
}

const known = new KnownValues(EVALUATION_LIMITS.childValues);

function run(job: Job): void {
  try {
    const values = job.keep ? known : new KnownValues(EVALUATION_LIMITS.childValues);
    runJob(job, values, report, proposeSolutions);
    report({ kind: 'done', job: job.job });
  } catch (error) {
    report({
      kind: 'fault',
      job: job.job,
      refusal: refusalOf(error),
      detail: error instanceof Error ? (error.stack ?? error.message) : String(error),
    });
  }
}

/** The run time's own limits (stack, length of an array or integer) speak through a RangeError. */
function refusalOf(error: unknown): Refusal {
  if (error instanceof RangeError) {
    return {
      code: 'limit-size',
      message:
        'A value in this line grew beyond what the program can hold; a smaller one was expected.',
    };
  }
  return {
    code: 'fault',
    message: 'This line met a mistake in the program; the line itself may be right.',
  };
}

function certify({ job, certify: line, cells, settings }: CertifyJob): void {
  try {
    report({ kind: 'certified', job, answer: certifyLine(cells, line, settings) });
  } catch (error) {
    report({ kind: 'fault', job, refusal: refusalOf(error), detail: String(error) });
  }
}

process.on('message', (message) => {
  const job = message as Job | CertifyJob;
  if ('certify' in job) certify(job);
  else run(job);
});

/** Has been compiled and has its tables when the first job comes, so that the job's time is the job's. */
function warmUp(): void {
  const source = 'a = sqrt(5 + 2 sqrt(6)) mm\nb = chord(a, turn/17)\nb < a\nc = 2 pi a\nd = (a + ';
  evaluateCells([{ id: 'warm-up', source }], { step: '0.5 mm' });
}

warmUp();
report({ kind: 'ready', job: 0 });
process.on('disconnect', () => process.exit(0));
