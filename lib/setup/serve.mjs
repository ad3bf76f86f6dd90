import { spawn } from 'node:child_process';
import { get } from 'node:http';
import { join } from 'node:path';
import { isAlive, SetupError, waitUntil } from './run-command.mjs';

/**
 * Runs Next on an address and waits until it answers.
 * @param options.dev the development server instead of the build
 * @returns `{ stop, ended }`: a function that stops it, and a promise of its exit
 */
export async function serve(root, { host, port, env, dev = false, output = 'inherit' }) {
  const next = join(root, 'node_modules', 'next', 'dist', 'bin', 'next');
  const child = spawn(
    process.execPath,
    [next, dev ? 'dev' : 'start', '--hostname', host, '--port', String(port)],
    {
      cwd: root,
      env: {
        ...env,
        NEXT_TELEMETRY_DISABLED: '1',
        NODE_ENV: dev ? 'development' : 'production',
      },
      // In a session of its own: Ctrl-C reaches it through us, before the database stops.
      detached: true,
      stdio: ['ignore', output, output],
    },
  );
  let running = true;
  const ended = new Promise((resolve) => {
    child.once('exit', (code, signal) => {
      running = false;
      resolve(code ?? signal);
    });
  });
  const stop = async () => {
    if (running) signalGroup(child.pid, 'SIGTERM');
    if (!(await waitUntil(() => !running, 10))) signalGroup(child.pid, 'SIGKILL');
    await ended;
  };
  // The development server compiles the first page before it answers.
  const seconds = dev ? 600 : 120;
  const answered = await waitUntil(async () => !running || (await answers(host, port)), seconds);
  if (!running) throw new SetupError('the application ended before it answered.');
  if (!answered) {
    await stop();
    throw new SetupError(`the application did not answer within ${seconds} s.`);
  }
  return { pid: child.pid, stop, ended };
}

/** Stops a server that a killed start left behind. */
export async function stopLeftover(pid) {
  if (!isAlive(pid)) return;
  signalGroup(pid, 'SIGTERM');
  if (!(await waitUntil(() => !isAlive(pid), 10))) signalGroup(pid, 'SIGKILL');
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

function answers(host, port) {
  const reachable = host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host;
  return new Promise((resolve) => {
    const request = get({ host: reachable, port, path: '/', timeout: 600_000 }, (response) => {
      response.resume();
      resolve(true);
    });
    request.on('timeout', () => request.destroy());
    request.on('error', () => resolve(false));
  });
}
