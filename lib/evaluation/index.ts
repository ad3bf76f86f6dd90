import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { ENGINE_VERSION } from '@/lib/engine/index';
import {
  type CellSource,
  type Outcome,
  type Result,
  expressionResult,
  findExpressionProblem,
  firstLine,
} from '@/lib/language/index';
import { type AnsweredCell, answerCells } from './answer';
import { type CertificateAnswer, type CertificateRequest, runCertificate } from './certificate';
import { bundlePath } from './child-process';
import { EVALUATION_LIMITS } from './limits';
import type { Task } from './messages';
import { OutcomeMemory, type OutcomeStore, findOutcomes } from './outcomes';
import { type Plan, planCells } from './plan';
import { Pool } from './pool';
import { EvaluateRequest } from './request';
import { type Fate, type Work, runWork } from './run';

export { EVALUATION_LIMITS } from './limits';
export { CertificateRequest, type CertificateAnswer } from './certificate';
export { countFollowing, outlineOf, type Definition, type Outline } from './dependents';
export { PoolBusy } from './pool';
export { EvaluateRequest, SettingsRequest, describeIssues } from './request';
export type { OutcomeStore } from './outcomes';

/** Results of one cell; with the digest to be echoed when the request spoke of digests. */
export interface CellAnswer {
  id: string;
  results: Result[];
  digest?: string;
}

/** The answer to a request, with its `id` when it had one. */
export type EvaluateAnswer = {
  schema: 1;
  engine: string;
  id?: string | number;
} & ({ result: Result; cells?: never } | { cells: CellAnswer[]; result?: never });

interface Shared {
  pool: Pool | null;
  memory: OutcomeMemory;
  lasting: OutcomeStore | null;
  program: Promise<string> | null;
}

/** One pool for the process; kept on `globalThis` because the development server loads modules anew at every change. */
const holder = globalThis as typeof globalThis & { surdworkEvaluation?: Shared };

function shared(): Shared {
  holder.surdworkEvaluation ??= {
    pool: null,
    memory: new OutcomeMemory(EVALUATION_LIMITS.memory),
    lasting: null,
    program: null,
  };
  return holder.surdworkEvaluation;
}

/** From now on outcomes are kept in a lasting store as well, behind the one in memory. */
export function storeOutcomesIn(lasting: OutcomeStore): void {
  shared().lasting = lasting;
}

/** Empties the memory, as that of an instance that has just been started. */
export function forgetOutcomes(): void {
  shared().memory = new OutcomeMemory(EVALUATION_LIMITS.memory);
}

/**
 * Evaluates in child processes, within the time and memory of EVALUATION_LIMITS; only lines whose outcome is not known
 * from this or any other request are evaluated at all. Accepts a request that the schema has checked. Every failure of
 * a line is in its result; rejects with `PoolBusy` when too many requests wait, and with an Error when the children
 * cannot run at all (their bundle is missing). With `keep` false nothing of the request is kept: the stores are neither
 * read nor written.
 */
export async function evaluate(
  request: EvaluateRequest,
  { keep = true }: { keep?: boolean } = {},
): Promise<EvaluateAnswer> {
  const identity = request.id === undefined ? {} : { id: request.id };
  const head = { schema: 1 as const, engine: ENGINE_VERSION, ...identity };
  const { expression, settings = {}, have } = request;
  if (expression !== undefined) {
    const problem = findExpressionProblem(expression);
    if (problem !== null) return { ...head, result: expressionResult(expression, problem) };
    const [cell] = await answer([{ id: '', source: firstLine(expression) }], settings, keep);
    const [result] = cell?.results ?? [];
    if (result === undefined) throw new Error('A line that is not blank has a result.');
    return { ...head, result };
  }
  const cells = await answer(request.cells ?? [], settings, keep, have);
  return have === undefined
    ? { ...head, cells: cells.map(({ id, results }) => ({ id, results })) }
    : { ...head, cells };
}

