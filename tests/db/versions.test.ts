import { randomUUID } from 'node:crypto';
import { afterAll, beforeEach, describe, expect, test } from 'vitest';
import { closeDatabase, database, inTransaction, isDuplicate } from '@/db/client';
import { findNotebook, insertNotebook, listNotebooksOf, lockHead } from '@/db/queries/notebooks';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { insertUser } from '@/db/queries/users';
import { findVersion, insertVersion, listVersions } from '@/db/queries/versions';
import { insertWorkshop } from '@/db/queries/workshops';

let authorId: string;
let notebookId: string;

beforeEach(async () => {
  const db = database();
  const email = `${randomUUID()}@yard.example`;
  authorId = await insertUser(db, { email, name: 'Saver', passwordHash: 'none' });
  const workshopId = await insertWorkshop(db, { name: 'Yard' });
  notebookId = await insertNotebook(db, { workshopId, title: 'Window' });
});

afterAll(closeDatabase);

/** A save as the services make it: null when somebody else was there first. */
function save(base: number, content: unknown): Promise<number | null> {
  return inTransaction(async (trx) => {
    if ((await lockHead(trx, notebookId)) !== base) return null;
    await insertVersion(trx, { notebookId, number: base + 1, authorId, content });
    return base + 1;
  });
}

describe('saving', () => {
  test('of many saves on the same base exactly one becomes the version', async () => {
    const saves = Array.from({ length: 12 }, (_, k) => save(0, { from: k }));
    const numbers = await Promise.all(saves);
    expect(numbers.filter((number) => number === 1)).toHaveLength(1);
    expect(numbers.filter((number) => number === null)).toHaveLength(11);
    const winner = numbers.indexOf(1);
    const stored = await findVersion(database(), notebookId, 1);
    expect(stored?.content).toEqual({ from: winner });
    expect((await findNotebook(database(), notebookId))?.head).toBe(1);
  });

  test('savers who try again on the new head all get in, none over another', async () => {
    const savers = Array.from({ length: 8 }, async (_, k) => {
      for (;;) {
        const head = (await findNotebook(database(), notebookId))?.head ?? 0;
        const number = await save(head, { saver: k });
        if (number !== null) return number;
      }
    });
    const numbers = (await Promise.all(savers)).sort((a, b) => a - b);
    expect(numbers).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
    const versions = await listVersions(database(), notebookId);
    expect(versions.map(({ number }) => number)).toEqual([8, 7, 6, 5, 4, 3, 2, 1]);
    const contents = await Promise.all(
      versions.map(({ number }) => findVersion(database(), notebookId, number)),
    );
    const seen = contents.map((version) => (version?.content as { saver: number }).saver);
    expect(new Set(seen).size).toBe(8);
  });

  test('a number that is taken is refused even without the lock, and the head stays', async () => {
    await save(0, { first: true });
    const again = database().transaction((trx) =>
      insertVersion(trx, { notebookId, number: 1, authorId, content: { second: true } }),
    );
    await expect(again).rejects.toSatisfy(isDuplicate);
    expect((await findVersion(database(), notebookId, 1))?.content).toEqual({ first: true });
  });

  test('a save that fails half-way leaves neither a version nor a moved head', async () => {
    const broken = inTransaction(async (trx) => {
      await insertVersion(trx, { notebookId, number: 1, authorId, content: {} });
      throw new RangeError('after the insert');
    });
    await expect(broken).rejects.toThrow(RangeError);
    expect(await listVersions(database(), notebookId)).toEqual([]);
    expect((await findNotebook(database(), notebookId))?.head).toBe(0);
  });
});

test('content comes back as it was stored, whatever the characters and the size of its numbers', async () => {
  const content = {
    cells: [{ source: 's = √(2) · R′ # “ħ” 𝕊 \\ \u2028 \0' }],
    digits: '9007199254740993',
    long: 'x'.repeat(300_000),
  };
  await save(0, content);
  const stored = await findVersion(database(), notebookId, 1);
  expect(stored?.content).toEqual(content);
});

test('a deadlock is tried again, and both sides get their work done', async () => {
  const db = database();
  const other = await insertNotebook(db, {
    workshopId: (await findNotebook(db, notebookId))?.workshop.id ?? '',
    title: 'Second',
  });
  let attempts = 0;
  const lockBoth = (first: string, second: string) =>
    inTransaction(async (trx) => {
      attempts += 1;
      await lockHead(trx, first);
      await new Promise((resolve) => setTimeout(resolve, 150));
      await lockHead(trx, second);
      await trx('notebooks').where({ id: second }).increment('head', 1);
    });
  await Promise.all([lockBoth(notebookId, other), lockBoth(other, notebookId)]);
  expect(attempts).toBe(3);
  expect((await findNotebook(db, notebookId))?.head).toBe(1);
  expect((await findNotebook(db, other))?.head).toBe(1);
});

test('the table of notebooks names who saved last, and only what the person has a role in', async () => {
  const db = database();
  expect(await listNotebooksOf(db, authorId, { archived: false })).toEqual([]);
  await putNotebookRole(db, notebookId, authorId, 'viewer');
  await save(0, {});
  const [entry, ...rest] = await listNotebooksOf(db, authorId, { archived: false });
  expect(rest).toEqual([]);
  expect(entry).toMatchObject({ id: notebookId, role: 'viewer', head: 1, savedBy: 'Saver' });
  expect(await listNotebooksOf(db, authorId, { archived: true })).toEqual([]);
});
