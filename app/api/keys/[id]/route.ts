import { revokeKey } from '@/lib/accounts';
import { done, route } from '@/lib/http';

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await revokeKey(person, part('id'));
  return done();
});
