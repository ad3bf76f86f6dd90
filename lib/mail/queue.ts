import type { Database } from '@/db/client';
import { insertMail } from '@/db/queries/outgoing-mail';
import type { Letter } from './letter';
import { pokeSending } from './poke';

/**
 * Puts a letter into the queue. Called inside the transaction of what it tells about: a letter goes
 * out if and only if that was stored.
 * @param once letters with the same key are sent once, however often they are queued
 */
export async function queueLetter(db: Database, letter: Letter, once?: string): Promise<void> {
  await insertMail(db, {
    recipient: letter.to,
    subject: letter.subject,
    letter,
    onceKey: once ?? null,
  });
  pokeSending();
}
