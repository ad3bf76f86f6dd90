import { randomUUID } from 'node:crypto';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findNotebook, listNotebooksOf, putTitleBlock } from '@/db/queries/notebooks';
import type { Person } from '@/lib/accounts';
import {
  DuplicateRequest,
  ListRequest,
  MoveRequest,
  SearchRequest,
  addComment,
  changeNotebook,
  changeTemplate,
  createNotebook,
  duplicateNotebook,
  listNotebooks,
  listPeople,
  makeFromTemplate,
  moveNotebook,
  readComments,
  readNotebook,
  readVersion,
  saveVersion,
  search,
  templatesFor,
} from '@/lib/notebooks';
import { contentWith, give, newCast, newNotebook, newPerson, newWorkshop } from './support/shelf';

afterAll(closeDatabase);

type Cast = Awaited<ReturnType<typeof newCast>>;
let cast: Cast;

beforeEach(async () => {
  cast = await newCast('R = 1200 mm');
});

/** What the record says of a notebook, oldest first. */
async function recorded(notebookId: string) {
  const rows = await database()('activity')
    .where({ notebook_id: notebookId })
    .orderBy('number')
    .select<
      { deed: string; actor_id: string; workshop_id: string; subject: string; details: string }[]
    >('deed', 'actor_id', 'workshop_id', 'subject', 'details');
  return rows.map((row) => ({ ...row, details: JSON.parse(row.details) as object }));
}

const archive = (archived = true) => changeNotebook(cast.owner, cast.notebook, { archived });

