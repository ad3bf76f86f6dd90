import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import { createServer, type Server } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { randomUUID } from 'node:crypto';
import knex, { type Knex } from 'knex';
import { simpleParser } from 'mailparser';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { connectionOptions } from '@/db/connection';
import { up } from '@/db/migrations/014-outgoing-mail';
import { pruneMail } from '@/db/queries/outgoing-mail';
import { queueLetter, type Letter } from '@/lib/mail';
import { MOST_ATTEMPTS } from '@/lib/mail/back-off';
import { openMailbox } from '@/lib/mail/mailbox-server.mjs';
import { smtpTransport, type Transport } from '@/lib/mail/transport';
import { sendDue } from '@/lib/mail/worker';

/** A queue of its own: one of the tests' shared database may be sent from by a served copy. */
const base = new URL(process.env.TEST_DATABASE_URL ?? 'mysql://missing');
const name = `${base.pathname.slice(1)}_mail`;
const own = new URL(base);
own.pathname = `/${name}`;

const FROM = 'Surdwork <surdwork@yard.example>';
let server: Knex;
/** Two clients stand for two instances. */
let db: Knex;
let other: Knex;
let folder: string;
let mailbox: { port: number; close(): Promise<void> };
let transport: Transport;

beforeAll(async () => {
  server = knex(connectionOptions(base.href));
  await server.raw(`drop database if exists ${name}`);
  await server.raw(`create database ${name}`);
  db = knex(connectionOptions(own.href));
  other = knex(connectionOptions(own.href));
  await up(db);
});

beforeEach(async () => {
  // What is told of failed attempts is part of them, and of no use here.
  vi.spyOn(console, 'error').mockImplementation(() => undefined);
  await db('outgoing_mail').delete();
  folder = mkdtempSync(join(tmpdir(), 'surdwork-mail-'));
  mailbox = await openMailbox(folder);
  transport = toPort(mailbox.port);
});

afterEach(async () => {
  transport.close();
  await mailbox.close();
  rmSync(folder, { recursive: true, force: true });
});

afterAll(async () => {
  await Promise.all([db.destroy(), other.destroy()]);
  await server.raw(`drop database if exists ${name}`);
  await server.destroy();
});

const toPort = (port: number) =>
  smtpTransport({ url: `smtp://127.0.0.1:${port}`, user: null, password: null, from: FROM });

const letter = (more: Partial<Letter> = {}): Letter => ({
  to: 'maren@oldacre.example',
  name: 'Maren Oldacre',
  subject: 'A note from the yard',
  paragraphs: ['The rod is ready; √2 · 600 mm = 848.5 mm.'],
  action: { label: 'See it', url: 'https://yard.example/notebooks/1' },
  reason: 'You get this letter because you asked for it.',
  ...more,
});

interface Row {
  id: string;
  attempts: number;
  letter: string;
  sent_at: Date | null;
  given_up_at: Date | null;
  due_at: Date;
  last_fault: string | null;
}

const rows = (): Promise<Row[]> => db<Row>('outgoing_mail').orderBy('queued_at');
const files = () => readdirSync(folder).sort();
const parsed = () =>
  Promise.all(files().map((file) => simpleParser(readFileSync(join(folder, file)))));
const makeDue = () => db('outgoing_mail').update({ due_at: new Date(Date.now() - 1000) });

/** A server that closes each connection at once, after a line if one is given. */
async function refusing(line = ''): Promise<{ server: Server; transport: Transport }> {
  const refuser = createServer((socket) => {
    socket.on('error', () => undefined);
    socket.end(line);
  });
  await new Promise<void>((resolve) => refuser.listen(0, '127.0.0.1', resolve));
  const address = refuser.address() as { port: number };
  return { server: refuser, transport: toPort(address.port) };
}

