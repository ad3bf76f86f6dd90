import { Failure } from '@/lib/access';
import { env } from '@/lib/env';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Refuses a write that a browser sends with its cookies on behalf of another site. Browsers say
 * where a request comes from in Sec-Fetch-Site, or on plain http only in Origin; a write that says
 * neither is refused too.
 * @throws Failure `foreign-origin`
 */
export function demandSameOrigin(request: Request): void {
  if (SAFE.has(request.method)) return;
  const site = request.headers.get('sec-fetch-site');
  const origin = request.headers.get('origin');
  if (site === null ? origin !== null && isOurs(origin, request) : site === 'same-origin') return;
  throw new Failure(
    'foreign-origin',
    'This request does not come from a page of this site, so it was not carried out.',
  );
}

function isOurs(origin: string, request: Request): boolean {
  if (!URL.canParse(origin)) return false;
  const from = new URL(origin);
  // The address the browser used may differ from the configured one: 127.0.0.1 beside localhost.
  return (
    from.origin === new URL(env().NEXTAUTH_URL).origin || from.host === request.headers.get('host')
  );
}
