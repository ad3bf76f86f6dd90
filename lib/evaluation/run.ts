import type { Outcome, Settings } from '@/lib/language/index';
import type { EvaluationChild } from './child-process';
import { EVALUATION_LIMITS, type EvaluationLimits } from './limits';
import type { Job, Refusal, Report, Task } from './messages';
import type { Pool } from './pool';
import { Watch } from './watch';

/** What is asked of a run: lines, each after those that it reads. Lines without settings are wanted only for others. */
export interface Work {
  readonly tasks: readonly Task[];
  readonly settings: readonly Settings[];
  /** Whether the children may keep values for later. */
  readonly keep: boolean;
}

/** What became of a task, by its position in the work. */
export type Fate =
  | { readonly kind: 'outcome'; readonly outcome: Outcome; readonly lasting: boolean }
  | { readonly kind: 'refused'; readonly refusal: Refusal };

export interface Finished {
  /** A task that was not come to has no fate. */
  readonly fates: ReadonlyMap<number, Fate>;
  /** For the log: what the program said of its own mistakes. */
  readonly faults: readonly string[];
}

type Attempt =
  | { readonly kind: 'done' }
  | {
      readonly kind: 'refused';
      /** The task in hand, by its position in the work; null between two tasks. */
      readonly task: number | null;
      /** Whether it had its value already. */
      readonly valued: boolean;
      readonly refusal: Refusal;
      readonly detail: string | null;
    };

/** What is known so far, from all attempts of all children. */
class Progress {
  readonly fates = new Map<number, Fate>();
  readonly refused = new Map<string, Refusal>();
  readonly brief = new Map<number, Refusal>();
  readonly faults: string[] = [];

  constructor(private readonly work: Work) {}

  /** Takes in how an attempt was stopped; false when that teaches nothing that another attempt could use. */
  learn({ task, valued, refusal, detail }: Extract<Attempt, { kind: 'refused' }>): boolean {
    if (detail !== null) this.faults.push(detail);
    const name = task === null ? undefined : this.work.tasks[task]?.value;
    if (task === null || name === undefined) return false;
    if (valued && !this.brief.has(task)) {
      this.brief.set(task, refusal);
    } else {
      this.refused.set(name, refusal);
    }
    return true;
  }
}

/**
 * Evaluates within the time of a request. Reports come line by line; when a child is stopped, or ends, the line in hand
 * is refused with the reason and the rest is evaluated again by a fresh child, outcomes that are already there being
 * kept. A line that had its value keeps it, and only its degree, polynomial and tower are left out. One line gets half
 * of the time that is left at most, so that several bad lines leave something for the others. A large work is cut into
 * pieces, and a second child takes pieces from the same pile as long as one is free.
 */
export async function runWork(
  pool: Pool,
  work: Work,
  limits: EvaluationLimits = EVALUATION_LIMITS,
): Promise<Finished> {
  const progress = new Progress(work);
  const pieces = cutIntoPieces(work, limits.linesPerJob);
  const lines = pieces.reduce((sum, piece) => sum + piece.length, 0);
  const time = Math.min(
    limits.requestTime + lines * limits.requestTimePerLine,
    limits.longestRequestTime,
  );
  const clock = { end: performance.now() + Math.max(time, limits.requestTime) };
  const worker = () => takePieces(pool, work, pieces, progress, clock, limits);
  const workers = [worker()];
  for (let more = 1; more < pieces.length + 1 && pool.enterIfFree(); more += 1)
    workers.push(worker().finally(() => pool.leave()));
  await Promise.all(workers);
  for (const [index, { value }] of work.tasks.entries()) {
    const refusal = progress.refused.get(value);
    if (refusal !== undefined && !progress.fates.has(index))
      progress.fates.set(index, { kind: 'refused', refusal });
  }
  return { fates: progress.fates, faults: progress.faults };
}