describe('a letter', () => {
  it('arrives with subject, addressee, sender, both parts and a working address', async () => {
    await queueLetter(db, letter());
    expect(await sendDue(db, transport)).toBe(1);
    const [mail] = await parsed();
    expect(mail?.subject).toBe('A note from the yard');
    expect(mail?.to).toMatchObject({
      value: [{ name: 'Maren Oldacre', address: 'maren@oldacre.example' }],
    });
    expect(mail?.from?.value).toEqual([{ name: 'Surdwork', address: 'surdwork@yard.example' }]);
    expect(mail?.text?.split('\n')).toContain('https://yard.example/notebooks/1');
    expect(mail?.text).toContain('√2 · 600 mm');
    expect(mail?.html).toContain('href="https://yard.example/notebooks/1"');
    expect(mail?.html).toContain('√2 · 600 mm');
    expect(mail?.headers.get('auto-submitted')).toBe('auto-generated');
    const [row] = await rows();
    expect(mail?.messageId).toBe(`<${row?.id}@yard.example>`);
  });

  it('is one file that its owner alone may read', async () => {
    await queueLetter(db, letter());
    await sendDue(db, transport);
    const [file = ''] = files();
    expect(file).toMatch(/^\d{8}T\d{9}Z-[0-9a-f]{8}\.eml$/);
    expect(statSync(join(folder, file)).mode & 0o077).toBe(0);
  });

  it('takes no header of whoever wrote a name or a subject', async () => {
    const sly = 'Maren\r\nBcc: victim@elsewhere.example\r\nX-Sly: 1';
    await queueLetter(
      db,
      letter({ name: sly, subject: `A note\r\nBcc: victim@elsewhere.example` }),
    );
    await sendDue(db, transport);
    const [mail] = await parsed();
    expect(mail?.bcc).toBeUndefined();
    expect(mail?.headers.has('x-sly')).toBe(false);
    expect(mail?.to).toMatchObject({ value: [{ address: 'maren@oldacre.example' }] });
    expect(mail?.subject).toBe('A note Bcc: victim@elsewhere.example');
  });

  it('goes to the one address it is for, whatever stands around it', async () => {
    await queueLetter(db, letter({ name: 'a@b.example, c@d.example', to: 'only@oldacre.example' }));
    await sendDue(db, transport);
    const [mail] = await parsed();
    const to = Array.isArray(mail?.to) ? mail.to[0] : mail?.to;
    expect(to?.value.map(({ address }) => address)).toEqual(['only@oldacre.example']);
  });

  it('is blank in the queue once it is out, and not sent again', async () => {
    await queueLetter(db, letter());
    await sendDue(db, transport);
    await makeDue();
    expect(await sendDue(db, transport)).toBe(0);
    const [row] = await rows();
    expect(row).toMatchObject({ letter: '{}', attempts: 1, last_fault: null });
    expect(row?.sent_at).not.toBeNull();
    expect(files()).toHaveLength(1);
  });

  it('with the same key as another is not sent beside it', async () => {
    for (let time = 0; time < 3; time += 1) await queueLetter(db, letter(), 'revision-a');
    expect(await sendDue(db, transport)).toBe(1);
  });

  it('goes out only if the transaction that queued it was stored', async () => {
    const broken = db.transaction(async (trx) => {
      await queueLetter(trx, letter());
      throw new Error('broken off');
    });
    await expect(broken).rejects.toThrow('broken off');
    expect(await sendDue(db, transport)).toBe(0);
  });
});

describe('two instances on one database', () => {
  it('send each letter once between them', async () => {
    const addresses = Array.from({ length: 60 }, () => `${randomUUID()}@oldacre.example`);
    for (const to of addresses) await queueLetter(db, letter({ to }));
    const second = toPort(mailbox.port);
    const counts = await Promise.all([sendDue(db, transport), sendDue(other, second)]);
    second.close();
    expect(counts[0] + counts[1]).toBe(60);
    const sent = (await parsed()).map(({ to }) => (Array.isArray(to) ? to[0] : to)?.text ?? '');
    expect(sent).toHaveLength(60);
    expect(new Set(sent).size).toBe(60);
  });

  it('leave a letter alone that the other one has in hand, and take it over when its lease is over', async () => {
    await queueLetter(db, letter());
    let release = (): void => undefined;
    const ids: string[] = [];
    /** Takes the letter and comes to nothing, as an instance that is killed does. */
    const stuck: Transport = {
      send: (_letter, id) => {
        ids.push(id);
        return new Promise((resolve) => (release = resolve));
      },
      close: () => undefined,
    };
    const first = sendDue(db, stuck, 2);
    await vi.waitFor(() => expect(ids).toHaveLength(1));
    expect(await sendDue(other, transport)).toBe(0);
    await makeDue();
    expect(await sendDue(other, transport)).toBe(1);
    const [mail] = await parsed();
    // A repeat can be known as one: it carries the same Message-ID.
    expect(mail?.messageId).toBe(`<${ids[0]}@yard.example>`);
    release();
    await first;
    expect(files()).toHaveLength(1);
  });

  it('do not let a late failure of one undo what the other one sent', async () => {
    await queueLetter(db, letter());
    let fail: (error: Error) => void = () => undefined;
    let begun = false;
    const late: Transport = {
      send: () => {
        begun = true;
        return new Promise((_, reject) => (fail = reject));
      },
      close: () => undefined,
    };
    const first = sendDue(db, late, 2);
    await vi.waitFor(() => expect(begun).toBe(true));
    await makeDue();
    expect(await sendDue(other, transport)).toBe(1);
    fail(new Error('connection lost'));
    await first;
    const [row] = await rows();
    expect(row?.sent_at).not.toBeNull();
    expect(row?.given_up_at).toBeNull();
    await makeDue();
    expect(await sendDue(db, transport)).toBe(0);
  });
});

