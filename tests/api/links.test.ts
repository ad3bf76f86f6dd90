import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../setup/server';
import { content, issue, newCast, newLink, newNotebook, type Cast } from './support/notebook';
import { Visitor } from './support/visitor';

let cast: Cast;
const db = openDatabase();
beforeAll(async () => {
  cast = await newCast('R = 1200 mm', 's = R sqrt(2)');
  await issue(cast.owner, cast.notebook);
});
afterAll(() => db.destroy());

const exportOf = (token: string, format = 'json') => `/api/client/${token}/export?format=${format}`;

const pageOf = (token: string) => `/client/${token}`;

describe('the page of a link', () => {
  it('says in plain words what there is, with the status that belongs to it', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    const { token, id: linkId } = await newLink(owner, id);
    const client = new Visitor();
    const waiting = await client.get(pageOf(token));
    expect([waiting.status, waiting.text.includes('Nothing has been issued yet')]).toEqual([
      200,
      true,
    ]);
    await issue(owner, id);
    const issued = await client.get(pageOf(token));
    expect(issued.status).toBe(200);
    expect(issued.text).toContain('for manufacture');
    expect(issued.headers.get('x-robots-tag')).toBe('noindex, nofollow');
    expect(issued.headers.get('cache-control')).toContain('no-store');
    await db('client_links')
      .where({ id: linkId })
      .update({ expires_at: new Date(0) });
    const expired = await client.get(pageOf(token));
    expect(expired.text).toContain('This link has expired');
    expect(expired.text).not.toContain('for manufacture');
    expect((await client.get(exportOf(token))).status).toBe(410);
    await owner.ask('DELETE', `/api/notebooks/${id}/links/${linkId}`);
    expect((await client.get(pageOf(token))).status).toBe(404);
    expect((await client.get(pageOf('A'.repeat(43)))).status).toBe(404);
  });

  it('counts openings of the page, but neither prefetches, nor looks at the head, nor exports', async () => {
    const { owner, notebook } = cast;
    const { token, id } = await newLink(owner, notebook);
    const client = new Visitor();
    await client.get(pageOf(token));
    await client.get(pageOf(token));
    await client.get(pageOf(token), { 'sec-purpose': 'prefetch' });
    await client.get(pageOf(token), { purpose: 'prefetch', 'x-opening': '1' });
    await client.ask('HEAD', pageOf(token));
    await client.get(exportOf(token));
    const links = (await owner.get(`/api/notebooks/${notebook}/links`)).json.links;
    expect(links).toContainEqual(expect.objectContaining({ id, opened: 2 }));
    const { openings } = (await owner.get(`/api/notebooks/${notebook}/links/${id}`)).json;
    expect(openings).toHaveLength(2);
  });
});

describe('a passphrase', () => {
  const form = (passphrase: string) => new URLSearchParams({ passphrase }).toString();
  const send = (who: Visitor, token: string, passphrase: string) =>
    who.ask('POST', `/api/client/${token}/passphrase`, {
      body: form(passphrase),
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });

  it('opens the page and its downloads for this browser and this link, and for no other', async () => {
    const { owner, notebook } = cast;
    const { token } = await newLink(owner, notebook, { passphrase: 'lime and sand' });
    const client = new Visitor();
    expect((await client.get(pageOf(token))).text).not.toContain('1200');
    const closed = await client.get(exportOf(token));
    expect([closed.status, closed.json.code]).toEqual([401, 'passphrase-needed']);

    const wrong = await send(client, token, 'lime and salt');
    expect([wrong.status, wrong.headers.get('location')]).toEqual([
      303,
      `/client/${token}?passphrase=wrong`,
    ]);
    expect(wrong.headers.getSetCookie()).toEqual([]);
    const right = await send(client, token, 'lime and sand');
    expect([right.status, right.headers.get('location')]).toEqual([303, `/client/${token}`]);
    const cookies = right.headers.getSetCookie();
    expect(cookies.map((line) => /Path=([^;]+)/.exec(line)?.[1])).toEqual([
      `/client/${token}`,
      `/api/client/${token}`,
    ]);
    for (const line of cookies) expect(line).toMatch(/HttpOnly; SameSite=Lax/);

    expect((await client.get(pageOf(token))).text).toContain('1200');
    expect((await client.get(exportOf(token))).status).toBe(200);
    const other = await newLink(owner, notebook, { passphrase: 'lime and sand' });
    expect((await client.get(exportOf(other.token))).status).toBe(401);
  });

  it('cannot be guessed at will', async () => {
    const { owner, notebook } = cast;
    const { token } = await newLink(owner, notebook, { passphrase: 'lime and sand' });
    const client = new Visitor();
    const places: (string | null)[] = [];
    for (let attempt = 0; attempt < 10; attempt += 1) {
      places.push((await send(client, token, `guess ${attempt}`)).headers.get('location'));
    }
    expect(places[0]).toContain('wrong');
    expect(places.at(-1)).toContain('wait');
  });

  it('is not read from anything but the form', async () => {
    const { token } = await newLink(cast.owner, cast.notebook, { passphrase: 'lime and sand' });
    const answer = await new Visitor().post(`/api/client/${token}/passphrase`, {
      passphrase: 'lime and sand',
    });
    expect(answer.status).toBe(415);
  });
});

