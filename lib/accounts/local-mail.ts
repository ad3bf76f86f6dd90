import { database } from '@/db/client';
import { findOldestWorkshop, findWorkshopRole } from '@/db/queries/workshops';
import { Failure, canInWorkshop } from '@/lib/access';
import { hasLocalMailbox } from '@/lib/mail';
import { findLocalMail, listLocalMail, type LocalMail } from '@/lib/mail/mailbox';
import type { Person } from './types';

/**
 * Whether the person may read the local mailbox. It holds the letters to everybody, with ways into
 * their accounts; so not every workshop's admin may, for anybody can make a workshop, but only those of
 * the first one: whoever set this copy up.
 */
export async function readsLocalMail(person: Person): Promise<boolean> {
  if (!hasLocalMailbox()) return false;
  const db = database();
  const id = await findOldestWorkshop(db);
  const role = id === null ? null : await findWorkshopRole(db, id, person.id);
  if (id === null || role === null) return false;
  const workshop = { id, members: new Map([[person.id, role]]) };
  return canInWorkshop({ kind: 'person', id: person.id }, 'localMail.read', workshop);
}

/** The letters, newest first. @throws Failure `not-found` for everybody else, and without a mailbox */
export async function listMail(person: Person): Promise<LocalMail[]> {
  await demandMailbox(person);
  return listLocalMail();
}

/** One letter. @throws Failure `not-found` */
export async function readMail(person: Person, id: string): Promise<LocalMail> {
  await demandMailbox(person);
  const letter = await findLocalMail(id);
  if (letter !== null) return letter;
  throw new Failure('not-found', 'There is no such letter.');
}

async function demandMailbox(person: Person): Promise<void> {
  if (await readsLocalMail(person)) return;
  throw new Failure('not-found', 'There is no mailbox here that you may read.');
}
