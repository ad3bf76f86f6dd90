import { z } from 'zod';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { ExportFormat, revisionFile, route, taggedAs } from '@/lib/http';
import { readRevision, recordExport, revisionTag } from '@/lib/notebooks';

const Which = z.strictObject({ format: ExportFormat });

export const GET = route(
  { person: 'required', query: Which },
  async ({ request, person, part, query }) => {
    await countAgainst(LIMITS.export, person.id);
    const [id, letter] = [part('id'), part('letter')];
    const tag = await revisionTag(person, id, letter);
    return taggedAs(request, `${tag}-${query.format}`, async () => {
      const revision = await readRevision(person, id, letter);
      await recordExport(person, id, { format: query.format, revision: letter });
      return revisionFile(revision, query.format, { forClient: false });
    });
  },
);
