import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { SetupError } from './run-command.mjs';

/**
 * Starts the local mailbox, in a process of its own because it needs packages: an SMTP server on
 * loopback that keeps each letter as a file in `folder`.
 * @returns `{ env, stop }`: the variables that lead the application to it, and a function that stops it
 */
export async function startMailbox(root, folder) {
  const child = spawn(process.execPath, [join(root, 'lib', 'mail', 'serve-mailbox.mjs'), folder], {
    cwd: root,
    // In a session of its own: Ctrl-C reaches it through us, after the application has stopped.
    detached: true,
    stdio: ['pipe', 'pipe', 'inherit'],
  });
  // It may be gone already when its input is closed.
  child.stdin.on('error', () => undefined);
  const ended = new Promise((resolve) => child.once('exit', resolve));
  const port = await Promise.race([
    firstLine(child.stdout).then((line) => JSON.parse(line).port),
    ended.then(() => {
      throw new SetupError('the local mailbox ended before it was ready.');
    }),
  ]);
  return {
    env: { SMTP_URL: `smtp://127.0.0.1:${port}`, SURDWORK_MAILBOX: folder },
    stop: async () => {
      child.stdin.end();
      await ended;
    },
  };
}

function firstLine(stream) {
  return new Promise((resolve) => {
    let text = '';
    stream.on('data', (chunk) => {
      text += chunk;
      if (text.includes('\n')) resolve(text.slice(0, text.indexOf('\n')));
    });
  });
}
