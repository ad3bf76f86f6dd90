import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { isProcessOf, run, say, SetupError } from './run-command.mjs';

const SOURCES = [
  'app',
  'components',
  'db',
  'fonts',
  'instrumentation.ts',
  'lib',
  'next.config.mjs',
  'package-lock.json',
  'package.json',
  'proxy.ts',
  'tailwind.config.ts',
  'tsconfig.json',
];

/** A digest of everything the build is made from. */
export function digestOfSources(root) {
  const digest = createHash('sha256');
  const visit = (path) => {
    const full = join(root, path);
    if (!existsSync(full)) return;
    if (statSync(full).isDirectory()) {
      for (const name of readdirSync(full).sort()) visit(join(path, name));
    } else {
      const content = readFileSync(full);
      digest.update(`${path}\0${content.length}\0`).update(content);
    }
  };
  SOURCES.forEach(visit);
  return digest.digest('hex');
}

const stampOf = (root) => join(root, '.build', 'built-from');
const servingFolder = (root) => join(root, '.build', 'serving');

/** Whether the build present was made from the sources as they are. */
export function buildIsCurrent(root) {
  const parts = [stampOf(root), join(root, '.next', 'BUILD_ID'), join(root, '.build', 'child.mjs')];
  if (!parts.every(existsSync)) return false;
  return readFileSync(stampOf(root), 'utf8') === digestOfSources(root);
}

/** Notes that this process serves the build, so that nobody replaces it underneath. */
export function markServing(root) {
  mkdirSync(servingFolder(root), { recursive: true });
  const mark = join(servingFolder(root), String(process.pid));
  writeFileSync(mark, '');
  return () => rmSync(mark, { force: true });
}

/** Builds the application unless the build present is current. */
export async function ensureBuild(root) {
  if (buildIsCurrent(root)) return;
  refuseWhileServed(root);
  say('building the application (under a minute) …');
  rmSync(stampOf(root), { force: true });
  const digest = digestOfSources(root);
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' };
  await runScript(root, 'build', { env });
  mkdirSync(join(root, '.build'), { recursive: true });
  writeFileSync(stampOf(root), digest);
}

function refuseWhileServed(root) {
  if (!existsSync(servingFolder(root))) return;
  const serving = readdirSync(servingFolder(root))
    .map(Number)
    .filter((pid) => isProcessOf(pid, 'lib/setup/'));
  if (serving.length === 0) return;
  throw new SetupError(
    `the sources have changed, but process ${serving.join(', ')} is serving the present build; stop it first.`,
  );
}

/** Runs one script of package.json. */
export function runScript(root, name, { args = [], ...options } = {}) {
  const npm = process.env.npm_execpath;
  const words = ['run', '--silent', name, ...(args.length > 0 ? ['--', ...args] : [])];
  return npm === undefined
    ? run('npm', words, { cwd: root, ...options })
    : run(process.execPath, [npm, ...words], { cwd: root, ...options });
}
