import { randomUUID } from 'node:crypto';
import { inTransaction, type Database } from '../client';

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

/** A mail that this instance alone may send until its lease is over. */
export interface ClaimedMail {
  id: string;
  letter: unknown;
  /** This one included. */
  attempts: number;
}

/**
 * Claims the mail that is due longest, for `lease` seconds; null when none is due. Rows that another
 * instance is just claiming are passed over. The database's clock decides, so instances need not agree.
 */
export async function claimMail(db: Database, lease: number): Promise<ClaimedMail | null> {
  const due: unknown = await dueMail(db).first('id');
  // Most looks find nothing, and need no transaction.
  if (due === undefined) return null;
  return inTransaction(async (trx) => {
    const row: { id: string; letter: string; attempts: number } | undefined = await dueMail(trx)
      .forUpdate()
      .skipLocked()
      .first('id', 'letter', 'attempts');
    if (row === undefined) return null;
    const attempts = row.attempts + 1;
    await trx('outgoing_mail')
      .where({ id: row.id })
      .update({ attempts, due_at: later(trx, lease) });
    return { id: row.id, letter: JSON.parse(row.letter) as unknown, attempts };
  }, db);
}

const dueMail = (db: Database) =>
  db('outgoing_mail')
    .where({ sent_at: null, given_up_at: null })
    .where('due_at', '<=', db.fn.now(3))
    .orderBy('due_at');

const later = (db: Database, seconds: number) =>
  db.raw('current_timestamp(3) + interval ? second', [seconds]);

/** The row as it was claimed: one whose lease ran out and who was claimed anew is somebody else's. */
const claimed = (db: Database, { id, attempts }: ClaimedMail) =>
  db('outgoing_mail').where({ id, attempts, sent_at: null, given_up_at: null });

/** What a letter says is nobody's business once it is out: it may hold a way into an account. */
const BLANK = '{}';

export async function markMailSent(db: Database, mail: ClaimedMail): Promise<void> {
  // Whoever has it now, it was sent.
  await db('outgoing_mail')
    .where({ id: mail.id })
    .update({ sent_at: db.raw('current_timestamp(3)'), letter: BLANK, last_fault: null });
}

/** Has a mail tried again after some seconds. */
export async function postponeMail(
  db: Database,
  mail: ClaimedMail,
  seconds: number,
  fault: string,
): Promise<void> {
  await claimed(db, mail).update({ due_at: later(db, seconds), last_fault: fault });
}

/** Stops trying. */
export async function giveMailUp(db: Database, mail: ClaimedMail, fault: string): Promise<void> {
  await claimed(db, mail).update({
    given_up_at: db.raw('current_timestamp(3)'),
    letter: BLANK,
    last_fault: fault,
  });
}

/** Drops the rows of mails that were sent or given up more than so many days ago. */
export async function pruneMail(db: Database, days: number): Promise<void> {
  const before = db.raw('current_timestamp(3) - interval ? day', [days]);
  await db('outgoing_mail').where('sent_at', '<', before).delete();
  await db('outgoing_mail').where('given_up_at', '<', before).delete();
}
