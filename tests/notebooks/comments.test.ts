import { randomUUID } from 'node:crypto';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { commentsStamp } from '@/db/queries/comments';
import type { Person } from '@/lib/accounts';
import {
  CommentChange,
  NewComment,
  addComment,
  changeComment,
  changeNotebook,
  readComments,
  removePerson,
  saveVersion,
  withdrawComment,
} from '@/lib/notebooks';
import { mentionOf, readableComment } from '@/lib/notebooks/comment-text';
import { contentWith, give, lettersTo, newCast, newPerson } from './support/shelf';

afterAll(closeDatabase);

type Cast = Awaited<ReturnType<typeof newCast>>;
let cast: Cast;

beforeEach(async () => {
  cast = await newCast('R = 1200 mm\ns = R/2', 'note: Struck from the sill.', 'section: Tracery');
});

const say = (person: Person, text: string, cell = 'c1') =>
  addComment(person, cast.notebook, NewComment.parse({ cell, text }));
const answer = (person: Person, thread: string, text: string) =>
  addComment(person, cast.notebook, NewComment.parse({ thread, text }));
const change = (person: Person, id: string, text: string) =>
  changeComment(person, cast.notebook, id, CommentChange.parse({ text }));
const resolve = (person: Person, id: string, resolved = true) =>
  changeComment(person, cast.notebook, id, { resolved });
const withdraw = (person: Person, id: string) => withdrawComment(person, cast.notebook, id);
const read = async (person = cast.owner) => (await readComments(person, cast.notebook)).threads;
const stamp = () => commentsStamp(database(), cast.notebook);

