import type { Knex } from 'knex';
import { database, type Database } from '@/db/client';
import { findNotebookRole } from '@/db/queries/notebook-roles';
import { findNotebook, lockHead, type Notebook } from '@/db/queries/notebooks';
import { demand, standingOf, type Action, type Actor, type Guarded, type Role } from '@/lib/access';
import { isId, readWorkshopSettings, type KeyHolder, type Person } from '@/lib/accounts';

export interface Opened {
  notebook: Notebook;
  role: Role;
}

/** Whoever asks a service: a person, or a script with a key that a person made. */
export type Asker = Person | KeyHolder;

const actorOf = (asker: Asker): Actor =>
  'keyId' in asker
    ? { kind: 'key', personId: asker.person.id, scopes: asker.scopes }
    : { kind: 'person', id: asker.id };

/** The person who asks, or who made the key; it is that person's role that counts, at each request. */
const personOf = (asker: Asker): Person => ('keyId' in asker ? asker.person : asker);

/**
 * The notebook, for a person or a key that may do this to it.
 * @throws Failure `not-found` for an unknown notebook and for one the person has no role on, alike;
 *   `forbidden` for somebody who may read it and no more
 */
export async function openFor(
  asker: Asker,
  action: Action,
  id: string,
  db: Database = database(),
): Promise<Opened> {
  const actor = actorOf(asker);
  const person = personOf(asker);
  const notebook = isId(id) ? await findNotebook(db, id) : null;
  const role = notebook === null ? null : await findNotebookRole(db, id, person.id);
  const guarded = notebook === null ? null : guardedBy(notebook, person, role);
  demand(actor, action, guarded);
  if (notebook === null || role === null) {
    throw new Error(`Access let ${standingOf(actor, guarded)} through to a notebook.`);
  }
  return { notebook, role };
}

/** What access has to know of a notebook to decide about one person. */
export function guardedBy(notebook: Notebook, person: Person, role: Role | null): Guarded {
  return {
    id: notebook.id,
    roles: new Map(role === null ? [] : [[person.id, role]]),
    editorsIssue: readWorkshopSettings(notebook.workshopSettings).issuing.editorsIssue,
  };
}

/**
 * The same inside a transaction that is going to change the notebook: its row is held first, so
 * that changes to one notebook happen one after another and rights are those of that moment.
 */
export async function holdFor(
  trx: Knex.Transaction,
  asker: Asker,
  action: Action,
  id: string,
): Promise<Opened> {
  if (isId(id)) await lockHead(trx, id);
  return openFor(asker, action, id, trx);
}
