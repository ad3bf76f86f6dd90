import { created, route } from '@/lib/http';
import { NewPerson, addPerson, listPeople } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  people: await listPeople(person, part('id')),
}));

export const POST = route({ person: 'required', body: NewPerson }, async ({ person, part, body }) =>
  created(await addPerson(person, part('id'), body)),
);
