import type { Database } from '../client';

/**
 * Counts one more hit of a bucket in the window that began at `windowStart`, and returns how many
 * the window has now. One statement, so instances that share the database share the count.
 */
export async function countHit(db: Database, bucket: string, windowStart: Date): Promise<number> {
  await db('rate_limits')
    .insert({ bucket, window_start: windowStart, hits: 1 })
    .onConflict(['bucket', 'window_start'])
    .merge({ hits: db.raw('hits + 1') });
  return findHits(db, bucket, windowStart);
}

/** How many hits a bucket has in the window that began at `windowStart`. */
export async function findHits(db: Database, bucket: string, windowStart: Date): Promise<number> {
  const row: { hits: number } | undefined = await db('rate_limits')
    .where({ bucket, window_start: windowStart })
    .first('hits');
  return row?.hits ?? 0;
}

/** Takes one hit of a window back, for instance of an attempt that turned out to be rightful. */
export async function takeHitBack(db: Database, bucket: string, windowStart: Date): Promise<void> {
  await db('rate_limits')
    .where({ bucket, window_start: windowStart })
    .where('hits', '>', 0)
    .decrement('hits', 1);
}

/** Forgets a bucket, for instance after the right password. */
export async function clearHits(db: Database, bucket: string): Promise<void> {
  await db('rate_limits').where({ bucket }).delete();
}

/** Drops windows that began before `before`; returns how many. */
export async function pruneHits(db: Database, before: Date): Promise<number> {
  return db('rate_limits').where('window_start', '<', before).delete();
}
