import { env } from '@/lib/env';
import { closeDatabase, database } from './client';
import { seedDemo, withdrawDemo } from './seeds/demo';

/**
 * Run by the set-up before the application starts: checks the environment, applies the migrations
 * that are missing, and sees to the demo. The last line it writes is JSON that says what was done.
 */
async function prepare(): Promise<void> {
  const db = database();
  const [, migrated] = (await db.migrate.latest({
    directory: './db/migrations',
    loadExtensions: ['.ts'],
  })) as [number, string[]];
  const demo = env().SURDWORK_DEMO === '1' ? await seedDemo(db) : await withdrawDemo(db);
  process.stdout.write(`${JSON.stringify({ migrated, demo })}\n`);
  await closeDatabase();
}

await prepare();
