import { isBuiltin } from 'node:module';
import { describe, expect, test } from 'vitest';
import { listFiles, readImports, type Import } from './read-imports';

/**
 * Who may import whom, at run time. `engine` ← `language` ← `evaluation` ← services ← `http` ← `app`;
 * `access` and `env` are asked by anyone above them. What is only a type may be taken from anywhere
 * below `app`. A folder that is not here has no place yet, and the test says so.
 */
const SERVICES = [
  'lib/accounts',
  'lib/notebooks',
  'lib/workshops',
  'lib/exports',
  'lib/activity',
  'lib/mail',
];
const MAY_IMPORT: Record<string, string[]> = {
  'lib/engine': [],
  'lib/certificate-check': [],
  'lib/divisions': ['lib/engine'],
  'lib/shop': ['lib/engine'],
  'lib/geometry': ['lib/engine'],
  'lib/language': ['lib/engine', 'lib/divisions', 'lib/geometry', 'lib/shop'],
  'lib/env': [],
  'lib/access': [],
  db: ['lib/env'],
  'lib/evaluation': ['lib/engine', 'lib/language', 'lib/env', 'db'],
  'lib/activity': ['lib/access', 'db'],
  'lib/mail': ['lib/access', 'lib/env', 'db'],
  'lib/accounts': ['lib/access', 'lib/env', 'lib/activity', 'lib/mail', 'db'],
  'lib/notebooks': [
    'lib/access',
    'lib/env',
    'lib/activity',
    'lib/mail',
    'db',
    'lib/evaluation',
    'lib/accounts',
  ],
  // Above notebooks: leaving a workshop hands notebooks over, and one is invited to a notebook too.
  'lib/workshops': [
    'lib/access',
    'lib/env',
    'lib/activity',
    'lib/mail',
    'db',
    'lib/evaluation',
    'lib/accounts',
    'lib/notebooks',
  ],
  'lib/exports': ['lib/access', 'lib/env', 'db', 'lib/evaluation', 'lib/accounts', 'lib/notebooks'],
  'lib/http': ['lib/access', 'lib/env', 'lib/evaluation', ...SERVICES],
  components: ['lib/engine', 'lib/divisions', 'lib/language', 'lib/access', 'lib/notebooks'],
  app: [
    'lib/access',
    'lib/env',
    'lib/divisions',
    'lib/evaluation',
    'lib/http',
    'components',
    'fonts',
    ...SERVICES,
  ],
  instrumentation: ['lib/mail'],
  proxy: ['lib/access', 'lib/env', 'lib/http', ...SERVICES],
  // Run by the set-up, outside the application: it fills the database through what lies above it.
  'db/seeds': ['db', 'lib/access', 'lib/env', 'lib/engine', 'lib/language', ...SERVICES],
  'lib/setup': ['db', 'lib/env', 'lib/language', 'lib/engine', 'lib/evaluation'],
};

/** What `components` may take from the services: code that runs in the browser as well. */
const BROWSER_SAFE = [
  'lib/notebooks/content.ts',
  'lib/notebooks/content-values.ts',
  'lib/notebooks/comment-text.ts',
  'lib/notebooks/trial-limits.ts',
  'lib/notebooks/merge/index.ts',
];

/** The table of the language's words: plain data, which the help page shows as it is. */
const WORDS = 'lib/language/names.ts';

function areaOf(path: string): string {
  if (path.startsWith('db/seeds/') || path === 'db/prepare.ts') return 'db/seeds';
  const [top = '', second = ''] = path.replace(/\.\w+$/, '').split('/');
  return top === 'lib' ? `lib/${second}` : top;
}

const files = listFiles(
  ['app', 'components', 'db', 'lib', 'instrumentation.ts', 'proxy.ts'],
  ['.ts', '.tsx', '.mjs'],
);
const imports = files.flatMap(readImports);
const show = ({ from, specifier }: Import) => `${from} imports ${specifier}`;
const within = (area: string) => imports.filter(({ from }) => areaOf(from) === area);

