import { beforeAll, describe, expect, it } from 'vitest';
import { content, give, newCast, newNotebook, type Cast } from './support/notebook';
import { Visitor, freshEmail, newcomer } from './support/visitor';

let cast: Cast;
beforeAll(async () => {
  cast = await newCast('R = 1200 mm');
});

describe('a notebook', () => {
  it('begins with version 1 by its maker, with the content it was made with', async () => {
    const owner = await newcomer('Owain');
    const id = await newNotebook(owner, 'R = 5 mm', 'R/2');
    const { json } = await owner.get(`/api/notebooks/${id}`);
    expect(json.notebook).toMatchObject({ id, version: 1, role: 'owner', savedBy: 'Owain' });
    expect(json.content).toEqual(content('R = 5 mm', 'R/2'));
  });

  it('is renamed, archived and brought back, and lists accordingly', async () => {
    const owner = await newcomer('Owain');
    const id = await newNotebook(owner, '1');
    const idsIn = async (query: string) =>
      ((await owner.get(`/api/notebooks${query}`)).json.notebooks as { id: string }[]).map(
        (line) => line.id,
      );
    await owner.ask('PATCH', `/api/notebooks/${id}`, { body: { title: 'Oriel', archived: true } });
    expect(await idsIn('')).toEqual([]);
    expect(await idsIn('?archived=1')).toEqual([id]);
    expect((await owner.get(`/api/notebooks/${id}`)).json.notebook).toMatchObject({
      title: 'Oriel',
    });
    const save = await owner.post(`/api/notebooks/${id}/versions`, {
      base: 1,
      content: content('2'),
    });
    expect([save.status, save.json.code]).toEqual([409, 'archived']);
    await owner.ask('PATCH', `/api/notebooks/${id}`, { body: { archived: false } });
    expect(await idsIn('')).toEqual([id]);
    expect(await idsIn('?archived=1')).toEqual([]);
  });

  it('keeps its title when only half of a change is allowed', async () => {
    const { editor, owner, notebook } = cast;
    const before = (await owner.get(`/api/notebooks/${notebook}`)).json.notebook;
    const answer = await editor.ask('PATCH', `/api/notebooks/${notebook}`, {
      body: { title: 'Half done', archived: true },
    });
    expect(answer.status).toBe(403);
    expect((await owner.get(`/api/notebooks/${notebook}`)).json.notebook).toEqual(before);
  });

  it('is made only in a workshop one belongs to', async () => {
    const { owner, stranger, notebook } = cast;
    const opened = await owner.get(`/api/notebooks/${notebook}`);
    const { workshop } = opened.json.notebook as { workshop: { id: string } };
    for (const workshopId of [workshop.id, '00000000-0000-4000-8000-000000000000', 'é']) {
      const answer = await stranger.post('/api/notebooks', { title: 'Intruder', workshopId });
      expect([answer.status, answer.json.code]).toEqual([404, 'not-found']);
    }
  });

  it.each(['not-an-id', '%00', 'é', "' or 1=1 --", '00000000-0000-4000-8000-000000000000'])(
    'with the id %s is not found',
    async (id) => {
      const answer = await cast.owner.get(`/api/notebooks/${encodeURIComponent(id)}`);
      expect(answer.status).toBe(404);
    },
  );

  it('is told apart from what the browser has by its entity tag', async () => {
    const { owner, editor, notebook } = cast;
    const first = await owner.get(`/api/notebooks/${notebook}`);
    const tag = first.headers.get('etag') ?? '';
    const again = await owner.get(`/api/notebooks/${notebook}`, { 'if-none-match': tag });
    expect([again.status, again.text]).toEqual([304, '']);
    await owner.ask('PATCH', `/api/notebooks/${notebook}`, { body: { title: 'Renamed' } });
    const changed = await owner.get(`/api/notebooks/${notebook}`, { 'if-none-match': tag });
    expect(changed.status).toBe(200);
    // The role is part of the answer, so nobody is served another person's copy.
    const other = await editor.get(`/api/notebooks/${notebook}`, {
      'if-none-match': changed.headers.get('etag') ?? '',
    });
    expect(other.status).toBe(200);
  });
});

