import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { download, finish, revalidated } from '@/lib/http/answer';

describe('a download', () => {
  const shape =
    /^attachment; filename="([A-Za-z0-9._ -]+)"; filename\*=UTF-8''([\w.~!#$&+^`|%-]*)$/;

  it('has a header that no name can break out of, and a name that is no path', () => {
    const name = fc.oneof(
      fc.string({ unit: 'binary' }),
      fc.stringMatching(/^[/\\".\r\n;%'()*:]{0,20}$/),
    );
    fc.assert(
      fc.property(name, (title) => {
        const response = download('x', 'text/plain', `${title}.json`);
        const [, plain = '', encoded = ''] =
          shape.exec(response.headers.get('content-disposition') ?? '') ?? [];
        expect(plain).toMatch(/^[^.]/);
        expect(decodeURIComponent(encoded)).not.toMatch(/[/\\:*?"<>|\p{Cc}]/u);
      }),
    );
  });

  it('keeps the letters of a title for clients that read them', () => {
    const { headers } = download('x', 'text/plain', 'Fenêtre à 17 lancettes.tex');
    expect(headers.get('content-disposition')).toBe(
      `attachment; filename="Fenetre a 17 lancettes.tex"; ` +
        `filename*=UTF-8''Fen%C3%AAtre%20%C3%A0%2017%20lancettes.tex`,
    );
  });
});

describe('an answer with an entity tag', () => {
  const ask = (known?: string) =>
    new Request(
      'http://localhost/',
      known === undefined ? {} : { headers: { 'if-none-match': known } },
    );

  it('is sent again only when it changed', async () => {
    const first = revalidated(ask(), { a: 1 });
    const tag = first.headers.get('etag') ?? '';
    expect(await first.json()).toEqual({ a: 1 });
    expect(revalidated(ask(`"other", ${tag}`), { a: 1 }).status).toBe(304);
    expect(revalidated(ask(tag), { a: 2 }).status).toBe(200);
  });

  it('is never for others, and never used unasked', () => {
    const { headers } = finish(revalidated(ask(), {}), 'n');
    expect(headers.get('cache-control')).toBe('private, no-cache');
    expect(headers.get('vary')).toBe('Cookie');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
  });
});
