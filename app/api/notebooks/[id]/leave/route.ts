import { done, route } from '@/lib/http';
import { leaveNotebook } from '@/lib/notebooks';

export const POST = route({ person: 'required' }, async ({ person, part }) => {
  await leaveNotebook(person, part('id'));
  return done();
});
