import { created, route } from '@/lib/http';
import { NewPerson, listPeople } from '@/lib/notebooks';
import { shareNotebook } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  people: await listPeople(person, part('id')),
}));

/** 201 for a role that was given; 202 where the address has no account and was invited. */
export const POST = route(
  { person: 'required', body: NewPerson },
  async ({ person, part, body }) => {
    const shared = await shareNotebook(person, part('id'), body);
    return shared.kind === 'added'
      ? created(shared.person)
      : Response.json({ invitation: shared.invitation }, { status: 202 });
  },
);
