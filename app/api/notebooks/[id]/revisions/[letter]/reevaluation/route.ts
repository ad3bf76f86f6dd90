import { LIMITS, countAgainst } from '@/lib/accounts';
import { route } from '@/lib/http';
import { reevaluateRevision } from '@/lib/notebooks';

/** Changes nothing, but works: a form of asking that nobody follows by the way. */
export const POST = route({ person: 'required' }, async ({ person, part }) => {
  await countAgainst(LIMITS.evaluatePerson, person.id);
  return reevaluateRevision(person, part('id'), part('letter'));
});
