import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import type { Person } from '@/lib/accounts';
import { deleteRole, newEdit } from './edits';
import {
  changeNotebook,
  listVersions,
  readNotebook,
  readVersion,
  saveVersion,
} from '@/lib/notebooks';
import type { NotebookContent } from '@/lib/notebooks/content';
import { mergeContents } from '@/lib/notebooks/merge';
import { contentOf, dimension, newNotebook, newPerson } from './people';

let owner: Person;
let editor: Person;
beforeAll(async () => {
  [owner, editor] = await Promise.all([newPerson('Owain'), newPerson('Edda')]);
});
afterAll(closeDatabase);

const start = contentOf(dimension('a', 'R = 1200 mm'), dimension('b', 'n = 8'));
const with2 = (first: string, second: string) =>
  contentOf(dimension('a', first), dimension('b', second));

describe('a save on an old version, to be merged', () => {
  test('that changed something else is stored as the next version, and says with which it was merged', async () => {
    const id = await newNotebook(owner, start, [editor]);
    await saveVersion(owner, id, { base: 1, content: with2('R = 1150 mm', 'n = 8') });
    const saved = await saveVersion(editor, id, {
      base: 1,
      content: with2('R = 1200 mm', 'n = 9'),
      merge: true,
      byItself: true,
    });
    const both = with2('R = 1150 mm', 'n = 9');
    expect(saved).toMatchObject({ number: 3, unchanged: false, merged: true, content: both });
    expect((await readNotebook(owner, id)).content).toEqual(both);
    expect((await listVersions(owner, id)).versions).toMatchObject([
      { number: 3, author: 'Edda', mergedWith: 2, byItself: true },
      { number: 2, author: 'Owain', mergedWith: null, byItself: false },
      { number: 1, author: 'Owain', mergedWith: null, byItself: false },
    ]);
  });

  test('that changed the same line is refused with the head and both readings, and nothing is stored', async () => {
    const id = await newNotebook(owner, start, [editor]);
    await saveVersion(owner, id, { base: 1, content: with2('R = 1150 mm', 'n = 8') });
    const content = with2('R = 1100 mm', 'n = 9');
    await expect(saveVersion(editor, id, { base: 1, content, merge: true })).rejects.toMatchObject({
      code: 'stale-version',
      extra: {
        head: { number: 2, author: 'Owain' },
        conflicts: [
          {
            kind: 'cell',
            id: 'a',
            mine: { source: 'R = 1100 mm' },
            theirs: { source: 'R = 1150 mm' },
          },
        ],
      },
    });
    expect((await readNotebook(owner, id)).notebook.version).toBe(2);
  });

  test('sent again because its answer was lost makes no second version', async () => {
    const id = await newNotebook(owner, start, [editor]);
    await saveVersion(owner, id, { base: 1, content: with2('R = 1150 mm', 'n = 8') });
    const sent = { base: 1, content: with2('R = 1200 mm', 'n = 9'), merge: true };
    await saveVersion(editor, id, sent);
    await saveVersion(owner, id, { base: 3, content: with2('R = 1100 mm', 'n = 9') });
    const again = await saveVersion(editor, id, sent);
    expect(again).toMatchObject({ number: 4, unchanged: true, merged: true });
    expect(again.content).toEqual(with2('R = 1100 mm', 'n = 9'));
  });

  test.each([
    [9, 'invalid'],
    [4_000_000_000, 'invalid'],
  ])('on version %i, which there is not, is refused', async (base, code) => {
    const id = await newNotebook(owner, start);
    const content = with2('R = 1 mm', 'n = 8');
    await expect(saveVersion(owner, id, { base, content, merge: true })).rejects.toMatchObject({
      code,
      message: `The change is said to be made on version ${base}, which this notebook does not have; its newest is version 1.`,
    });
  });

  test('that would be too large together is refused in a sentence, and both texts stay', async () => {
    const many = (side: string) =>
      contentOf(
        ...start.cells,
        ...Array.from({ length: 1_000 }, (_, at) => dimension(`${side}${at}`, '1')),
      );
    const id = await newNotebook(owner, start, [editor]);
    await saveVersion(owner, id, { base: 1, content: many('o') });
    const sent = { base: 1, content: many('e'), merge: true };
    await expect(saveVersion(editor, id, sent)).rejects.toMatchObject({
      code: 'invalid',
      message:
        'Brought together with version 2 the notebook cannot be saved: The notebook has 2002 cells; at most 2000 are allowed.',
    });
  });

  test('of an archived notebook, or by whom the role was taken from, is refused with a reason', async () => {
    const id = await newNotebook(owner, start, [editor]);
    const sent = { base: 1, content: with2('R = 1 mm', 'n = 8'), merge: true };
    await deleteRole(id, editor);
    await expect(saveVersion(editor, id, sent)).rejects.toMatchObject({ code: 'not-found' });
    await changeNotebook(owner, id, { archived: true });
    await expect(saveVersion(owner, id, sent)).rejects.toMatchObject({
      code: 'archived',
      message: 'This notebook is archived, so nothing was saved. An owner can bring it back.',
    });
  });
});

