import { NOTEBOOK_BODY, created, revalidated, route } from '@/lib/http';
import { ListQuery, SaveRequest, listVersions, saveVersion } from '@/lib/notebooks';

export const GET = route(
  { person: 'required', query: ListQuery },
  async ({ request, person, part, query }) =>
    revalidated(request, await listVersions(person, part('id'), query)),
);

/** 201 for a new version; 200 when the content is that of the newest one already. */
export const POST = route(
  { person: 'required', body: SaveRequest, bodyLimit: NOTEBOOK_BODY },
  async ({ person, part, body }) => {
    const saved = await saveVersion(person, part('id'), body);
    return saved.unchanged ? saved : created(saved);
  },
);
