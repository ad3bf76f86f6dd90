import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { Failure } from '@/lib/access';
import { env } from '@/lib/env';
import { addressOf } from './address';
import { personOfSession, signIn } from './people';

/** How long a session lasts without a visit, in seconds: two weeks. */
const SESSION_SECONDS = 14 * 24 * 3600;

declare module 'next-auth/jwt' {
  interface JWT {
    /** The person's token version at sign-in; a session with an older one is over. */
    tokenVersion?: number;
  }
}

declare module 'next-auth' {
  interface User {
    tokenVersion: number;
  }
}

/**
 * Options of next-auth, made at the first request and not when the module loads: a build has no
 * secrets. A failed attempt comes back as `?error=CredentialsSignin`, too many as `?error=too-many`.
 */
export function signInOptions(): NextAuthOptions {
  return {
    secret: env().NEXTAUTH_SECRET,
    session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
    pages: { signIn: '/sign-in', signOut: '/sign-in', error: '/sign-in' },
    providers: [
      CredentialsProvider({
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        async authorize(credentials, request) {
          const { email, password } = credentials ?? {};
          if (typeof email !== 'string' || typeof password !== 'string') return null;
          try {
            return await signIn({ email, password }, addressOf(new Headers(request.headers)));
          } catch (error) {
            // next-auth hands the message on in an address, so it must be a code and nothing more.
            throw new Error(error instanceof Failure ? error.code : 'fault', { cause: error });
          }
        },
      }),
    ],
    callbacks: {
      async jwt({ token, user, trigger }) {
        if (trigger === 'signIn') {
          return {
            sub: user.id,
            name: user.name,
            email: user.email,
            tokenVersion: user.tokenVersion,
          };
        }
        const person = await personOfSession(token.sub ?? '', token.tokenVersion ?? -1);
        // Thrown, because next-auth answers that by taking the cookie away.
        if (person === null) throw new Error('The session has been ended.');
        return { ...token, name: person.name, email: person.email };
      },
      session({ session, token }) {
        return { user: { name: token.name, email: token.email }, expires: session.expires };
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
