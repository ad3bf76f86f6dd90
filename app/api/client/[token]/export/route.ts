import { z } from 'zod';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { ExportFormat, passOf, revisionFile, route, taggedAs } from '@/lib/http';
import { exportByToken } from '@/lib/notebooks';

const Which = z.strictObject({ format: ExportFormat });

export const GET = route(
  { person: 'none', query: Which },
  async ({ request, address, part, query }) => {
    await countAgainst(LIMITS.export, address);
    const { tag, read } = await exportByToken(part('token'), passOf(request));
    // Asked for again, it is answered without being read, much less worked out.
    return taggedAs(request, `${tag}-${query.format}`, async () =>
      revisionFile(await read(), query.format, { forClient: true }),
    );
  },
);
