import { picture, route } from '@/lib/http';
import { readLogo } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ request, person, part }) =>
  picture(request, await readLogo(person, part('id'), part('hash'))),
);