describe('what is sent', () => {
  const bad: [string, unknown, number, string][] = [
    ['no JSON', '{"title": ', 400, 'unreadable'],
    ['nothing', '', 400, 'unreadable'],
    ['a list', [], 422, 'invalid'],
    ['a number for the title', { title: 7 }, 422, 'invalid'],
    ['an empty title', { title: ' ' }, 422, 'invalid'],
    ['a title with half of a character', '{"title":"\\ud800"}', 422, 'invalid'],
    [
      'a source with half of a character',
      { title: 'x', content: content('1 \ud800') },
      422,
      'invalid',
    ],
    ['a field nobody knows', { title: 'x', owner: 'me' }, 422, 'invalid'],
    ['a prototype', '{"title":"x","__proto__":{"role":"owner"}}', 422, 'invalid'],
    ['an over-long title', { title: 'x'.repeat(201) }, 422, 'invalid'],
    ['an over-long source', { title: 'x', content: content('1'.repeat(20_001)) }, 422, 'invalid'],
    [
      'too many cells',
      { title: 'x', content: content(...Array<string>(2_001).fill('1')) },
      422,
      'invalid',
    ],
    ['too many bytes', { title: 'x'.repeat(8_500_000) }, 413, 'too-large'],
    [
      'two cells with one id',
      { title: 'x', content: { ...content('1'), cells: [1, 2].map(() => content('1').cells[0]) } },
      422,
      'invalid',
    ],
    ['deep nesting', `{"title":${'['.repeat(50_000)}${']'.repeat(50_000)}}`, 422, 'invalid'],
  ];
  it.each(bad)('with %s is refused by name', async (_what, body, status, code) => {
    const answer = await cast.owner.post('/api/notebooks', body);
    expect([answer.status, answer.json.code]).toEqual([status, code]);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    expect(String(answer.json.detail)).toMatch(/^[\w“].*[.)]$/s);
    expect(answer.text.length).toBeLessThan(2000);
  });

  it('names the field in nested content', async () => {
    const wrong = { ...content('1'), settings: { ...content().settings, unit: 'furlong' } };
    const answer = await cast.owner.post('/api/notebooks', { title: 'x', content: wrong });
    expect(answer.json.fields).toEqual([
      { field: 'content.settings.unit', message: 'The unit must be one of mm, cm, m, in, ft.' },
    ]);
  });

  it.each(['0.5 furlong', '0 mm', 'wide', '-1 mm'])(
    'with the cutting step %s, which nobody can cut to, is refused',
    async (step) => {
      const wrong = { ...content('1'), settings: { ...content().settings, step } };
      const answer = await cast.owner.post('/api/notebooks', { title: 'x', content: wrong });
      expect(answer.status).toBe(422);
      expect(answer.json.fields).toMatchObject([{ field: 'content.settings.step' }]);
      expect(answer.json.detail).toContain(step);
    },
  );

  it('as a form is refused, so that no other site can send it without asking', async () => {
    const answer = await cast.owner.post('/api/notebooks', '{"title":"x"}', {
      'content-type': 'text/plain',
    });
    expect([answer.status, answer.json.code]).toEqual([415, 'wrong-type']);
  });

  it('without any word of where it comes from is refused when cookies speak for it', async () => {
    const { owner } = cast;
    const unsaid = await owner.post('/api/notebooks', { title: 'x' }, { origin: 'null' });
    expect([unsaid.status, unsaid.json.code]).toEqual([403, 'foreign-origin']);
    const crossSite = await owner.post(
      '/api/notebooks',
      { title: 'x' },
      { 'sec-fetch-site': 'cross-site' },
    );
    expect([crossSite.status, crossSite.json.code]).toEqual([403, 'foreign-origin']);
  });
});

