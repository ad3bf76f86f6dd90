import { hostname } from 'node:os';
import { isAbsolute, join } from 'node:path';
import { SetupError } from './run-command.mjs';

const LOOPBACK = new Set(['127.0.0.1', 'localhost', '::1', '[::1]']);

/**
 * What the person at the terminal may set, checked before anything starts.
 * README lists the names; everything else the application reads is made from these.
 */
export function readOptions(root, variables = process.env) {
  const host = variables.HOST ?? '127.0.0.1';
  const port = readPort(variables, 'PORT') ?? 3000;
  const databaseUrl = variables.DATABASE_URL;
  if (!LOOPBACK.has(host) && variables.NEXTAUTH_URL === undefined) {
    throw new SetupError(
      `HOST is ${host}, so other machines can reach this one: set NEXTAUTH_URL to the address they use, for instance http://${hostname()}:${port}`,
    );
  }
  const shown = host.includes(':') && !host.startsWith('[') ? `[${host}]` : host;
  const address = variables.NEXTAUTH_URL ?? `http://${shown}:${port}`;
  if (!URL.canParse(address)) throw new SetupError(`NEXTAUTH_URL is not an address: ${address}`);
  const folder = variables.DATA_DIR ?? '.data';
  return {
    root,
    host,
    port,
    address: address.replace(/\/$/, ''),
    folder: isAbsolute(folder) ? folder : join(root, folder),
    databaseUrl,
    databasePort: readPort(variables, 'DATABASE_PORT'),
    demo: wantsDemo(variables.SURDWORK_DEMO, [
      LOOPBACK.has(host),
      LOOPBACK.has(new URL(address).hostname),
      databaseUrl === undefined,
    ]),
    secret: variables.NEXTAUTH_SECRET,
    /** Whether an SMTP server is named that takes the mail. */
    smtp: Boolean(variables.SMTP_URL || variables.SMTP_HOST),
  };
}

function readPort(variables, name) {
  const text = variables[name];
  if (text === undefined || text === '') return undefined;
  const port = Number(text);
  if (Number.isInteger(port) && port > 0 && port < 65_536) return port;
  throw new SetupError(`${name} is ${text}; a port is a whole number from 1 to 65535.`);
}

/** The demo's passwords are published, so it exists only on a copy nobody else can reach, or when asked for. */
function wantsDemo(asked, signsOfPrivacy) {
  if (asked === undefined || asked === '') return signsOfPrivacy.every(Boolean);
  if (asked === '0' || asked === '1') return asked === '1';
  throw new SetupError(`SURDWORK_DEMO is ${asked}; it is 1 to have the demo, 0 not to have it.`);
}
