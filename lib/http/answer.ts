import { createHash } from 'node:crypto';

/** Headers of every answer of the API: it is data, never a page, and never kept by others. */
const HEADERS: Readonly<Record<string, string>> = {
  'cache-control': 'no-store',
  'content-security-policy': "default-src 'none'; frame-ancestors 'none'",
  'cross-origin-resource-policy': 'same-origin',
  'referrer-policy': 'same-origin',
  'x-content-type-options': 'nosniff',
};

export function created(body: unknown): Response {
  return Response.json(body, { status: 201 });
}

/** Nothing to say but that it is done. */
export function done(): Response {
  return new Response(null, { status: 204 });
}

/** Puts the common headers on, leaving those alone that the answer brings itself. */
export function finish(response: Response, requestId: string): Response {
  for (const [name, value] of Object.entries(HEADERS)) {
    if (!response.headers.has(name)) response.headers.set(name, value);
  }
  response.headers.set('x-request-id', requestId);
  return response;
}

/**
 * A JSON answer with an entity tag, so that a client that has it already is told so in a few bytes
 * (304). The browser may keep it, but asks again before each use.
 */
export function revalidated(request: Request, body: unknown): Response {
  const text = JSON.stringify(body);
  const tag = `W/"${createHash('sha256').update(text).digest('base64url').slice(0, 27)}"`;
  const headers = { etag: tag, 'cache-control': 'private, no-cache', vary: 'Cookie' };
  if (isKnown(request, tag)) return new Response(null, { status: 304, headers });
  return new Response(text, { headers: { ...headers, 'content-type': 'application/json' } });
}

/**
 * The same for an answer whose tag is known before it is made, such as that of an issued revision: it
 * is made only for who has not got it.
 * @param name tells this answer from every other one at the same address
 */
export async function taggedAs(
  request: Request,
  name: string,
  make: () => Promise<Response>,
): Promise<Response> {
  const tag = `"${name}"`;
  const isNew = !isKnown(request, tag);
  const answer = isNew ? await make() : new Response(null, { status: 304 });
  answer.headers.set('etag', tag);
  answer.headers.set('cache-control', 'private, no-cache');
  answer.headers.set('vary', 'Cookie, Authorization');
  return answer;
}

const isKnown = (request: Request, tag: string): boolean => {
  const sent = request.headers.get('if-none-match')?.split(',') ?? [];
  return sent.some((one) => bare(one.trim()) === bare(tag));
};

/** Tags are compared weakly (RFC 9110, 13.1.2): a proxy that packs an answer makes its tag weak. */
const bare = (tag: string): string => tag.replace(/^W\//, '');

/**
 * A file to be saved, never shown in place. The plain name is for old clients; `filename*` after
 * RFC 8187 carries the title as it is written.
 */
export function download(text: string, type: string, name: string): Response {
  const plain = name
    .normalize('NFKD')
    .replace(/[^A-Za-z0-9._ -]+/g, '')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  const safe = name
    .replace(/[\p{Cc}\p{Cf}\p{Cs}/\\:*?"<>|]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  const encoded = encodeURIComponent(safe).replace(
    /['()*]/g,
    (mark) => `%${mark.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return new Response(text, {
    headers: {
      'content-type': `${type}; charset=utf-8`,
      'content-disposition': `attachment; filename="${plain || 'notebook'}"; filename*=UTF-8''${encoded}`,
    },
  });
}
