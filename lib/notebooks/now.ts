import { z } from 'zod';
import { database } from '@/db/client';
import { commentsStamp } from '@/db/queries/comments';
import { findPresence, listPresent, putPresence, type Presence } from '@/db/queries/presence';
import type { Person } from '@/lib/accounts';
import { CONTENT_LIMITS } from './content-values';
import { openFor } from './guard';
import type { Now } from './types';

/** Milliseconds after which somebody who was not heard of counts as gone. */
const GONE = 30_000;
/** Milliseconds between two notes that somebody is here; a cell taken in hand is noted sooner. */
const AGAIN = 10_000;
const SOONER = 2_000;

const count = z
  .string()
  .regex(/^(0|[1-9]\d{0,9})$/, { error: 'A version is given by its number.' })
  .transform(Number);

export const NowQuery = z.strictObject({
  /** The cell in hand, if one is. */
  cell: z
    .string()
    .regex(/^[A-Za-z0-9_-]+$/, { error: 'The cell in hand is given by its id.' })
    .max(CONTENT_LIMITS.cellId, {
      error: `A cell id is at most ${CONTENT_LIMITS.cellId} characters long.`,
    })
    .optional(),
  /** The version on the screen. */
  seen: count.optional(),
});
export type NowQuery = z.infer<typeof NowQuery>;

/**
 * What is news on a notebook, and a note that the asking person is here. The note is written at most every ten seconds,
 * or two when another cell is taken in hand, so that asking often costs five short reads.
 */
export async function lookNow(person: Person, id: string, query: NowQuery): Promise<Now> {
  const { notebook, role } = await openFor(person, 'presence.see', id);
  const db = database();
  const at = new Date();
  const [present, comments] = await Promise.all([
    listPresent(db, id, new Date(at.getTime() - GONE), person.id),
    commentsStamp(db, id),
  ]);
  const own = present.find((one) => one.person.id === person.id) ?? null;
  const cell = query.cell ?? null;
  const seenVersion = Math.min(query.seen ?? 0, notebook.head);
  if (isWorthNoting(own, at, cell, seenVersion)) {
    await putPresence(db, { notebookId: id, userId: person.id, at, cell, seenVersion });
  }
  return {
    head: notebook.head,
    archived: notebook.archivedAt !== null,
    role,
    comments,
    people: present.filter((one) => one !== own).map((one) => ({ ...one.person, cell: one.cell })),
  };
}

function isWorthNoting(own: Presence | null, at: Date, cell: string | null, seen: number): boolean {
  if (own === null || seen > own.seenVersion) return true;
  const age = at.getTime() - own.seenAt.getTime();
  return age >= AGAIN || (own.cell !== cell && age >= SOONER);
}

/** The newest version that the person has had on the screen; null when they never had the notebook open. */
export async function findSeen(person: Person, id: string): Promise<number | null> {
  await openFor(person, 'presence.see', id);
  const seen = await findPresence(database(), id, person.id);
  return seen === null || seen.seenVersion === 0 ? null : seen.seenVersion;
}
