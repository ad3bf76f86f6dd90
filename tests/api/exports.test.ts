import { beforeAll, describe, expect, it } from 'vitest';
import { content } from './support/notebook';
import { newcomer, type Visitor } from './support/visitor';

let owner: Visitor;
let id: string;

beforeAll(async () => {
  owner = await newcomer('Owain');
  const made = await owner.post('/api/notebooks', {
    title: 'Rose “Süd”/../\u202e; filename=x',
    content: content('R = 1200 mm', 's = R sqrt(2)'),
  });
  id = String(made.json.id);
  await owner.post(`/api/notebooks/${id}/versions`, { base: 1, content: content('R = 77 mm') });
});

const exportOf = (query: string) => owner.get(`/api/notebooks/${id}/export?${query}`);

describe('an export', () => {
  it('as JSON has the identity, the version and the results of the result schema', async () => {
    const answer = await exportOf('format=json&version=1');
    expect(answer.status).toBe(200);
    expect(answer.headers.get('content-type')).toContain('application/json');
    expect(answer.json).toMatchObject({
      schema: 1,
      notebook: { id, workshop: 'Quarrymoor Yard' },
      version: { number: 1, author: 'Owain' },
      cells: [
        { id: 'c1', results: [{ mark: 'R', exact: { text: '1200' }, unit: 'mm' }] },
        { id: 'c2', results: [{ mark: 's', exact: { text: '1200*sqrt(2)' }, unit: 'mm' }] },
      ],
    });
    expect(answer.text).not.toContain(owner.email);
  });

  it('is of the newest version unless another one is asked for', async () => {
    expect((await exportOf('format=json')).json).toMatchObject({ version: { number: 2 } });
  });

  it('as TeX is a whole document', async () => {
    const answer = await exportOf('format=tex&version=1');
    expect(answer.text).toMatch(/^\\documentclass/);
    expect(answer.text.trimEnd()).toMatch(/\\end\{document\}$/);
    expect(answer.text).toContain('1200\\sqrt{2}');
  });

  it('is saved under a name that no title can turn into a path or a header', async () => {
    const { headers } = await exportOf('format=tex');
    const disposition = headers.get('content-disposition') ?? '';
    const shape =
      /^attachment; filename="([A-Za-z0-9._ -]+)"; filename\*=UTF-8''([A-Za-z0-9._~!#$&+^`|%-]+)$/;
    const [, plain = '', encoded = ''] = shape.exec(disposition) ?? [];
    expect(plain).toMatch(/\.tex$/);
    const name = decodeURIComponent(encoded);
    expect(name).toContain('Süd');
    expect(name).toMatch(/, version 2\.tex$/);
    expect(name).not.toMatch(/[/\\"\p{Cc}\p{Cf}]/u);
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('content-security-policy')).toContain("default-src 'none'");
  });

  it.each([
    ['no format', '', 422],
    ['another format', 'format=pdf', 422],
    ['a format twice', 'format=json&format=tex', 422],
    ['a version that is no number', 'format=json&version=1.5', 422],
    ['a version that is not there', 'format=json&version=99', 404],
  ])('with %s is refused', async (_what, query, status) => {
    expect((await exportOf(query)).status).toBe(status);
  });
});
