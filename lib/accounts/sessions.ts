import { database, inTransaction } from '@/db/client';
import {
  deleteSession,
  deleteSessionsOf,
  findSessionPerson,
  insertSession,
  listSessionsOf,
  pruneSessions,
  recordSessionSeen,
} from '@/db/queries/sessions';
import { Failure } from '@/lib/access';
import { recordForAccount } from './happenings';
import { isId } from './ids';
import type { Person, SessionLine } from './types';

/** How long a session lasts without a visit, in seconds: two weeks. */
export const SESSION_SECONDS = 14 * 24 * 3600;

/** A session in steady use writes when it was seen no oftener than this. */
const SEEN_EVERY_MS = 5 * 60_000;

/** Begins a session for somebody who has just proved who they are; its id goes into the cookie. */
export async function beginSession(personId: string, device: string): Promise<string> {
  await pruneSessions(database(), new Date(Date.now() - SESSION_SECONDS * 1000));
  return inTransaction(async (trx) => {
    const id = await insertSession(trx, { userId: personId, device });
    await recordForAccount(trx, {
      deed: 'session.begun',
      accountId: personId,
      by: personId,
      subject: device,
    });
    return id;
  });
}

/** The person of a session; null once it was ended or its account is gone. */
export async function personOfSession(sessionId: string): Promise<Person | null> {
  if (!isId(sessionId)) return null;
  const db = database();
  const found = await findSessionPerson(db, sessionId);
  if (found === null) return null;
  if (Date.now() - found.seenAt.getTime() > SEEN_EVERY_MS) await recordSessionSeen(db, sessionId);
  return { id: found.id, name: found.name, email: found.email };
}

/** The person's sessions, last used first. `current` is the one that asks, if one does. */
export async function listSessions(person: Person, current: string | null): Promise<SessionLine[]> {
  const sessions = await listSessionsOf(database(), person.id);
  return sessions.map(({ id, device, begunAt, seenAt }) => ({
    id,
    device,
    begunAt: begunAt.toISOString(),
    seenAt: seenAt.toISOString(),
    current: id === current,
  }));
}

/** Ends one session of the person, at once. @throws Failure `not-found` */
export async function endSession(person: Person, id: string): Promise<void> {
  await inTransaction(async (trx) => {
    const ended = isId(id) ? await deleteSession(trx, person.id, id) : null;
    if (ended === null) {
      throw new Failure('not-found', 'You have no such session, or it has ended already.');
    }
    await recordForAccount(trx, {
      deed: 'session.ended',
      accountId: person.id,
      by: person.id,
      subject: ended.device,
    });
  });
}

/** Ends every session of the person, on all devices, this one included. */
export async function signOutEverywhere(person: Person): Promise<void> {
  await inTransaction(async (trx) => {
    await deleteSessionsOf(trx, person.id);
    await recordForAccount(trx, {
      deed: 'session.ended',
      accountId: person.id,
      by: person.id,
      subject: 'all devices',
    });
  });
}