/** Positions of the tasks that are wanted for themselves, in pieces of at most `most`. */
function cutIntoPieces({ tasks }: Work, most: number): number[][] {
  const wanted = tasks.flatMap(({ settings }, index) => (settings === null ? [] : [index]));
  const pieces: number[][] = [];
  for (let from = 0; from < wanted.length; from += most)
    pieces.push(wanted.slice(from, from + most));
  return pieces;
}

async function takePieces(
  pool: Pool,
  work: Work,
  pieces: number[][],
  progress: Progress,
  clock: { end: number },
  limits: EvaluationLimits,
): Promise<void> {
  for (let piece = pieces.shift(); piece !== undefined; piece = pieces.shift()) {
    for (;;) {
      const { job, places } = jobOf(work, piece, progress);
      const child = pool.take(job.tasks.flatMap(({ reads }) => reads.map(([, value]) => value)));
      // A child is warm as a rule; the time of one that still starts is not the request's.
      const before = performance.now();
      await child.prepare();
      clock.end += performance.now() - before;
      const attempt = await tryOnce(child, job, places, progress, clock.end, limits);
      if (attempt.kind === 'done') {
        if (work.keep) child.remember(job.tasks.map(({ value }) => value));
        pool.give(child);
        break;
      }
      pool.discard(child);
      if (!progress.learn(attempt) || performance.now() >= clock.end) return;
    }
  }
}

let jobs = 0;

/** The tasks of a piece that have no fate yet and all that they read, with their positions in the work. */
function jobOf(
  work: Work,
  piece: readonly number[],
  progress: Progress,
): { job: Job; places: readonly number[] } {
  const wanted = new Set(piece.filter((index) => !progress.fates.has(index)));
  const values = new Set<string>();
  const chosen: [number, Task][] = [];
  for (let index = work.tasks.length - 1; index >= 0; index -= 1) {
    const task = work.tasks[index];
    if (task === undefined || !(wanted.has(index) || values.has(task.value))) continue;
    // One line may be there several times; the first that gives the value is enough for those that read it.
    chosen.push([index, wanted.has(index) ? task : { ...task, settings: null }]);
    for (const [, value] of task.reads) if (value !== null) values.add(value);
  }
  chosen.reverse();
  const places = chosen.map(([index]) => index);
  jobs += 1;
  const job = {
    job: jobs,
    tasks: chosen.map(([, task]) => task),
    settings: work.settings,
    keep: work.keep,
    refused: [...progress.refused],
    brief: places.flatMap((place, index) => {
      const refusal = progress.brief.get(place);
      return refusal === undefined ? [] : [[index, refusal] as const];
    }),
  };
  return { job, places };
}

function tryOnce(
  child: EvaluationChild,
  job: Job,
  places: readonly number[],
  progress: Progress,
  end: number,
  limits: EvaluationLimits,
): Promise<Attempt> {
  const watch = new Watch(child, end, limits);
  return new Promise<Attempt>((resolve) => {
    const settle = (outcome: Attempt): void => {
      watch.stop();
      resolve(outcome);
    };
    const refuse = (refusal: Refusal, detail: string | null): void => {
      const task = watch.task === null ? null : (places[watch.task] ?? null);
      settle({ kind: 'refused', task, valued: watch.valued, refusal, detail });
    };
    watch.start((refusal) => refuse(refusal, null));
    child.start(job, (report) => {
      take(report, watch, places, progress);
      if (report.kind === 'done') settle({ kind: 'done' });
      if (report.kind === 'fault') refuse(report.refusal, report.detail);
    });
  });
}

function take(report: Report, watch: Watch, places: readonly number[], { fates }: Progress): void {
  if (report.kind === 'started') watch.begin(report.task);
  if (report.kind === 'valued') watch.begin(report.task, true);
  if (report.kind === 'finished') {
    const { outcome, lasting, task } = report;
    const place = places[task];
    if (place !== undefined) fates.set(place, { kind: 'outcome', outcome, lasting });
    watch.begin(null);
  }
}
