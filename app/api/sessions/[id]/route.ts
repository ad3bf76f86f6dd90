import { endSession } from '@/lib/accounts';
import { done, route } from '@/lib/http';

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await endSession(person, part('id'));
  return done();
});
