import { mkdirSync, openSync, readFileSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureBuild, markServing, runScript } from './build.mjs';
import { ensureDebianPackages, SERVER_PACKAGES, TEST_PACKAGES } from './debian-packages.mjs';
import { startMailbox } from './mailbox.mjs';
import { checkNodeVersion, ensureNodePackages } from './node-packages.mjs';
import { endRunning, findProgram, run, say, SetupError } from './run-command.mjs';
import { serve } from './serve.mjs';
import { findFreePort } from './state.mjs';
import { openTestDatabase } from './test-database.mjs';
import { readReport, summaryLines } from './test-summary.mjs';

const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));
/** Test files or parts of their names; all checks when there are none. */
const files = process.argv.slice(2);
const folder = join(root, '.build', `test-${process.pid}`);
const servedLog = join(folder, 'served.log');

const undo = [];
const steps = [];

async function cleanUp() {
  for (const action of undo.splice(0).reverse()) await action();
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    say('stopping …');
    endRunning();
    cleanUp().finally(() => process.exit(130));
  });
}

/** Runs one step and records how it went; a later step still runs, so that one run tells all. */
async function step(name, work) {
  say(`${name} …`);
  const begin = Date.now();
  let fault = null;
  try {
    await work();
  } catch (error) {
    fault = error;
    process.stdout.write(`${error instanceof SetupError ? error.message : error.stack}\n`);
  }
  steps.push({ name, fault, seconds: (Date.now() - begin) / 1000 });
  return fault === null;
}

/** Whether the chosen files may be ones that need a served copy. */
function needsServer() {
  const needsNone = /^tests\/(?!api\/|browser\/)[^/]+\//;
  return files.length === 0 || files.some((file) => !needsNone.test(file));
}

/** An OpenID Connect provider that a test starts where the served copy looks for it. */
async function openIdEnvironment() {
  return {
    OIDC_ISSUER: `http://127.0.0.1:${await findFreePort()}`,
    OIDC_CLIENT_ID: 'surdwork',
    OIDC_CLIENT_SECRET: 'a secret between the two',
    OIDC_NAME: 'Quarry House',
  };
}

async function startServed(env, port) {
  mkdirSync(folder, { recursive: true });
  undo.push(markServing(root));
  const output = openSync(servedLog, 'a');
  const server = await serve(root, {
    host: '127.0.0.1',
    port,
    output,
    env: { ...process.env, ...env },
  });
  undo.push(server.stop);
}

async function runVitest(env, reportPath) {
  const vitest = join(root, 'node_modules', 'vitest', 'vitest.mjs');
  await run(
    process.execPath,
    [
      vitest,
      'run',
      '--config',
      'tests/vitest.config.ts',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${reportPath}`,
      ...(needsServer() && env.TEST_BASE_URL === undefined ? ['--project=!served'] : []),
      ...files,
    ],
    { cwd: root, show: true, env: { ...process.env, ...env } },
  );
}

async function runChecks() {
  checkNodeVersion(root);
  await ensureDebianPackages({ ...SERVER_PACKAGES, ...TEST_PACKAGES });
  await ensureNodePackages(root);
  mkdirSync(folder, { recursive: true });
  undo.push(() => rmSync(folder, { recursive: true, force: true }));

  if (files.length === 0) {
    await step('lint', () => runScript(root, 'lint', { show: true }));
    await step('typecheck', () => runScript(root, 'typecheck', { show: true }));
  }
  const port = process.env.TEST_PORT ?? (await findFreePort());
  const address = `http://127.0.0.1:${port}`;
  let env = {};
  const ready = await step('set-up', async () => {
    const database = await openTestDatabase(root, address);
    undo.push(database.close);
    env = { ...database.env, TEST_CHROMIUM: findProgram('chromium') };
    if (!needsServer()) return runScript(root, 'build:child');
    await ensureBuild(root);
    const mailbox = await startMailbox(root, join(folder, 'mail'));
    undo.push(mailbox.stop);
    Object.assign(env, mailbox.env, await openIdEnvironment());
    await startServed(env, port);
    env.TEST_BASE_URL = address;
  });
  // Without a served copy the tests that need none still tell something.
  const reportPath = join(folder, 'report.json');
  const passed = await step('tests', () => runVitest(env, reportPath));
  const report = readReport(reportPath, root);
  await step('completeness', () => {
    if (report === null) throw new SetupError('the tests left no report.');
    if (report.left > 0) throw new SetupError(`${report.left} tests are there but did not run.`);
  });
  if (!passed && ready && needsServer()) showServedLog();
  return report;
}

function showServedLog() {
  const lines = readFileSync(servedLog, 'utf8').trim().split('\n').slice(-40);
  process.stdout.write(`\nThe served copy's last lines:\n${lines.join('\n')}\n`);
}

runChecks()
  .then(
    (report) => {
      process.stdout.write(`${summaryLines(steps, report).join('\n')}\n`);
      process.exitCode = steps.some(({ fault }) => fault !== null) ? 1 : 0;
    },
    (error) => {
      const text = error instanceof SetupError ? error.message : error.stack;
      process.stderr.write(`surdwork: ${text}\n`);
      process.exitCode = 1;
    },
  )
  .then(cleanUp)
  .catch((error) => {
    process.stderr.write(`surdwork: ${error.stack}\n`);
    process.exitCode = 1;
  });
