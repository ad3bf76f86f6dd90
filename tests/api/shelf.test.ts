import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertMembership } from '@/db/queries/workshops';
import { openDatabase } from '../setup/server';
import { newCast, newNotebook, type Cast } from './support/notebook';
import { newcomer, type Visitor } from './support/visitor';

/** Comments, search, duplicates and templates over HTTP. */
let cast: Cast;
let member: Visitor;
let base: string;
const db = openDatabase();

beforeAll(async () => {
  cast = await newCast('R = 1200 mm # clerestory');
  member = await newcomer('Mab');
  base = `/api/notebooks/${cast.notebook}`;
  const opened = await cast.owner.get(base);
  const { workshop } = opened.json.notebook as { workshop: { id: string } };
  const row: { id: string } = await db('users').where({ email: member.email }).first('id');
  await insertMembership(db, workshop.id, row.id, 'member');
});

afterAll(() => db.destroy());

describe('comments', () => {
  it('are answered with a tag, and with 304 until something is said', async () => {
    const first = await cast.viewer.get(`${base}/comments`);
    const tag = first.headers.get('etag') ?? '';
    const again = await cast.viewer.get(`${base}/comments`, { 'if-none-match': tag });
    expect([first.status, again.status, again.text]).toEqual([200, 304, '']);
    await cast.editor.post(`${base}/comments`, { cell: 'c1', text: 'Measured where?' });
    const then = await cast.viewer.get(`${base}/comments`, { 'if-none-match': tag });
    expect(then.status).toBe(200);
    expect(then.text).toContain('Measured where?');
  });

  it('are news of the notebook', async () => {
    const before = await cast.viewer.get(`${base}/now`);
    await cast.editor.post(`${base}/comments`, { cell: 'c1', text: 'And how?' });
    const after = await cast.viewer.get(`${base}/now`);
    expect(after.json.comments).not.toBe(before.json.comments);
  });

  it('are changed and withdrawn by their authors alone', async () => {
    const made = await cast.editor.post(`${base}/comments`, { cell: 'c1', text: 'Slip' });
    const path = `${base}/comments/${String(made.json.id)}`;
    for (const who of [cast.owner, cast.viewer]) {
      const changed = await who.ask('PATCH', path, { body: { text: 'Mine' } });
      const gone = await who.ask('DELETE', path);
      expect([changed.status, gone.status]).toEqual([403, 403]);
    }
    expect((await cast.stranger.ask('DELETE', path)).status).toBe(404);
    expect((await cast.editor.ask('PATCH', path, { body: { text: 'Sill' } })).status).toBe(204);
    expect((await cast.editor.ask('DELETE', path)).status).toBe(204);
    expect((await cast.editor.ask('DELETE', path)).status).toBe(404);
  });

  it.each([
    ['no text', { cell: 'c1' }, 422],
    ['markup in an unknown field', { cell: 'c1', text: 'a', html: '<b>' }, 422],
    ['an unknown cell', { cell: 'nowhere', text: 'a' }, 422],
    ['an unknown thread', { thread: 'nowhere', text: 'a' }, 404],
    ['no JSON', '{', 400],
  ])('%s is refused in a sentence', async (_, body, status) => {
    const answer = await cast.viewer.post(`${base}/comments`, body);
    expect(answer.status).toBe(status);
    expect(String(answer.json.detail)).toMatch(/^[^<>]+[.)]$/);
  });

  it('in a resolved thread are refused with a code of its own', async () => {
    const { json } = await cast.viewer.post(`${base}/comments`, { cell: 'c1', text: 'Done?' });
    const thread = String(json.thread);
    const body = { resolved: true };
    expect((await cast.owner.ask('PATCH', `${base}/comments/${thread}`, { body })).status).toBe(
      204,
    );
    const late = await cast.viewer.post(`${base}/comments`, { thread, text: 'Late' });
    expect([late.status, late.json.code]).toEqual([409, 'resolved']);
  });
});

describe('search', () => {
  const find = (who: Visitor, query: string, headers?: Record<string, string>) =>
    who.get(`/api/search?${query}`, headers);

  it('finds for whoever has a role, and nothing for members and strangers', async () => {
    for (const who of [cast.owner, cast.editor, cast.viewer])
      expect((await find(who, 'q=clerestory')).json.hits).toHaveLength(1);
    for (const who of [member, cast.stranger])
      expect((await find(who, 'q=clerestory')).json).toEqual({ hits: [], next: null });
  });

  it('answers 304 to whoever has the answer', async () => {
    const tag = (await find(cast.owner, 'q=clerestory')).headers.get('etag') ?? '';
    const again = await find(cast.owner, 'q=clerestory', { 'if-none-match': tag });
    expect(again.status).toBe(304);
  });

  it.each(['q=a&q=b', `q=${'x'.repeat(201)}`, 'q=a&archived=2', 'q=a&after=zz', 'q=a&owner=me'])(
    'refuses %s',
    async (query) => {
      expect((await find(cast.owner, query)).status).toBe(422);
    },
  );
});

describe('templates', () => {
  it('are seen and used by members, by nobody else, and only while they are templates', async () => {
    const mark = (template: boolean) =>
      cast.owner.ask('PATCH', `${base}/template`, { body: { template } });
    const use = (who: Visitor) =>
      who.post(`/api/templates/${cast.notebook}/notebooks`, { title: 'From it' });
    const seen = async (who: Visitor) => (await who.get('/api/templates')).json.templates;
    expect([(await use(member)).status, await seen(member)]).toEqual([404, []]);
    await mark(true);
    expect(await seen(member)).toHaveLength(1);
    expect(await seen(cast.stranger)).toEqual([]);
    const [made, refused] = [await use(member), await use(cast.stranger)];
    expect([made.status, refused.status]).toEqual([201, 404]);
    const opened = await member.get(`/api/notebooks/${String(made.json.id)}`);
    expect(opened.text).toContain('clerestory');
    expect((await member.get(base)).status).toBe(404);
    await mark(false);
    expect((await use(member)).status).toBe(404);
  });
});

describe('moving', () => {
  it('takes a notebook to another workshop of its owner', async () => {
    const [owner, other] = [await newcomer('Owen'), await newcomer('Hal')];
    const notebook = await newNotebook(owner, 'R = 1 m');
    const theirs = await newNotebook(other, 'R = 1 m');
    const workshopOf = async (who: Visitor, id: string) =>
      ((await who.get(`/api/notebooks/${id}`)).json.notebook as { workshop: { id: string } })
        .workshop.id;
    const workshopId = await workshopOf(other, theirs);
    const move = () => owner.post(`/api/notebooks/${notebook}/move`, { workshopId });
    expect((await move()).status).toBe(404);
    const row: { id: string } = await db('users').where({ email: owner.email }).first('id');
    await insertMembership(db, workshopId, row.id, 'member');
    expect((await move()).status).toBe(204);
    expect(await workshopOf(owner, notebook)).toBe(workshopId);
    expect((await move()).status).toBe(422);
  });
});
