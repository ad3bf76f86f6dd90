import { picture, route } from '@/lib/http';
import { readNotebookLogo } from '@/lib/workshops';

export const GET = route({ person: 'required' }, async ({ request, person, part }) =>
  picture(request, await readNotebookLogo(person, part('id'), part('hash'))),
);
