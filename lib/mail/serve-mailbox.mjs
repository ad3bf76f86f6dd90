import { openMailbox } from './mailbox-server.mjs';

/** `node lib/mail/serve-mailbox.mjs FOLDER`: says its port, and ends when its input does. */
const [folder] = process.argv.slice(2);
const { port, close } = await openMailbox(folder);
process.stdout.write(`${JSON.stringify({ port })}\n`);

let ending = false;
function end() {
  if (ending) return;
  ending = true;
  close().then(() => process.exit(0));
  // Connections that are kept open must not hold it up.
  setTimeout(() => process.exit(0), 2000).unref();
}
process.on('SIGTERM', end);
process.on('SIGINT', end);
// Closed when whoever started it is gone, in whatever way.
process.stdin.resume().on('end', end).on('error', end);
