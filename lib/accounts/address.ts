/**
 * The network address a request came from, as far as it can be told: the last entry of
 * X-Forwarded-For, which the nearest proxy wrote, or Next itself where there is none. Without a
 * proxy a client can make one up, so no limit may rest on the address alone.
 */
export function addressOf(headers: Headers): string {
  const last = headers.get('x-forwarded-for')?.split(',').at(-1)?.trim();
  return last === undefined || last === '' ? 'unknown' : last.slice(0, 64);
}