describe('a duplicate', () => {
  it.each(['owner', 'editor', 'viewer'] as const)(
    'is made by the %s, who owns it alone',
    async (who) => {
      const { id } = await duplicateNotebook(cast[who], cast.notebook, {});
      const { notebook, content } = await readNotebook(cast[who], id);
      expect(notebook).toMatchObject({ title: 'Copy of Rose window', role: 'owner', version: 1 });
      expect(notebook.workshop.id).toBe(cast.workshop);
      expect(content).toEqual(contentWith('R = 1200 mm'));
      expect((await listPeople(cast[who], id)).map((one) => one.id)).toEqual([cast[who].id]);
    },
  );

  it('is of the version that is asked for, and says from where it came', async () => {
    await saveVersion(cast.owner, cast.notebook, { base: 1, content: contentWith('R = 2 m') });
    const first = await duplicateNotebook(cast.owner, cast.notebook, { version: 1, title: 'Old' });
    const newest = await duplicateNotebook(cast.owner, cast.notebook, {});
    expect((await readNotebook(cast.owner, first.id)).content).toEqual(contentWith('R = 1200 mm'));
    expect((await readNotebook(cast.owner, newest.id)).content).toEqual(contentWith('R = 2 m'));
    const row: unknown = await database()('notebooks')
      .where({ id: first.id })
      .first('origin_id', 'origin_version');
    expect(row).toEqual({ origin_id: cast.notebook, origin_version: 1 });
    const { version } = await readVersion(cast.owner, first.id, 1);
    expect(version.note).toBe('copied from “Rose window”, version 1');
  });

  it('brings no comments, people, links or numbers along, but what describes the work', async () => {
    await addComment(cast.owner, cast.notebook, { cell: 'c1', text: 'Stays behind' });
    await putTitleBlock(database(), cast.notebook, {
      identificationNumber: '17',
      supplementaryTitle: 'North transept',
      creator: 'Ona',
      approvalPerson: 'Edwy',
      sheet: '1 of 3',
      toleranceClass: 'f',
    });
    const { id } = await duplicateNotebook(cast.editor, cast.notebook, {});
    expect((await readComments(cast.editor, id)).threads).toEqual([]);
    expect((await findNotebook(database(), id))?.titleBlock).toMatchObject({
      identificationNumber: '',
      supplementaryTitle: 'North transept',
      creator: '',
      approvalPerson: '',
      sheet: '',
      toleranceClass: 'f',
    });
  });

  it('goes into the workshop that is chosen, or into one’s own where one is no member of the other', async () => {
    const guest = await newPerson('Guest');
    const home = await newWorkshop(guest, 'Home');
    await give(cast.notebook, guest, 'viewer');
    const { id } = await duplicateNotebook(guest, cast.notebook, {});
    expect((await findNotebook(database(), id))?.workshop.id).toBe(home);
    const there = duplicateNotebook(guest, cast.notebook, { workshopId: cast.workshop });
    await expect(there).rejects.toMatchObject({ code: 'not-found' });
    const homeless = await newPerson('Homeless');
    await give(cast.notebook, homeless, 'editor');
    const nowhere = duplicateNotebook(homeless, cast.notebook, {});
    await expect(nowhere).rejects.toMatchObject({ code: 'invalid' });
  });

  it('is found at once, is recorded, and can be made of an archived notebook', async () => {
    await archive();
    const { id } = await duplicateNotebook(cast.viewer, cast.notebook, { title: 'Tympanum' });
    const { hits } = await search(cast.viewer, SearchRequest.parse({ q: 'tympanum' }));
    expect(hits.map((hit) => hit.id)).toEqual([id]);
    expect(await recorded(id)).toEqual([
      {
        deed: 'notebook.duplicated',
        actor_id: cast.viewer.id,
        workshop_id: cast.workshop,
        subject: 'Tympanum',
        details: { from: cast.notebook, version: 1 },
      },
    ]);
  });

  it.each(['member', 'stranger'] as const)('is not made by a %s', async (who) => {
    const work = duplicateNotebook(cast[who], cast.notebook, {});
    await expect(work).rejects.toMatchObject({ code: 'not-found' });
  });

  it('is not made of a version or into a workshop that there is not', async () => {
    for (const request of [{ version: 9 }, { workshopId: randomUUID() }, { workshopId: 'x' }])
      await expect(duplicateNotebook(cast.owner, cast.notebook, request)).rejects.toMatchObject({
        code: 'not-found',
      });
    expect(DuplicateRequest.safeParse({ version: 0 }).success).toBe(false);
    expect(DuplicateRequest.safeParse({ version: 1.5 }).success).toBe(false);
    expect(DuplicateRequest.safeParse({ title: ' ' }).success).toBe(false);
  });

  it('of a title at its longest is cut, and not within a character', async () => {
    const long = `${'x'.repeat(191)}𝕊tone`;
    await changeNotebook(cast.owner, cast.notebook, { title: long });
    const { id } = await duplicateNotebook(cast.owner, cast.notebook, {});
    expect((await readNotebook(cast.owner, id)).notebook.title).toBe(`Copy of ${'x'.repeat(191)}`);
  });
});