async function answer(
  cells: readonly CellSource[],
  settings: NonNullable<EvaluateRequest['settings']>,
  keep: boolean,
  have: EvaluateRequest['have'] = {},
): Promise<AnsweredCell[]> {
  const plan = planCells(await programIdentity(), cells, settings);
  return answerCells(cells, plan, await findFates(plan, keep), have);
}

/** What becomes of every line of a plan, by the name of its outcome. */
async function findFates(plan: Plan, keep: boolean): Promise<ReadonlyMap<string, Fate>> {
  const { memory, lasting } = shared();
  const names = new Set(plan.lines.flatMap((line) => line?.outcome ?? []));
  const known = keep ? await findOutcomes(names, memory, lasting) : new Map<string, Outcome>();
  const fates = new Map<string, Fate>();
  for (const [name, outcome] of known) fates.set(name, { kind: 'outcome', outcome, lasting: true });
  if (known.size === names.size) return fates;

  const { tasks, wanted } = tasksFor(plan, known);
  const finished = await work({ tasks, settings: plan.settings, keep });
  for (const fault of finished.faults) console.error(`evaluation: ${fault}`);
  const fresh = new Map<string, Outcome>();
  for (const [index, name] of wanted) {
    const fate = finished.fates.get(index);
    if (fate === undefined) continue;
    fates.set(name, fate);
    // What the clock or the memory stopped may come out otherwise on a quieter machine, so it is not remembered.
    if (fate.kind === 'outcome' && fate.lasting) fresh.set(name, fate.outcome);
  }
  if (!keep) return fates;
  for (const [name, outcome] of fresh) memory.keep(name, outcome);
  if (fresh.size > 0) void lasting?.write(fresh).catch(() => undefined);
  return fates;
}

/** The lines whose outcomes are not known, and before them all that they read, at any remove. */
function tasksFor(
  { graph, lines }: Plan,
  known: ReadonlyMap<string, Outcome>,
): { tasks: Task[]; wanted: Map<number, string> } {
  const first = new Map<string, number>();
  for (const index of graph.order) {
    const line = lines[index];
    if (line !== undefined && !known.has(line.outcome) && !first.has(line.outcome))
      first.set(line.outcome, index);
  }
  const chosen: { task: Task; name: string | null }[] = [];
  const read = new Set<string | null>();
  for (const index of graph.order.toReversed()) {
    const line = lines[index];
    if (line === undefined) continue;
    const isWanted = first.get(line.outcome) === index;
    if (!isWanted && !read.has(line.task.value)) continue;
    if (isWanted) chosen.push({ task: line.task, name: line.outcome });
    else chosen.push({ task: { ...line.task, settings: null }, name: null });
    for (const [, value] of line.task.reads) read.add(value);
  }
  chosen.reverse();
  const wanted = new Map<number, string>();
  chosen.forEach(({ name }, place) => {
    if (name !== null) wanted.set(place, name);
  });
  return { tasks: chosen.map(({ task }) => task), wanted };
}

/**
 * The certificate of one line, made in a child process within the time and memory of a line. Why there is none is in
 * the answer; rejects with `PoolBusy` when too many requests wait.
 */
export async function certify(request: CertificateRequest): Promise<CertificateAnswer> {
  const pool = (shared().pool ??= new Pool());
  await pool.enter();
  try {
    return { schema: 1, engine: ENGINE_VERSION, ...(await runCertificate(pool, request)) };
  } finally {
    pool.leave();
  }
}

/** Ends all children. A later evaluation starts new ones. */
export async function closePool(): Promise<void> {
  const state = shared();
  const { pool } = state;
  state.pool = null;
  await pool?.close();
}

async function work(asked: Work): ReturnType<typeof runWork> {
  const pool = (shared().pool ??= new Pool());
  await pool.enter();
  try {
    return await runWork(pool, asked);
  } finally {
    pool.leave();
  }
}

/** A digest of the very program that the children run, so that no answer of another program is ever taken for its. */
function programIdentity(): Promise<string> {
  const state = shared();
  state.program ??= readFile(bundlePath()).then((bundle) =>
    createHash('sha256').update(bundle).digest('hex'),
  );
  state.program.catch(() => {
    state.program = null;
  });
  return state.program;
}
