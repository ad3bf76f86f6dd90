import { database } from '@/db/client';
import type { Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { openFor } from './guard';

interface Exported {
  format: string;
  version?: number;
  /** The letter of an issued revision. */
  revision?: string;
}

/**
 * Puts on the record that a person took figures out as a file, once the file is about to be written.
 * What a browser has kept from before and asks about again is no export.
 */
export async function recordExport(person: Person, id: string, what: Exported): Promise<void> {
  const { notebook } = await openFor(person, 'notebook.export', id);
  await record(database(), {
    deed: 'notebook.exported',
    by: person.id,
    workshopId: notebook.workshop.id,
    notebookId: id,
    subject: notebook.title,
    details: { ...what },
  });
}
