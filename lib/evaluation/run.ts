import { type Result, keyOf } from '@/lib/language/index';
import type { Ending, EvaluationChild } from './child-process';
import { EVALUATION_LIMITS, type EvaluationLimits } from './limits';
import type { Job, Refusal, Report } from './messages';
import type { Pool } from './pool';

/** What is asked of a run: the cells, or the one expression, as the language takes them. */
export type Work = Pick<Job, 'expression' | 'cells' | 'settings'>;

export interface Finished {
  /** Results by `keyOf` their place. */
  readonly results: ReadonlyMap<string, Result>;
  /** Why lines were stopped, by `keyOf` their place; those with a result have it from there. */
  readonly refused: ReadonlyMap<string, Refusal>;
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
      /** Whether the line had its value already. */
      readonly valued: boolean;
      readonly refusal: Refusal;
      readonly detail: string | null;
    };

/** What is known so far, from all attempts. */
class Progress {
  readonly results = new Map<string, Result>();
  readonly refused = new Map<string, Refusal>();
  readonly brief = new Map<string, Refusal>();
  readonly faults: string[] = [];

  /** Takes in how an attempt was stopped; false when that teaches nothing that another attempt could use. */
  learn({ line, valued, refusal, detail }: Extract<Attempt, { kind: 'refused' }>): boolean {
    if (detail !== null) this.faults.push(detail);
    if (line === null || this.refused.has(line)) return false;
    if (valued && !this.brief.has(line)) {
      this.brief.set(line, refusal);
    } else {
      this.results.delete(line);
      this.refused.set(line, refusal);
    }
    return true;
  }

  finished(expression: Result | null, complete: boolean): Finished {
    const stopped = !complete || this.refused.size > 0 || this.brief.size > 0;
    const { results, refused, faults } = this;
    return { results, refused, expression, stopped, faults };
  }
}

/**
 * Evaluates within the time of a request. Reports come line by line; when a child is stopped, or ends, the line in hand
 * is refused with the reason and the rest is evaluated again by a fresh child, results that are already there being
 * kept. A line that had its value keeps it, and only its degree, polynomial and tower are left out. One line gets half
 * of the time that is left at most, so that several bad lines leave something for the others.
 */
export async function runWork(
  pool: Pool,
  work: Work,
  limits: EvaluationLimits = EVALUATION_LIMITS,
): Promise<Finished> {
  let end = performance.now() + limits.requestTime;
  const progress = new Progress();
  for (;;) {
    const child = pool.take();
    // A child is warm as a rule; the time of one that still starts is not the request's.
    const before = performance.now();
    await child.prepare();
    end += performance.now() - before;
    const attempt = await tryOnce(child, work, progress, end, limits);
    if (attempt.kind === 'done') pool.give(child);
    else pool.discard(child);
    if (attempt.kind === 'done') return progress.finished(attempt.expression, true);
    if (!progress.learn(attempt) || performance.now() >= end) return progress.finished(null, false);
  }
}

let jobs = 0;

function tryOnce(
  child: EvaluationChild,
  work: Work,
  progress: Progress,
  end: number,
  limits: EvaluationLimits,
): Promise<Attempt> {
  const watch = new Watch(child, end, limits);
  jobs += 1;
  const job = {
    job: jobs,
    ...work,
    known: [...progress.results],
    refused: [...progress.refused],
    brief: [...progress.brief],
  };
  return new Promise<Attempt>((resolve) => {
    const settle = (outcome: Attempt): void => {
      watch.stop();
      resolve(outcome);
    };
    const refuse = (refusal: Refusal, detail: string | null): void =>
      settle({ kind: 'refused', line: watch.line, valued: watch.valued, refusal, detail });
    watch.start((refusal) => refuse(refusal, null));
    child.start(job, (report) => {
      take(report, watch, progress.results);
      if (report.kind === 'done') settle({ kind: 'done', expression: report.result });
      if (report.kind === 'fault') refuse(report.refusal, report.detail);
    });
  });
}

function take(report: Report, watch: Watch, results: Map<string, Result>): void {
  if (report.kind === 'started') watch.begin(keyOf(report));
  if (report.kind === 'valued') watch.begin(keyOf(report), true);
  if (report.kind === 'finished') {
    results.set(keyOf(report), report.result);
    watch.begin(null);
  }
}

/** With fewer milliseconds left of the request, no line waits for a processor any longer. */
const LEAST_WAIT = 400;

/** Watches the clock and the child while a job runs, and knows which line is in hand. */
class Watch {
  line: string | null = null;
  valued = false;
  private timer: NodeJS.Timeout | undefined;
  private memoryTimer: NodeJS.Timeout | undefined;
  private refuse: ((refusal: Refusal) => void) | null = null;
  private allowed = 0;
  private spentBefore: number | null = null;

  constructor(
    private readonly child: EvaluationChild,
    private readonly end: number,
    private readonly limits: EvaluationLimits,
  ) {}

  start(refuse: (refusal: Refusal) => void): void {
    this.refuse = refuse;
    void this.child.ended.then((ending) => this.refuse?.(this.refusal(ending)));
    this.memoryTimer = setInterval(() => {
      const met = this.child.residentMemory();
      if (met !== null && met > this.limits.childMemory) this.refuse?.(this.refusal('memory'));
    }, this.limits.memoryWatch);
    this.begin(null);
  }

  /** A line starts, or its second part after it has its value, or the time between two lines. */
  begin(line: string | null, valued = false): void {
    this.line = line;
    this.valued = valued;
    const left = this.left();
    this.allowed = Math.ceil(line === null ? left : Math.min(this.limits.lineTime, left / 2));
    this.spentBefore = this.child.processorMilliseconds();
    this.wait(this.allowed);
  }

  private left(): number {
    return Math.max(0, this.end - performance.now());
  }

  private wait(milliseconds: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      const missing = this.missingTime();
      if (missing > 0) this.wait(missing);
      else this.refuse?.(this.refusal('stopped'));
    }, milliseconds);
  }

  /** On a busy machine a line may wait for a processor: what it has not had yet it gets, while the request lasts. */
  private missingTime(): number {
    const spent = this.child.processorMilliseconds();
    if (spent === null || this.spentBefore === null) return 0;
    const missing = this.allowed - (spent - this.spentBefore);
    return missing < this.allowed / 4 || this.left() < LEAST_WAIT
      ? 0
      : Math.min(missing, this.left() / 2);
  }

  private refusal(ending: Ending): Refusal {
    return refusalOf(
      ending,
      this.limits,
      this.allowed,
      this.valued ? 'The degree of this value' : 'The exact value of this line',
    );
  }

  stop(): void {
    clearTimeout(this.timer);
    clearInterval(this.memoryTimer);
    this.refuse = null;
  }
}

/** `what` begins the sentence. */
function refusalOf(
  ending: Ending,
  limits: EvaluationLimits,
  allowed: number,
  what: string,
): Refusal {
  switch (ending) {
    case 'memory':
      return {
        code: 'limit-memory',
        message: `${what} needs more than ${limits.childMemory} megabytes of memory, which is the limit.`,
      };
    case 'stopped':
    case 'processor-time':
      return {
        code: 'limit-time',
        message: `${what} took more than ${allowed} milliseconds, which was the limit for it.`,
      };
    case 'crash':
      return {
        code: 'fault',
        message:
          'The evaluation of this line ended without an answer through a mistake in the program.',
      };
  }
}
