import { done, route } from '@/lib/http';
import { revokeLink } from '@/lib/notebooks';

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await revokeLink(person, part('id'), part('linkId'));
  return done();
});
