import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { openTestDatabase } from '../../lib/setup/test-database.mjs';

const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));

/** Gives the tests a real MariaDB: the one `npm test` has started, or else one for this run alone. */
export async function setup() {
  if (process.env.TEST_DATABASE_URL !== undefined) return undefined;
  const { env, close } = await openTestDatabase(root);
  Object.assign(process.env, env);
  return close;
}
