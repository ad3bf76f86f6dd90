import { passOf, picture, route } from '@/lib/http';
import { logoByToken } from '@/lib/notebooks';

export const GET = route({ person: 'none' }, async ({ request, part }) =>
  picture(request, await logoByToken(part('token'), passOf(request), part('hash'))),
);
