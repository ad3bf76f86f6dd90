import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../setup/server';
import { content, newCast, newLink, newNotebook, type Cast } from './support/notebook';
import { Visitor } from './support/visitor';

let cast: Cast;
const db = openDatabase();
beforeAll(async () => {
  cast = await newCast('R = 1200 mm', 's = R sqrt(2)');
});
afterAll(() => db.destroy());

const exportOf = (token: string, format = 'json') => `/api/client/${token}/export?format=${format}`;

describe('a client link', () => {
  it('is shown once, at its making, and stored only as a hash', async () => {
    const { owner, notebook } = cast;
    const made = await owner.post(`/api/notebooks/${notebook}/links`, { label: 'Chapter house' });
    expect(made.status).toBe(201);
    const { id, token, url } = made.json as { id: string; token: string; url: string };
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect(url.endsWith(`/client/${token}`)).toBe(true);
    const list = await owner.get(`/api/notebooks/${notebook}/links`);
    expect(list.text).not.toContain(token);
    expect(list.json.links).toMatchObject([
      { id, label: 'Chapter house', madeBy: 'Owain', revokedAt: null, opened: 0 },
    ]);
    const row = (await db('client_links').where({ id }).first()) as Record<string, unknown>;
    expect(JSON.stringify(row)).not.toContain(token);
    expect(row.token_hash).toMatch(/^[0-9a-f]{64}$/);
  });

  it('lets its holder export without an account, and gives away nobody’s address or identity', async () => {
    const { owner, editor, viewer, notebook } = cast;
    const { token } = await newLink(owner, notebook);
    const client = new Visitor();
    for (const format of ['json', 'tex']) {
      const answer = await client.get(exportOf(token, format));
      expect(answer.status).toBe(200);
      expect(answer.text).toContain('1200');
      for (const person of [owner, editor, viewer]) expect(answer.text).not.toContain(person.email);
      expect(answer.text).not.toMatch(/Owain|Edda|Vigo/);
      expect(answer.text).not.toContain(token);
    }
  });

  it('exports the newest version', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    const { token } = await newLink(owner, id);
    await owner.post(`/api/notebooks/${id}/versions`, { base: 1, content: content('R = 271 mm') });
    expect((await new Visitor().get(exportOf(token))).text).toContain('271');
  });

  it('changes nothing and opens nothing else', async () => {
    const { owner, notebook } = cast;
    const { token } = await newLink(owner, notebook);
    const client = new Visitor();
    for (const method of ['POST', 'PATCH', 'PUT', 'DELETE']) {
      const answer = await client.ask(method, exportOf(token), { body: {} });
      expect([404, 405]).toContain(answer.status);
    }
    expect((await client.get(`/api/notebooks/${token}`)).status).toBe(401);
    expect((await owner.get(`/api/notebooks/${token}`)).status).toBe(404);
  });

  it('ends at once when it is revoked, and then looks as if it had never been', async () => {
    const { owner, notebook } = cast;
    const { id, token } = await newLink(owner, notebook);
    const client = new Visitor();
    expect((await client.get(exportOf(token))).status).toBe(200);
    const path = `/api/notebooks/${notebook}/links/${id}`;
    expect((await owner.ask('DELETE', path)).status).toBe(204);
    const revoked = await client.get(exportOf(token));
    const unknown = await client.get(exportOf('A'.repeat(43)));
    expect([revoked.status, unknown.status]).toEqual([404, 404]);
    expect({ ...revoked.json, requestId: '' }).toEqual({ ...unknown.json, requestId: '' });
    expect((await owner.ask('DELETE', path)).status).toBe(404);
    const list = (await owner.get(`/api/notebooks/${notebook}/links`)).json.links;
    expect(list).toContainEqual(
      expect.objectContaining({ id, revokedAt: expect.any(String) as string }),
    );
  });

  it('of one notebook is not revoked through another', async () => {
    const { owner, stranger, notebook } = cast;
    const { id, token } = await newLink(owner, notebook);
    const own = await newNotebook(stranger, '1');
    const answer = await stranger.ask('DELETE', `/api/notebooks/${own}/links/${id}`);
    expect(answer.status).toBe(404);
    expect((await new Visitor().get(exportOf(token))).status).toBe(200);
  });

  it.each(['short', 'A'.repeat(44), `${'A'.repeat(42)}%00`, `${'A'.repeat(42)}é`, '%F0%9F%93%90'])(
    'that is %s is not found',
    async (token) => {
      const answer = await new Visitor().get(exportOf(token));
      expect([answer.status, answer.json.code]).toEqual([404, 'not-found']);
    },
  );
});
