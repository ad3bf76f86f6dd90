import { z } from 'zod';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { route } from '@/lib/http';
import { prospectOfIssue } from '@/lib/notebooks';

const Which = z.strictObject({
  version: z
    .string({ error: 'The version is missing.' })
    .regex(/^[1-9]\d{0,9}$/, { error: 'The version must be a whole number from 1.' })
    .transform(Number),
});

export const GET = route({ person: 'required', query: Which }, async ({ person, part, query }) => {
  await countAgainst(LIMITS.evaluatePerson, person.id);
  return prospectOfIssue(person, part('id'), query.version);
});
