import type { Attachment } from '@/db/queries/attachments';

const ENDINGS: Readonly<Record<string, string>> = {
  'image/png': 'png',
  'image/jpeg': 'jpg',
  'image/webp': 'webp',
};

/**
 * An uploaded picture. Named by its hash, it never changes, so a browser keeps it. Opened by itself
 * it is saved and not shown, and could run nothing if it were.
 */
export function picture(request: Request, { sha256, mediaType, bytes }: Attachment): Response {
  const headers = {
    etag: `"${sha256}"`,
    'cache-control': 'private, max-age=31536000, immutable',
    'content-security-policy': "default-src 'none'; sandbox; frame-ancestors 'none'",
  };
  if (request.headers.get('if-none-match') === headers.etag) {
    return new Response(null, { status: 304, headers });
  }
  return new Response(new Uint8Array(bytes), {
    headers: {
      ...headers,
      'content-type': mediaType,
      'content-disposition': `attachment; filename="logo.${ENDINGS[mediaType] ?? 'bin'}"`,
    },
  });
}