describe('a template', () => {
  const mark = (template = true, who = cast.owner) =>
    changeTemplate(who, cast.notebook, { template });

  it('is seen by every member of its workshop, who reads nothing else of it', async () => {
    expect(await templatesFor(cast.member)).toEqual([]);
    await mark();
    expect(await templatesFor(cast.member)).toMatchObject([
      { id: cast.notebook, title: 'Rose window', workshop: { id: cast.workshop }, version: 1 },
    ]);
    await expect(readNotebook(cast.member, cast.notebook)).rejects.toMatchObject({
      code: 'not-found',
    });
    expect(await templatesFor(cast.stranger)).toEqual([]);
  });

  it('begins a notebook with its newest version', async () => {
    await mark();
    await saveVersion(cast.owner, cast.notebook, { base: 1, content: contentWith('w = 3 m') });
    const { id } = await makeFromTemplate(cast.member, cast.notebook, { title: 'North wall' });
    const { notebook, content } = await readNotebook(cast.member, id);
    expect(notebook).toMatchObject({ title: 'North wall', role: 'owner', version: 1 });
    expect(content).toEqual(contentWith('w = 3 m'));
    expect(await recorded(id)).toMatchObject([{ deed: 'notebook.made' }]);
    expect((await readVersion(cast.member, id, 1)).version.note).toBe(
      'from the template “Rose window”, version 2',
    );
  });

  it('is nobody’s outside its workshop, nor while it is none or archived', async () => {
    const make = (who: Person) => makeFromTemplate(who, cast.notebook, { title: 'Mine' });
    const refused = { code: 'not-found' };
    await expect(make(cast.member)).rejects.toMatchObject(refused);
    await mark();
    await expect(make(cast.stranger)).rejects.toMatchObject(refused);
    await archive();
    await expect(make(cast.member)).rejects.toMatchObject(refused);
    expect(await templatesFor(cast.member)).toEqual([]);
    await archive(false);
    await make(cast.member);
    await mark(false);
    await expect(make(cast.member)).rejects.toMatchObject(refused);
    await expect(makeFromTemplate(cast.member, 'x', { title: 'Mine' })).rejects.toMatchObject(
      refused,
    );
  });

  it('is made one by owners alone, is recorded once, and not of an archived notebook', async () => {
    for (const who of ['editor', 'viewer'] as const)
      await expect(mark(true, cast[who])).rejects.toMatchObject({ code: 'forbidden' });
    for (const who of ['member', 'stranger'] as const)
      await expect(mark(true, cast[who])).rejects.toMatchObject({ code: 'not-found' });
    await mark();
    await mark();
    await mark(false);
    const deeds = (await recorded(cast.notebook)).filter(
      ({ deed }) => deed === 'notebook.template',
    );
    expect(deeds.map(({ details }) => details)).toEqual([{ template: true }, { template: false }]);
    await archive();
    await expect(mark()).rejects.toMatchObject({ code: 'archived' });
  });
});

describe('a move', () => {
  let other: string;
  beforeEach(async () => {
    other = await newWorkshop(cast.owner, 'Second yard');
  });
  const move = (who = cast.owner, workshopId = other) =>
    moveNotebook(who, cast.notebook, MoveRequest.parse({ workshopId }));

  it('takes the notebook over with everybody’s role, and both workshops have it on record', async () => {
    const before = await listPeople(cast.owner, cast.notebook);
    await move();
    expect((await readNotebook(cast.viewer, cast.notebook)).notebook.workshop).toEqual({
      id: other,
      name: 'Second yard',
    });
    expect(await listPeople(cast.owner, cast.notebook)).toEqual(before);
    const deeds = (await recorded(cast.notebook)).filter(({ deed }) => deed === 'notebook.moved');
    expect(deeds.map(({ workshop_id }) => workshop_id)).toEqual([cast.workshop, other]);
    expect(deeds[0]?.details).toEqual({ from: cast.workshop, to: other });
  });

  it('leaves the templates of the workshop that it leaves, and joins none', async () => {
    await changeTemplate(cast.owner, cast.notebook, { template: true });
    await move();
    expect(await templatesFor(cast.member)).toEqual([]);
    expect(await templatesFor(cast.owner)).toEqual([]);
  });

  it('is made by an owner who belongs to the other workshop, and by nobody else', async () => {
    for (const who of ['editor', 'viewer'] as const)
      await expect(move(cast[who])).rejects.toMatchObject({ code: 'forbidden' });
    for (const who of ['member', 'stranger'] as const)
      await expect(move(cast[who])).rejects.toMatchObject({ code: 'not-found' });
    const foreign = await newWorkshop(cast.stranger, 'Foreign yard');
    await expect(move(cast.owner, foreign)).rejects.toMatchObject({ code: 'not-found' });
    await expect(move(cast.owner, 'nowhere')).rejects.toMatchObject({ code: 'not-found' });
  });

  it('is not made to where it is, nor of an archived notebook', async () => {
    await expect(move(cast.owner, cast.workshop)).rejects.toMatchObject({ code: 'invalid' });
    await archive();
    await expect(move()).rejects.toMatchObject({ code: 'archived' });
  });
});

