import NextAuth from 'next-auth';
import { signInOptions } from '@/lib/accounts/sign-in';
import { guarded } from '@/lib/http';

/** Signing in and out. next-auth answers; the size of what it reads is bounded before. */
const handler = guarded(async (request, context) => {
  const answer: unknown = await NextAuth(
    request as never,
    context as never,
    signInOptions(request.headers),
  );
  return answer as Response;
});

export { handler as GET, handler as POST };
