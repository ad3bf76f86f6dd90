import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { listFiles, root } from './read-imports';

/** A way in: a page, or one method of an endpoint, by its address with `[name]` for what varies. */
export interface Door {
  method: string;
  pattern: string;
}

const METHOD = /\b(GET|POST|PUT|PATCH|DELETE)\b/g;

/** Every page of the application, found on disk by the framework's own convention. */
export function listPages(): string[] {
  return listFiles(['app'], ['page.tsx'])
    .map((file) => patternOf(file, 'page.tsx'))
    .sort();
}

/** Every method of every endpoint, likewise. */
export function listEndpoints(): Door[] {
  return listFiles(['app'], ['route.ts']).flatMap((file) =>
    methodsOf(file).map((method) => ({ method, pattern: patternOf(file, 'route.ts') })),
  );
}

/** The doors that no request of these leads to; of two patterns the one with fewer varying parts is meant. */
export function doorsLeftOut(
  doors: readonly Door[],
  requests: readonly { method: string; address: string }[],
): string[] {
  const varying = ({ pattern }: Door) => pattern.split('[').length;
  const byPrecision = doors.toSorted((one, other) => varying(one) - varying(other));
  const opened = requests.map(({ method, address }) =>
    byPrecision.find((door) => door.method === method && leadsTo(door.pattern, address)),
  );
  return doors.filter((door) => !opened.includes(door)).map(nameOf);
}

function leadsTo(pattern: string, address: string): boolean {
  const parts = pattern.split('/');
  const given = (address.split('?')[0] ?? '').split('/');
  const fits = (part: string, index: number) =>
    part.startsWith('[') ? given[index] !== '' : part === given[index];
  return parts.length === given.length && parts.every(fits);
}

/** The address of a pattern with every varying part filled in the same way. */
export const fillIn = (pattern: string, part: string): string =>
  pattern.replace(/\[[^\]]+\]/g, part);

export const nameOf = ({ method, pattern }: Door): string => `${method} ${pattern}`;

function patternOf(file: string, end: string): string {
  const folders = file
    .slice('app/'.length, -end.length)
    .split('/')
    .filter((folder) => folder !== '' && !folder.startsWith('('));
  return `/${folders.join('/')}`;
}

function methodsOf(file: string): string[] {
  const source = readFileSync(join(root, file), 'utf8');
  const exported = source.split('\n').filter((line) => line.startsWith('export '));
  const methods = exported.flatMap((line) =>
    [...line.replace(/=.*$/, '').matchAll(METHOD)].map(([method]) => method),
  );
  if (methods.length === 0) throw new Error(`${file} exports no method that can be read.`);
  return [...new Set(methods)];
}