describe('a thread', () => {
  it('begins with a comment on a cell, and answers follow in order', async () => {
    const { thread } = await say(cast.viewer, 'Is this clear of the ferramenta?');
    await answer(cast.editor, thread, 'By 6 mm.');
    await answer(cast.owner, thread, 'Then it stays.');
    const threads = await read();
    expect(threads).toHaveLength(1);
    expect(threads[0]).toMatchObject({
      id: thread,
      cell: 'c1',
      cellName: 'R, s',
      resolvedAt: null,
    });
    expect(threads[0]?.comments.map(({ author, text }) => [author.name, text])).toEqual([
      ['Vera Moss', 'Is this clear of the ferramenta?'],
      ['Edwy Carr', 'By 6 mm.'],
      ['Ona Thorn', 'Then it stays.'],
    ]);
  });

  it('names its cell by marks, by the beginning of a note, by a heading', async () => {
    for (const cell of ['c1', 'c2', 'c3']) await say(cast.owner, 'Look here.', cell);
    expect((await read()).map(({ cellName }) => cellName)).toEqual([
      'R, s',
      'Struck from the sill.',
      'Tracery',
    ]);
  });

  it('stays readable when its cell has gone', async () => {
    const { thread } = await say(cast.owner, 'Why half?');
    await saveVersion(cast.owner, cast.notebook, { base: 1, content: contentWith('w = 1 m') });
    expect((await read())[0]).toMatchObject({ id: thread, cellName: 'R, s' });
    await answer(cast.editor, thread, 'It is gone now.');
    expect((await read())[0]?.comments).toHaveLength(2);
  });

  it('is resolved and opened again by owners and editors, whoever began it, and by nobody else', async () => {
    const { thread } = await say(cast.viewer, 'Mine to begin.');
    await expect(resolve(cast.viewer, thread)).rejects.toMatchObject({ code: 'forbidden' });
    await resolve(cast.editor, thread);
    expect((await read())[0]).toMatchObject({ resolvedBy: 'Edwy Carr' });
    await expect(answer(cast.owner, thread, 'Late.')).rejects.toMatchObject({ code: 'resolved' });
    await resolve(cast.owner, thread, false);
    expect((await read())[0]).toMatchObject({ resolvedBy: null, resolvedAt: null });
    await answer(cast.owner, thread, 'In time.');
  });

  it('is resolved by its first comment alone, not by an answer', async () => {
    const { thread } = await say(cast.owner, 'First');
    const { id } = await answer(cast.owner, thread, 'Second');
    await expect(resolve(cast.owner, id)).rejects.toMatchObject({ code: 'not-found' });
    await expect(answer(cast.owner, id, 'Third')).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('one’s own text', () => {
  it('is changed by its author, not even by an owner', async () => {
    const { id } = await say(cast.viewer, 'Sil');
    await expect(change(cast.owner, id, 'Sill')).rejects.toMatchObject({ code: 'forbidden' });
    await change(cast.viewer, id, 'Sill');
    const [comment] = (await read())[0]?.comments ?? [];
    expect(comment).toMatchObject({ text: 'Sill', withdrawn: false });
    expect(comment?.editedAt).not.toBeNull();
  });

  it('is withdrawn by its author alone; where answers follow, its place stays without the text', async () => {
    const { id, thread } = await say(cast.viewer, 'A slip of mine');
    await answer(cast.editor, thread, 'No harm.');
    await expect(withdraw(cast.owner, id)).rejects.toMatchObject({ code: 'forbidden' });
    await withdraw(cast.viewer, id);
    expect((await read())[0]?.comments).toMatchObject([
      { text: '', withdrawn: true },
      { text: 'No harm.', withdrawn: false },
    ]);
    expect(JSON.stringify(await database()('comments').where({ id }))).not.toContain('slip');
    await expect(change(cast.viewer, id, 'Again')).rejects.toMatchObject({ code: 'not-found' });
  });

  it('goes altogether where nothing follows, and takes withdrawn ones before it along', async () => {
    const { id, thread } = await say(cast.viewer, 'One');
    const second = await answer(cast.editor, thread, 'Two');
    const third = await answer(cast.owner, thread, 'Three');
    await withdraw(cast.editor, second.id);
    expect((await read())[0]?.comments).toHaveLength(3);
    await withdraw(cast.owner, third.id);
    expect((await read())[0]?.comments.map(({ text }) => text)).toEqual(['One']);
    await withdraw(cast.viewer, id);
    expect(await read()).toEqual([]);
  });
});

describe('mentions', () => {
  it('tell two people of one name apart, and each gets a letter with a link to the cell', async () => {
    const [one, two] = [await newPerson('Ash Rill'), await newPerson('Ash Rill')];
    await give(cast.notebook, one, 'viewer');
    await give(cast.notebook, two, 'editor');
    const { thread } = await say(cast.owner, `${mentionOf(two.id)} please check\nthe foil.`);
    expect(await lettersTo(one)).toEqual([]);
    const [letter, ...more] = await lettersTo(two);
    expect(more).toEqual([]);
    expect(letter).toMatchObject({
      name: 'Ash Rill',
      subject: 'Ona Thorn mentions you on “Rose window”',
    });
    expect(letter?.paragraphs).toEqual([
      'Ona Thorn wrote about “R, s” on the notebook “Rose window”:',
      '@Ash Rill please check',
      'the foil.',
    ]);
    expect(new URL(letter?.action.url ?? '').pathname).toBe(`/notebooks/${cast.notebook}`);
    expect(new URL(letter?.action.url ?? '').search).toBe(`?comment=${thread}`);
    expect(new URL(letter?.action.url ?? '').hash).toBe('#cell-c1');
  });

  it('write once for a comment, however often it is changed, and not to oneself', async () => {
    const text = `${mentionOf(cast.editor.id)} ${mentionOf(cast.owner.id)}`;
    const { id } = await say(cast.owner, text);
    await change(cast.owner, id, `${text} again`);
    await change(cast.owner, id, `nobody`);
    await change(cast.owner, id, `${mentionOf(cast.viewer.id)} and ${text}`);
    expect(await lettersTo(cast.editor)).toHaveLength(1);
    expect(await lettersTo(cast.viewer)).toHaveLength(1);
    expect(await lettersTo(cast.owner)).toEqual([]);
  });

  it('are of people with a role alone, and a refused one stores and sends nothing', async () => {
    for (const who of [cast.member, cast.stranger]) {
      const text = `${mentionOf(cast.editor.id)} ${mentionOf(who.id)}`;
      await expect(say(cast.owner, text)).rejects.toMatchObject({ code: 'invalid' });
      expect(await lettersTo(who)).toEqual([]);
    }
    await expect(say(cast.owner, mentionOf(randomUUID()))).rejects.toMatchObject({
      code: 'invalid',
    });
    expect(await read()).toEqual([]);
    expect(await lettersTo(cast.editor)).toEqual([]);
  });

  it('are shown by the name of now, also of somebody who has left since', async () => {
    await say(cast.owner, `Ask ${mentionOf(cast.viewer.id)}.`);
    await database()('users').where({ id: cast.viewer.id }).update({ name: 'Vera Wren' });
    await removePerson(cast.owner, cast.notebook, cast.viewer.id);
    const { threads, people } = await readComments(cast.owner, cast.notebook);
    const text = threads[0]?.comments[0]?.text ?? '';
    expect(readableComment(text, (id) => people[id] ?? '?')).toBe('Ask @Vera Wren.');
  });

  it('cut a long comment in the letter, not in the thread', async () => {
    const long = `${mentionOf(cast.viewer.id)} ${'stone '.repeat(300)}`.trim();
    await say(cast.owner, long);
    const [letter] = await lettersTo(cast.viewer);
    expect(letter?.paragraphs.join('').length).toBeLessThan(600);
    expect((await read())[0]?.comments[0]?.text).toBe(long);
  });
});

describe('who may', () => {
  it.each(['owner', 'editor', 'viewer'] as const)('as %s read and write', async (who) => {
    await say(cast[who], 'Seen.');
    expect(await read(cast[who])).toHaveLength(1);
  });

  it.each(['member', 'stranger'] as const)('not as a %s', async (who) => {
    const { thread } = await say(cast.owner, 'Within');
    const person = cast[who];
    for (const work of [
      () => readComments(person, cast.notebook),
      () => say(person, 'Hello'),
      () => answer(person, thread, 'Hello'),
      () => change(person, thread, 'Hello'),
      () => resolve(person, thread),
      () => withdraw(person, thread),
    ])
      await expect(work()).rejects.toMatchObject({ code: 'not-found' });
  });

  it('not on an archived notebook, whose comments can still be read', async () => {
    const { id, thread } = await say(cast.owner, 'Before');
    await changeNotebook(cast.owner, cast.notebook, { archived: true });
    for (const work of [
      () => say(cast.owner, 'After'),
      () => answer(cast.owner, thread, 'After'),
      () => change(cast.owner, id, 'After'),
      () => resolve(cast.owner, thread),
      () => withdraw(cast.owner, id),
    ])
      await expect(work()).rejects.toMatchObject({ code: 'archived' });
    expect(await read(cast.viewer)).toHaveLength(1);
  });

  it('not in a thread of another notebook', async () => {
    const { thread } = await say(cast.owner, 'Here');
    const other = await newCast('R = 1 m');
    await give(other.notebook, cast.owner, 'owner');
    const there = addComment(cast.owner, other.notebook, { thread, text: 'There' });
    await expect(there).rejects.toMatchObject({ code: 'not-found' });
    const change = changeComment(cast.owner, other.notebook, thread, { resolved: true });
    await expect(change).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('bad input', () => {
  it('a cell that was never kept is refused', async () => {
    await expect(say(cast.owner, 'Where?', 'zz')).rejects.toMatchObject({ code: 'invalid' });
  });

  it.each(['no id', randomUUID()])('an unknown thread is refused: %s', async (thread) => {
    await expect(answer(cast.owner, thread, 'Where?')).rejects.toMatchObject({ code: 'not-found' });
    await expect(withdraw(cast.owner, thread)).rejects.toMatchObject({ code: 'not-found' });
  });

  it.each([
    ['no text', { cell: 'c1' }],
    ['an empty text', { cell: 'c1', text: ' \n ' }],
    ['2 001 characters', { cell: 'c1', text: 'x'.repeat(2001) }],
    ['half of a character', { cell: 'c1', text: '\ud800' }],
    ['a control character', { cell: 'c1', text: 'a\0b' }],
    ['neither cell nor thread', { text: 'Hello' }],
    ['both cell and thread', { cell: 'c1', thread: randomUUID(), text: 'Hello' }],
    [
      '21 people',
      { cell: 'c1', text: Array.from({ length: 21 }, () => mentionOf(randomUUID())).join('') },
    ],
    ['a field nobody knows', { cell: 'c1', text: 'Hello', html: '<b>' }],
  ])('%s is no comment', (_, body) => {
    expect(NewComment.safeParse(body).success).toBe(false);
  });

  it('a mention counts as one character, and line ends are made alike', () => {
    const text = `${mentionOf(randomUUID())}${'x'.repeat(1999)}`;
    expect(NewComment.safeParse({ cell: 'c1', text }).success).toBe(true);
    expect(NewComment.parse({ cell: 'c1', text: ' a\r\nb\rc\t ' }).text).toBe('a\nb\nc');
  });

  it('neither text nor resolved, or both, is no change', () => {
    expect(CommentChange.safeParse({}).success).toBe(false);
    expect(CommentChange.safeParse({ text: 'a', resolved: true }).success).toBe(false);
  });
});

describe('the stamp that others ask for', () => {
  it('changes with every change of the comments, and with nothing else', async () => {
    const stamps = [await stamp()];
    const { id, thread } = await say(cast.owner, 'One');
    stamps.push(await stamp());
    const second = await answer(cast.editor, thread, 'Two');
    stamps.push(await stamp());
    await change(cast.owner, id, 'One more');
    stamps.push(await stamp());
    await resolve(cast.owner, thread);
    stamps.push(await stamp());
    await resolve(cast.owner, thread, false);
    stamps.push(await stamp());
    await withdraw(cast.owner, id);
    stamps.push(await stamp());
    expect(new Set(stamps).size).toBe(stamps.length);
    await saveVersion(cast.owner, cast.notebook, { base: 1, content: contentWith('w = 1 m') });
    expect(await stamp()).toBe(stamps.at(-1));
    await withdraw(cast.editor, second.id);
    expect(await stamp(), 'as before there was any').toBe(stamps[0]);
  });
});
