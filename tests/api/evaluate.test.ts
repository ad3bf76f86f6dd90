import { beforeAll, describe, expect, it } from 'vitest';
import type { Answer } from './support/visitor';
import { Visitor, newcomer } from './support/visitor';

let person: Visitor;
beforeAll(async () => {
  person = await newcomer('Maren');
});

const evaluate = (body: unknown) => person.post('/api/evaluate', body);

interface Line {
  line: number;
  kind: string;
  mark: string | null;
  exact?: { text: string };
  decimal?: { re: string };
  truth?: { value: boolean };
  error?: { code: string; message: string; from: number; to: number };
}

const linesOf = (answer: Answer, cell = 0): Line[] =>
  (answer.json.cells as { results: Line[] }[])[cell]?.results ?? [];

describe('evaluating', () => {
  it('answers an expression with the id it came with', async () => {
    const answer = await evaluate({ id: 7, expression: 'sqrt(5+2*sqrt(6))' });
    expect(answer.status).toBe(200);
    expect(answer.json).toMatchObject({
      schema: 1,
      id: 7,
      result: {
        kind: 'number',
        exact: { text: 'sqrt(2)+sqrt(3)' },
        degree: 4,
        minimalPolynomial: ['1', '0', '-10', '0', '1'],
        reach: { straightedgeAndCompass: true },
      },
    });
  });

  it('shares marks between cells and decides equality', async () => {
    const answer = await evaluate({
      cells: [
        { id: 'a', source: 's == R sqrt(2-sqrt(2))' },
        { id: 'b', source: 'R = 1200 mm\ns = R sqrt(2 - sqrt(2))' },
      ],
      settings: { digits: 6 },
    });
    expect(linesOf(answer, 0)).toMatchObject([{ kind: 'truth', truth: { value: true } }]);
    expect(linesOf(answer, 1)).toMatchObject([
      { mark: 'R', exact: { text: '1200' } },
      // The chord of an eighth of a turn: 2 sin(π/8) = 0.76536686…
      { mark: 's', decimal: { re: '918.440' } },
    ]);
  });

  it('names each error at its place and still answers the other cells', async () => {
    const sources = ['1 +', 'Q + 1', '1/0', 'sqrt(2) < i', '2 + 2'];
    const answer = await evaluate({
      cells: sources.map((source, index) => ({ id: `c${index}`, source })),
    });
    expect(answer.status).toBe(200);
    const lines = sources.map((_, index) => linesOf(answer, index)[0]);
    expect(lines.map((line) => line?.error?.code ?? line?.exact?.text)).toEqual([
      'syntax',
      'unknown-name',
      'division-by-zero',
      'domain',
      '4',
    ]);
    for (const line of lines.slice(0, 4)) {
      const { from = -1, to = -1, message = '' } = line?.error ?? {};
      expect(from).toBeGreaterThanOrEqual(0);
      expect(to).toBeGreaterThanOrEqual(from);
      expect(message).toMatch(/^[^\n]+\.$/);
    }
  });

  it('built to explode ends in a named limit, leaves the other cells answered and the server well', async () => {
    const tower = Array.from({ length: 30 }, (_, index) => `sqrt(${index + 2}+`).join('');
    const answer = await evaluate({
      cells: [
        { id: 'power', source: '9^9^9^9' },
        { id: 'tower', source: `${tower}1${')'.repeat(30)}` },
        { id: 'sum', source: '1 + 1' },
      ],
    });
    expect(linesOf(answer, 0)[0]?.error?.code).toMatch(/^limit-/);
    expect(linesOf(answer, 1)[0]?.error?.code).toMatch(/^limit-/);
    expect(linesOf(answer, 2)[0]?.exact?.text).toBe('2');
    expect((await new Visitor().get('/api/health')).status).toBe(200);
  });

  it.each([
    ['neither expression nor cells', {}],
    ['both', { expression: '1', cells: [] }],
    ['no text', { expression: 12 }],
    ['an over-long expression', { expression: '1+'.repeat(200_000) }],
    ['digits below 1', { expression: '1', settings: { digits: 0 } }],
    ['a unit nobody knows', { expression: '1', settings: { unit: 'furlong' } }],
    ['a step that is no length', { expression: '1', settings: { step: '3 deg' } }],
    ['a field nobody knows', { expression: '1', precision: 3 }],
  ])('with %s is a problem document and no result', async (_what, body) => {
    const answer = await evaluate(body);
    expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    expect(String(answer.json.detail).length).toBeLessThan(400);
  });
});
