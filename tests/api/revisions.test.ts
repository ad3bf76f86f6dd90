import { beforeAll, describe, expect, it } from 'vitest';
import { issue, newCast, newKey, newLink, type Cast } from './support/notebook';
import { Visitor } from './support/visitor';

let cast: Cast;
beforeAll(async () => {
  cast = await newCast('R = 1200 mm', 's = R sqrt(2)\nt = 30 deg\nP = point(1 mm, 2 mm)');
  await issue(cast.owner, cast.notebook);
});

const path = (rest = '') => `/api/notebooks/${cast.notebook}/revisions${rest}`;

describe('an issued revision', () => {
  it('is answered by the result schema, with what issuing adds', async () => {
    const answer = await cast.viewer.get(path('/A'));
    expect(answer.status).toBe(200);
    expect(answer.json).toMatchObject({
      schema: 1,
      engine: expect.stringMatching(/^\d/) as string,
      notebook: { id: cast.notebook },
      version: { number: 1 },
      revision: {
        letter: 'A',
        purpose: 'for manufacture',
        issuedBy: 'Owain',
        checkedBy: null,
        supersededBy: null,
      },
      titleBlock: { legalOwner: 'Quarrymoor Yard', creator: 'Owain' },
      cells: [
        { id: 'c1', results: [{ mark: 'R', exact: { text: '1200' }, unit: 'mm' }] },
        { id: 'c2', results: [{ mark: 's', exact: { text: '1200*sqrt(2)' } }, {}, {}] },
      ],
    });
    const tag = answer.headers.get('etag') ?? '';
    expect(answer.headers.get('cache-control')).toBe('private, no-cache');
    const again = await cast.viewer.get(path('/A'), { 'if-none-match': tag });
    expect([again.status, again.text]).toEqual([304, '']);
  });

  it('gives its marks as CSV after RFC 4180', async () => {
    const answer = await cast.viewer.get(path('/A/export?format=csv'));
    expect(answer.headers.get('content-type')).toBe('text/csv; charset=utf-8');
    expect(answer.headers.get('content-disposition')).toContain('revision A.csv');
    const [head, ...rows] = answer.text.split('\r\n');
    expect(head).toBe(
      'id,quantity,exact,decimal,unit,cut size,step,maximum error,version,revision',
    );
    expect(rows[0]).toBe('R,length,1200,1200,mm,1200,0.5 mm,0,1,A');
    expect(rows.at(-1)).toBe('');
    expect(rows.map((row) => row.split(',')[0])).toEqual(['R', 's', 't', 'P: x', 'P: y', '']);
  });

  it('is worked out again on demand and equal to what was issued', async () => {
    const answer = await cast.viewer.post(path('/A/reevaluation'), {});
    expect(answer.json).toMatchObject({ letter: 'A', lines: 4, differences: [] });
  });

  it.each(['B', 'a', 'A1', '%41%42%43%44%45', 'next1'])('“%s” is not found', async (letter) => {
    const answer = await cast.owner.get(path(`/${letter}`));
    expect([answer.status, answer.json.code]).toEqual([404, 'not-found']);
  });
});

describe('issuing', () => {
  it.each([
    ['without a purpose', { version: 1 }],
    ['with an empty purpose', { version: 1, purpose: '  ' }],
    ['without a version', { purpose: 'for comment' }],
    ['of version 0', { version: 0, purpose: 'for comment' }],
    ['with a checker who is no id', { version: 1, purpose: 'for comment', checkedBy: 'Tam' }],
    ['with a field of its own', { version: 1, purpose: 'for comment', letter: 'Z' }],
  ])('%s is refused', async (_what, body) => {
    const answer = await cast.owner.post(path(), body);
    expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
  });
});

describe('keys by their scopes', () => {
  const asked = (key: string, method: string, to: string, body?: unknown) =>
    new Visitor().ask(method, to, { body, headers: { authorization: `Bearer ${key}` } });

  it.each([
    [['evaluate'], { evaluate: 200, list: 403, read: 403 }],
    [['revisions'], { evaluate: 403, list: 200, read: 200 }],
    [['evaluate', 'revisions'], { evaluate: 200, list: 200, read: 200 }],
  ])('%j open what they are for', async (scopes, expected) => {
    const { key } = await newKey(cast.viewer, scopes);
    const evaluated = await asked(key, 'POST', '/api/evaluate', { expression: '1+1' });
    const listed = await asked(key, 'GET', path());
    const read = await asked(key, 'GET', path('/A'));
    expect({ evaluate: evaluated.status, list: listed.status, read: read.status }).toEqual(
      expected,
    );
    for (const [method, to] of [
      ['POST', path()],
      ['GET', path('/next?version=1')],
      ['GET', path('/A/export?format=csv')],
      ['POST', path('/A/reevaluation')],
      ['GET', `/api/notebooks/${cast.notebook}`],
    ] as const) {
      const answer = await asked(key, method, to, method === 'POST' ? {} : undefined);
      expect([answer.status, answer.json.code]).toEqual([401, 'sign-in-needed']);
    }
  });

  it('read only what their maker has a role on, asked each time', async () => {
    const { key } = await newKey(cast.stranger, ['revisions']);
    expect((await asked(key, 'GET', path('/A'))).status).toBe(404);
    const own = await newKey(cast.editor, ['revisions']);
    expect((await asked(own.key, 'GET', path('/A'))).status).toBe(200);
    const people = (await cast.owner.get(`/api/notebooks/${cast.notebook}/people`)).json.people as {
      id: string;
      email: string;
    }[];
    const editor = people.find(({ email }) => email === cast.editor.email)?.id ?? '';
    await cast.owner.ask('DELETE', `/api/notebooks/${cast.notebook}/people/${editor}`);
    const after = await asked(own.key, 'GET', path('/A'));
    expect([after.status, after.json.code]).toEqual([404, 'not-found']);
  });

  it.each([[[]], [['everything']], [['evaluate', 'evaluate']]])(
    'are not made for %j',
    async (scopes) => {
      const answer = await cast.owner.post('/api/keys', { label: 'Saw', scopes });
      expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
    },
  );

  it('say nothing of a notebook to the token of a client link', async () => {
    const { token } = await newLink(cast.owner, cast.notebook);
    expect((await asked(token, 'GET', path('/A'))).status).toBe(401);
  });
});
