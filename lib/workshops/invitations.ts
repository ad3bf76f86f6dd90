import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import {
  endInvitation,
  insertInvitation,
  listWaitingInvitations,
  lockWaitingInvitation,
  renewInvitation,
  type Invitation,
  type InvitedTo,
} from '@/db/queries/invitations';
import { listNotebookPeople } from '@/db/queries/notebook-roles';
import { listMembers } from '@/db/queries/workshops';
import { Failure, ROLES } from '@/lib/access';
import {
  EmailAddress,
  LIMITS,
  countAgainst,
  hashOf,
  isId,
  newSecret,
  type Person,
} from '@/lib/accounts';
import { record } from '@/lib/activity';
import { queueLetter } from '@/lib/mail';
import { holdFor, openFor } from '@/lib/notebooks/guard';
import { holdWorkshop, openWorkshop } from './guard';
import { invitationLetter } from './invitation-letter';
import { MemberRole } from './members';
import type { InvitationLine } from './types';

/** How long an invitation can be accepted. */
const DAYS = 14;
const DAY_MS = 24 * 3600 * 1000;
/** Invitations that wait for one workshop, or for one notebook. */
const WAITING = 200;
/** Letters for one invitation, the first included. */
const LETTERS = 5;

export const WorkshopInvitation = z.strictObject({ email: EmailAddress, role: MemberRole });
export type WorkshopInvitation = z.infer<typeof WorkshopInvitation>;

export const NotebookInvitation = z.strictObject({
  email: EmailAddress,
  role: z.enum(ROLES, { error: 'The role must be owner, editor or viewer.' }),
});
export type NotebookInvitation = z.infer<typeof NotebookInvitation>;

/** Where an invitation leads, as a request names it. */
export type Target = { workshop: string } | { notebook: string };

interface HeldTarget extends InvitedTo {
  workshop: Invitation['workshop'];
  notebook: Invitation['notebook'];
  subject: string;
}

/** Holds what is invited to, for a person who may invite there; the rights are asked at this moment. */
async function holdTarget(
  trx: Knex.Transaction,
  person: Person,
  target: Target,
): Promise<HeldTarget> {
  if ('workshop' in target) {
    const { workshop } = await holdWorkshop(trx, person, 'members.change', target.workshop);
    const { id, name } = workshop;
    return {
      workshopId: id,
      notebookId: null,
      workshop: { id, name },
      notebook: null,
      subject: name,
    };
  }
  const { notebook } = await holdFor(trx, person, 'people.change', target.notebook);
  const { id, title, workshop } = notebook;
  return {
    workshopId: workshop.id,
    notebookId: id,
    workshop,
    notebook: { id, title },
    subject: title,
  };
}

/** Invitations that wait, expired ones too, newest first; for whoever may invite. */
export async function listInvitations(person: Person, target: Target): Promise<InvitationLine[]> {
  const to: InvitedTo =
    'workshop' in target
      ? {
          workshopId: (await openWorkshop(person, 'members.change', target.workshop)).workshop.id,
          notebookId: null,
        }
      : {
          workshopId: (await openFor(person, 'people.change', target.notebook)).notebook.workshop
            .id,
          notebookId: target.notebook,
        };
  return (await listWaitingInvitations(database(), to)).map(lineOf);
}

/**
 * Invites an address: stores the invitation and queues its letter, both or neither.
 * @throws Failure `already-added` for somebody who is there already or has been invited,
 *   `limit-reached` above 200 that wait, `too-many`
 */
