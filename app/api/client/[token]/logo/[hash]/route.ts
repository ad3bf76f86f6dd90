import { passOf, picture, route } from '@/lib/http';
import { exportByToken } from '@/lib/notebooks';
import { logoByHash } from '@/lib/workshops';

/** The picture in the title block of what a link shows, for whoever the link lets through. */
export const GET = route({ person: 'none' }, async ({ request, part }) => {
  await exportByToken(part('token'), passOf(request));
  return picture(request, await logoByHash(part('hash')));
});
