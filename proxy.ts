import { randomBytes, randomUUID } from 'node:crypto';
import { NextResponse, type NextRequest } from 'next/server';
import { getToken } from 'next-auth/jwt';
import { Failure } from '@/lib/access';
import { env } from '@/lib/env';
import { problemResponse } from '@/lib/http/problem';

/** Pages that make sense only with a person; the services behind them ask again and decide. */
const NEEDS_PERSON = /^\/(mail|notebooks|workshops|settings)(\/|$)/;

/** Pages whose address is itself a secret: no search engine may keep them, */
const SECRET_ADDRESS = /^\/(client|confirm|reset|invitations)\//;
/** and of these, whose secret works once, no cache either. */
const USED_ONCE = /^\/(confirm|reset|invitations)\//;

/**
 * Runs before every page: sends signed-out people to sign in, and puts the security headers on.
 * A convenience and a second fence; no right is decided here.
 */
export async function proxy(request: NextRequest): Promise<NextResponse> {
  const { pathname, search } = request.nextUrl;
  if (!isDecodable(pathname)) return withHeaders(unreadableAddress());
  if (pathname.startsWith('/api/')) return NextResponse.next();
  if (NEEDS_PERSON.test(pathname) && !(await hasSession(request))) {
    const next = encodeURIComponent(pathname + search);
    // Next sends an address of its own host as a path, so the person stays on the host they know.
    return withHeaders(NextResponse.redirect(new URL(`/sign-in?next=${next}`, request.url)));
  }
  const nonce = randomBytes(16).toString('base64');
  const policy = contentPolicy(nonce);
  // Next reads the nonce from the request's policy and puts it on every script it writes.
  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('content-security-policy', policy);
  headers.set('x-opening', isOpening(request) ? '1' : '0');
  const response = withHeaders(NextResponse.next({ request: { headers } }));
  response.headers.set('content-security-policy', policy);
  if (SECRET_ADDRESS.test(pathname)) response.headers.set('x-robots-tag', 'noindex, nofollow');
  if (USED_ONCE.test(pathname)) response.headers.set('cache-control', 'private, no-store');
  return response;
}

/** Whether somebody opens the page, rather than a browser that fetches it in case, or asks for its head. */
function isOpening({ method, headers }: NextRequest): boolean {
  const purpose = `${headers.get('purpose') ?? ''} ${headers.get('sec-purpose') ?? ''}`;
  const inCase = purpose.includes('prefetch') || headers.has('next-router-prefetch');
  return method === 'GET' && !inCase && !headers.has('rsc');
}

export const config = {
  // Not for files that a build names by their hash, nor for the API, which sets headers of its own:
  // of its addresses only those with a percent sign are looked at.
  matcher: ['/((?!api/|_next/static/|_next/image).*)', '/api/(.*%.*)'],
};

/** Next has no answer of its own to `%` without two digits after it, or to bytes that are not UTF-8. */
function isDecodable(pathname: string): boolean {
  try {
    decodeURIComponent(pathname);
    return true;
  } catch {
    return false;
  }
}

function unreadableAddress(): NextResponse {
  const failure = new Failure(
    'unreadable',
    'The address has a percent sign that stands for no character; copy the whole address again.',
  );
  const { status, headers, body } = problemResponse(failure, randomUUID());
  return new NextResponse(body, { status, headers });
}

async function hasSession(request: NextRequest): Promise<boolean> {
  const cookies = Object.fromEntries(
    request.cookies.getAll().map(({ name, value }) => [name, value]),
  );
  const token = await getToken({
    req: { cookies, headers: {} } as Parameters<typeof getToken>[0]['req'],
    secret: env().NEXTAUTH_SECRET,
    secureCookie: env().NEXTAUTH_URL.startsWith('https:'),
  });
  return token !== null;
}

/**
 * Scripts run only with the nonce of this answer. Style elements need it too; style attributes are
 * let through, because typeset formulas place their parts with them.
 */
function contentPolicy(nonce: string): string {
  const development = env().NODE_ENV === 'development';
  const secure = env().NEXTAUTH_URL.startsWith('https:');
  return [
    "default-src 'none'",
    // React's development build rebuilds server stacks with eval; the production build has none.
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ''}`,
    // The development overlay writes style elements without a nonce.
    `style-src 'self' ${development ? "'unsafe-inline'" : `'nonce-${nonce}'`}`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data:",
    "font-src 'self'",
    `connect-src 'self'${development ? ' ws:' : ''}`,
    "manifest-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
    ...(secure ? ['upgrade-insecure-requests'] : []),
  ].join('; ');
}

function withHeaders(response: NextResponse): NextResponse {
  const { headers } = response;
  headers.set('cross-origin-opener-policy', 'same-origin');
  headers.set('cross-origin-resource-policy', 'same-origin');
  headers.set('permissions-policy', 'camera=(), geolocation=(), microphone=(), payment=(), usb=()');
  // Client links are secrets in an address: it goes to no other site.
  headers.set('referrer-policy', 'same-origin');
  headers.set('x-content-type-options', 'nosniff');
  headers.set('x-frame-options', 'DENY');
  if (env().NEXTAUTH_URL.startsWith('https:')) {
    headers.set('strict-transport-security', 'max-age=31536000');
  }
  return response;
}