describe('a server that takes nothing', () => {
  it('has the letter tried again later and later, and given up with a reason', async () => {
    const refuser = await refusing();
    await queueLetter(db, letter());
    const waits: number[] = [];
    for (let attempt = 1; attempt <= MOST_ATTEMPTS; attempt += 1) {
      expect(await sendDue(db, refuser.transport)).toBe(0);
      const [row] = await rows();
      expect(row?.attempts).toBe(attempt);
      waits.push(((row?.due_at.getTime() ?? 0) - Date.now()) / 1000);
      if (attempt === 1) {
        expect(row).toMatchObject({ sent_at: null, given_up_at: null });
        expect(row?.last_fault).toMatch(/^E[A-Z]+$/);
        expect(row?.letter).toContain('rod');
        // Before its time it is left alone.
        expect(await sendDue(db, refuser.transport)).toBe(0);
      }
      await makeDue();
    }
    expect(waits[0]).toBeGreaterThan(20);
    expect(waits[0]).toBeLessThan(31);
    expect(waits[3]).toBeGreaterThan(3500);
    const [row] = await rows();
    expect(row?.given_up_at).not.toBeNull();
    expect(row?.last_fault).toMatch(/^given up after 8 attempts: E[A-Z]+$/);
    expect(row?.letter).toBe('{}');
    expect(await sendDue(db, transport)).toBe(0);
    refuser.transport.close();
    refuser.server.close();
  });

  it('loses nothing: what it refused is sent once it takes letters again', async () => {
    const refuser = await refusing('421 come back later\r\n');
    await queueLetter(db, letter());
    await sendDue(db, refuser.transport);
    refuser.transport.close();
    refuser.server.close();
    await makeDue();
    expect(await sendDue(db, transport)).toBe(1);
    expect(await parsed()).toHaveLength(1);
  });

  it('does not keep other letters back', async () => {
    await queueLetter(db, letter({ to: 'first@oldacre.example' }));
    await queueLetter(db, letter({ to: 'second@oldacre.example' }));
    const choosy: Transport = {
      send: (one, id) =>
        one.to.startsWith('first')
          ? Promise.reject(Object.assign(new Error('no'), { code: 'ETIMEDOUT' }))
          : transport.send(one, id),
      close: () => undefined,
    };
    expect(await sendDue(db, choosy)).toBe(1);
  });

  it.each([
    [550, /^refused for good: EENVELOPE 550$/, true],
    [450, /^EENVELOPE 450$/, false],
  ])('answering %i to the address, is believed', async (responseCode, fault, final) => {
    await queueLetter(db, letter());
    const refused: Transport = {
      send: () =>
        Promise.reject(
          Object.assign(new Error('maren@oldacre.example'), { code: 'EENVELOPE', responseCode }),
        ),
      close: () => undefined,
    };
    await sendDue(db, refused);
    const [row] = await rows();
    expect(row?.last_fault).toMatch(fault);
    expect(row?.given_up_at !== null).toBe(final);
    expect(row?.last_fault).not.toContain('maren');
  });
});

describe('the queue', () => {
  it('gives up what is no letter, and goes on', async () => {
    await queueLetter(db, letter());
    await db('outgoing_mail').update({ letter: '{"to": 7}' });
    await queueLetter(db, letter());
    expect(await sendDue(db, transport)).toBe(1);
    const faults = (await rows()).map((row) => row.last_fault);
    expect(faults).toContain('the letter is not readable');
  });

  it('forgets whom it wrote to after a month, and never what still waits', async () => {
    for (const to of ['sent', 'recent', 'waits']) {
      await queueLetter(db, letter({ to: `${to}@oldacre.example` }));
    }
    const old = new Date(Date.now() - 31 * 24 * 3600 * 1000);
    const of = (who: string) => db('outgoing_mail').where({ recipient: `${who}@oldacre.example` });
    await of('sent').update({ sent_at: old, queued_at: old });
    await of('recent').update({ sent_at: new Date(), queued_at: old });
    await of('waits').update({ queued_at: old });
    await pruneMail(db, 30);
    const left: string[] = await db('outgoing_mail').pluck('recipient');
    expect(left.sort()).toEqual(['recent@oldacre.example', 'waits@oldacre.example']);
  });
});

describe('the local mailbox', () => {
  it('stops and starts again on the same folder, and keeps what is in it', async () => {
    await queueLetter(db, letter());
    await sendDue(db, transport);
    transport.close();
    await mailbox.close();
    mailbox = await openMailbox(folder);
    transport = toPort(mailbox.port);
    await queueLetter(db, letter());
    expect(await sendDue(db, transport)).toBe(1);
    expect(files()).toHaveLength(2);
  });
});
