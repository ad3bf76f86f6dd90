import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Database } from '../client';
import type { NotebookRole } from './notebooks';
import { normaliseEmail } from './users';
import type { WorkshopRole } from './workshops';

export interface Invitation {
  id: string;
  workshop: { id: string; name: string };
  /** Null for an invitation to the workshop itself. */
  notebook: { id: string; title: string } | null;
  role: WorkshopRole | NotebookRole;
  email: string;
  /** Empty when whoever invited is not there any more. */
  invitedBy: string;
  madeAt: Date;
  sentAt: Date;
  sentCount: number;
  expiresAt: Date;
  acceptedAt: Date | null;
  withdrawnAt: Date | null;
}

interface InvitationRow {
  id: string;
  workshop_id: string;
  workshop_name: string;
  notebook_id: string | null;
  notebook_title: string | null;
  role: Invitation['role'];
  email: string;
  inviter_name: string | null;
  made_at: Date;
  sent_at: Date;
  sent_count: number;
  expires_at: Date;
  accepted_at: Date | null;
  withdrawn_at: Date | null;
}

const toInvitation = (row: InvitationRow): Invitation => ({
  id: row.id,
  workshop: { id: row.workshop_id, name: row.workshop_name },
  notebook:
    row.notebook_id === null ? null : { id: row.notebook_id, title: row.notebook_title ?? '' },
  role: row.role,
  email: row.email,
  invitedBy: row.inviter_name ?? '',
  madeAt: row.made_at,
  sentAt: row.sent_at,
  sentCount: row.sent_count,
  expiresAt: row.expires_at,
  acceptedAt: row.accepted_at,
  withdrawnAt: row.withdrawn_at,
});

const withNames = (db: Database) =>
  db('invitations')
    .leftJoin('notebooks', 'notebooks.id', 'invitations.notebook_id')
    // A notebook may have moved to another workshop since.
    .join('workshops', function () {
      this.on(
        'workshops.id',
        db.raw('coalesce(notebooks.workshop_id, invitations.workshop_id)') as unknown as string,
      );
    })
    .leftJoin('users', 'users.id', 'invitations.invited_by')
    .select(
      'invitations.*',
      'workshops.id as workshop_id',
      'workshops.name as workshop_name',
      'notebooks.title as notebook_title',
      'users.name as inviter_name',
    );

/** Where an invitation leads: one notebook, or a workshop itself. */
export interface InvitedTo {
  workshopId: string;
  notebookId: string | null;
}

const leadingTo = (db: Database, { workshopId, notebookId }: InvitedTo) =>
  notebookId === null
    ? withNames(db)
        .where('invitations.workshop_id', workshopId)
        .whereNull('invitations.notebook_id')
    : withNames(db).where('invitations.notebook_id', notebookId);

const isWaiting = (query: Knex.QueryBuilder) =>
  query.whereNull('invitations.accepted_at').whereNull('invitations.withdrawn_at');

/** Stores an invitation by the SHA-256 of its token and returns the new id. */
export async function insertInvitation(
  db: Database,
  invitation: InvitedTo & {
    role: Invitation['role'];
    email: string;
    tokenHash: string;
    invitedBy: string;
    expiresAt: Date;
  },
): Promise<string> {
  const id = randomUUID();
  await db('invitations').insert({
    id,
    workshop_id: invitation.workshopId,
    notebook_id: invitation.notebookId,
    role: invitation.role,
    email: normaliseEmail(invitation.email),
    token_hash: invitation.tokenHash,
    invited_by: invitation.invitedBy,
    expires_at: invitation.expiresAt,
  });
  return id;
}

/** Invitations that were neither accepted nor withdrawn, expired ones too, newest first. */
export async function listWaitingInvitations(db: Database, to: InvitedTo): Promise<Invitation[]> {
  const rows = (await isWaiting(leadingTo(db, to)).orderBy([
    { column: 'invitations.made_at', order: 'desc' },
    'invitations.id',
  ])) as InvitationRow[];
  return rows.map(toInvitation);
}

export async function findInvitationByToken(
  db: Database,
  tokenHash: string,
): Promise<Invitation | null> {
  const row = (await withNames(db).where('invitations.token_hash', tokenHash).first()) as
    InvitationRow | undefined;
  return row === undefined ? null : toInvitation(row);
}

/** The waiting invitation with this id, held until the transaction ends. */
export async function lockWaitingInvitation(
  trx: Knex.Transaction,
  id: string,
): Promise<Invitation | null> {
  // The row alone first: joined, the lock would take the workshop's and the notebook's rows too.
  const held: unknown = await isWaiting(trx('invitations').where({ id })).forUpdate().first('id');
  if (held === undefined) return null;
  const row = (await withNames(trx).where('invitations.id', id).first()) as InvitationRow;
  return toInvitation(row);
}

/** Gives an invitation a new token and a new end, and counts the letter. */
export async function renewInvitation(
  db: Database,
  id: string,
  { tokenHash, expiresAt }: { tokenHash: string; expiresAt: Date },
): Promise<void> {
  await db('invitations')
    .where({ id })
    .update({
      token_hash: tokenHash,
      expires_at: expiresAt,
      sent_at: db.raw('current_timestamp(3)'),
      sent_count: db.raw('sent_count + 1'),
    });
}

export async function endInvitation(
  db: Database,
  id: string,
  how: 'accepted' | 'withdrawn',
): Promise<void> {
  await db('invitations')
    .where({ id })
    .update({ [`${how}_at`]: db.raw('current_timestamp(3)') });
}
