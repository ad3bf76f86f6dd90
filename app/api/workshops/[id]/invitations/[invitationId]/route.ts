import { done, route } from '@/lib/http';
import { withdrawInvitation } from '@/lib/workshops';

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await withdrawInvitation(person, { workshop: part('id') }, part('invitationId'));
  return done();
});
