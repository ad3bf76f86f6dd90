import { randomUUID } from 'node:crypto';
import type { Database } from '../client';

export interface NewMail {
  recipient: string;
  subject: string;
  /** As the service wrote it; stored as JSON. */
  letter: unknown;
  onceKey: string | null;
}

/** Puts a mail into the queue; one whose key is there already is left out, and false returned. */
export async function insertMail(db: Database, mail: NewMail): Promise<boolean> {
  const added = (await db('outgoing_mail')
    .insert({
      id: randomUUID(),
      recipient: mail.recipient,
      subject: mail.subject,
      letter: JSON.stringify(mail.letter),
      once_key: mail.onceKey,
    })
    .onConflict('once_key')
    .ignore()) as unknown;
  return Array.isArray(added) ? added.length > 0 : Boolean(added);
}
