import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  deleteNotebookRole,
  findNotebookRole,
  listNotebookPeople,
  lockOwners,
  putNotebookRole,
} from '@/db/queries/notebook-roles';
import { findUserByEmail } from '@/db/queries/users';
import { Failure, ROLES, type Role } from '@/lib/access';
import { EmailAddress, LIMITS, countAgainst, isId, type Person } from '@/lib/accounts';
import { holdFor, openFor } from './guard';
import type { NotebookPerson } from './types';

const PEOPLE = 200;

const AnyRole = z.enum(ROLES, { error: 'The role must be owner, editor or viewer.' });

export const NewPerson = z.strictObject({ email: EmailAddress, role: AnyRole });
export type NewPerson = z.infer<typeof NewPerson>;

export const RoleChange = z.strictObject({ role: AnyRole });

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
    await holdFor(trx, person, 'people.change', id);
    const added = await findUserByEmail(trx, email);
    if (added === null) {
      const message = `There is no account with the e-mail address ${email}; the person has to sign up first.`;
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

function changePeople(
  person: Person,
  id: string,
  personId: string,
  role: Role | null,
): Promise<void> {
  return inTransaction(async (trx) => {
    await holdFor(trx, person, 'people.change', id);
    const present = isId(personId) ? await findNotebookRole(trx, id, personId) : null;
    if (present === null) {
      throw new Failure('not-found', 'That person has no role on this notebook.');
    }
    const owners = await lockOwners(trx, id);
    if (present === 'owner' && role !== 'owner' && owners.length === 1) {
      throw new Failure(
        'last-owner',
        'This is the only owner of the notebook; make somebody else an owner first.',
      );
    }
    if (role === null) await deleteNotebookRole(trx, id, personId);
    else await putNotebookRole(trx, id, personId, role);
  });
}
