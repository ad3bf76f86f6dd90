import { revalidated, route } from '@/lib/http';
import { SearchRequest, search } from '@/lib/notebooks';

export const GET = route(
  { person: 'required', query: SearchRequest },
  async ({ request, person, query }) => revalidated(request, await search(person, query)),
);
