import { listSessions, signOutEverywhere } from '@/lib/accounts';
import { currentSession } from '@/lib/accounts/session';
import { done, route } from '@/lib/http';

export const GET = route({ person: 'required' }, async ({ person }) => ({
  sessions: await listSessions(person, (await currentSession())?.id ?? null),
}));

/** Ends every session of the person, this one too. */
export const DELETE = route({ person: 'required' }, async ({ person }) => {
  await signOutEverywhere(person);
  return done();
});
