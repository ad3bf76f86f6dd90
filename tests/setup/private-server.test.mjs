import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import knex from 'knex';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { PrivateServer } from '../../lib/setup/private-server.mjs';
import { isAlive, waitUntil } from '../../lib/setup/run-command.mjs';
import { makeDataFolder } from '../../lib/setup/state.mjs';
import { connectionOptions } from '../../db/connection';

const root = process.cwd();
let base;
/** Deep enough that a socket inside it would be beyond what the system takes. */
let folder;

beforeAll(() => {
  base = mkdtempSync(join(tmpdir(), 'surdwork-server-'));
  folder = join(base, 'd'.repeat(90));
  makeDataFolder(folder);
});
afterAll(async () => {
  // Also what a failed test left running.
  await new PrivateServer(folder).stop();
  rmSync(base, { recursive: true, force: true });
});

const pidOf = (server) => Number(readFileSync(server.pidFile, 'utf8'));

async function ask(url, sql) {
  const db = knex({ ...connectionOptions(url), acquireConnectionTimeout: 3000 });
  try {
    const [rows] = await db.raw(sql);
    return rows;
  } finally {
    await db.destroy();
  }
}

/** Another process that uses the same server until it is told to leave. */
async function startNeighbour() {
  const script = `
    const { PrivateServer } = await import('./lib/setup/private-server.mjs');
    const server = new PrivateServer(${JSON.stringify(folder)});
    await server.start();
    console.log('joined on ' + server.port);
    process.stdin.resume();
    process.stdin.on('end', async () => { await server.stop(); process.exit(0); });
  `;
  const child = spawn(process.execPath, ['--input-type=module', '-e', script], { cwd: root });
  let output = '';
  child.stdout.on('data', (chunk) => (output += chunk));
  expect(await waitUntil(() => output.includes('joined on'), 20)).toBe(true);
  const leave = () =>
    new Promise((resolve) => {
      child.once('exit', resolve);
      child.stdin.end();
    });
  return { output, leave };
}

describe('the private MariaDB', { timeout: 90_000 }, () => {
  const server = () => new PrivateServer(folder, { durable: false });

  test('it starts below a deep folder, on loopback, and lets in its own user alone', async () => {
    const first = server();
    await first.start();
    const url = await first.ensureDatabase('surdwork');
    expect(await ask(url, 'select database() as name')).toEqual([{ name: 'surdwork' }]);
    const intruder = new URL(url);
    intruder.username = 'root';
    intruder.password = '';
    intruder.pathname = '/mysql';
    const DENIED = 1045;
    await expect(ask(intruder.href, 'select 1')).rejects.toMatchObject({ errno: DENIED });
    const [{ value }] = await ask(url, 'select @@bind_address as value');
    expect(value).toBe('127.0.0.1');
    await first.stop();
  });

  test('the second user joins the first one’s server, and the last one to leave stops it', async () => {
    const first = server();
    await first.start();
    const pid = pidOf(first);
    const neighbour = await startNeighbour();
    expect(neighbour.output).toContain(`joined on ${first.port}`);
    await first.stop();
    expect(isAlive(pid)).toBe(true);
    await neighbour.leave();
    expect(await waitUntil(() => !isAlive(pid), 10)).toBe(true);
  });

  test('after a power cut it comes up again, on the same port, with what was stored', async () => {
    const first = new PrivateServer(folder);
    await first.start();
    const url = await first.ensureDatabase('surdwork');
    await ask(url, 'create table kept (n int)');
    await ask(url, 'insert into kept values (17)');
    const pid = pidOf(first);
    process.kill(pid, 'SIGKILL');
    expect(await waitUntil(() => !isAlive(pid), 10)).toBe(true);

    const again = new PrivateServer(folder);
    await again.start();
    expect(again.port).toBe(first.port);
    expect(await ask(await again.ensureDatabase('surdwork'), 'select n from kept')).toEqual([
      { n: 17 },
    ]);
    await again.stop();
  });
});
