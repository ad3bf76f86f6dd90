import { created, revalidated, route } from '@/lib/http';
import { NewComment, addComment, readComments } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ request, person, part }) =>
  revalidated(request, await readComments(person, part('id'))),
);

export const POST = route(
  { person: 'required', body: NewComment },
  async ({ person, part, body }) => created(await addComment(person, part('id'), body)),
);