export async function invite(
  person: Person,
  target: Target,
  { email, role }: WorkshopInvitation | NotebookInvitation,
): Promise<InvitationLine> {
  await demandToInvite(person, target);
  await countLetter(person, email);
  const token = newSecret();
  return inTransaction(async (trx) => {
    const held = await holdTarget(trx, person, target);
    const present =
      held.notebookId === null
        ? await listMembers(trx, held.workshopId)
        : await listNotebookPeople(trx, held.notebookId);
    const there = present.find((one) => one.email === email);
    if (there !== undefined) throw already(`${there.name} is here already, as ${there.role}.`);
    const waiting = await listWaitingInvitations(trx, held);
    if (waiting.some((one) => one.email === email)) {
      throw already(
        `${email} has been invited already; send that invitation again, or withdraw it.`,
      );
    }
    if (waiting.length >= WAITING) {
      throw new Failure(
        'limit-reached',
        `There are ${waiting.length} invitations that wait; withdraw some first.`,
      );
    }
    const expiresAt = new Date(Date.now() + DAYS * DAY_MS);
    const id = await insertInvitation(trx, {
      ...held,
      role,
      email,
      tokenHash: hashOf(token),
      invitedBy: person.id,
      expiresAt,
    });
    await queueLetter(
      trx,
      invitationLetter(person.name, { ...held, role, email, expiresAt }, token),
    );
    await record(trx, {
      deed: 'member.invited',
      by: person.id,
      workshopId: held.workshopId,
      notebookId: held.notebookId,
      subject: held.subject,
      details: { invitation: id, role },
    });
    const sentAt = new Date().toISOString();
    return {
      id,
      email,
      role,
      invitedBy: person.name,
      sentAt,
      expiresAt: expiresAt.toISOString(),
      expired: false,
    };
  });
}

/**
 * Sends an invitation once more, with a new link and a new end; the link before is worth nothing.
 * @throws Failure `not-found`, `limit-reached` after 5 letters, `too-many`
 */
export async function resendInvitation(person: Person, target: Target, id: string): Promise<void> {
  await demandToInvite(person, target);
  const token = newSecret();
  const waiting = (await listInvitations(person, target)).find((one) => one.id === id);
  if (waiting === undefined) throw noInvitation();
  await countLetter(person, waiting.email);
  await inTransaction(async (trx) => {
    const held = await holdTarget(trx, person, target);
    const invitation = await lockHere(trx, target, id);
    if (invitation.sentCount >= LETTERS) {
      throw new Failure(
        'limit-reached',
        `${LETTERS} letters have been sent for this invitation; withdraw it and ask the person whether the address is right.`,
      );
    }
    const expiresAt = new Date(Date.now() + DAYS * DAY_MS);
    await renewInvitation(trx, id, { tokenHash: hashOf(token), expiresAt });
    await queueLetter(trx, invitationLetter(person.name, { ...invitation, expiresAt }, token));
    await record(trx, {
      deed: 'invitation.sent-again',
      by: person.id,
      workshopId: held.workshopId,
      notebookId: held.notebookId,
      subject: held.subject,
      details: { invitation: id },
    });
  });
}

/** Ends an invitation at once: its link says so from then on. @throws Failure `not-found` */
export async function withdrawInvitation(
  person: Person,
  target: Target,
  id: string,
): Promise<void> {
  await inTransaction(async (trx) => {
    const held = await holdTarget(trx, person, target);
    await lockHere(trx, target, id);
    await endInvitation(trx, id, 'withdrawn');
    await record(trx, {
      deed: 'invitation.withdrawn',
      by: person.id,
      workshopId: held.workshopId,
      notebookId: held.notebookId,
      subject: held.subject,
      details: { invitation: id },
    });
  });
}

/** The waiting invitation, if it leads to this very place. */
async function lockHere(trx: Knex.Transaction, target: Target, id: string): Promise<Invitation> {
  const found = isId(id) ? await lockWaitingInvitation(trx, id) : null;
  const here =
    found !== null &&
    ('workshop' in target
      ? found.notebook === null && found.workshop.id === target.workshop
      : found.notebook?.id === target.notebook);
  if (!here) throw noInvitation();
  return found;
}

async function demandToInvite(person: Person, target: Target): Promise<void> {
  if ('workshop' in target) await openWorkshop(person, 'members.change', target.workshop);
  else await openFor(person, 'people.change', target.notebook);
}

/** Letters are counted per inviting person, and per address over all who invite it. */
async function countLetter(person: Person, email: string): Promise<void> {
  await countAgainst(LIMITS.invite, person.id);
  await countAgainst(LIMITS.inviteEmail, email);
}

const already = (message: string) =>
  new Failure('already-added', message, { fields: [{ field: 'email', message }] });

const noInvitation = () =>
  new Failure('not-found', 'There is no such invitation here, or it was accepted or withdrawn.');

const lineOf = (invitation: Invitation): InvitationLine => ({
  id: invitation.id,
  email: invitation.email,
  role: invitation.role,
  invitedBy: invitation.invitedBy,
  sentAt: invitation.sentAt.toISOString(),
  expiresAt: invitation.expiresAt.toISOString(),
  expired: invitation.expiresAt.getTime() <= Date.now(),
});
