import type { Database } from '@/db/client';
import { listWorkshopsOf } from '@/db/queries/workshops';
import { record, type Deed, type Happening } from '@/lib/activity';

interface AccountDeed {
  deed: Deed;
  /** Whose account it is about. */
  accountId: string;
  /** Whoever did it; null where nobody proved to be the person. */
  by: string | null;
  subject?: string;
  details?: Happening['details'];
}

/**
 * Puts a deed on an account into the record of every workshop the person belongs to, so that their
 * admins see it there.
 */
export async function recordForAccount(
  db: Database,
  { deed, accountId, by, subject = 'their account', details = {} }: AccountDeed,
): Promise<void> {
  for (const { id } of await listWorkshopsOf(db, accountId)) {
    await record(db, { deed, by, workshopId: id, subject, details });
  }
}
