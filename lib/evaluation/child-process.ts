import { type ChildProcess, spawn } from 'node:child_process';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { createInterface } from 'node:readline';
import type { Socket } from 'node:net';
import { EVALUATION_LIMITS } from './limits';
import type { CertifyJob, Job, Report, SentReport } from './messages';

/** The bundle of `child.ts`. The path is made at run time so that a bundler of the application leaves it alone. */
export function bundlePath(): string {
  return path.join(/* turbopackIgnore: true */ process.cwd(), '.build', 'child.mjs');
}

const MOST_REMEMBERED = 20_000;
const PAGE = 4096;
/** Milliseconds of a clock tick in which Linux counts processor time. */
const TICK = 10;

/** How a child ended: by us, by running out of heap, by the system's limit on processor time, or otherwise. */
export type Ending = 'stopped' | 'memory' | 'processor-time' | 'crash';

/**
 * One child process with its limits. It works on one job at a time and does not keep the parent alive while idle.
 * A heap beyond its limit aborts the child and nothing else; the system ends a child that spins for ever even when its
 * parent is gone, through the limit on processor time that it is started with.
 */
export class EvaluationChild {
  /** Milliseconds of processor time that the child had had when it last reported. */
  spent = 0;
  private readonly child: ChildProcess;
  private stopped = false;
  private listener: ((report: Report) => void) | null = null;
  readonly ended: Promise<Ending>;
  /** Settles when the program has been loaded, or the child has ended before that. */
  readonly ready: Promise<void>;
  private over = false;
  private readonly remembered = new Set<string>();

  constructor(program: string) {
    const limit = `ulimit -t ${EVALUATION_LIMITS.childProcessorTime}; ulimit -c 0; exec "$0" "$@"`;
    const options = [
      `--max-old-space-size=${EVALUATION_LIMITS.childHeap}`,
      '--stack-size=900',
      program,
    ];
    this.child = spawn('/bin/sh', ['-c', limit, process.execPath, ...options], {
      env: { NODE_ENV: 'production' },
      stdio: ['ignore', 'pipe', 'ignore', 'ipc'],
    });
    this.ended = new Promise((resolve) => {
      this.child.once('error', () => this.finish(resolve, 'crash'));
      // Not `exit`: what the child wrote last must have been read when its end is told.
      this.child.once('close', (code, signal) => this.finish(resolve, this.endingOf(code, signal)));
    });
    this.ready = new Promise((resolve) => {
      void this.ended.then(() => resolve());
      if (this.child.stdout === null) return;
      createInterface({ input: this.child.stdout }).on('line', (line) => {
        const report = JSON.parse(line) as SentReport;
        this.spent = report.spent;
        if (report.kind === 'ready') resolve();
        else this.listener?.(report);
      });
    });
    // A send that meets a dying child is reported here as well; `ended` already says so.
    this.child.on('error', () => undefined);
    this.hold(false);
  }

  get alive(): boolean {
    return !this.over;
  }

  /** Waits until the child can work, and keeps the parent alive meanwhile. */
  async prepare(): Promise<void> {
    this.hold(true);
    await this.ready;
  }

  /** Sends a job; reports go to the listener until another job is sent. */
  start(job: Job | CertifyJob, listener: (report: Report) => void): void {
    this.hold(true);
    this.listener = (report) => {
      if (report.job !== job.job) return;
      listener(report);
    };
    this.child.send(job, () => undefined);
  }

  /** Notes the values that a job has left in the child, which may have forgotten some of them meanwhile. */
  remember(values: readonly string[]): void {
    if (this.remembered.size > MOST_REMEMBERED) this.remembered.clear();
    for (const value of values) this.remembered.add(value);
  }

  /** How many of some values the child probably knows; looks at the first few only. */
  countKnown(values: readonly (string | null)[]): number {
    return values.slice(0, 100).filter((value) => value !== null && this.remembered.has(value))
      .length;
  }

  /** Ends the work on a job and lets the parent end while this child waits. */
  rest(): void {
    this.listener = null;
    this.hold(false);
  }

  /** Megabytes that the child holds now; null where the system does not tell. */
  residentMemory(): number | null {
    try {
      const [, pages = ''] = readFileSync(`/proc/${this.child.pid ?? 0}/statm`, 'utf8').split(' ');
      return (Number(pages) * PAGE) / 2 ** 20;
    } catch {
      return null;
    }
  }

  /** Milliseconds of processor time that the child has had; null where the system does not tell. */
  processorMilliseconds(): number | null {
    try {
      const stat = readFileSync(`/proc/${this.child.pid ?? 0}/stat`, 'utf8');
      // The name of the program, in brackets, may hold spaces; user and system time are fields 14 and 15.
      const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
      return (Number(fields[11]) + Number(fields[12])) * TICK;
    } catch {
      return null;
    }
  }

  /** Ends the child; the parent lives at least until that is done. */
  kill(): void {
    this.stopped = true;
    if (this.alive) this.hold(true);
    this.child.kill('SIGKILL');
  }

  private finish(resolve: (ending: Ending) => void, ending: Ending): void {
    if (this.over) return;
    this.over = true;
    resolve(ending);
  }

  private endingOf(code: number | null, signal: NodeJS.Signals | null): Ending {
    if (this.stopped) return 'stopped';
    if (signal === 'SIGXCPU' || signal === 'SIGKILL') return 'processor-time';
    // The run time aborts when the heap is exhausted: by signal, or as 128 + 6 through a shell.
    return signal === 'SIGABRT' || signal === 'SIGTRAP' || signal === 'SIGILL' || code === 134
      ? 'memory'
      : 'crash';
  }

  private hold(needed: boolean): void {
    const stdout = this.child.stdout as Socket | null;
    for (const handle of [this.child, this.child.channel, stdout]) {
      if (needed) handle?.ref();
      else handle?.unref();
    }
  }
}
