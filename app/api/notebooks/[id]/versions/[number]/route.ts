import { revalidated, route } from '@/lib/http';
import { readVersion } from '@/lib/notebooks';

export const GET = route({ person: 'required' }, async ({ request, person, part, count }) =>
  revalidated(request, await readVersion(person, part('id'), count('number'))),
);
