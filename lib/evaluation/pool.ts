import { availableParallelism } from 'node:os';
import { EvaluationChild, bundlePath } from './child-process';
import { EVALUATION_LIMITS } from './limits';

/** Too many requests are waiting; the caller may try again later. */
export class PoolBusy extends Error {
  constructor() {
    super(`More than ${EVALUATION_LIMITS.waiting} evaluations are waiting; try again in a moment.`);
    this.name = 'PoolBusy';
  }
}

/**
 * Warm children, one more than may work at once, so that a killed one is replaced without waiting for a start.
 * Whoever takes a child gives it back: to rest when it is well, and to be replaced when it is not.
 */
export class Pool {
  private readonly idle: EvaluationChild[] = [];
  private readonly all = new Set<EvaluationChild>();
  private readonly waiting: { resolve: () => void; reject: (reason: Error) => void }[] = [];
  private working = 0;
  private closed = false;

  constructor(
    private readonly parallel = Math.max(2, Math.min(4, availableParallelism())),
    private readonly program = bundlePath(),
  ) {}

  /** Waits for a turn; at most `parallel` requests work at once. */
  async enter(): Promise<void> {
    if (this.closed) throw new Error('The pool of evaluations is closed.');
    if (this.working < this.parallel) {
      this.working += 1;
      this.refill();
      return;
    }
    if (this.waiting.length >= EVALUATION_LIMITS.waiting) throw new PoolBusy();
    await new Promise<void>((resolve, reject) => this.waiting.push({ resolve, reject }));
  }

  leave(): void {
    const next = this.waiting.shift();
    if (next === undefined) this.working -= 1;
    else next.resolve();
  }

  take(): EvaluationChild {
    const child = this.idle.shift() ?? this.spawn();
    this.refill();
    return child;
  }

  /** Takes a child back after its work. A dead, killed or much used one is replaced. */
  give(child: EvaluationChild): void {
    child.rest();
    if (
      !this.closed &&
      child.alive &&
      child.processorTime < EVALUATION_LIMITS.retireProcessorTime
    ) {
      this.idle.push(child);
    } else {
      this.discard(child);
    }
  }

  discard(child: EvaluationChild): void {
    child.kill();
    this.all.delete(child);
    if (!this.closed) this.refill();
  }

  async close(): Promise<void> {
    this.closed = true;
    for (const { reject } of this.waiting.splice(0))
      reject(new Error('The pool of evaluations is closed.'));
    const children = [...this.all];
    for (const child of children) child.kill();
    await Promise.all(children.map((child) => child.ended));
  }

  private spawn(): EvaluationChild {
    const child = new EvaluationChild(this.program);
    this.all.add(child);
    void child.ended.then(() => {
      this.all.delete(child);
      const place = this.idle.indexOf(child);
      if (place !== -1) this.idle.splice(place, 1);
    });
    return child;
  }

  private refill(): void {
    while (this.all.size < this.parallel + 1) this.idle.push(this.spawn());
  }
}
