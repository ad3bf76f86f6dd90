import { env } from '@/lib/env';
import { closeDatabase, database } from './client';
import { seedDemo, withdrawDemo } from './seeds/demo';
import { makeAllSearchable } from './seeds/searchable';

/**
 * Run by the set-up before the application starts: checks the environment, applies the migrations
 * that are missing, sees to the demo, and to it that every notebook is found by its newest version. The last line it writes is JSON that says what was done.
 */
async function prepare(): Promise<void> {
  const db = database();
  const [, migrated] = (await db.migrate.latest({
    directory: './db/migrations',
    loadExtensions: ['.ts'],
  })) as [number, string[]];
  const demo = env().SURDWORK_DEMO === '1' ? await seedDemo(db) : await withdrawDemo(db);
  await makeAllSearchable(db);
  process.stdout.write(`${JSON.stringify({ migrated, demo })}\n`);
  await closeDatabase();
}

await prepare();
