import { readdirSync } from 'node:fs';
import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { join } from 'node:path';
import knex, { type Knex } from 'knex';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { connectionOptions } from '@/db/connection';

const root = process.cwd();
const base = new URL(process.env.TEST_DATABASE_URL ?? 'mysql://missing');
const name = `${base.pathname.slice(1)}_migrations`;
const own = new URL(base);
own.pathname = `/${name}`;

let db: Knex;

beforeAll(async () => {
  const server = knex(connectionOptions(base.href));
  await server.raw(`drop database if exists ${name}`);
  await server.raw(`create database ${name}`);
  await server.destroy();
  db = knex(connectionOptions(own.href));
});

afterAll(async () => {
  await db.raw(`drop database ${name}`);
  await db.destroy();
});

/** The same command line that the operator has. */
async function migrate(...words: string[]): Promise<string> {
  const cli = join('node_modules', 'knex', 'bin', 'cli.js');
  const { stdout } = await promisify(execFile)(
    process.execPath,
    ['--import', 'tsx', cli, ...words, '--knexfile', 'knexfile.ts'],
    { cwd: root, env: { ...process.env, DATABASE_URL: own.href } },
  );
  return stdout;
}

async function structure(): Promise<string[]> {
  const [rows] = (await db.raw(
    `select concat_ws(' ', table_name, column_name, column_type, is_nullable, collation_name, column_key) as line
     from information_schema.columns where table_schema = database() order by 1`,
  )) as [{ line: string }[]];
  const [keys] = (await db.raw(
    `select concat_ws(' ', table_name, constraint_name, constraint_type) as line
     from information_schema.table_constraints where table_schema = database() order by 1`,
  )) as [{ line: string }[]];
  return [...rows, ...keys].map(({ line }) => line);
}

test('all migrations go up, back down to nothing, and up again to the same structure', async () => {
  await migrate('migrate:latest');
  const first = await structure();
  expect(first.some((line) => line.startsWith('versions content '))).toBe(true);

  await migrate('migrate:rollback', '--all');
  const left = (await structure()).filter((line) => !line.startsWith('knex_migrations'));
  expect(left).toEqual([]);

  await migrate('migrate:latest');
  expect(await structure()).toEqual(first);
});

test('a migration that was broken off after its statement can run again', async () => {
  const before = await structure();
  await db('knex_migrations').delete();
  await migrate('migrate:latest');
  expect(await structure()).toEqual(before);
  const recorded = await db('knex_migrations').count({ n: '*' }).first();
  expect(recorded?.n).toBe(readdirSync(join(root, 'db', 'migrations')).length);
});
