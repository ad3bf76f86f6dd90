import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { ENGINE_VERSION } from '@/lib/engine/index';
import {
  type CellResults,
  type LinePlace,
  type Result,
  DEFAULT_SETTINGS,
  keyOf,
  markOfLine,
} from '@/lib/language/index';
import type { Refusal } from './messages';
import { type AnswerStore, MemoryStore, keyOfAnswer, layered } from './cache';
import { type CertificateAnswer, type CertificateRequest, runCertificate } from './certificate';
import { bundlePath } from './child-process';
import { EVALUATION_LIMITS } from './limits';
import { Pool } from './pool';
import { EvaluateRequest } from './request';
import { type Finished, runWork } from './run';

export { EVALUATION_LIMITS } from './limits';
export { CertificateRequest, type CertificateAnswer } from './certificate';
export { PoolBusy } from './pool';
export { EvaluateRequest, SettingsRequest, describeIssues } from './request';
export { type AnswerStore, MemoryStore } from './cache';

/** The answer to a request, with its `id` when it had one. */
export type EvaluateAnswer = {
  schema: 1;
  engine: string;
  id?: string | number;
} & ({ result: Result; cells?: never } | { cells: CellResults[]; result?: never });

/** One pool for the process; kept on `globalThis` because the development server loads modules anew at every change. */
const holder = globalThis as typeof globalThis & {
  surdworkEvaluation?: { pool: Pool | null; store: AnswerStore; program: Promise<string> | null };
};

function shared() {
  holder.surdworkEvaluation ??= { pool: null, store: new MemoryStore(), program: null };
  return holder.surdworkEvaluation;
}

/** From now on answers are kept in a lasting store as well, behind the one in memory. */
export function storeAnswersIn(lasting: AnswerStore): void {
  shared().store = layered(new MemoryStore(), lasting);
}

/**
 * Evaluates in a child process, within the time and memory of EVALUATION_LIMITS.
 * Accepts a request that the schema has checked. Every failure of a line is in its result; rejects with `PoolBusy` when
 * too many requests wait, and with an Error when the children cannot run at all (their bundle is missing).
 * With `keep` false nothing of the request is kept: the store is neither read nor written.
 */
export async function evaluate(
  request: EvaluateRequest,
  { keep = true }: { keep?: boolean } = {},
): Promise<EvaluateAnswer> {
  const { store } = shared();
  const settings = { ...DEFAULT_SETTINGS, ...request.settings };
  const cells = request.cells ?? [];
  const asked = { expression: request.expression ?? null, cells, settings };
  const key = keyOfAnswer(await programIdentity(), asked);
  const identity = request.id === undefined ? {} : { id: request.id };
  const head = { schema: 1 as const, engine: ENGINE_VERSION, ...identity };
  const kept = keep ? await store.read(key).catch(() => null) : null;
  if (kept !== null)
    return { ...head, ...(JSON.parse(kept) as { result: Result } | { cells: CellResults[] }) };

  const finished = await work(asked);
  for (const fault of finished.faults) console.error(`evaluation: ${fault}`);
  const body =
    request.expression === undefined
      ? { cells: assemble(cells, finished) }
      : { result: resultOf(request.expression, finished) };
  // What the clock or the memory stopped may come out otherwise on a quieter machine, so it is not remembered.
  if (keep && !finished.stopped)
    await store.write(key, JSON.stringify(body)).catch(() => undefined);
  return { ...head, ...body };
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

async function work(asked: Parameters<typeof runWork>[1]): Promise<Finished> {
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

function resultOf(source: string, finished: Finished): Result {
  return finished.expression ?? lineResult(finished, { cell: 0, line: 1 }, source);
}

/** Results of each cell in order of its lines; a line that was not come to is answered all the same. */
function assemble(cells: NonNullable<EvaluateRequest['cells']>, finished: Finished): CellResults[] {
  return cells.map(({ id, source }, cell) => ({
    id,
    results: source
      .split(/\r\n|\n|\r/)
      .flatMap((text, index) =>
        isBlank(text) ? [] : [lineResult(finished, { cell, line: index + 1 }, text)],
      ),
  }));
}

const isBlank = (line: string): boolean => /^[ \t\u00a0\u2009\u202f]*(#|$)/.test(line);

function lineResult(finished: Finished, place: LinePlace, source: string): Result {
  const key = keyOf(place);
  const result = finished.results.get(key);
  if (result !== undefined) return result;
  const { code, message } = finished.refused.get(key) ?? OUT_OF_TIME;
  const error = { code, message, from: 0, to: source.length };
  return {
    line: place.line,
    source,
    mark: markOfLine(source),
    kind: 'error',
    typeset: null,
    error,
  };
}

const OUT_OF_TIME: Refusal = {
  code: 'limit-time',
  message: `The time of the whole request, ${EVALUATION_LIMITS.requestTime} milliseconds, was used up before this line had an answer.`,
};
