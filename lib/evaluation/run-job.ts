import {
  type LineOptions,
  type PackedValue,
  completeSettings,
  evaluateSource,
} from '@/lib/language/index';
import type { KnownValues } from './known-values';
import type { Job, Refusal, Report, Task } from './messages';

/** The value of a line in this job; `lasting` is false when a refusal played a part. */
interface Found {
  readonly value: PackedValue | null;
  readonly lasting: boolean;
}

/**
 * Does the tasks of a job one after another and reports each. Only values that are not known and that a task needs are
 * worked out; those that will be the same for ever are kept for later jobs.
 */
export function runJob(
  job: Job,
  known: KnownValues,
  report: (message: Report) => void,
  propose: LineOptions['propose'] = null,
): void {
  const refused = new Map(job.refused);
  const brief = new Map(job.brief);
  const settings = job.settings.map((given) => completeSettings(given));
  const found = new Map<string, Found>();
  const wanted = wantedTasks(job, known, refused, found);

  const findValue = (name: string | null): Found => {
    if (name === null) return { value: null, lasting: true };
    const here = found.get(name);
    if (here === undefined) throw new Error('A job lacks a line that another of its lines reads.');
    return here;
  };

  const runTask = (task: Task, index: number): void => {
    const reads = new Map(task.reads.map(([mark, name]) => [mark, findValue(name)]));
    const given = task.settings === null ? null : (settings[task.settings] ?? null);
    const short: Refusal | null = brief.get(index) ?? null;
    const options: LineOptions = {
      valued: () => report({ kind: 'valued', job: job.job, task: index }),
      brief: short,
      propose,
    };
    report({ kind: 'started', job: job.job, task: index });
    const find = (mark: string): PackedValue | null => reads.get(mark)?.value ?? null;
    const { outcome, value } = evaluateSource(
      task.source,
      new Set(task.functions),
      given,
      find,
      options,
    );
    const lasting = [...reads.values()].every((read) => read.lasting);
    found.set(task.value, { value, lasting });
    if (lasting) known.keep(task.value, value);
    if (outcome !== null)
      report({
        kind: 'finished',
        job: job.job,
        task: index,
        outcome,
        lasting: lasting && short === null,
      });
  };

  job.tasks.forEach((task, index) => {
    if (refused.has(task.value)) found.set(task.value, { value: null, lasting: false });
    else if (wanted.has(index)) runTask(task, index);
  });
}

/**
 * From the last task to the first, so that wants reach what lies further up. Known values that are read are held in
 * `found` from here on, so that none is forgotten while the job runs.
 */
function wantedTasks(
  { tasks }: Job,
  known: KnownValues,
  refused: ReadonlyMap<string, Refusal>,
  found: Map<string, Found>,
): ReadonlySet<number> {
  const wanted = new Set<number>();
  const values = new Set<string>();
  for (let index = tasks.length - 1; index >= 0; index -= 1) {
    const task = tasks[index];
    if (task === undefined || refused.has(task.value)) continue;
    if (task.settings === null && !values.has(task.value)) continue;
    wanted.add(index);
    for (const [, name] of task.reads) {
      const value = name === null ? undefined : known.find(name);
      if (name !== null && value === undefined) values.add(name);
      if (name !== null && value !== undefined) found.set(name, { value, lasting: true });
    }
  }
  return wanted;
}
