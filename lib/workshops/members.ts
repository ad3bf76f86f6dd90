import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import { deleteNotebookRole, lockRolesIn, putNotebookRole } from '@/db/queries/notebook-roles';
import {
  changeMembership,
  deleteMembership,
  listMembers as listRows,
} from '@/db/queries/workshops';
import { Failure, WORKSHOP_ROLES } from '@/lib/access';
import { isId, type Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { holdWorkshop, openWorkshop, type HeldWorkshop } from './guard';
import type { MemberLine, OwnedNotebook } from './types';

export const MemberRole = z.enum(WORKSHOP_ROLES, { error: 'The role must be admin or member.' });

export const MemberChange = z.strictObject({ role: MemberRole });
export type MemberChange = z.infer<typeof MemberChange>;

/** How a membership ends: whoever is to own the notebooks that would be left without an owner. */
export const Parting = z.strictObject({
  successor: z.string({ error: 'The successor is not given by their id.' }).optional(),
});
export type Parting = z.infer<typeof Parting>;

/** Everybody who belongs to the workshop, admins first. */
export async function listMembers(person: Person, id: string): Promise<MemberLine[]> {
  await openWorkshop(person, 'members.list', id);
  const members = await listRows(database(), id);
  return members.map((member) => ({ ...member, since: member.since.toISOString() }));
}

/** @throws Failure `not-found` for somebody who does not belong to it, `last-admin` */
export async function changeMember(
  person: Person,
  id: string,
  memberId: string,
  { role }: MemberChange,
): Promise<void> {
  await inTransaction(async (trx) => {
    const held = await holdWorkshop(trx, person, 'members.change', id);
    const before = held.members.get(memberId);
    if (before === undefined) throw noMember();
    if (before === role) return;
    if (role !== 'admin') demandAnotherAdmin(held, memberId);
    await changeMembership(trx, id, memberId, role);
    await record(trx, {
      deed: 'member.role-changed',
      by: person.id,
      workshopId: id,
      subject: held.workshop.name,
      details: { person: memberId, from: before, to: role },
    });
  });
}

/**
 * Takes somebody out of the workshop; their roles on its notebooks end with that.
 * @throws Failure `not-found`, `last-admin`; `successor-needed` with the notebooks that only this
 *   person owns, while no successor is named; `invalid` for a successor who is not a member
 */
export async function removeMember(
  person: Person,
  id: string,
  memberId: string,
  parting: Parting = {},
): Promise<void> {
  await inTransaction(async (trx) => {
    const held = await holdWorkshop(trx, person, 'members.change', id);
    if (!held.members.has(memberId)) throw noMember();
    await part(trx, held, memberId, parting, person);
    await record(trx, {
      deed: 'member.removed',
      by: person.id,
      workshopId: id,
      subject: held.workshop.name,
      details: { person: memberId },
    });
  });
}

/** The same of oneself. @throws Failure as `removeMember` */
export async function leaveWorkshop(
  person: Person,
  id: string,
  parting: Parting = {},
): Promise<void> {
  await inTransaction(async (trx) => {
    const held = await holdWorkshop(trx, person, 'workshop.leave', id);
    await part(trx, held, person.id, parting, person);
    const subject = held.workshop.name;
    await record(trx, { deed: 'member.left', by: person.id, workshopId: id, subject });
  });
}

/** Ends a membership and the roles that go with it; what would be ownerless goes to the successor. */
async function part(
  trx: Knex.Transaction,
  held: HeldWorkshop,
  memberId: string,
  { successor }: Parting,
  by: Person,
): Promise<void> {
  demandAnotherAdmin(held, memberId);
  const workshopId = held.workshop.id;
  const roles = await lockRolesIn(trx, workshopId, memberId);
  const alone = roles.filter((role) => role.onlyOwner);
  if (alone.length > 0) {
    const notebooks = alone.map(({ notebookId, title }) => ({ id: notebookId, title }));
    const next = successorAmong(held, memberId, successor, notebooks, by);
    for (const { notebookId, title } of alone) {
      await putNotebookRole(trx, notebookId, next, 'owner');
      await record(trx, {
        deed: 'role.handed-over',
        by: by.id,
        workshopId,
        notebookId,
        subject: title,
        details: { person: next },
      });
    }
  }
  for (const { notebookId } of roles) await deleteNotebookRole(trx, notebookId, memberId);
  await deleteMembership(trx, workshopId, memberId);
}

function successorAmong(
  { members }: HeldWorkshop,
  memberId: string,
  successor: string | undefined,
  notebooks: OwnedNotebook[],
  by: Person,
): string {
  const [first] = notebooks;
  const many =
    notebooks.length === 1 ? `the notebook “${first?.title}”` : `${notebooks.length} notebooks`;
  const who = memberId === by.id ? 'You are' : 'This person is';
  if (successor === undefined) {
    throw new Failure(
      'successor-needed',
      `${who} the only owner of ${many} here; say who is to own them from now on.`,
      { notebooks },
    );
  }
  if (isId(successor) && successor !== memberId && members.has(successor)) return successor;
  const message = 'The successor must be another member of this workshop.';
  throw new Failure('invalid', message, { fields: [{ field: 'successor', message }] });
}

/** Nobody is left behind without an admin. @throws Failure `last-admin` */
function demandAnotherAdmin({ members }: HeldWorkshop, memberId: string): void {
  const others = [...members].filter(([id, role]) => role === 'admin' && id !== memberId);
  if (members.get(memberId) !== 'admin' || others.length > 0) return;
  throw new Failure(
    'last-admin',
    'This is the only admin of the workshop; make somebody else an admin first.',
  );
}

const noMember = () => new Failure('not-found', 'That person does not belong to this workshop.');
