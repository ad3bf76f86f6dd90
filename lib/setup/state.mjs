import { randomBytes } from 'node:crypto';
import { chmodSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';

/** Makes the data folder, readable by its owner alone. */
export function makeDataFolder(folder) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  chmodSync(folder, 0o700);
}

/** What the data folder remembers between starts: secrets made once, the database's port, the demo's link. */
export function readState(folder) {
  try {
    return JSON.parse(readFileSync(join(folder, 'state.json'), 'utf8'));
  } catch (error) {
    if (error.code === 'ENOENT') return {};
    throw error;
  }
}

/** Adds to what is remembered. Written beside and moved into place, so a fault never halves it. */
export function remember(folder, changes) {
  const state = { ...readState(folder), ...changes };
  const path = join(folder, 'state.json');
  writeFileSync(`${path}.${process.pid}`, `${JSON.stringify(state, null, 2)}\n`, { mode: 0o600 });
  renameSync(`${path}.${process.pid}`, path);
  return state;
}

/** A secret of the data folder, made at the first call. */
export function secret(folder, name) {
  const known = readState(folder)[name];
  if (typeof known === 'string') return known;
  const made = randomBytes(32).toString('base64url');
  remember(folder, { [name]: made });
  return made;
}

/** Whether a port of a host is free to listen on. */
export function portIsFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** Some free port of the loopback address. */
export function findFreePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen({ port: 0, host: '127.0.0.1' }, () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });
}
