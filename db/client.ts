import knex, { type Knex } from 'knex';
import { connectionOptions } from './connection';
import { env } from '@/lib/env';

/** What a query function takes: the client itself, or a transaction of it. */
export type Database = Knex;

const holder = globalThis as typeof globalThis & { surdworkDatabase?: Knex };

/**
 * The one client of this process. Opened at the first call, kept on `globalThis` because the
 * development server loads modules anew at every change.
 */
export function database(): Database {
  holder.surdworkDatabase ??= knex(connectionOptions(env().DATABASE_URL));
  return holder.surdworkDatabase;
}

/** Closes the client's connections; the next `database()` opens new ones. */
export async function closeDatabase(): Promise<void> {
  const open = holder.surdworkDatabase;
  delete holder.surdworkDatabase;
  await open?.destroy();
}

/** Whether the database answers at all, within a second. */
export async function answersQueries(): Promise<boolean> {
  try {
    await database().raw('select 1').timeout(1000, { cancel: false });
    return true;
  } catch {
    return false;
  }
}

const DEADLOCK = 1213;
const ATTEMPTS = 4;

/**
 * Runs `work` in a transaction. When MariaDB breaks a deadlock by ending this side, nothing of it
 * was stored and it runs again, at most three times more; so `work` must act on the database alone.
 */
export async function inTransaction<T>(
  work: (transaction: Knex.Transaction) => Promise<T>,
  db: Database = database(),
): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await db.transaction(work);
    } catch (error) {
      if (attempt === ATTEMPTS || errorNumber(error) !== DEADLOCK) throw error;
    }
  }
}

const DUPLICATE = 1062;

/** Whether an error is MariaDB's refusal of a second row with the same unique key. */
export function isDuplicate(error: unknown): boolean {
  return errorNumber(error) === DUPLICATE;
}

/** MariaDB's number of an error, which unlike the driver's name for it is always right. */
function errorNumber(error: unknown): number | undefined {
  if (typeof error !== 'object' || error === null || !('errno' in error)) return undefined;
  return typeof error.errno === 'number' ? error.errno : undefined;
}
