import type { Database } from '../client';

export interface NewActivity {
  workshopId: string | null;
  notebookId: string | null;
  actorId: string | null;
  deed: string;
  subject: string;
  details: object;
}

/** Adds one line to the record; there is no way to change or remove one. */
export async function insertActivity(db: Database, line: NewActivity): Promise<void> {
  await db('activity').insert({
    workshop_id: line.workshopId,
    notebook_id: line.notebookId,
    actor_id: line.actorId,
    deed: line.deed,
    subject: line.subject,
    details: JSON.stringify(line.details),
  });
}
