import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  deleteNotebookRole,
  findNotebookRole,
  listNotebookPeople,
  lockOwners,
  putNotebookRole,
} from '@/db/queries/notebook-roles';
import type { Notebook } from '@/db/queries/notebooks';
import { findUserByEmail } from '@/db/queries/users';
import { Failure, ROLES, type Role } from '@/lib/access';
import { EmailAddress, LIMITS, countAgainst, isId, type Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { holdFor, openFor } from './guard';
import type { NotebookPerson } from './types';

const PEOPLE = 200;

const AnyRole = z.enum(ROLES, { error: 'The role must be owner, editor or viewer.' });

export const NewPerson = z.strictObject({ email: EmailAddress, role: AnyRole });
export type NewPerson = z.infer<typeof NewPerson>;

export const RoleChange = z.strictObject({ role: AnyRole });

export const HandingOver = z.strictObject({
  to: z.string({ error: 'The new owner is not given by their id.' }),
});
export type HandingOver = z.infer<typeof HandingOver>;

/** Everybody with a role on the notebook, owners first. */
export async function listPeople(person: Person, id: string): Promise<NotebookPerson[]> {
  await openFor(person, 'people.list', id);
  return listNotebookPeople(database(), id);
}

/**
 * Gives a role to the person with this e-mail address.
 * @throws Failure `unknown-email`, `already-added`, `limit-reached`, `too-many`
 */
export async function addPerson(
  person: Person,
  id: string,
  { email, role }: NewPerson,
): Promise<NotebookPerson> {
  await openFor(person, 'people.change', id);
  // Owners learn which addresses have accounts; the limit keeps that to people one works with.
  await countAgainst(LIMITS.addPerson, person.id);
  return inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'people.change', id);
    const added = await findUserByEmail(trx, email);
    if (added === null) {
      const message = `There is no account with the e-mail address ${email}.`;
      throw new Failure('unknown-email', message, { fields: [{ field: 'email', message }] });
    }
    const present = await findNotebookRole(trx, id, added.id);
    if (present !== null) {
      const message = `${added.name} is on this notebook already, as ${present}; change the role there.`;
      throw new Failure('already-added', message, { fields: [{ field: 'email', message }] });
    }
    if ((await listNotebookPeople(trx, id)).length >= PEOPLE) {
      throw new Failure('limit-reached', `A notebook can have at most ${PEOPLE} people.`);
    }
    await putNotebookRole(trx, id, added.id, role);
    const details = { person: added.id, role };
    await record(trx, { ...about(notebook), deed: 'role.given', by: person.id, details });
    return { id: added.id, name: added.name, email: added.email, role };
  });
}

/** @throws Failure `not-found` for somebody without a role, `last-owner` */
export async function changeRole(
  person: Person,
  id: string,
  personId: string,
  role: Role,
): Promise<void> {
  await changePeople(person, id, personId, role);
}

/** Takes somebody's role away. @throws Failure `not-found`, `last-owner` */
export async function removePerson(person: Person, id: string, personId: string): Promise<void> {
  await changePeople(person, id, personId, null);
}

/**
 * Gives up one's own role. @throws Failure `last-owner`
 */
export function leaveNotebook(person: Person, id: string): Promise<void> {
  return inTransaction(async (trx) => {
    const { notebook, role } = await holdFor(trx, person, 'notebook.leave', id);
    if (role === 'owner') await demandAnotherOwner(trx, id);
    await deleteNotebookRole(trx, id, person.id);
    await record(trx, { ...about(notebook), deed: 'role.left', by: person.id, details: { role } });
  });
}

/**
 * Makes somebody with a role on the notebook an owner and oneself an editor, in one step.
 * @throws Failure `not-found` for somebody without a role, `invalid` for oneself
 */
export function handOver(person: Person, id: string, { to }: HandingOver): Promise<void> {
  return inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'people.change', id);
    if (to === person.id) {
      throw new Failure('invalid', 'You own this notebook already; hand it over to somebody else.');
    }
    const present = isId(to) ? await findNotebookRole(trx, id, to) : null;
    if (present === null) throw noRole();
    await putNotebookRole(trx, id, to, 'owner');
    await putNotebookRole(trx, id, person.id, 'editor');
    const details = { person: to };
    await record(trx, { ...about(notebook), deed: 'role.handed-over', by: person.id, details });
  });
}

function changePeople(
  person: Person,
  id: string,
  personId: string,
  role: Role | null,
): Promise<void> {
  return inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'people.change', id);
    const present = isId(personId) ? await findNotebookRole(trx, id, personId) : null;
    if (present === null) throw noRole();
    if (present === role) return;
    if (present === 'owner') await demandAnotherOwner(trx, id);
    const by = person.id;
    if (role === null) {
      await deleteNotebookRole(trx, id, personId);
      const details = { person: personId, from: present };
      await record(trx, { ...about(notebook), deed: 'role.taken', by, details });
    } else {
      await putNotebookRole(trx, id, personId, role);
      const details = { person: personId, from: present, to: role };
      await record(trx, { ...about(notebook), deed: 'role.changed', by, details });
    }
  });
}

/** The owners are held, so that two who go at the same time cannot both believe the other stays. */
async function demandAnotherOwner(trx: Knex.Transaction, id: string): Promise<void> {
  if ((await lockOwners(trx, id)).length > 1) return;
  throw new Failure(
    'last-owner',
    'This is the only owner of the notebook; make somebody else an owner first.',
  );
}

const noRole = () => new Failure('not-found', 'That person has no role on this notebook.');

const about = ({ id, title, workshop }: Notebook) => ({
  workshopId: workshop.id,
  notebookId: id,
  subject: title,
});
