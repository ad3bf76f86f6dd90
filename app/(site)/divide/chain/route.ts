import { z } from 'zod';
import { chainFile } from '@/components/divide/chains';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { isFermatPrime } from '@/lib/divisions';
import { download, route } from '@/lib/http';

const Which = z.strictObject({
  prime: z
    .string()
    .transform(Number)
    .refine(isFermatPrime, { error: 'The prime must be 3, 5, 17, 257 or 65537.' }),
});

/** The chain of quadratics of a Fermat prime as a file. */
export const GET = route({ person: 'none', query: Which }, async ({ address, query }) => {
  await countAgainst(LIMITS.export, address);
  const text = await chainFile(query.prime);
  return download(text, 'application/json', `quadratics-${query.prime}.json`);
});
