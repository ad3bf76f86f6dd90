import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database, inTransaction } from '@/db/client';
import { createKey, revokeKey, type Person } from '@/lib/accounts';
import { DEEDS, DEED_GROUPS, deedsOf, record, type Deed } from '@/lib/activity';
import {
  addPerson,
  changeNotebook,
  changeRole,
  changeTitleBlock,
  createNotebook,
  handOver,
  leaveNotebook,
  recordExport,
  removePerson,
  TitleBlockEntries,
} from '@/lib/notebooks';
import {
  ActivityQuery,
  changeMember,
  changeWorkshop,
  exportActivity,
  invite,
  makeWorkshop,
  readActivity,
  removeMember,
  resendInvitation,
  withdrawInvitation,
} from '@/lib/workshops';
import { deedsIn, newNotebook, newYard, type Yard } from './yard';

afterAll(closeDatabase);

const code = (wanted: string) => ({ code: wanted });
const query = (asked: Record<string, string> = {}) => ActivityQuery.parse(asked);

/** Lines written past the services, to have many of them. */
async function fill(yard: Yard, count: number, by: Person, deed: Deed = 'workshop.changed') {
  await inTransaction(async (trx) => {
    for (let line = 1; line <= count; line += 1) {
      await record(trx, { deed, by: by.id, workshopId: yard.id, subject: `line ${line}` });
    }
  });
}

describe('the record in the database', () => {
  it('can be neither changed nor shortened', async () => {
    const yard = await newYard();
    await fill(yard, 1, yard.admin);
    const lines = () => database()('activity').where({ workshop_id: yard.id });
    await expect(lines().update({ subject: 'other' })).rejects.toThrow('append-only');
    await expect(lines().delete()).rejects.toThrow('append-only');
    expect(await deedsIn(yard.id)).toEqual(['workshop.changed']);
  });

  it('outlives the workshop and the people it speaks of', async () => {
    const yard = await newYard();
    await fill(yard, 1, yard.member);
    await database()('workshops').where({ id: yard.id }).delete();
    await database()('users').where({ id: yard.member.id }).delete();
    expect(await deedsIn(yard.id)).toHaveLength(1);
  });
});

