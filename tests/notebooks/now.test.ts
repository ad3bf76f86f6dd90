import { afterAll, beforeAll, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import type { Person } from '@/lib/accounts';
import { findSeen, lookNow, saveVersion } from '@/lib/notebooks';
import { deleteRole } from './edits';
import { contentOf, dimension, newNotebook, newPerson } from './people';

let owner: Person;
let editor: Person;
beforeAll(async () => {
  [owner, editor] = await Promise.all([newPerson('Owain'), newPerson('Edda')]);
});
afterAll(closeDatabase);

const start = contentOf(dimension('a', 'R = 1200 mm'));

/** Moves what is known of somebody back by so many seconds. */
const age = (id: string, { id: userId }: Person, seconds: number) =>
  database()('presence')
    .where({ notebook_id: id, user_id: userId })
    .update({ seen_at: new Date(Date.now() - seconds * 1000) });

const commentsMark = expect.any(String) as string;

test('people see who else is here and with which cell in hand, until nothing is heard of them', async () => {
  const id = await newNotebook(owner, start, [editor]);
  expect(await lookNow(owner, id, { seen: 1 })).toEqual({
    head: 1,
    archived: false,
    role: 'owner',
    people: [],
    comments: commentsMark,
  });
  await lookNow(editor, id, { seen: 1, cell: 'a' });
  const now = await lookNow(owner, id, { seen: 1 });
  expect(now.people).toEqual([{ id: editor.id, name: 'Edda', cell: 'a' }]);
  await age(id, editor, 31);
  expect((await lookNow(owner, id, { seen: 1 })).people).toEqual([]);
});

test('asking again soon writes nothing and gives the same answer', async () => {
  const id = await newNotebook(owner, start, [editor]);
  const first = await lookNow(owner, id, { seen: 1 });
  await age(id, owner, 9);
  const [before] = await database()('presence').where({ notebook_id: id });
  expect(await lookNow(owner, id, { seen: 1 })).toEqual(first);
  expect(await database()('presence').where({ notebook_id: id })).toEqual([before]);
  await age(id, owner, 11);
  await lookNow(owner, id, { seen: 1 });
  const [after] = (await database()('presence').where({ notebook_id: id })) as { seen_at: Date }[];
  expect(Date.now() - (after?.seen_at.getTime() ?? 0)).toBeLessThan(5_000);
});

test('the version seen never goes back, nor beyond the newest', async () => {
  const id = await newNotebook(owner, start);
  expect(await findSeen(owner, id)).toBeNull();
  await lookNow(owner, id, { seen: 9 });
  expect(await findSeen(owner, id)).toBe(1);
  await saveVersion(owner, id, { base: 1, content: contentOf(dimension('a', 'R = 1 mm')) });
  await lookNow(owner, id, { seen: 2 });
  await lookNow(owner, id, { seen: 1 });
  await age(id, owner, 60);
  await lookNow(owner, id, { seen: 1 });
  expect(await findSeen(owner, id)).toBe(2);
});

test('whoever has lost the role is not here any more, and sees nothing', async () => {
  const id = await newNotebook(owner, start, [editor]);
  await lookNow(editor, id, {});
  await deleteRole(id, editor);
  expect((await lookNow(owner, id, {})).people).toEqual([]);
  await expect(lookNow(editor, id, {})).rejects.toMatchObject({ code: 'not-found' });
});
