import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { refusal } from '../../lib/certificate-check/verify.mjs';
import { CertificateRequest, certify, closePool } from '@/lib/evaluation/index';
import { ensureBundles } from '@/lib/evaluation/bundles.mjs';

beforeAll(async () => {
  await ensureBundles();
});
afterAll(closePool);

const CELLS = [
  { id: 'a', source: 'R = 1200 mm\n# a remark\np = 2 R sin(turn/34)' },
  { id: 'b', source: 'q = p/R + x\nx = sqrt(2)', settings: { unit: 'in' as const } },
  {
    id: 'c',
    source: 'w = cos(turn/7)\nc = 2 pi R\np == R\nalpha = turn/5\nu = v\nv = u\nbad = 1/0',
  },
];
const certificateOf = (cell: string, line: number) => certify({ cells: CELLS, at: { cell, line } });

/** 2 sin(π/17), the chord of a seventeenth, has degree φ(17) = 16. */
describe('the certificate of a line', () => {
  it.each([
    ['a', 1, 1, 'mm'],
    ['a', 3, 16, 'mm'],
    ['b', 1, 32, null],
    ['b', 2, 2, null],
  ])(
    'of cell %s, line %i, is accepted by the separate program',
    async (cell, line, degree, unit) => {
      const answer = await certificateOf(cell, line);
      if (answer.kind !== 'certificate') throw new Error(answer.message);
      expect(answer).toMatchObject({ schema: 1, unit, certificate: { degree } });
      expect(refusal(JSON.parse(JSON.stringify(answer.certificate)))).toBeNull();
    },
  );

  it('speaks of the number of units that the cell is given in', async () => {
    const answer = await certify({
      cells: [{ id: 'a', source: '254 mm', settings: { unit: 'in' } }],
      at: { cell: 'a', line: 1 },
    });
    expect(answer).toMatchObject({ unit: 'in', certificate: { minimalPolynomial: ['1', '-10'] } });
  });

  it.each([
    ['a value that square roots do not reach', 'c', 1, 'not-exact'],
    ['a transcendental value', 'c', 2, 'not-exact'],
    ['a statement', 'c', 3, 'domain'],
    ['an angle', 'c', 4, 'domain'],
    ['a mark in a circle', 'c', 5, 'depends-on-error'],
    ['an error', 'c', 7, 'division-by-zero'],
    ['a remark', 'a', 2, 'domain'],
    ['no line', 'a', 9, 'domain'],
    ['no cell', 'z', 1, 'domain'],
  ])('is refused for %s, with the reason as data', async (_what, cell, line, code) => {
    expect(await certificateOf(cell, line)).toMatchObject({ kind: 'none', code });
  });

  it('that would go on for ever is stopped, and the next one is made', async () => {
    const endless = `(${Array.from({ length: 15 }, (_, index) => `sqrt(1+sqrt(${index + 2}))`).join('+')})^99`;
    const stopped = await certify({
      cells: [{ id: 'a', source: endless }],
      at: { cell: 'a', line: 1 },
    });
    expect(stopped.kind === 'none' && stopped.code).toMatch(/^limit-/);
    expect((await certificateOf('a', 1)).kind).toBe('certificate');
  });
});

describe('a request for a certificate', () => {
  it.each([
    ['no cells', { at: { cell: 'a', line: 1 } }],
    ['no line', { cells: [], at: { cell: 'a' } }],
    ['line 0', { cells: [], at: { cell: 'a', line: 0 } }],
    ['an unknown field', { cells: [], at: { cell: 'a', line: 1 }, extra: 1 }],
  ])('with %s is refused', (_what, request) => {
    expect(CertificateRequest.safeParse(request).success).toBe(false);
  });
});
