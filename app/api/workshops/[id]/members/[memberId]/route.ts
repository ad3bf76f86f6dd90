import { done, route } from '@/lib/http';
import { MemberChange, Parting, changeMember, removeMember } from '@/lib/workshops';

export const PATCH = route(
  { person: 'required', body: MemberChange },
  async ({ person, part, body }) => {
    await changeMember(person, part('id'), part('memberId'), body);
    return done();
  },
);

/** The successor, where one is needed, is a parameter: a removal has no body. */
export const DELETE = route(
  { person: 'required', query: Parting },
  async ({ person, part, query }) => {
    await removeMember(person, part('id'), part('memberId'), query);
    return done();
  },
);
