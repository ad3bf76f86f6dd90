import { createHash, randomUUID } from 'node:crypto';
import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import knex, { type Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/client';
import { connectionOptions } from '@/db/connection';
import { holderOfKey, signIn, workshopsOf } from '@/lib/accounts';
import { hashPassword } from '@/lib/accounts/passwords';
import { listLinks, listPeople, listVersions, readNotebook, readVersion } from '@/lib/notebooks';
import { listMembers, readActivity, readWorkshop } from '@/lib/workshops';

/**
 * The database of the previous release (migrations 001 to 010) with people's work in it goes up to
 * today's structure: everything is still there, and today's services read it.
 */
const PREVIOUS = 10;
const base = new URL(process.env.TEST_DATABASE_URL ?? 'mysql://missing');
const name = `${base.pathname.slice(1)}_previous`;
const own = new URL(base);
own.pathname = `/${name}`;

type Migration = Knex.Migration;
const files = import.meta.glob<Migration>('../../db/migrations/*.ts', { eager: true });
const released = Object.entries(files)
  .map(([path, migration]) => ({ name: path.split('/').at(-1) ?? '', migration }))
  .sort((a, b) => a.name.localeCompare(b.name))
  .slice(0, PREVIOUS);

/** Under the names that the operator's command line records. */
const source: Knex.MigrationSource<(typeof released)[number]> = {
  getMigrations: () => Promise.resolve(released),
  getMigrationName: (one) => one.name,
  getMigration: (one) => Promise.resolve(one.migration),
};

let db: Knex;

async function migrate(...words: string[]): Promise<void> {
  const cli = join('node_modules', 'knex', 'bin', 'cli.js');
  const all = ['--import', 'tsx', cli, ...words, '--knexfile', 'knexfile.ts'];
  const env = { ...process.env, DATABASE_URL: own.href };
  await promisify(execFile)(process.execPath, all, { cwd: process.cwd(), env });
}

async function structure(): Promise<string[]> {
  const [rows] = (await db.raw(
    `select concat_ws(' ', table_name, column_name, column_type, is_nullable, column_default) as line
     from information_schema.columns where table_schema = database() order by 1`,
  )) as [{ line: string }[]];
  return rows.map(({ line }) => line);
}

const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');
const password = 'trammel and straightedge';
const token = 't'.repeat(43);
const key = `swk_${'k'.repeat(43)}`;
const ids = {
  ida: randomUUID(),
  tam: randomUUID(),
  workshop: randomUUID(),
  notebook: randomUUID(),
  link: randomUUID(),
  key: randomUUID(),
};
const ida = { id: ids.ida, name: 'Ida', email: 'ida@oldacre.example' };
const sources = ['R = 1200 mm', 'R = 1150 mm'];
const contentOf = (text: string) => ({
  format: 1,
  settings: { digits: 12, unit: 'mm', step: '0.5 mm', rounding: 'half-even' },
  cells: [{ id: 'c1', kind: 'dimension', source: text }],
});

/** What people had stored, as the previous release stored it. */
async function fillPrevious(): Promise<void> {
  const passwordHash = await hashPassword(password);
  const user = { password_hash: passwordHash, token_version: 3 };
  await db('users').insert([
    { ...user, ...ida },
    { ...user, id: ids.tam, name: 'Tam', email: 'tam@oldacre.example' },
  ]);
  await db('workshops').insert({ id: ids.workshop, name: 'Oldacre Joinery' });
  await db('memberships').insert([
    { workshop_id: ids.workshop, user_id: ids.ida, role: 'admin' },
    { workshop_id: ids.workshop, user_id: ids.tam, role: 'member' },
  ]);
  const { workshop, notebook } = ids;
  await db('notebooks').insert({ id: notebook, workshop_id: workshop, title: 'Bay', head: 2 });
  await db('notebook_roles').insert([
    { notebook_id: notebook, user_id: ids.ida, role: 'owner' },
    { notebook_id: notebook, user_id: ids.tam, role: 'editor' },
  ]);
  for (const [index, text] of sources.entries()) {
    const content = JSON.stringify(contentOf(text));
    await db('versions').insert({
      notebook_id: notebook,
      number: index + 1,
      author_id: ids.ida,
      note: index === 0 ? 'as surveyed' : null,
      content,
      content_hash: sha256(content),
    });
  }
  await db('client_links').insert({
    id: ids.link,
    notebook_id: notebook,
    token_hash: sha256(token),
    label: 'The architect',
    created_by: ids.ida,
    opened_count: 4,
  });
  await db('api_keys').insert({
    id: ids.key,
    user_id: ids.ida,
    label: 'Saw',
    key_hash: sha256(key),
    fragment: 'kkkkkk',
    scopes: '["evaluate"]',
  });
}

const TABLES = [
  'users',
  'workshops',
  'memberships',
  'notebooks',
  'notebook_roles',
  'versions',
  'client_links',
  'api_keys',
] as const;

type Rows = Record<string, Record<string, unknown>[]>;

async function everything(): Promise<Rows> {
  const rows: Rows = {};
  for (const table of TABLES) {
    rows[table] = (await db(table).orderByRaw('1, 2').select('*')) as Rows[string];
  }
  return rows;
}

let before: Rows;
let structureBefore: string[];

beforeAll(async () => {
  const server = knex(connectionOptions(base.href));
  await server.raw(`drop database if exists ${name}`);
  await server.raw(`create database ${name}`);
  await server.destroy();
  db = knex(connectionOptions(own.href));
  // Today's services are to read this database.
  process.env.DATABASE_URL = own.href;
  await db.migrate.latest({ migrationSource: source });
  await fillPrevious();
  before = await everything();
  structureBefore = await structure();
  await migrate('migrate:latest');
}, 120_000);

afterAll(async () => {
  await closeDatabase();
  await db.raw(`drop database ${name}`);
  await db.destroy();
});

describe('a database of the previous release, after all migrations', () => {
  test('holds every value it held, save those of columns that are gone', async () => {
    const now = await everything();
    const gone = ['token_version'];
    for (const table of TABLES) {
      const kept = (before[table] ?? []).map((row) =>
        Object.fromEntries(Object.entries(row).filter(([column]) => !gone.includes(column))),
      );
      expect(now[table]).toEqual(kept.map((row) => expect.objectContaining(row) as unknown));
    }
  });

  test('lets the people in with the passwords they had', async () => {
    const credentials = { email: ida.email, password };
    const person = await signIn(credentials, { address: randomUUID(), device: 'a browser' });
    expect(person).toEqual(ida);
    expect(await workshopsOf(ida)).toEqual([
      { id: ids.workshop, name: 'Oldacre Joinery', admin: true },
    ]);
  });

  test('has workshops that have decided nothing yet', async () => {
    const { settings } = await readWorkshop(ida, ids.workshop);
    expect(settings.start).toMatchObject({ unit: 'mm', step: null, digits: 30 });
    expect(settings.issuing).toEqual({ editorsIssue: false, checkNeeded: false });
    expect(settings.titleBlock.logo).toBeNull();
    const members = await listMembers(ida, ids.workshop);
    expect(members.map((one) => [one.name, one.role])).toEqual([
      ['Ida', 'admin'],
      ['Tam', 'member'],
    ]);
    const { entries } = await readActivity(ida, ids.workshop, {});
    expect(entries.every(({ did }) => did !== '')).toBe(true);
  });

  test('shows notebooks, versions and roles as they were', async () => {
    const { notebook, content } = await readNotebook(ida, ids.notebook);
    expect(content).toEqual(contentOf('R = 1150 mm'));
    expect(notebook).toMatchObject({ title: 'Bay', version: 2, role: 'owner', archivedAt: null });
    expect(notebook.titleBlock).toMatchObject({
      legalOwner: 'Oldacre Joinery',
      title: 'Bay',
      creator: 'Ida',
      sheet: '1',
    });
    const { versions } = await listVersions(ida, ids.notebook);
    expect(versions.map(({ number, note }) => [number, note])).toEqual([
      [2, null],
      [1, 'as surveyed'],
    ]);
    expect((await readVersion(ida, ids.notebook, 1)).content).toEqual(contentOf('R = 1200 mm'));
    const people = await listPeople(ida, ids.notebook);
    expect(people.map((one) => [one.name, one.role])).toEqual([
      ['Ida', 'owner'],
      ['Tam', 'editor'],
    ]);
  });

  test('keeps client links and keys, with the rights they had', async () => {
    const links = await listLinks(ida, ids.notebook);
    expect(links).toMatchObject([
      { id: ids.link, label: 'The architect', opened: 4, revokedAt: null },
    ]);
    expect(await holderOfKey(key)).toMatchObject({ person: ida, scopes: ['evaluate'] });
  });

  test('goes back to the previous release with everything in it', async () => {
    await closeDatabase();
    await migrate('migrate:rollback');
    expect(await structure()).toEqual(structureBefore);
    const now = await everything();
    // When a key was last used was noted meanwhile; sessions, which counted these, ended.
    const settled = (rows: Rows) =>
      JSON.stringify(rows, (column, value: unknown) =>
        ['token_version', 'last_used_at'].includes(column) ? null : value,
      );
    expect(settled(now)).toBe(settled(before));
  }, 120_000);
});
