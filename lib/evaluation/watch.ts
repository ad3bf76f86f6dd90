import type { Ending, EvaluationChild } from './child-process';
import type { EvaluationLimits } from './limits';
import type { Refusal } from './messages';

/** With fewer milliseconds left of the request, no line waits for a processor any longer. */
const LEAST_WAIT = 400;

/** Watches the clock and the child while a job runs, and knows which task is in hand. */
export class Watch {
  /** Position of the task in the job. */
  task: number | null = null;
  valued = false;
  private timer: NodeJS.Timeout | undefined;
  private memoryTimer: NodeJS.Timeout | undefined;
  private refuse: ((refusal: Refusal) => void) | null = null;
  private allowed = 0;
  private spentBefore = 0;

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

  /** As the child has just reported, a line starts, or its second part after it has its value, or the time between two lines. */
  begin(task: number | null, valued = false): void {
    this.task = task;
    this.valued = valued;
    const left = this.left();
    this.allowed = Math.ceil(task === null ? left : Math.min(this.limits.lineTime, left / 2));
    this.spentBefore = this.child.spent;
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
    if (spent === null) return 0;
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
