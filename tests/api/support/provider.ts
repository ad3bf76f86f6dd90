import type { Server } from 'node:http';
import Provider from 'oidc-provider';
import { baseUrl } from '../../setup/server';

/** Somebody with an account at the provider. */
export interface Vouched {
  email?: string;
  email_verified?: boolean;
  name?: string;
}

const named = (variable: string) => {
  const value = process.env[variable];
  if (value === undefined) throw new Error(`${variable} is not set; “npm test” sets it.`);
  return value;
};

/** A real OpenID Connect provider at the address where the served copy looks for one. */
export async function openProvider(people: Map<string, Vouched>): Promise<{ close(): void }> {
  const issuer = named('OIDC_ISSUER');
  const provider = new Provider(issuer, {
    clients: [
      {
        client_id: named('OIDC_CLIENT_ID'),
        client_secret: named('OIDC_CLIENT_SECRET'),
        redirect_uris: [new URL('/api/auth/callback/oidc', baseUrl()).href],
      },
    ],
    claims: { openid: ['sub'], email: ['email', 'email_verified'], profile: ['name'] },
    findAccount: (_context, id) => {
      const vouched = people.get(id);
      return vouched && { accountId: id, claims: () => ({ sub: id, ...vouched }) };
    },
    pkce: { required: () => true },
    cookies: { keys: ['of the test alone'] },
  });
  const server: Server = await new Promise((resolve) => {
    const listening = provider.listen(Number(new URL(issuer).port), '127.0.0.1', () =>
      resolve(listening),
    );
  });
  return {
    close: () => {
      server.closeAllConnections();
      server.close();
    },
  };
}

/**
 * Goes through the provider's own pages as a browser would: signs in as `subject`, consents, and
 * gives the address of ours that the provider sends the browser back to.
 */
export async function passThrough(authorization: string, subject: string): Promise<URL> {
  const cookies = new Map<string, string>();
  let url = new URL(authorization);
  let form: URLSearchParams | null = null;
  for (let step = 0; step < 12; step += 1) {
    const response: Response = await fetch(url, {
      method: form === null ? 'GET' : 'POST',
      redirect: 'manual',
      headers: { cookie: [...cookies].map(([name, value]) => `${name}=${value}`).join('; ') },
      ...(form === null ? {} : { body: form }),
    });
    for (const line of response.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      cookies.set(pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1));
    }
    const location = response.headers.get('location');
    form = null;
    if (location !== null) {
      url = new URL(location, url);
      if (url.origin === new URL(baseUrl()).origin) return url;
      continue;
    }
    const page = await response.text();
    const prompt = /name="prompt" value="(\w+)"/.exec(page)?.[1];
    if (prompt === undefined) throw new Error(`The provider answered ${response.status}: ${page}`);
    form = new URLSearchParams({ prompt, login: subject, password: 'any' });
  }
  throw new Error('The provider never sent the browser back.');
}
