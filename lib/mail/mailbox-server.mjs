import { randomBytes } from 'node:crypto';
import { chmod, mkdir, readdir, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { SMTPServer } from 'smtp-server';

const MOST_BYTES = 2 * 1024 * 1024;
/** The oldest go when there are more, so that a copy left running does not fill its disk. */
const KEPT = 1000;

/**
 * An SMTP server on the loopback address that sends nothing on: each letter becomes one file in a
 * folder, readable by its owner alone, named by the time it came.
 * @param folder made when it is missing
 * @param options.port 0 for a free one
 * @returns `{ port, close }`
 */
export async function openMailbox(folder, { port = 0 } = {}) {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  await chmod(folder, 0o700);
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: MOST_BYTES,
    onData(stream, _session, done) {
      const chunks = [];
      stream.on('data', (chunk) => chunks.push(chunk));
      stream.once('error', done);
      stream.once('end', () => {
        if (stream.sizeExceeded) {
          done(Object.assign(new Error('The letter is too long.'), { responseCode: 552 }));
          return;
        }
        store(folder, Buffer.concat(chunks)).then(() => done(), done);
      });
    },
  });
  // A client that goes away in the middle of a letter is not a fault of the server's.
  server.on('error', () => undefined);
  await new Promise((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  return {
    port: server.server.address().port,
    close: () => new Promise((resolve) => server.close(resolve)),
  };
}

async function store(folder, bytes) {
  const time = new Date().toISOString().replace(/[-:.]/g, '');
  const path = join(folder, `${time}-${randomBytes(4).toString('hex')}`);
  // Written beside and moved into place, so that nobody reads half a letter.
  await writeFile(`${path}.part`, bytes, { mode: 0o600 });
  await rename(`${path}.part`, `${path}.eml`);
  const names = (await readdir(folder)).filter((name) => name.endsWith('.eml')).sort();
  for (const name of names.slice(0, -KEPT)) await rm(join(folder, name), { force: true });
}
