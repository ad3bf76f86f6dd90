import { type Result, keyOf } from '@/lib/language/index';
import type { Ending, EvaluationChild } from './child-process';
import { EVALUATION_LIMITS } from './limits';
import type { Job, Refusal, Report } from './messages';
import type { Pool } from './pool';

/** What is asked of a run: the cells, or the one expression, as the language takes them. */
export type Work = Pick<Job, 'expression' | 'cells' | 'settings'>;

export interface Finished {
  /** Results by `keyOf` their place. */
  readonly results: ReadonlyMap<string, Result>;
  /** The result of an expression. */
  readonly expression: Result | null;
  /** Whether time or memory stopped a line; such answers may come out otherwise another time. */
  readonly stopped: boolean;
  /** For the log: what the program said of its own mistakes. */
  readonly faults: readonly string[];
}

type Attempt =
  | { readonly kind: 'done'; readonly expression: Result | null }
  | {
      readonly kind: 'refused';
      readonly line: string | null;
      readonly refusal: Refusal;
      readonly detail: string | null;
    };

/**
 * Evaluates within the time of a request. Reports come line by line; when a child is stopped, or ends, the line in hand
 * is refused with the reason and the rest is evaluated again by a fresh child, results that are already there being
 * kept. One line gets half of the time that is left at most, so that several bad lines leave something for the others.
 */
export async function runWork(
  pool: Pool,
  work: Work,
  now: () => number = () => performance.now(),
): Promise<Finished> {
  const end = now() + EVALUATION_LIMITS.requestTime;
  const results = new Map<string, Result>();
  const refused = new Map<string, Refusal>();
  const faults: string[] = [];
  for (;;) {
    const attempt = await tryOnce(pool, work, results, refused, end, now);
    if (attempt.kind === 'done')
      return { results, expression: attempt.expression, stopped: refused.size > 0, faults };
    if (attempt.detail !== null) faults.push(attempt.detail);
    if (attempt.line === null || refused.has(attempt.line) || now() >= end) {
      return { results, expression: null, stopped: true, faults };
    }
    results.delete(attempt.line);
    refused.set(attempt.line, attempt.refusal);
  }
}

let jobs = 0;

async function tryOnce(
  pool: Pool,
  work: Work,
  results: Map<string, Result>,
  refused: ReadonlyMap<string, Refusal>,
  end: number,
  now: () => number,
): Promise<Attempt> {
  const child = pool.take();
  const watch = new Watch(child, end, now);
  jobs += 1;
  const attempt = await new Promise<Attempt>((resolve) => {
    const settle = (outcome: Attempt): void => {
      watch.stop();
      resolve(outcome);
    };
    watch.start((refusal) => settle({ kind: 'refused', line: watch.line, refusal, detail: null }));
    child.start({ job: jobs, ...work, known: [...results], refused: [...refused] }, (report) => {
      take(report, watch, results);
      if (report.kind === 'done') settle({ kind: 'done', expression: report.result });
      if (report.kind === 'fault')
        settle({
          kind: 'refused',
          line: watch.line,
          refusal: report.refusal,
          detail: report.detail,
        });
    });
  });
  if (attempt.kind === 'done') pool.give(child);
  else pool.discard(child);
  return attempt;
}

function take(report: Report, watch: Watch, results: Map<string, Result>): void {
  if (report.kind === 'started') watch.begin(keyOf(report));
  if (report.kind === 'finished') {
    results.set(keyOf(report), report.result);
    watch.begin(null);
  }
}

/** Watches the clock and the child while a job runs, and knows which line is in hand. */
class Watch {
  line: string | null = null;
  private timer: NodeJS.Timeout | undefined;
  private refuse: ((refusal: Refusal) => void) | null = null;
  private allowed = 0;

  constructor(
    private readonly child: EvaluationChild,
    private readonly end: number,
    private readonly now: () => number,
  ) {}

  start(refuse: (refusal: Refusal) => void): void {
    this.refuse = refuse;
    void this.child.ended.then((ending) => this.refuse?.(refusalOf(ending, this.allowed)));
    this.begin(null);
  }

  /** A line starts, or the time between two lines does. */
  begin(line: string | null): void {
    this.line = line;
    clearTimeout(this.timer);
    const left = Math.max(0, this.end - this.now());
    this.allowed = Math.ceil(line === null ? left : Math.min(EVALUATION_LIMITS.lineTime, left / 2));
    this.timer = setTimeout(() => this.refuse?.(refusalOf('stopped', this.allowed)), this.allowed);
  }

  stop(): void {
    clearTimeout(this.timer);
    this.refuse = null;
  }
}

function refusalOf(ending: Ending, allowed: number): Refusal {
  switch (ending) {
    case 'memory':
      return {
        code: 'limit-memory',
        message: `The exact value of this line needs more than ${EVALUATION_LIMITS.childHeap} megabytes of memory, which is the limit.`,
      };
    case 'stopped':
    case 'processor-time':
      return {
        code: 'limit-time',
        message: `The exact value of this line took more than ${allowed} milliseconds, which was the limit for it.`,
      };
    case 'crash':
      return {
        code: 'fault',
        message:
          'The evaluation of this line ended without an answer through a mistake in the program.',
      };
  }
}
