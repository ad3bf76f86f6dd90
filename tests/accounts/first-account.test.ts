import { execFile } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { randomUUID } from 'node:crypto';
import knex, { type Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { connectionOptions } from '@/db/connection';

/** A copy of its own, on which nobody has an account yet and which keeps its letters to itself. */
const base = new URL(process.env.TEST_DATABASE_URL ?? 'mysql://missing');
const name = `${base.pathname.slice(1)}_first`;
const own = new URL(base);
own.pathname = `/${name}`;
const before = { ...process.env };

let server: Knex;
let folder: string;
let accounts: typeof import('@/lib/accounts');
let localMail: typeof import('@/lib/accounts/local-mail');
let client: typeof import('@/db/client');

beforeAll(async () => {
  server = knex(connectionOptions(base.href));
  await server.raw(`drop database if exists ${name}`);
  await server.raw(`create database ${name}`);
  const cli = join('node_modules', 'knex', 'bin', 'cli.js');
  await promisify(execFile)(
    process.execPath,
    ['--import', 'tsx', cli, 'migrate:latest', '--knexfile', 'knexfile.ts'],
    { env: { ...process.env, DATABASE_URL: own.href } },
  );
  folder = mkdtempSync(join(tmpdir(), 'surdwork-first-'));
  process.env.DATABASE_URL = own.href;
  process.env.SURDWORK_MAILBOX = folder;
  vi.resetModules();
  accounts = await import('@/lib/accounts');
  localMail = await import('@/lib/accounts/local-mail');
  client = await import('@/db/client');
}, 180_000);

afterAll(async () => {
  await client.closeDatabase();
  process.env.DATABASE_URL = before.DATABASE_URL;
  if (before.SURDWORK_MAILBOX === undefined) delete process.env.SURDWORK_MAILBOX;
  else process.env.SURDWORK_MAILBOX = before.SURDWORK_MAILBOX;
  rmSync(folder, { recursive: true, force: true });
  await server.raw(`drop database if exists ${name}`);
  await server.destroy();
});

const password = 'trammel and straightedge';
const newAccount = (called: string) => ({
  name: called,
  email: `${randomUUID()}@oldacre.example`,
  password,
  workshop: `${called}’s yard`,
});

describe('on a copy without an SMTP server', () => {
  it('the first person is let in at once, of two at the same moment only one, and reads the letters', async () => {
    const asked = [newAccount('Maren'), newAccount('Orla')];
    const answers = await Promise.all(
      asked.map((account) => accounts.signUp(account, randomUUID())),
    );
    expect(answers.map(({ confirmed }) => confirmed).sort()).toEqual([false, true]);
    const first = answers.find(({ confirmed }) => confirmed)?.email ?? '';
    const second = answers.find(({ confirmed }) => !confirmed)?.email ?? '';
    const whence = { address: randomUUID(), device: 'Firefox on Linux' };
    const person = await accounts.signIn({ email: first, password }, whence);
    expect(person?.email).toBe(first);
    expect(person && (await localMail.readsLocalMail(person))).toBe(true);

    const row: { letter: string } = await client
      .database()('outgoing_mail')
      .where({ recipient: second })
      .first('letter');
    const { url } = (JSON.parse(row.letter) as { action: { url: string } }).action;
    const token = url.split('/').at(-1) ?? '';
    const later = await accounts.confirmSignUp(token, randomUUID());
    expect(await localMail.readsLocalMail(later)).toBe(false);
    await expect(localMail.listMail(later)).rejects.toMatchObject({ code: 'not-found' });
    await expect(localMail.readMail(later, 'x')).rejects.toMatchObject({ code: 'not-found' });
  });

  it('nobody after the first is let in at once', async () => {
    const answer = await accounts.signUp(newAccount('Wren'), randomUUID());
    expect(answer.confirmed).toBe(false);
  });
});