describe('every deed of a service', () => {
  it('is on the record once, in the order in which it was done', async () => {
    const yard = await newYard();
    const { admin, member, stranger, id } = yard;
    const notebook = await newNotebook(admin, id);
    await changeNotebook(admin, notebook, { title: 'Wheel window' });
    await changeNotebook(admin, notebook, { title: 'Wheel window' });
    await changeNotebook(admin, notebook, { archived: true });
    await changeNotebook(admin, notebook, { archived: true });
    await changeNotebook(admin, notebook, { archived: false });
    await changeTitleBlock(admin, notebook, TitleBlockEntries.parse({ sheet: '2' }));
    await addPerson(admin, notebook, { email: member.email, role: 'viewer' });
    await addPerson(admin, notebook, { email: stranger.email, role: 'viewer' });
    await changeRole(admin, notebook, member.id, 'editor');
    await changeRole(admin, notebook, member.id, 'editor');
    await removePerson(admin, notebook, stranger.id);
    await recordExport(admin, notebook, { format: 'json', version: 1 });
    await handOver(admin, notebook, { to: member.id });
    await leaveNotebook(admin, notebook);
    const key = await createKey(admin, { label: 'Saw', scopes: ['evaluate'] });
    await revokeKey(admin, key.id);
    await changeWorkshop(admin, id, { name: 'Quarrymoor' });
    const target = { workshop: id };
    const sent = await invite(admin, target, { email: stranger.email, role: 'member' });
    await resendInvitation(admin, target, sent.id);
    await withdrawInvitation(admin, target, sent.id);
    await changeMember(admin, id, member.id, { role: 'admin' });
    await removeMember(admin, id, member.id, { successor: admin.id });
    expect(await deedsIn(id)).toEqual([
      'notebook.made',
      'notebook.renamed',
      'notebook.archived',
      'notebook.brought-back',
      'titleBlock.changed',
      'role.given',
      'role.given',
      'role.changed',
      'role.taken',
      'notebook.exported',
      'role.handed-over',
      'role.left',
      'key.made',
      'key.revoked',
      'workshop.changed',
      'member.invited',
      'invitation.sent-again',
      'invitation.withdrawn',
      'member.role-changed',
      'role.handed-over',
      'member.removed',
    ]);
    const { id: further } = await makeWorkshop(admin, { name: 'Second yard' });
    expect(await deedsIn(further)).toEqual(['workshop.made']);
  });

  it('is not there when the deed was refused', async () => {
    const yard = await newYard();
    const { admin, member, stranger, id } = yard;
    const notebook = await newNotebook(admin, id);
    const attempts = [
      () => changeNotebook(member, notebook, { title: 'Stolen' }),
      () =>
        changeNotebook(admin, notebook, { archived: true }).then(() =>
          changeTitleBlock(admin, notebook, TitleBlockEntries.parse({})),
        ),
      () => leaveNotebook(admin, notebook),
      () => handOver(admin, notebook, { to: stranger.id }),
      () => removePerson(admin, notebook, stranger.id),
      () => recordExport(member, notebook, { format: 'tex' }),
      () => createNotebook(stranger, { title: 'Mine', workshopId: id }),
      () => changeWorkshop(member, id, { name: 'Mine' }),
      () => changeMember(admin, id, admin.id, { role: 'member' }),
      () => removeMember(admin, id, admin.id),
    ];
    for (const attempt of attempts) await expect(attempt()).rejects.toBeInstanceOf(Error);
    expect(await deedsIn(id)).toEqual(['notebook.made', 'notebook.archived']);
  });

  it('is not there when the deed was rolled back', async () => {
    const yard = await newYard();
    const failing = inTransaction(async (trx) => {
      await record(trx, {
        deed: 'workshop.changed',
        by: yard.admin.id,
        workshopId: yard.id,
        subject: 'nothing',
      });
      throw new Error('broken off');
    });
    await expect(failing).rejects.toThrow('broken off');
    expect(await deedsIn(yard.id)).toEqual([]);
  });

  it('names no person and no address', async () => {
    const yard = await newYard();
    const { admin, member, id } = yard;
    const notebook = await newNotebook(admin, id);
    await addPerson(admin, notebook, { email: member.email, role: 'editor' });
    await invite(admin, { workshop: id }, { email: yard.stranger.email, role: 'member' });
    const rows: unknown = await database()('activity').where({ workshop_id: id });
    const text = JSON.stringify(rows);
    for (const secret of [admin.email, member.email, yard.stranger.email, '"Mab"', 'Ada']) {
      expect(text).not.toContain(secret);
    }
  });
});

