import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { run, say, SetupError } from './run-command.mjs';

/** Stops with one line when this Node is outside what package.json asks for. */
export function checkNodeVersion(root) {
  const wanted = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).engines.node;
  const [, low, high] = /^>=(\d+\.\d+) <(\d+)$/.exec(wanted) ?? [];
  const number = (text) => {
    const [major, minor = '0'] = text.split('.');
    return Number(major) * 1000 + Number(minor);
  };
  const here = number(process.versions.node);
  if (here < number(low) || here >= number(high)) {
    throw new SetupError(`Node ${wanted} is needed, this is ${process.versions.node}.`);
  }
}

/** Whether node_modules holds exactly the versions the lock file names (other platforms' parts aside). */
export function packagesAreCurrent(root) {
  const wanted = readPackages(join(root, 'package-lock.json'));
  const present = readPackages(join(root, 'node_modules', '.package-lock.json'));
  if (wanted === null || present === null) return false;
  return Object.entries(wanted).every(([path, entry]) => {
    if (path === '' || entry.link === true) return true;
    const found = present[path];
    return found === undefined ? entry.optional === true : found.version === entry.version;
  });
}

function readPackages(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8')).packages;
  } catch {
    return null;
  }
}

/** Installs the npm packages from the lock file unless they are already the right ones. */
export async function ensureNodePackages(root) {
  if (packagesAreCurrent(root)) return;
  say('installing npm packages from the lock file (about a minute) …');
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
  const npm = process.env.npm_execpath;
  if (npm === undefined) await run('npm', args, { cwd: root });
  else await run(process.execPath, [npm, ...args], { cwd: root });
}
