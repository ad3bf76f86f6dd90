/**
 * Where to go after signing in: the wished path if it is one of this site, else the table of
 * notebooks. Whatever a browser could read as another site is refused.
 */
export function safeNextPath(wished: string | null | undefined): string {
  const fallback = '/notebooks';
  if (!wished?.startsWith('/') || /[\\\p{Cc}]/u.test(wished)) return fallback;
  const base = 'http://localhost';
  if (!URL.canParse(wished, base)) return fallback;
  const { origin, pathname, search, hash } = new URL(wished, base);
  return origin === base && !pathname.startsWith('//') ? pathname + search + hash : fallback;
}