describe('the people of a notebook', () => {
  it('are added by e-mail address, whatever its case, once', async () => {
    const owner = await newcomer('Owain');
    const other = await newcomer('Edda');
    const id = await newNotebook(owner, '1');
    const path = `/api/notebooks/${id}/people`;
    const added = await owner.post(path, {
      email: ` ${other.email.toUpperCase()} `,
      role: 'viewer',
    });
    expect(added.status).toBe(201);
    expect(added.json).toMatchObject({ name: 'Edda', email: other.email, role: 'viewer' });
    const again = await owner.post(path, { email: other.email, role: 'editor' });
    expect([again.status, again.json.code]).toEqual([409, 'already-added']);
    const list = (await owner.get(path)).json.people;
    expect(list).toMatchObject([
      { name: 'Owain', role: 'owner' },
      { name: 'Edda', role: 'viewer' },
    ]);
    expect(JSON.stringify(list)).not.toMatch(/hash|password|token/i);
  });

  it('are not made up: an address without an account is invited and gets no role by itself', async () => {
    const email = freshEmail('nobody');
    const path = `/api/notebooks/${cast.notebook}`;
    const answer = await cast.owner.post(`${path}/people`, { email, role: 'viewer' });
    expect(answer.status).toBe(202);
    expect(answer.json.invitation).toMatchObject({ email, role: 'viewer', expired: false });
    expect((await cast.owner.get(`${path}/people`)).text).not.toContain(email);
    expect((await cast.owner.get(`${path}/invitations`)).text).toContain(email);
  });

  it('always include an owner', async () => {
    const owner = await newcomer('Owain');
    const second = await newcomer('Una');
    const id = await newNotebook(owner, '1');
    const path = `/api/notebooks/${id}/people`;
    const [own] = (await owner.get(path)).json.people as { id: string }[];
    for (const [method, body] of [['DELETE'], ['PATCH', { role: 'viewer' }]] as const) {
      const answer = await owner.ask(method, `${path}/${own?.id}`, { body });
      expect([answer.status, answer.json.code]).toEqual([409, 'last-owner']);
    }
    const secondId = await give(owner, id, second, 'owner');
    // Both leave at once: exactly one may.
    const answers = await Promise.all([
      owner.ask('DELETE', `${path}/${own?.id}`),
      second.ask('DELETE', `${path}/${secondId}`),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([204, 409]);
  });

  it('who are removed lose the notebook at once', async () => {
    const { owner, stranger } = cast;
    const id = await newNotebook(owner, '1');
    const strangerId = await give(owner, id, stranger, 'editor');
    expect((await stranger.get(`/api/notebooks/${id}`)).status).toBe(200);
    await owner.ask('DELETE', `/api/notebooks/${id}/people/${strangerId}`);
    expect((await stranger.get(`/api/notebooks/${id}`)).status).toBe(404);
    const save = await stranger.post(`/api/notebooks/${id}/versions`, {
      base: 1,
      content: content('2'),
    });
    expect(save.status).toBe(404);
  });
});

describe('the API as a whole', () => {
  it('answers an unknown address with a problem document', async () => {
    const answer = await new Visitor().get('/api/nothing/here');
    expect([answer.status, answer.json.code]).toEqual([404, 'not-found']);
  });

  it('says whether it can serve, and nothing else', async () => {
    const answer = await new Visitor().get('/api/health');
    expect([answer.status, answer.text]).toEqual([200, '{"status":"ok"}']);
  });

  it('is never cached by others, never sniffed, never framed, and every answer has a number', async () => {
    const visitor = new Visitor();
    for (const path of ['/api/health', '/api/notebooks', '/api/auth/csrf', '/api/nothing']) {
      const { headers } = await visitor.get(path);
      expect(headers.get('cache-control')).toMatch(/no-store/);
      expect(headers.get('x-content-type-options')).toBe('nosniff');
      expect(headers.get('content-security-policy')).toContain("frame-ancestors 'none'");
      expect(headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
    }
  });
});
