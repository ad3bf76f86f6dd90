import { existsSync, readdirSync, renameSync, statSync, writeFileSync, mkdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
const folder = path.join(root, '.build');
const SOURCES = [
  'lib/engine',
  'lib/divisions',
  'lib/geometry',
  'lib/shop',
  'lib/language',
  'lib/evaluation',
  'package-lock.json',
  'tsconfig.json',
];

/** Entry point of each bundle by the bundle's name. */
const ENTRIES = {
  child: 'lib/evaluation/child.ts',
  'command-line': 'lib/evaluation/command-line.ts',
};

/** The time of the latest change of anything that a bundle is made of. */
function latestChange(file) {
  const stats = statSync(file);
  if (!stats.isDirectory()) return stats.mtimeMs;
  return Math.max(
    stats.mtimeMs,
    ...readdirSync(file).map((name) => latestChange(path.join(file, name))),
  );
}

/**
 * Makes the bundles that are missing or older than their sources; returns their paths by name.
 * A bundle is put in place in one step, so that a process that starts meanwhile never reads half of one.
 */
export async function ensureBundles({ force = false } = {}) {
  const changed = Math.max(...SOURCES.map((source) => latestChange(path.join(root, source))));
  const bundles = Object.entries(ENTRIES).map(([name, entry]) => ({
    entry,
    file: path.join(folder, `${name}.mjs`),
  }));
  for (const { entry, file } of bundles) {
    if (!force && existsSync(file) && statSync(file).mtimeMs > changed) continue;
    const { build } = await import('esbuild');
    const { outputFiles } = await build({
      absWorkingDir: root,
      entryPoints: [entry],
      bundle: true,
      write: false,
      platform: 'node',
      target: 'node20',
      format: 'esm',
      logLevel: 'warning',
    });
    mkdirSync(folder, { recursive: true });
    const temporary = `${file}.${process.pid}`;
    writeFileSync(temporary, outputFiles[0].contents);
    renameSync(temporary, file);
  }
  return Object.fromEntries(Object.keys(ENTRIES).map((name, index) => [name, bundles[index].file]));
}