describe('a client link', () => {
  it('is listed without its token, which is stored only as a hash and shown again to owners alone', async () => {
    const { owner, notebook } = cast;
    const made = await owner.post(`/api/notebooks/${notebook}/links`, { label: 'Chapter house' });
    expect(made.status).toBe(201);
    const { id, token, url } = made.json as { id: string; token: string; url: string };
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect(url.endsWith(`/client/${token}`)).toBe(true);
    const list = await owner.get(`/api/notebooks/${notebook}/links`);
    expect(list.text).not.toContain(token);
    const [newest] = list.json.links as Record<string, unknown>[];
    expect(newest).toMatchObject({
      id,
      label: 'Chapter house',
      madeBy: 'Owain',
      revokedAt: null,
      opened: 0,
    });
    const again = await owner.get(`/api/notebooks/${notebook}/links/${id}`);
    expect(again.json).toEqual({ url, openings: [] });
    const row = (await db('client_links').where({ id }).first()) as Record<string, unknown>;
    expect(JSON.stringify(row)).not.toContain(token);
    expect(row.token_hash).toMatch(/^[0-9a-f]{64}$/);
  });

  it('lets its holder export without an account, and names nobody but whom the title block names', async () => {
    const { owner, editor, viewer, notebook } = cast;
    const { token } = await newLink(owner, notebook);
    const client = new Visitor();
    for (const format of ['json', 'tex', 'csv']) {
      const answer = await client.get(exportOf(token, format));
      expect(answer.status).toBe(200);
      expect(answer.text).toContain('1200');
      for (const person of [owner, editor, viewer]) expect(answer.text).not.toContain(person.email);
      expect(answer.text).not.toMatch(/Edda|Vigo/);
      expect(answer.text.includes('Owain')).toBe(format !== 'csv');
      expect(answer.text).not.toContain(token);
    }
  });

  it('exports what was issued last, whatever has been kept since', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    const { token } = await newLink(owner, id);
    const nothing = await new Visitor().get(exportOf(token));
    expect([nothing.status, nothing.json.code]).toEqual([404, 'nothing-issued']);
    await issue(owner, id);
    await owner.post(`/api/notebooks/${id}/versions`, { base: 1, content: content('R = 271 mm') });
    expect((await new Visitor().get(exportOf(token))).text).not.toContain('271');
    await issue(owner, id, 2);
    expect((await new Visitor().get(exportOf(token))).text).toContain('271');
  });

  it('answers 304 to who has the revision already, until another one is issued', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    const { token } = await newLink(owner, id);
    await issue(owner, id);
    const tags = new Set<string>();
    for (const format of ['json', 'tex', 'csv']) {
      const first = await new Visitor().get(exportOf(token, format));
      const tag = first.headers.get('etag') ?? '';
      expect(first.headers.get('cache-control')).toBe('private, no-cache');
      const again = await new Visitor().get(exportOf(token, format), { 'if-none-match': tag });
      expect([again.status, again.text]).toEqual([304, '']);
      tags.add(tag);
    }
    expect(tags.size).toBe(3);
    await issue(owner, id);
    const [tag = ''] = tags;
    const newer = await new Visitor().get(exportOf(token), { 'if-none-match': tag });
    expect(newer.status).toBe(200);
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
