import { z } from 'zod';
import { NOTEBOOK_BODY, created, revalidated, route } from '@/lib/http';
import { NewNotebook, createNotebook, listNotebooks } from '@/lib/notebooks';

const Which = z.strictObject({ archived: z.enum(['0', '1']).optional() });

export const GET = route({ person: 'required', query: Which }, async ({ request, person, query }) =>
  revalidated(request, {
    notebooks: await listNotebooks(person, { archived: query.archived === '1' }),
  }),
);

export const POST = route(
  { person: 'required', body: NewNotebook, bodyLimit: NOTEBOOK_BODY },
  async ({ person, body }) => created(await createNotebook(person, body)),
);
