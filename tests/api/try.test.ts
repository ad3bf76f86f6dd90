import { afterAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../setup/server';
import { Visitor } from './support/visitor';

const db = openDatabase();
afterAll(() => db.destroy());

const attempt = (source: unknown, visitor = new Visitor()) => visitor.post('/api/try', { source });

interface Line {
  kind: string;
  mark: string | null;
  exact?: { text: string };
  cut?: { value: string; step: string };
  truth?: { value: boolean };
  error?: { code: string };
}
const linesOf = (answer: { json: Record<string, unknown> }) => answer.json.results as Line[];

describe('the live cell of the front page', () => {
  it('answers somebody without an account or a session', async () => {
    const answer = await attempt('R = 1200 mm\ns = 2 R sin(turn/10)\ns^2 == R^2 (5 - sqrt(5))/2');
    expect(answer.status).toBe(200);
    expect(linesOf(answer)).toMatchObject([
      { mark: 'R', exact: { text: '1200' } },
      // The side of a pentagon is √((5−√5)/2) = 1.17557050458 of its radius: 1410.68 mm.
      { mark: 's', cut: { value: '1410.5', step: '0.5 mm' } },
      { kind: 'truth', truth: { value: true } },
    ]);
    expect(answer.headers.get('cache-control')).toBe('no-store');
  });

  it('names each error at its line and answers the other lines', async () => {
    const answer = await attempt('2 +\n\n1200 mm + 3 deg\n9^9^9^9\n# a remark\n2 + 2');
    expect(answer.status).toBe(200);
    const codes = linesOf(answer).map((line) => line.error?.code ?? line.exact?.text);
    expect(codes).toEqual(['syntax', 'unit-mismatch', expect.stringMatching(/^limit-/), '4']);
  });

  it('keeps nothing: neither question nor answer is in the database', async () => {
    const count = async () => {
      const row = await db('evaluation_cache').count({ n: '*' }).first();
      return Number(row?.n);
    };
    const before = await count();
    const answer = await attempt(`${Date.now()}/7 + sqrt(11)`);
    expect(linesOf(answer)[0]?.kind).toBe('number');
    expect(await count()).toBe(before);
  });

  it.each([
    ['a long text', 'x'.repeat(401), /401 characters.*400/],
    ['many lines', '1\n'.repeat(8), /9 lines.*8/],
    ['no text', 12, /number/],
    ['nothing', undefined, /missing/],
  ])('refuses %s with one sentence', async (_, source, sentence) => {
    const answer = await attempt(source);
    expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
    expect(answer.json.detail).toMatch(sentence);
  });

  it('refuses settings, ids and cells, which belong to notebooks', async () => {
    const answer = await new Visitor().post('/api/try', { source: '1', settings: { digits: 900 } });
    expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
  });

  it('refuses a body beyond its few kilobytes and what is no JSON', async () => {
    const large = await attempt('x'.repeat(5000));
    expect([large.status, large.json.code]).toEqual([413, 'too-large']);
    const form = await new Visitor().ask('POST', '/api/try', {
      body: 'source=1',
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });
    expect([form.status, form.json.code]).toEqual([415, 'wrong-type']);
  });

  it('takes so many tries a minute from one address, then says how long to wait; others go on', async () => {
    const visitor = new Visitor();
    const statuses: number[] = [];
    let last = await attempt('1', visitor);
    for (let hit = 0; hit < 70 && last.status !== 429; hit += 1) {
      statuses.push(last.status);
      last = await attempt('1', visitor);
    }
    expect(statuses.length).toBeLessThanOrEqual(60);
    expect(statuses.length).toBeGreaterThan(0);
    expect([last.status, last.json.code]).toEqual([429, 'too-many']);
    expect(last.headers.get('content-type')).toContain('application/problem+json');
    expect(Number(last.headers.get('retry-after'))).toBeGreaterThan(0);
    expect(last.json.detail).toMatch(/^Too many tries from this address: 60 are allowed/);
    expect((await attempt('1')).status).toBe(200);
    const page = await visitor.get('/?lines=2%2B2');
    expect(page.status).toBe(200);
    expect(page.text).toContain('Too many tries from this address');
  });
});

describe('the front page without scripts', () => {
  it('works out the lines that its form sends', async () => {
    const page = await new Visitor().get(
      `/?lines=${encodeURIComponent('h = sagitta(2050 mm, turn/12)')}`,
    );
    expect(page.text).toContain('h = sagitta(2050 mm, turn/12)');
    // 2050 (1 − cos 15°) = 69.85206: common knowledge of the cosine of 15 degrees.
    expect(page.text.includes('69.85205')).toBe(true);
  });

  it('says so when the lines are too many', async () => {
    const page = await new Visitor().get(`/?lines=${'1%0A'.repeat(20)}`);
    expect(page.status).toBe(200);
    expect(page.text).toContain('There are 21 lines');
  });
});