describe('keeping by hand', () => {
  test('what one’s own sheet saved by itself makes that very version one kept by hand, with the note', async () => {
    const id = await newNotebook(owner, start);
    const content = with2('R = 1 mm', 'n = 8');
    await saveVersion(owner, id, { base: 1, content, byItself: true });
    const kept = { base: 2, content, note: 'as measured' };
    for (const request of [kept, kept, { base: 2, content, byItself: true }])
      expect(await saveVersion(owner, id, request)).toMatchObject({ number: 2, unchanged: true });
    const { versions } = await listVersions(owner, id);
    expect(versions).toMatchObject([{ byItself: false, note: 'as measured' }, {}]);
    expect((await readVersion(owner, id, 2)).content).toEqual(content);
  });

  test('what somebody else’s sheet saved makes a version of one’s own', async () => {
    const id = await newNotebook(owner, start, [editor]);
    const content = with2('R = 1 mm', 'n = 8');
    await saveVersion(owner, id, { base: 1, content, byItself: true });
    const kept = { base: 2, content, note: 'checked on site' };
    expect(await saveVersion(editor, id, kept)).toMatchObject({ number: 3, author: 'Edda' });
    expect((await listVersions(owner, id)).versions).toMatchObject([
      { author: 'Edda', note: 'checked on site' },
      { author: 'Owain', note: null, byItself: true },
      {},
    ]);
  });
});

test('twenty writers at once: every acknowledged edit is in the history, and the head is their sequential replay', async () => {
  const writers = await Promise.all(
    Array.from({ length: 20 }, (_, at) => newPerson(`Writer ${at}`)),
  );
  const [first, ...others] = writers;
  if (!first) throw new Error('There are twenty writers.');
  const shared = dimension('shared', '# common');
  const begin = contentOf(shared, ...writers.map((_, at) => dimension(`own${at}`, 'x = 1')));
  const id = await newNotebook(first, begin, others);
  interface Acknowledged {
    number: number;
    base: NotebookContent;
    sent: NotebookContent;
    line: string;
  }
  const acknowledged: Acknowledged[] = [];
  const refused: unknown[] = [];

  const write = async (writer: Person, at: number) => {
    let base = { number: 1, content: begin };
    for (let edit = 0; edit < 15; edit += 1) {
      const { content: sent, line } = newEdit(base.content, at, edit);
      try {
        const saved = await saveVersion(writer, id, {
          base: base.number,
          content: sent,
          merge: true,
          byItself: true,
        });
        acknowledged.push({ number: saved.number, base: base.content, sent, line });
        base = { number: saved.number, content: saved.content ?? sent };
      } catch (error) {
        refused.push(error);
      }
    }
  };
  await Promise.all(writers.map(write));

  expect(refused).toEqual([]);
  const { versions } = await listVersions(first, id);
  expect(versions.map(({ number }) => number)).toEqual(
    Array.from({ length: 301 }, (_, at) => 301 - at),
  );
  acknowledged.sort((a, b) => a.number - b.number);
  expect(acknowledged.map(({ number }) => number)).toEqual(
    Array.from({ length: 300 }, (_, at) => at + 2),
  );
  let head = begin;
  for (const { number, base, sent, line } of acknowledged) {
    const replayed = mergeContents(base, sent, head);
    expect(replayed.conflicts).toEqual([]);
    head = replayed.content;
    if (number % 50 === 0) expect((await readVersion(first, id, number)).content).toEqual(head);
    expect(head.cells.some(({ source }) => source.split('\n').includes(line))).toBe(true);
  }
  expect((await readNotebook(first, id)).content).toEqual(head);
  const text = head.cells.map(({ source }) => source).join('\n');
  for (const { line } of acknowledged) expect(text).toContain(line);
  const rows: unknown[] = await database()('versions')
    .where({ notebook_id: id })
    .whereNotNull('merged_with');
  expect(rows.length).toBeGreaterThan(200);
}, 240_000);
