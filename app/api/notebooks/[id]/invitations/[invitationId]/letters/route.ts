import { done, route } from '@/lib/http';
import { resendInvitation } from '@/lib/workshops';

/** Sends the invitation once more, under a new link. */
export const POST = route({ person: 'required' }, async ({ person, part }) => {
  await resendInvitation(person, { notebook: part('id') }, part('invitationId'));
  return done();
});
