import { done, route } from '@/lib/http';
import { Parting, leaveWorkshop } from '@/lib/workshops';

export const POST = route({ person: 'required', body: Parting }, async ({ person, part, body }) => {
  await leaveWorkshop(person, part('id'), body);
  return done();
});
