import { done, route } from '@/lib/http';
import { RoleChange, changeRole, removePerson } from '@/lib/notebooks';

export const PATCH = route(
  { person: 'required', body: RoleChange },
  async ({ person, part, body }) => {
    await changeRole(person, part('id'), part('personId'), body.role);
    return done();
  },
);

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await removePerson(person, part('id'), part('personId'));
  return done();
});
