import { created, route } from '@/lib/http';
import { RestoreRequest, restoreVersion } from '@/lib/notebooks';

/** 201 for a new version; 200 when the newest one has that content already. */
export const POST = route(
  { person: 'required', body: RestoreRequest },
  async ({ person, part, body }) => {
    const saved = await restoreVersion(person, part('id'), Number(part('number')), body);
    return saved.unchanged ? saved : created(saved);
  },
);
