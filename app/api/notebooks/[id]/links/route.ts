import { created, route } from '@/lib/http';
import { LinkRequest, createLink, listLinks } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ person, part }) => ({
  links: await listLinks(person, part('id')),
}));

export const POST = route(
  { person: 'required', body: LinkRequest },
  async ({ person, part, body }) => created(await createLink(person, part('id'), body)),
);
