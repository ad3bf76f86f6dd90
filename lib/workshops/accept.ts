import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction, isDuplicate } from '@/db/client';
import {
  endInvitation,
  findInvitationByToken,
  lockWaitingInvitation,
  type Invitation,
} from '@/db/queries/invitations';
import { findNotebookRole, putNotebookRole } from '@/db/queries/notebook-roles';
import { lockHead } from '@/db/queries/notebooks';
import { deleteSignUps } from '@/db/queries/sign-ups';
import { findUserByEmail, insertUser } from '@/db/queries/users';
import { changeMembership, insertMembership, lockMembers } from '@/db/queries/workshops';
import { Failure, ROLES, WORKSHOP_ROLES, type Role, type WorkshopRole } from '@/lib/access';
import {
  LIMITS,
  Password,
  countAgainst,
  hashOf,
  hashPassword,
  oneLine,
  type Person,
} from '@/lib/accounts';
import { record } from '@/lib/activity';
import type { InvitationView } from './types';

const TOKEN = /^[A-Za-z0-9_-]{43}$/;

/** What a person without an account gives to make one; the address is that of the invitation. */
export const InvitedAccount = z.strictObject({
  name: oneLine('The name', 120),
  password: Password,
});
export type InvitedAccount = z.infer<typeof InvitedAccount>;

/** Where an accepted invitation leads to. */
export interface Joined {
  path: string;
}

/**
 * What an invitation's link shows, whether it still holds or not.
 * @throws Failure `not-found` for an unknown token, and for one that was replaced by a newer letter
 */
export async function lookAtInvitation(token: string): Promise<InvitationView> {
  const invitation = await getInvitation(token);
  const { workshop, notebook, role, email, invitedBy, expiresAt } = invitation;
  return {
    state: stateOf(invitation),
    workshop,
    notebook,
    role,
    email,
    invitedBy,
    expiresAt: expiresAt.toISOString(),
    hasAccount: (await findUserByEmail(database(), email)) !== null,
  };
}

/**
 * Accepts an invitation: the person gets the membership or the role. Whoever has a higher one
 * already keeps it.
 * @throws Failure `not-found`; `link-over` for one that expired, was withdrawn or was accepted;
 *   `other-address` for a person with another e-mail address than the invited one
 */
export async function acceptInvitation(person: Person, token: string): Promise<Joined> {
  const invitation = await getInvitation(token);
  demandOpen(invitation);
  if (person.email !== invitation.email) {
    throw new Failure(
      'other-address',
      `This invitation is for ${invitation.email}, and you are signed in as ${person.email}.`,
    );
  }
  await inTransaction((trx) => takeUp(trx, invitation, person.id));
  return { path: pathOf(invitation) };
}

/**
 * Makes an account for the invited address and accepts, in one step. The token came by mail to that
 * address, which proves it.
 * @throws Failure as `acceptInvitation`; `already-added` where the address has an account; `too-many`
 */
export async function acceptWithNewAccount(
  token: string,
  { name, password }: InvitedAccount,
  address: string,
): Promise<Joined> {
  const invitation = await getInvitation(token);
  demandOpen(invitation);
  await countAgainst(LIMITS.signUp, address);
  const passwordHash = await hashPassword(password);
  const { email } = invitation;
  try {
    await inTransaction(async (trx) => {
      // Whoever waited for a confirmation of this address needs none any more.
      await deleteSignUps(trx, email);
      const id = await insertUser(trx, { email, name, passwordHash });
      await record(trx, {
        deed: 'account.made',
        by: id,
        workshopId: invitation.workshop.id,
        subject: invitation.workshop.name,
      });
      await takeUp(trx, invitation, id);
    });
  } catch (error) {
    if (!isDuplicate(error)) throw error;
    throw new Failure('already-added', `There is an account for ${email} already; sign in to it.`);
  }
  return { path: pathOf(invitation) };
}

async function getInvitation(token: string): Promise<Invitation> {
  const found = TOKEN.test(token) ? await findInvitationByToken(database(), hashOf(token)) : null;
  if (found !== null) return found;
  throw new Failure(
    'not-found',
    'There is no such invitation: its address is incomplete, or a newer letter has replaced it.',
  );
}

/** Gives what was promised, once. What may change is held in the order that all services keep. */
async function takeUp(
  trx: Knex.Transaction,
  { id, workshop, notebook }: Invitation,
  personId: string,
): Promise<void> {
  const members =
    notebook === null ? await lockMembers(trx, workshop.id) : new Map<string, WorkshopRole>();
  if (notebook !== null) await lockHead(trx, notebook.id);
  const held = await lockWaitingInvitation(trx, id);
  if (held === null) throw over('ended');
  if (stateOf(held) !== 'open') throw over('expired');
  await endInvitation(trx, id, 'accepted');
  const about = { by: personId, workshopId: held.workshop.id };
  if (notebook === null) {
    const before = members.get(personId) ?? null;
    const role = higher(WORKSHOP_ROLES, before, held.role as WorkshopRole);
    if (before === null) await insertMembership(trx, workshop.id, personId, role);
    else await changeMembership(trx, workshop.id, personId, role);
    const details = { invitation: id, role };
    await record(trx, { ...about, deed: 'member.joined', subject: held.workshop.name, details });
    return;
  }
  const before = await findNotebookRole(trx, notebook.id, personId);
  const role = higher(ROLES, before, held.role as Role);
  await putNotebookRole(trx, notebook.id, personId, role);
  await record(trx, {
    ...about,
    deed: 'member.joined',
    notebookId: notebook.id,
    subject: notebook.title,
    details: { invitation: id, role },
  });
}

/** The one of two roles that stands earlier in the list, which is the one that may do more. */
function higher<R extends string>(roles: readonly R[], held: R | null, given: R): R {
  return held !== null && roles.indexOf(held) < roles.indexOf(given) ? held : given;
}

function stateOf({ acceptedAt, withdrawnAt, expiresAt }: Invitation): InvitationView['state'] {
  if (acceptedAt !== null) return 'accepted';
  if (withdrawnAt !== null) return 'withdrawn';
  return expiresAt.getTime() <= Date.now() ? 'expired' : 'open';
}

function demandOpen(invitation: Invitation): void {
  const state = stateOf(invitation);
  if (state !== 'open') throw over(state);
}

const WHY = {
  accepted: 'This invitation has been accepted already; it works once.',
  withdrawn: 'This invitation has been withdrawn.',
  ended: 'This invitation has been accepted or withdrawn meanwhile.',
  expired: 'This invitation has expired; ask for a new one.',
} as const;

const over = (state: keyof typeof WHY) => new Failure('link-over', WHY[state]);

const pathOf = ({ workshop, notebook }: Invitation) =>
  notebook === null ? `/workshops/${workshop.id}` : `/notebooks/${notebook.id}`;
