import 'server-only';
import { cookies } from 'next/headers';
import { redirect } from 'next/navigation';
import { cache } from 'react';
import { getToken } from 'next-auth/jwt';
import { env } from '@/lib/env';
import { personOfSession } from './sessions';
import type { Person } from './types';

interface CurrentSession {
  id: string;
  person: Person;
}

/**
 * The session of this request's cookie, asked of the database once per request: one that was ended
 * elsewhere, or whose account is gone, is none.
 */
export const currentSession = cache(async (): Promise<CurrentSession | null> => {
  const jar = await cookies();
  const sent = Object.fromEntries(jar.getAll().map(({ name, value }) => [name, value]));
  // No headers: next-auth would also take a session from a bearer token, which is for API keys.
  const token = await getToken({
    req: { cookies: sent, headers: {} } as Parameters<typeof getToken>[0]['req'],
    secret: env().NEXTAUTH_SECRET,
    secureCookie: env().NEXTAUTH_URL.startsWith('https:'),
  });
  if (token?.sid === undefined) return null;
  const person = await personOfSession(token.sid);
  return person === null ? null : { id: token.sid, person };
});

/** Who is signed in with the cookie of this request. */
export async function currentPerson(): Promise<Person | null> {
  return (await currentSession())?.person ?? null;
}

/** The same for a page that needs a person: signed-out people go to sign in and come back to `path`. */
export async function personForPage(path: string): Promise<Person> {
  const person = await currentPerson();
  return person ?? redirect(`/sign-in?next=${encodeURIComponent(path)}`);
}
