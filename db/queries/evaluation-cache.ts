import type { Database } from '../client';

/** The answers stored under these keys (SHA-256, hexadecimal); keys without one are left out. */
export async function findCachedAnswers(
  db: Database,
  keys: readonly string[],
): Promise<Map<string, unknown>> {
  if (keys.length === 0) return new Map();
  const rows: { cache_key: string; answer: string }[] = await db('evaluation_cache')
    .whereIn('cache_key', keys)
    .select('cache_key', 'answer');
  return new Map(rows.map((row) => [row.cache_key, JSON.parse(row.answer) as unknown]));
}

/** Stores answers; one that is already there is the same one and stays. */
export async function putCachedAnswers(
  db: Database,
  answers: ReadonlyMap<string, unknown>,
): Promise<void> {
  if (answers.size === 0) return;
  const rows = [...answers].map(([key, answer]) => ({
    cache_key: key,
    answer: JSON.stringify(answer),
  }));
  await db('evaluation_cache').insert(rows).onConflict('cache_key').ignore();
}

/** Drops answers stored before `before`; returns how many. */
export async function pruneCachedAnswers(db: Database, before: Date): Promise<number> {
  return db('evaluation_cache').where('created_at', '<', before).delete();
}
