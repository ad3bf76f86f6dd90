import { created, route } from '@/lib/http';
import { DuplicateRequest, duplicateNotebook } from '@/lib/notebooks';

export const POST = route(
  { person: 'required', body: DuplicateRequest },
  async ({ person, part, body }) => created(await duplicateNotebook(person, part('id'), body)),
);
