import type { Database } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import type { Deed } from './deeds';

/** One line for the record. `subject` and `details` name things, never people or addresses. */
export interface Happening {
  deed: Deed;
  /** Whoever did it; null where nobody is known. */
  by: string | null;
  workshopId?: string | null;
  notebookId?: string | null;
  /** What it was done to, as it is called now; cut at 300 characters. */
  subject: string;
  details?: Readonly<Record<string, string | number | boolean | null>>;
}

const SUBJECT = 300;

/**
 * Adds a line to the append-only record. Called inside the transaction that does the deed, so that
 * neither exists without the other.
 */
export async function record(db: Database, happening: Happening): Promise<void> {
  await insertActivity(db, {
    workshopId: happening.workshopId ?? null,
    notebookId: happening.notebookId ?? null,
    actorId: happening.by,
    deed: happening.deed,
    subject: [...happening.subject].slice(0, SUBJECT).join(''),
    details: happening.details ?? {},
  });
}
