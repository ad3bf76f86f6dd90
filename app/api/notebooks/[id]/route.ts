import { done, revalidated, route } from '@/lib/http';
import { NotebookChange, changeNotebook, readNotebook } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ request, person, part }) =>
  revalidated(request, await readNotebook(person, part('id'))),
);

export const PATCH = route(
  { person: 'required', body: NotebookChange },
  async ({ person, part, body }) => {
    await changeNotebook(person, part('id'), body);
    return done();
  },
);
