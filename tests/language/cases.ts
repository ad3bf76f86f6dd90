import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** The cases of a file: one a line, the two halves parted by ` => `; lines that start with `# ` are remarks. */
export function readCases(name: string): [string, string][] {
  const path = fileURLToPath(new URL(`../cases/${name}`, import.meta.url));
  return readFileSync(path, 'utf8')
    .split('\n')
    .filter((line) => line.includes(' => ') && !/^# [A-Z]/.test(line))
    .map((line) => {
      const at = line.lastIndexOf(' => ');
      return [line.slice(0, at), line.slice(at + 4)];
    });
}
