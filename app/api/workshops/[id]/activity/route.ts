import { route } from '@/lib/http';
import { ActivityQuery, readActivity } from '@/lib/workshops';

export const GET = route({ person: 'required', query: ActivityQuery }, ({ person, part, query }) =>
  readActivity(person, part('id'), query),
);
