import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase, database, isDuplicate } from '@/db/client';
import { insertNotebook } from '@/db/queries/notebooks';
import { findUserByEmail, insertUser } from '@/db/queries/users';
import { insertVersion } from '@/db/queries/versions';
import { insertMembership, insertWorkshop } from '@/db/queries/workshops';

afterAll(closeDatabase);

const newUser = (email: string) =>
  insertUser(database(), { email, name: 'Someone', passwordHash: 'none' });
const newEmail = () => `${randomUUID()}@yard.example`;

/** MariaDB's error numbers, which the driver's names do not always match. */
const FOREIGN_KEY = { errno: 1452 };
const ROW_IN_USE = { errno: 1451 };
const CHECK = { errno: 4025 };
const TRUNCATED = { errno: 1265 };

describe('users', () => {
  test('one address is one person, whatever its case', async () => {
    const email = newEmail();
    await newUser(email);
    await expect(newUser(email.toUpperCase())).rejects.toSatisfy(isDuplicate);
    expect((await findUserByEmail(database(), ` ${email.toUpperCase()} `))?.email).toBe(email);
  });

  test('addresses that differ by an accent are two people', async () => {
    const name = randomUUID();
    await newUser(`rene-${name}@yard.example`);
    const id = await newUser(`rené-${name}@yard.example`);
    expect((await findUserByEmail(database(), `rené-${name}@yard.example`))?.id).toBe(id);
  });

  test('the table itself refuses an address that is not in lower case', async () => {
    const row = {
      id: randomUUID(),
      email: 'Capital@yard.example',
      name: 'A',
      password_hash: 'none',
    };
    await expect(database()('users').insert(row)).rejects.toMatchObject(CHECK);
  });
});

describe('references', () => {
  test('a membership needs a workshop and a person that exist', async () => {
    const user = await newUser(newEmail());
    const workshop = await insertWorkshop(database(), { name: 'Yard' });
    const nobody = randomUUID();
    await expect(insertMembership(database(), nobody, user, 'member')).rejects.toMatchObject(
      FOREIGN_KEY,
    );
    await expect(insertMembership(database(), workshop, nobody, 'member')).rejects.toMatchObject(
      FOREIGN_KEY,
    );
  });

  test('whoever has saved a version cannot be removed from under it', async () => {
    const db = database();
    const { author } = await notebookWithVersion();
    await expect(db('users').where({ id: author }).delete()).rejects.toMatchObject(ROW_IN_USE);
  });

  test('a version can be restored only from a version of the same notebook', async () => {
    const { author, notebookId } = await notebookWithVersion();
    const other = await notebookWithVersion();
    const add = (notebook: string, number: number, restoredFrom: number | null) =>
      database().transaction((trx) =>
        insertVersion(trx, {
          notebookId: notebook,
          number,
          authorId: author,
          content: {},
          restoredFrom,
        }),
      );
    await add(other.notebookId, 5, null);
    await expect(add(notebookId, 2, 5)).rejects.toMatchObject(FOREIGN_KEY);
    await expect(add(notebookId, 2, 1)).resolves.toBeInstanceOf(Date);
  });
});

describe('what the columns take', () => {
  test('a role outside the list is refused', async () => {
    const { author, notebookId } = await notebookWithVersion();
    const row = { notebook_id: notebookId, user_id: author, role: 'visitor' };
    await expect(database()('notebook_roles').insert(row)).rejects.toMatchObject(TRUNCATED);
  });

  test('content that is not JSON is refused', async () => {
    const { author, notebookId } = await notebookWithVersion();
    const row = {
      notebook_id: notebookId,
      number: 2,
      author_id: author,
      content: '{"cells": [',
      content_hash: '0'.repeat(64),
    };
    await expect(database()('versions').insert(row)).rejects.toMatchObject(CHECK);
  });

  test('every table stores all of Unicode and compares names by the same rule', async () => {
    const [tables] = (await database().raw(
      'select table_name as name, table_collation as rule from information_schema.tables where table_schema = database()',
    )) as [{ name: string; rule: string }[]];
    expect(tables.length).toBeGreaterThanOrEqual(12);
    expect(tables.filter(({ rule }) => rule !== 'utf8mb4_unicode_ci')).toEqual([]);
  });

  test('times come back to the millisecond, and the session counts in UTC', async () => {
    const db = database();
    const { author, notebookId } = await notebookWithVersion();
    const savedAt = new Date('2031-03-30T01:30:00.123Z');
    const version = { notebookId, number: 2, authorId: author, content: {}, savedAt };
    await db.transaction((trx) => insertVersion(trx, version));
    const row: { saved_at: Date; stored: string } = await db('versions')
      .where({ notebook_id: notebookId, number: 2 })
      .first('saved_at', db.raw("date_format(saved_at, '%Y-%m-%dT%H:%i:%s.%fZ') as stored"));
    expect(row.saved_at.toISOString()).toBe('2031-03-30T01:30:00.123Z');
    expect(row.stored).toBe('2031-03-30T01:30:00.123000Z');
  });
});

async function notebookWithVersion(): Promise<{ author: string; notebookId: string }> {
  const db = database();
  const author = await newUser(newEmail());
  const workshopId = await insertWorkshop(db, { name: 'Yard' });
  const notebookId = await insertNotebook(db, { workshopId, title: 'Window' });
  await db.transaction((trx) =>
    insertVersion(trx, { notebookId, number: 1, authorId: author, content: { cells: [] } }),
  );
  return { author, notebookId };
}
