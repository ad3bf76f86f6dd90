import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { Failure } from '@/lib/access';
import { env } from '@/lib/env';
import { addressOf } from './address';
import { deviceOf } from './device';
import { OPEN_ID, openIdProvider, openIdSettings, personOfClaims, type Claims } from './open-id';
import { signIn } from './people';
import { SESSION_SECONDS, beginSession, endSession, personOfSession } from './sessions';

declare module 'next-auth/jwt' {
  interface JWT {
    /** The session's row in the database; once that is gone the cookie is worth nothing. */
    sid?: string;
  }
}

/**
 * Options of next-auth for one request, and not made when the module loads: a build has no secrets.
 * What went wrong comes back as `?error=` and a code: `CredentialsSignin` for a failed attempt, a
 * code of ours such as `too-many` or `unconfirmed`, or one of next-auth's about the other service.
 */
export function signInOptions(headers: Headers): NextAuthOptions {
  const device = deviceOf(headers.get('user-agent'));
  const openId = openIdSettings();
  return {
    secret: env().NEXTAUTH_SECRET,
    session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
    pages: { signIn: '/sign-in', signOut: '/sign-in', error: '/sign-in' },
    providers: [
      CredentialsProvider({
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        async authorize(credentials) {
          const { email, password } = credentials ?? {};
          if (typeof email !== 'string' || typeof password !== 'string') return null;
          return withCode(() =>
            signIn({ email, password }, { address: addressOf(headers), device }),
          );
        },
      }),
      ...(openId === null ? [] : [openIdProvider(openId)]),
    ],
    callbacks: {
      async signIn({ user, account, profile }) {
        if (account?.provider !== OPEN_ID || openId === null) return true;
        // In place of the service's name for the person: ours.
        user.id = await withCode(() => personOfClaims(profile as Claims, openId));
        return true;
      },
      async jwt({ token, user, trigger }) {
        const sid = trigger === 'signIn' ? await beginSession(user.id, device) : (token.sid ?? '');
        const person = await personOfSession(sid);
        // Thrown, because next-auth answers that by taking the cookie away.
        if (person === null) throw new Error('The session has been ended.');
        return { sub: person.id, name: person.name, email: person.email, sid };
      },
      session({ session, token }) {
        return { user: { name: token.name, email: token.email }, expires: session.expires };
      },
    },
    events: {
      async signOut({ token }) {
        const person = await personOfSession(token.sid ?? '');
        if (person !== null) await endSession(person, token.sid ?? '');
      },
    },
    logger: {
      error(code) {
        // Ended and outdated sessions are everyday matters; the details may hold tokens.
        if (code !== 'JWT_SESSION_ERROR') console.error(JSON.stringify({ fault: 'sign-in', code }));
      },
      warn() {},
    },
  };
}

/** next-auth hands the message of an error on in an address, so it must be a code and nothing more. */
async function withCode<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    throw new Error(error instanceof Failure ? error.code : 'fault', { cause: error });
  }
}
