import { done, route } from '@/lib/http';
import { LinkChange, changeLink, readLink, revokeLink } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, ({ person, part }) =>
  readLink(person, part('id'), part('linkId')),
);

export const PATCH = route(
  { person: 'required', body: LinkChange },
  async ({ person, part, body }) => {
    await changeLink(person, part('id'), part('linkId'), body);
    return done();
  },
);

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await revokeLink(person, part('id'), part('linkId'));
  return done();
});
