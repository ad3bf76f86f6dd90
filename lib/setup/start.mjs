import { readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureBuild, markServing, runScript } from './build.mjs';
import { ensureDebianPackages, SERVER_PACKAGES } from './debian-packages.mjs';
import { startMailbox } from './mailbox.mjs';
import { checkNodeVersion, ensureNodePackages } from './node-packages.mjs';
import { readOptions } from './options.mjs';
import { prepareDatabase } from './prepare-database.mjs';
import { PrivateServer } from './private-server.mjs';
import { endRunning, isProcessOf, say, SetupError } from './run-command.mjs';
import { serve, stopLeftover } from './serve.mjs';
import { makeDataFolder, portIsFree, secret } from './state.mjs';

const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));
const dev = process.argv.includes('--dev');

/** What to undo at the end, last thing first. */
const undo = [];
let stopping = null;

function stop() {
  stopping ??= (async () => {
    endRunning();
    for (const step of undo.reverse()) await step();
  })();
  return stopping;
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    if (stopping === null) say('stopping …');
    stop().then(
      () => process.exit(0),
      (error) => fail(error),
    );
  });
}

function fail(error) {
  process.stderr.write(`surdwork: ${error instanceof SetupError ? error.message : error.stack}\n`);
  process.exit(1);
}

async function start() {
  checkNodeVersion(root);
  const options = readOptions(root);
  makeDataFolder(options.folder);
  const mark = join(options.folder, 'running.json');
  const earlier = await findEarlier(mark);
  if (earlier !== null) {
    say(`already running at ${earlier.address} (process ${earlier.pid}).`);
    return;
  }
  if (!(await portIsFree(options.port, options.host))) {
    throw new SetupError(
      `port ${options.port} of ${options.host} is taken; set PORT to another one.`,
    );
  }
  const note = { pid: process.pid, address: options.address };
  writeFileSync(mark, JSON.stringify(note));
  undo.push(() => rmSync(mark, { force: true }));

  await ensureNodePackages(root);
  const env = {
    ...process.env,
    ...(await applicationEnvironment(options)),
    ...(options.smtp ? {} : await localMail(options)),
  };
  say('bringing the database up to date …');
  const { migrated, demo, linkToken } = await prepareDatabase(root, options.folder, env);
  if (migrated.length > 0) say(`${migrated.length} changes of structure applied.`);
  if (dev) await runScript(root, 'build:child');
  else {
    await ensureBuild(root);
    undo.push(markServing(root));
  }
  if (stopping !== null) return;
  say(`starting the application on ${options.host}:${options.port} …`);
  const server = await serve(root, { ...options, env, dev });
  undo.push(server.stop);
  writeFileSync(mark, JSON.stringify({ ...note, server: server.pid }));

  greet(options, demo, linkToken);
  const code = await server.ended;
  if (stopping !== null) return;
  await stop();
  throw new SetupError(`the application ended by itself (${code}).`);
}

/** The copy that already serves this data folder, or null; what a killed one left is cleared away. */
async function findEarlier(mark) {
  let note;
  try {
    note = JSON.parse(readFileSync(mark, 'utf8'));
  } catch {
    return null;
  }
  if (isProcessOf(note.pid, 'lib/setup/start.mjs')) return note;
  if (isProcessOf(note.server, 'next')) await stopLeftover(note.server);
  return null;
}

/** Starts the private database unless another one is named, and says what the application needs to know. */
async function applicationEnvironment(options) {
  return {
    DATABASE_URL: options.databaseUrl ?? (await startDatabase(options)),
    NEXTAUTH_SECRET: options.secret ?? secret(options.folder, 'sessionSecret'),
    NEXTAUTH_URL: options.address,
    SURDWORK_DEMO: options.demo ? '1' : '0',
  };
}

/** Where no SMTP server is named, letters are kept in the data folder, to be read on a page. */
async function localMail({ folder }) {
  const mailbox = await startMailbox(root, join(folder, 'mail'));
  undo.push(mailbox.stop);
  return mailbox.env;
}

async function startDatabase({ folder, databasePort }) {
  await ensureDebianPackages(SERVER_PACKAGES);
  const server = new PrivateServer(folder, { port: databasePort });
  undo.push(() => server.stop());
  await server.start();
  return server.ensureDatabase('surdwork');
}

function greet({ address, smtp }, demo, linkToken) {
  const lines = ['', `  Surdwork is ready: ${address}`, ''];
  if (demo !== null) {
    lines.push(`  Demo workshop ${demo.workshop}; password for each: ${demo.password}`);
    for (const { email, role } of demo.people) lines.push(`    ${email.padEnd(24)} ${role}`);
    if (linkToken !== undefined) {
      lines.push(`  What a client sees of it: ${address}/client/${linkToken}`);
    }
    lines.push('');
  }
  if (!smtp) lines.push(`  Letters stay on this machine; an admin reads them: ${address}/mail`, '');
  lines.push('  Ctrl-C stops it.', '');
  process.stdout.write(`${lines.join('\n')}\n`);
}

start().catch(async (error) => {
  if (stopping !== null) return;
  await stop().catch(() => undefined);
  fail(error);
});
