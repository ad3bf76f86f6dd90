import { Failure } from '@/lib/access';
import { answersQueries } from '@/lib/accounts';
import { route } from '@/lib/http';

/** Whether this instance can serve: it runs, and its database answers. */
export const GET = route({ person: 'none' }, async () => {
  if (await answersQueries()) return { status: 'ok' };
  throw new Failure('busy', 'The database does not answer.');
});
