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

  /** Takes a turn only when one is free and nobody waits for it. */
  enterIfFree(): boolean {
    if (this.closed || this.working >= this.parallel || this.waiting.length > 0) return false;
    this.working += 1;
    this.refill();
    return true;
  }

  leave(): void {
    const next = this.waiting.shift();
    if (next === undefined) this.working -= 1;
    else next.resolve();
  }

  /** A child for some work; of those that rest, the one that knows most of the values that the work reads. */
  take(values: readonly (string | null)[] = []): EvaluationChild {
    const best = this.idle.reduce<{ child: EvaluationChild; known: number } | null>((so, child) => {
      const known = child.countKnown(values);
      return so === null || known > so.known ? { child, known } : so;
    }, null);
    if (best !== null) this.idle.splice(this.idle.indexOf(best.child), 1);
    const child = best?.child ?? this.spawn();
    this.refill();
    return child;
  }

  /** Takes a child back after its work. A dead, killed or much used one is replaced. */
  give(child: EvaluationChild): void {
    child.rest();
    if (
      !this.closed &&
      child.alive &&
      child.spent < EVALUATION_LIMITS.retireProcessorTime * 1_000
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
