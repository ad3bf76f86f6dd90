import { revalidated, route } from '@/lib/http';
import { NowQuery, lookNow } from '@/lib/notebooks';

/** Asked every few seconds by each open sheet; 304 for as long as nothing happens. */
export const GET = route(
  { person: 'required', query: NowQuery },
  async ({ request, person, part, query }) =>
    revalidated(request, await lookNow(person, part('id'), query)),
);