describe('direction of imports', () => {
  test('every file belongs to an area with a place in the order', () => {
    const strays = files.filter((file) => MAY_IMPORT[areaOf(file)] === undefined);
    expect(strays).toEqual([]);
    expect(files.length).toBeGreaterThan(50);
  });

  test('nothing points upwards', () => {
    const upward = imports.filter(({ from, to, typeOnly }) => {
      if (to === null || typeOnly || to === WORDS) return false;
      const here = areaOf(from);
      const there = areaOf(to);
      return here !== there && !(MAY_IMPORT[here] ?? []).includes(there);
    });
    expect(upward.map(show)).toEqual([]);
  });

  test('not even a type is taken from app or http by what lies below', () => {
    const upward = imports.filter(({ from, to }) => {
      if (to === null || !['app', 'lib/http'].includes(areaOf(to))) return false;
      return !['app', 'lib/http', 'proxy'].includes(areaOf(from));
    });
    expect(upward.map(show)).toEqual([]);
  });

  test('components that are not kept on the server take from the services only what runs in a browser', () => {
    const onServer = new Set(
      imports.filter(({ specifier }) => specifier === 'server-only').map(({ from }) => from),
    );
    const wrong = within('components').filter(
      ({ from, to, typeOnly }) =>
        to !== null &&
        !typeOnly &&
        !onServer.has(from) &&
        areaOf(to) === 'lib/notebooks' &&
        !BROWSER_SAFE.includes(to),
    );
    expect(wrong.map(show)).toEqual([]);
  });

  test('outside the engine, modules do not import each other in a circle', () => {
    // Inside it they must: adding two elements merges their towers, and merging towers adds.
    expect(findCircle(imports.filter(({ from }) => areaOf(from) !== 'lib/engine'))).toBeNull();
  });
});

describe('what stands alone', () => {
  test('the engine imports nothing outside its own folder, by relative path', () => {
    const outside = within('lib/engine').filter(
      ({ specifier, to }) => !specifier.startsWith('.') || areaOf(to ?? '') !== 'lib/engine',
    );
    expect(outside.map(show)).toEqual([]);
  });

  test('the language uses the engine and Lezer alone, by relative path', () => {
    const outside = within('lib/language').filter(
      ({ specifier }) => !specifier.startsWith('.') && !specifier.startsWith('@lezer/'),
    );
    expect(outside.map(show)).toEqual([]);
  });

  test('the set-up needs nothing but Node until the packages are there', () => {
    const needy = imports.filter(
      ({ from, specifier }) =>
        from.startsWith('lib/setup/') &&
        from.endsWith('.mjs') &&
        !specifier.startsWith('.') &&
        !isBuiltin(specifier),
    );
    expect(needy.map(show)).toEqual([]);
  });

  test('only the database folder speaks to the driver', () => {
    const drivers = ['knex', 'mysql2', 'mysql2/promise'];
    const wrong = imports.filter(
      ({ from, specifier, typeOnly }) =>
        !typeOnly && drivers.includes(specifier) && !from.startsWith('db/'),
    );
    expect(wrong.map(show)).toEqual([]);
  });
});

describe('the reading itself', () => {
  test('it tells types from values and finds re-exports and dynamic imports', () => {
    const client = readImports('db/client.ts');
    expect(client).toContainEqual(
      expect.objectContaining({ specifier: '@/lib/env', to: 'lib/env.ts', typeOnly: false }),
    );
    const users = readImports('db/queries/users.ts');
    expect(users).toContainEqual(
      expect.objectContaining({ specifier: '../client', to: 'db/client.ts', typeOnly: true }),
    );
  });

  test('a circle is found', () => {
    const step = (from: string, to: string): Import => ({
      from,
      to,
      specifier: to,
      typeOnly: false,
    });
    const circle = [step('a', 'b'), step('b', 'c'), step('c', 'a'), step('c', 'd')];
    expect(findCircle(circle)).toEqual(['a', 'b', 'c', 'a']);
    expect(findCircle(circle.slice(0, 2))).toBeNull();
  });
});

/** The files of one circle of run-time imports, or null. */
function findCircle(all: Import[]): string[] | null {
  const next = new Map<string, string[]>();
  for (const { from, to, typeOnly } of all) {
    if (to !== null && !typeOnly) next.set(from, [...(next.get(from) ?? []), to]);
  }
  const finished = new Set<string>();
  const search = (file: string, path: string[]): string[] | null => {
    if (path.includes(file)) return [...path.slice(path.indexOf(file)), file];
    if (finished.has(file)) return null;
    for (const other of next.get(file) ?? []) {
      const circle = search(other, [...path, file]);
      if (circle !== null) return circle;
    }
    finished.add(file);
    return null;
  };
  for (const file of next.keys()) {
    const circle = search(file, []);
    if (circle !== null) return circle;
  }
  return null;
}
