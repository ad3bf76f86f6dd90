import { type Database, database } from '@/db/client';
import {
  findCachedAnswers,
  pruneCachedAnswers,
  putCachedAnswers,
} from '@/db/queries/evaluation-cache';
import type { Outcome } from '@/lib/language/index';
import type { OutcomeStore } from './outcomes';

const DAY = 24 * 60 * 60 * 1000;
/** What was evaluated longer ago is evaluated again when it is asked for. */
const KEPT_FOR = 30 * DAY;
const PRUNED_EVERY = DAY / 24;
/** Names in one query. */
const BATCH = 500;
/** Characters of outcomes in one statement, well below what the server takes in a packet. */
const STATEMENT = 1_000_000;

/** Outcomes kept in MariaDB, for all instances together. `open` is asked at each use, so nothing connects early. */
export function databaseStore(open: () => Database = database): OutcomeStore {
  let pruned = 0;
  return {
    async read(names) {
      const found = new Map<string, Outcome>();
      for (let from = 0; from < names.length; from += BATCH) {
        const answers = await findCachedAnswers(open(), names.slice(from, from + BATCH));
        for (const [name, outcome] of answers) found.set(name, outcome as Outcome);
      }
      return found;
    },
    async write(outcomes) {
      for (const batch of batchesOf(outcomes)) await putCachedAnswers(open(), batch);
      const now = Date.now();
      if (now - pruned < PRUNED_EVERY) return;
      pruned = now;
      await pruneCachedAnswers(open(), new Date(now - KEPT_FOR));
    },
  };
}

function* batchesOf(outcomes: ReadonlyMap<string, Outcome>): Generator<Map<string, Outcome>> {
  let batch = new Map<string, Outcome>();
  let size = 0;
  for (const [name, outcome] of outcomes) {
    batch.set(name, outcome);
    size += JSON.stringify(outcome).length;
    if (size < STATEMENT && batch.size < BATCH) continue;
    yield batch;
    batch = new Map();
    size = 0;
  }
  if (batch.size > 0) yield batch;
}
