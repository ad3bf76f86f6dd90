import { type Database, database } from '@/db/client';
import { findCachedAnswers, putCachedAnswers } from '@/db/queries/evaluation-cache';
import type { AnswerStore } from './cache';

/** Answers kept in MariaDB, for all instances together. `open` is asked at each use, so nothing connects early. */
export function databaseStore(open: () => Database = database): AnswerStore {
  return {
    async read(key) {
      const answers = await findCachedAnswers(open(), [key]);
      return answers.has(key) ? JSON.stringify(answers.get(key)) : null;
    },
    async write(key, answer) {
      await putCachedAnswers(open(), new Map([[key, JSON.parse(answer) as unknown]]));
    },
  };
}