describe('an archived notebook', () => {
  it('is read, and neither saved, renamed nor commented on, until it is brought back', async () => {
    await archive();
    const { owner, notebook } = cast;
    for (const work of [
      () => saveVersion(owner, notebook, { base: 1, content: contentWith('R = 1 m') }),
      () => changeNotebook(owner, notebook, { title: 'Other' }),
      () => addComment(owner, notebook, { cell: 'c1', text: 'Late' }),
    ])
      await expect(work()).rejects.toMatchObject({ code: 'archived' });
    expect((await readNotebook(cast.viewer, notebook)).notebook.archivedAt).not.toBeNull();
    await changeNotebook(owner, notebook, { title: 'Back', archived: false });
    await saveVersion(owner, notebook, { base: 1, content: contentWith('R = 1 m') });
    expect((await readNotebook(owner, notebook)).notebook).toMatchObject({
      title: 'Back',
      version: 2,
      archivedAt: null,
    });
  });

  it('is archived and brought back by owners alone', async () => {
    for (const who of ['editor', 'viewer'] as const)
      await expect(
        changeNotebook(cast[who], cast.notebook, { archived: true }),
      ).rejects.toMatchObject({ code: 'forbidden' });
  });
});

describe('the table of notebooks', () => {
  const list = async (who: Person, asked: object = {}) =>
    listNotebooks(who, ListRequest.parse(asked));
  const titles = async (who: Person, asked: object = {}) =>
    (await list(who, asked)).notebooks.map(({ title }) => title);

  it('is filtered by workshop, role and archive, and ordered by title or by change', async () => {
    const { owner, workshop } = cast;
    const second = await newWorkshop(owner, 'A second yard');
    await newNotebook(owner, second, 'Apse');
    const lent = await newNotebook(cast.editor, workshop, 'Zodiac floor');
    await give(lent, owner, 'viewer');
    expect(await titles(owner)).toEqual(['Zodiac floor', 'Apse', 'Rose window']);
    expect(await titles(owner, { sort: 'title' })).toEqual(['Apse', 'Rose window', 'Zodiac floor']);
    expect(await titles(owner, { workshop: second })).toEqual(['Apse']);
    expect(await titles(owner, { role: 'viewer' })).toEqual(['Zodiac floor']);
    expect(await titles(owner, { role: 'owner', workshop })).toEqual(['Rose window']);
    expect(await titles(owner, { role: 'editor' })).toEqual([]);
    await archive();
    expect(await titles(owner, { archived: '1' })).toEqual(['Rose window']);
    expect(await titles(owner, { sort: 'title' })).toEqual(['Apse', 'Zodiac floor']);
    expect((await list(owner)).workshops.map(({ name }) => name)).toEqual([
      'A second yard',
      'Thornscar Yard',
    ]);
    // A workshop of somebody else’s has nothing for the person, and says nothing.
    const foreign = await newWorkshop(cast.stranger);
    await newNotebook(cast.stranger, foreign, 'Theirs');
    expect(await list(owner, { workshop: foreign })).toMatchObject({ notebooks: [], total: 0 });
  });

  it('is given page by page, each notebook once, and behind the last page the last one', async () => {
    const many = await newPerson('Many');
    const yard = await newWorkshop(many);
    for (let k = 1; k <= 7; k += 1)
      await createNotebook(many, { title: `Bay ${k}`, workshopId: yard });
    const asked = { sort: 'title', size: '3' };
    expect(await titles(many, asked)).toEqual(['Bay 1', 'Bay 2', 'Bay 3']);
    expect(await titles(many, { ...asked, page: '3' })).toEqual(['Bay 7']);
    expect(await list(many, { ...asked, page: '99' })).toMatchObject({
      page: 3,
      pages: 3,
      total: 7,
    });
    expect(await listNotebooksOf(database(), many.id, { archived: false })).toHaveLength(7);
  });

  it.each([
    { page: '0' },
    { page: '-1' },
    { page: 'x' },
    { size: '501' },
    { role: 'admin' },
    { sort: 'size' },
    { archived: 'yes' },
    { colour: 'red' },
  ])('does not take %j', (asked) => {
    expect(ListRequest.safeParse(asked).success).toBe(false);
  });
});
