import { execFile } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { buildIsCurrent, digestOfSources } from '../../lib/setup/build.mjs';
import { ensureDebianPackages } from '../../lib/setup/debian-packages.mjs';
import { checkNodeVersion, packagesAreCurrent } from '../../lib/setup/node-packages.mjs';
import { readOptions } from '../../lib/setup/options.mjs';
import { SetupError } from '../../lib/setup/run-command.mjs';
import { makeDataFolder, portIsFree, readState, remember, secret } from '../../lib/setup/state.mjs';

const root = process.cwd();
let folder;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'surdwork-set-up-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe('options', () => {
  test('left alone, it listens on loopback, keeps its data in the project and has the demo', () => {
    expect(readOptions('/yard', {})).toMatchObject({
      host: '127.0.0.1',
      port: 3000,
      address: 'http://127.0.0.1:3000',
      folder: '/yard/.data',
      demo: true,
    });
  });

  test.each([
    ['another address to listen on', { HOST: '0.0.0.0', NEXTAUTH_URL: 'http://yard.example' }],
    ['a public address in front', { NEXTAUTH_URL: 'https://yard.example' }],
    ['a database that others may share', { DATABASE_URL: 'mysql://a:b@db.example/surdwork' }],
    ['the wish not to have it', { SURDWORK_DEMO: '0' }],
  ])('there is no demo with %s', (_, variables) => {
    expect(readOptions('/yard', variables).demo).toBe(false);
  });

  test('the demo exists on a public address when it is asked for', () => {
    const variables = { HOST: '0.0.0.0', NEXTAUTH_URL: 'http://yard.example', SURDWORK_DEMO: '1' };
    expect(readOptions('/yard', variables).demo).toBe(true);
  });

  test.each([
    [{ PORT: 'abc' }, /^PORT is abc/],
    [{ PORT: '70000' }, /^PORT is 70000/],
    [{ DATABASE_PORT: '3306.5' }, /^DATABASE_PORT is 3306\.5/],
    [{ HOST: '0.0.0.0' }, /set NEXTAUTH_URL/],
    [{ NEXTAUTH_URL: 'yard' }, /^NEXTAUTH_URL is not an address/],
    [{ SURDWORK_DEMO: 'yes' }, /^SURDWORK_DEMO is yes/],
  ])('%o is refused in one line', (variables, message) => {
    const attempt = () => readOptions('/yard', variables);
    expect(attempt).toThrow(SetupError);
    expect(attempt).toThrow(message);
  });
});

describe('packages', () => {
  const missing = { 'surdwork-package-that-is-not': 'surdwork-program-that-is-not' };

  test('whoever may not install is told in one line what to install', async () => {
    const script = `
      process.getuid = () => 1000;
      const { ensureDebianPackages } = await import('./lib/setup/debian-packages.mjs');
      await ensureDebianPackages(${JSON.stringify(missing)}).catch((error) => console.log(error.message));
    `;
    const told = await promisify(execFile)(
      process.execPath,
      ['--input-type=module', '-e', script],
      { cwd: root },
    );
    const lines = told.stdout.trim().split('\n');
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatch(/install.*surdwork-package-that-is-not$/);
  });

  test('what is there is not installed again', async () => {
    await expect(ensureDebianPackages({ nodejs: 'node' })).resolves.toBeUndefined();
  });

  test('node_modules is compared with the lock file package by package', () => {
    expect(packagesAreCurrent(root)).toBe(true);
    const lock = (versions) => JSON.stringify({ packages: { '': {}, ...versions } });
    mkdirSync(join(folder, 'node_modules'));
    const wanted = {
      'node_modules/a': { version: '1.0.0' },
      'node_modules/b': { version: '2.0.0' },
    };
    const other = { 'node_modules/c': { version: '3.0.0', optional: true } };
    writeFileSync(join(folder, 'package-lock.json'), lock({ ...wanted, ...other }));
    const present = (versions) => {
      writeFileSync(join(folder, 'node_modules', '.package-lock.json'), lock(versions));
      return packagesAreCurrent(folder);
    };
    expect(present(wanted)).toBe(true);
    expect(present({ ...wanted, 'node_modules/b': { version: '2.0.1' } })).toBe(false);
    expect(present({ 'node_modules/a': { version: '1.0.0' } })).toBe(false);
    expect(present({})).toBe(false);
  });

  test('an older or newer Node is refused', () => {
    const asking = (node) => {
      writeFileSync(join(folder, 'package.json'), JSON.stringify({ engines: { node } }));
      return () => checkNodeVersion(folder);
    };
    expect(asking('>=20.0 <99')).not.toThrow();
    expect(asking('>=98.5 <99')).toThrow(SetupError);
    expect(asking('>=10.0 <20')).toThrow(SetupError);
  });
});

describe('state', () => {
  test('a secret is made once, kept, and readable by its owner alone', () => {
    makeDataFolder(folder);
    const made = secret(folder, 'sessionSecret');
    expect(made.length).toBeGreaterThanOrEqual(43);
    expect(secret(folder, 'sessionSecret')).toBe(made);
    expect(secret(folder, 'databasePassword')).not.toBe(made);
    remember(folder, { databasePort: 3307 });
    expect(readState(folder)).toMatchObject({ sessionSecret: made, databasePort: 3307 });
    expect(statSync(join(folder, 'state.json')).mode & 0o077).toBe(0);
    expect(statSync(folder).mode & 0o077).toBe(0);
  });

  test('a port in use is seen', async () => {
    const holder = createServer();
    const port = await new Promise((resolve) => {
      holder.listen(0, '127.0.0.1', () => resolve(holder.address().port));
    });
    expect(await portIsFree(port)).toBe(false);
    await new Promise((resolve) => holder.close(resolve));
    expect(await portIsFree(port)).toBe(true);
  });
});

describe('build', () => {
  test('its digest follows every source: a change, a new file, a new name', () => {
    const copy = join(folder, 'copy');
    cpSync(join(root, 'lib', 'access'), join(copy, 'lib', 'access'), { recursive: true });
    const first = digestOfSources(copy);
    expect(digestOfSources(copy)).toBe(first);
    writeFileSync(join(copy, 'lib', 'access', 'more.ts'), 'export {};\n');
    const second = digestOfSources(copy);
    expect(second).not.toBe(first);
    writeFileSync(join(copy, 'lib', 'access', 'more.ts'), 'export {}; \n');
    expect(digestOfSources(copy)).not.toBe(second);
    rmSync(join(copy, 'lib', 'access', 'more.ts'));
    expect(digestOfSources(copy)).toBe(first);
    expect(buildIsCurrent(copy)).toBe(false);
  });
});
