import { NOTEBOOK_BODY, created, revalidated, route } from '@/lib/http';
import { ListRequest, NewNotebook, createNotebook, listNotebooks } from '@/lib/notebooks';

export const GET = route(
  { person: 'required', query: ListRequest },
  async ({ request, person, query }) => revalidated(request, await listNotebooks(person, query)),
);

export const POST = route(
  { person: 'required', body: NewNotebook, bodyLimit: NOTEBOOK_BODY },
  async ({ person, body }) => created(await createNotebook(person, body)),
);
