import { z } from 'zod';
import { LIMITS, countAgainst } from '@/lib/accounts';
import { ExportFormat, exportFile, route } from '@/lib/http';
import { readForExport, recordExport } from '@/lib/notebooks';

const Which = z.strictObject({
  format: ExportFormat,
  version: z
    .string()
    .regex(/^[1-9]\d{0,9}$/, { error: 'The version must be a whole number from 1.' })
    .transform(Number)
    .optional(),
});

export const GET = route({ person: 'required', query: Which }, async ({ person, part, query }) => {
  const { notebook, version, content } = await readForExport(person, part('id'), query.version);
  await countAgainst(LIMITS.export, person.id);
  const identity = { id: notebook.id, title: notebook.title, workshop: notebook.workshop.name };
  await recordExport(person, notebook.id, { format: query.format, version: version.number });
  return exportFile({ ...identity, version }, content, query.format);
});
