import { created, route } from '@/lib/http';
import { RestoreRequest, restoreVersion } from '@/lib/notebooks';

/** 201 for a new version; 200 when the newest one has that content already. */
export const POST = route(
  { person: 'required', body: RestoreRequest },
  async ({ person, part, count, body }) => {
    const saved = await restoreVersion(person, part('id'), count('number'), body);
    return saved.unchanged ? saved : created(saved);
  },
);