describe('reading the record', () => {
  it('is for admins of the workshop', async () => {
    const yard = await newYard();
    await expect(readActivity(yard.member, yard.id, query())).rejects.toMatchObject(
      code('forbidden'),
    );
    await expect(exportActivity(yard.member, yard.id, query())).rejects.toMatchObject(
      code('forbidden'),
    );
    await expect(readActivity(yard.stranger, yard.id, query())).rejects.toMatchObject(
      code('not-found'),
    );
  });

  it('goes page by page from the newest to the oldest, each line once', async () => {
    const yard = await newYard();
    await fill(yard, 120, yard.admin);
    const seen: string[] = [];
    let before: number | null = null;
    const sizes: number[] = [];
    do {
      const page = await readActivity(
        yard.admin,
        yard.id,
        query(before === null ? {} : { before: String(before) }),
      );
      seen.push(...page.entries.map(({ subject }) => subject));
      sizes.push(page.entries.length);
      before = page.before;
      // What is done meanwhile does not shift the pages.
      await fill(yard, 1, yard.admin);
    } while (before !== null);
    expect(sizes).toEqual([50, 50, 20]);
    expect(seen).toEqual(Array.from({ length: 120 }, (_, index) => `line ${120 - index}`));
  });

  it('is filtered by person, kind and day, each alone and all together', async () => {
    const yard = await newYard();
    await fill(yard, 2, yard.admin, 'workshop.changed');
    await fill(yard, 3, yard.member, 'notebook.made');
    await fill(yard, 4, yard.member, 'role.given');
    const today = new Date().toISOString().slice(0, 10);
    const tomorrow = new Date(Date.now() + 24 * 3600 * 1000).toISOString().slice(0, 10);
    const count = async (asked: Record<string, string>) =>
      (await readActivity(yard.admin, yard.id, query(asked))).entries.length;
    expect(await count({})).toBe(9);
    expect(await count({ person: yard.member.id })).toBe(7);
    expect(await count({ group: 'people' })).toBe(4);
    expect(await count({ person: yard.admin.id, group: 'people' })).toBe(0);
    expect(await count({ from: tomorrow })).toBe(0);
    expect(await count({ from: '2020-01-01', to: '2020-01-02' })).toBe(0);
    expect(await count({ from: '2020-01-01', to: tomorrow, group: 'notebooks' })).toBe(3);
    expect(await count({ to: today })).toBeGreaterThanOrEqual(0);
    const { people } = await readActivity(yard.admin, yard.id, query());
    expect(people.map(({ name }) => name)).toEqual(['Ada', 'Mab']);
  });

  it('tells names as they are now', async () => {
    const yard = await newYard();
    const notebook = await newNotebook(yard.admin, yard.id);
    await addPerson(yard.admin, notebook, { email: yard.member.email, role: 'editor' });
    await database()('users').where({ id: yard.member.id }).update({ name: 'Mabel' });
    await database()('users').where({ id: yard.admin.id }).update({ name: 'former member' });
    const { entries } = await readActivity(yard.admin, yard.id, query());
    expect(entries[0]).toMatchObject({
      who: 'former member',
      did: 'gave a role on',
      subject: 'Rose window',
      notebookId: notebook,
      more: 'Mabel, as editor',
    });
  });

  it('refuses what it cannot look for', () => {
    for (const asked of [
      { person: 'ida' },
      { group: 'everything' },
      { from: '31.3.2026' },
      { from: '2026-02-30' },
      { before: '0' },
      { before: '-1' },
      { page: '2' },
    ]) {
      expect(ActivityQuery.safeParse(asked).success).toBe(false);
    }
  });

  it('knows a kind for every deed', () => {
    const grouped = DEED_GROUPS.flatMap(deedsOf);
    expect([...grouped].sort()).toEqual(Object.keys(DEEDS).sort());
  });
});

describe('the record as a file', () => {
  it('holds every line, newest first, whatever the number of lines', async () => {
    const yard = await newYard();
    await fill(yard, 1_001, yard.admin);
    const { text, name } = await exportActivity(yard.admin, yard.id, query());
    const rows = parseCsv(text);
    expect(name).toBe('Quarrymoor Yard, activity.csv');
    expect(rows).toHaveLength(1_002);
    expect(rows[1]?.[5]).toBe('line 1001');
    expect(rows.at(-1)?.[5]).toBe('line 1');
    expect(new Set(rows.map((row) => row.length))).toEqual(new Set([8]));
  });

  it('gives back any subject, and starts no formula', async () => {
    const yard = await newYard();
    const subjects = [
      'a "quoted", title',
      '=1+1',
      '+4',
      '@sum',
      '-2+3',
      'two\r\nlines',
      'Grübchen',
    ];
    for (const subject of subjects) {
      await record(database(), {
        deed: 'notebook.made',
        by: yard.admin.id,
        workshopId: yard.id,
        subject,
      });
    }
    const rows = parseCsv((await exportActivity(yard.admin, yard.id, query())).text).slice(1);
    const read = rows.map((row) => row[5] ?? '').reverse();
    expect(read.map((cell) => cell.replace(/^'/, ''))).toEqual(subjects);
    for (const cell of read) expect(cell).not.toMatch(/^[=+@-]/);
  });
});

/** A reader of RFC 4180 of its own: the grammar of its section 2, nothing more lenient. */
function parseCsv(text: string): string[][] {
  expect(text.endsWith('\r\n')).toBe(true);
  const rows: string[][] = [];
  let at = 0;
  while (at < text.length) {
    const row: string[] = [];
    for (;;) {
      const field = /^(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/.exec(text.slice(at, at + 5_000));
      if (field === null) throw new Error(`No field of RFC 4180 at ${at}.`);
      row.push(field[1]?.replaceAll('""', '"') ?? field[2] ?? '');
      at += field[0].length;
      if (field[3] === '\r\n') break;
    }
    rows.push(row);
  }
  return rows;
}
