import { Failure } from '@/lib/access';
import { route } from '@/lib/http';

/** Addresses under /api that do not exist answer as the others do, not with a page. */
const handler = route({ person: 'none' }, () => {
  throw new Failure('not-found', 'There is nothing at this address.');
});

export { handler as DELETE, handler as GET, handler as PATCH, handler as POST, handler as PUT };
