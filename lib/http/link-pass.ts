import { env } from '@/lib/env';
import { PASS_SECONDS } from '@/lib/notebooks';

/** Cookie of a link's page and of its downloads; each link has its own, by the path. */
export const LINK_PASS = 'surdwork-link';

/** The lines that give a browser the pass of one link, for its page and for its downloads. */
export function passCookies(token: string, pass: string): string[] {
  const secure = env().NEXTAUTH_URL.startsWith('https:') ? '; Secure' : '';
  return [`/client/${token}`, `/api/client/${token}`].map(
    (path) =>
      `${LINK_PASS}=${pass}; Path=${path}; Max-Age=${PASS_SECONDS}; HttpOnly; SameSite=Lax${secure}`,
  );
}

/** The pass that a request brings along. */
export function passOf(request: Request): string | undefined {
  const pairs = (request.headers.get('cookie') ?? '').split(';').map((pair) => pair.trim());
  return pairs.find((pair) => pair.startsWith(`${LINK_PASS}=`))?.slice(LINK_PASS.length + 1);
}
