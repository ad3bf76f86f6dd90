import { signOutEverywhere } from '@/lib/accounts';
import { done, route } from '@/lib/http';

/** Ends every session of the person, this one too. */
export const DELETE = route({ person: 'required' }, async ({ person }) => {
  await signOutEverywhere(person);
  return done();
});
