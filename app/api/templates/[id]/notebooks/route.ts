import { created, route } from '@/lib/http';
import { FromTemplate, makeFromTemplate } from '@/lib/notebooks';

export const POST = route(
  { person: 'required', body: FromTemplate },
  async ({ person, part, body }) => created(await makeFromTemplate(person, part('id'), body)),
);
