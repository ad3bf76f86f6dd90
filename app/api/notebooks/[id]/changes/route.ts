import { revalidated, route } from '@/lib/http';
import { ChangesQuery, readChanges } from '@/lib/notebooks';

export const GET = route(
  { person: 'required', query: ChangesQuery },
  async ({ request, person, part, query }) =>
    revalidated(request, await readChanges(person, part('id'), query)),
);
