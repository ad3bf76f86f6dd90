import { z } from 'zod';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { ExportFormat, exportFile, route } from '@/lib/http';
import { readByTokenForExport } from '@/lib/notebooks';

const Which = z.strictObject({ format: ExportFormat });

export const GET = route({ person: 'none', query: Which }, async ({ address, part, query }) => {
  await countAgainst(LIMITS.export, address);
  const { notebook, version, content } = await readByTokenForExport(part('token'));
  // To a client the workshop answers for its figures; who sits at which desk is not theirs to know.
  const identity = { ...notebook, version: { ...version, author: notebook.workshop } };
  return exportFile(identity, content, query.format);
});
