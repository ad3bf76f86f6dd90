import { join } from 'node:path';
import { prepareDatabase } from './prepare-database.mjs';
import { PrivateServer } from './private-server.mjs';
import { isAlive } from './run-command.mjs';
import { makeDataFolder, secret } from './state.mjs';

const PREFIX = 'surdwork_test_';

/**
 * A fresh database with the demo in it, on a private server that is kept apart from the one people
 * work on. Each run has its own, so that runs side by side do not meet.
 * @returns `{ env, close }`: the variables that point the application at it, and a function that drops it
 */
export async function openTestDatabase(root, address = 'http://127.0.0.1:3000') {
  const folder = process.env.TEST_DATA_DIR ?? join(root, '.data', 'test');
  makeDataFolder(folder);
  const port = process.env.TEST_DATABASE_PORT;
  const server = new PrivateServer(folder, {
    port: port === undefined ? undefined : Number(port),
    durable: false,
  });
  await server.start();
  const name = PREFIX + process.pid;
  const close = async () => {
    await server.execute(`drop database if exists \`${name}\``);
    await server.stop();
  };
  try {
    await dropLeftovers(server);
    await server.execute(`drop database if exists \`${name}\``);
    const url = await server.ensureDatabase(name, `${PREFIX}%`);
    const env = {
      TEST_DATABASE_URL: url,
      DATABASE_URL: url,
      NEXTAUTH_SECRET: secret(folder, 'sessionSecret'),
      NEXTAUTH_URL: address,
      SURDWORK_DEMO: '1',
    };
    await prepareDatabase(root, folder, { ...process.env, ...env });
    return { env, close };
  } catch (error) {
    await close();
    throw error;
  }
}

/** Drops the databases of runs that were killed; their names end in the process's number. */
async function dropLeftovers(server) {
  const listed = await server.execute('show databases');
  const names = listed.split('\n').filter((name) => name.startsWith(PREFIX));
  for (const name of names) {
    const [pid] = name.slice(PREFIX.length).split('_');
    if (!isAlive(Number(pid))) await server.execute(`drop database \`${name}\``);
  }
}
