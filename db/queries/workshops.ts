import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Database } from '../client';

export type WorkshopRole = 'admin' | 'member';

export interface Workshop {
  id: string;
  name: string;
  /** Settings that new notebooks start from; the service checks their shape. */
  defaults: unknown;
}

interface WorkshopRow {
  id: string;
  name: string;
  defaults: string;
}

interface MembershipRow {
  workshop_id: string;
  user_id: string;
  role: WorkshopRole;
}

const toWorkshop = (row: WorkshopRow): Workshop => ({
  id: row.id,
  name: row.name,
  defaults: JSON.parse(row.defaults) as unknown,
});

/** Adds a workshop and returns the new id. */
export async function insertWorkshop(
  db: Database,
  workshop: { name: string; defaults?: unknown },
): Promise<string> {
  const id = randomUUID();
  const defaults = JSON.stringify(workshop.defaults ?? {});
  await db('workshops').insert({ id, name: workshop.name, defaults });
  return id;
}

export async function findWorkshop(db: Database, id: string): Promise<Workshop | null> {
  const row = await db<WorkshopRow>('workshops').where({ id }).first();
  return row === undefined ? null : toWorkshop(row);
}

/**
 * Makes a person admin or member of a workshop.
 * @throws what `isDuplicate` recognises when the person already belongs to it
 */
export async function insertMembership(
  db: Database,
  workshopId: string,
  userId: string,
  role: WorkshopRole,
): Promise<void> {
  await db('memberships').insert({ workshop_id: workshopId, user_id: userId, role });
}

export async function findWorkshopRole(
  db: Database,
  workshopId: string,
  userId: string,
): Promise<WorkshopRole | null> {
  const row = await db<MembershipRow>('memberships')
    .where({ workshop_id: workshopId, user_id: userId })
    .first();
  return row?.role ?? null;
}

/** The workshops a person belongs to, oldest membership first. */
export async function listWorkshopsOf(
  db: Database,
  userId: string,
): Promise<(Workshop & { role: WorkshopRole })[]> {
  const rows = await db('memberships')
    .join('workshops', 'workshops.id', 'memberships.workshop_id')
    .where('memberships.user_id', userId)
    .orderBy(['memberships.created_at', 'workshops.id'])
    .select<(WorkshopRow & { role: WorkshopRole })[]>(
      'workshops.id',
      'workshops.name',
      'workshops.defaults',
      'memberships.role',
    );
  return rows.map((row) => ({ ...toWorkshop(row), role: row.role }));
}

/**
 * The role of a person in a workshop, held until the transaction ends: nobody removes the person
 * while they do what the role allows.
 */
export async function holdWorkshopRole(
  trx: Knex.Transaction,
  workshopId: string,
  userId: string,
): Promise<WorkshopRole | null> {
  const row = await trx<MembershipRow>('memberships')
    .where({ workshop_id: workshopId, user_id: userId })
    .forShare()
    .first();
  return row?.role ?? null;
}

/**
 * Everybody's role in a workshop, held until the transaction ends. Whatever changes memberships or
 * settings of a workshop begins with this, so that it happens one after another; notebooks are held
 * after it and in the order of their ids.
 */
export async function lockMembers(
  trx: Knex.Transaction,
  workshopId: string,
): Promise<Map<string, WorkshopRole>> {
  const rows = await trx<MembershipRow>('memberships')
    .where({ workshop_id: workshopId })
    .orderBy('user_id')
    .forUpdate()
    .select('user_id', 'role');
  return new Map(rows.map((row) => [row.user_id, row.role]));
}

export interface WorkshopMember {
  id: string;
  name: string;
  email: string;
  role: WorkshopRole;
  since: Date;
}

/** Everybody who belongs to a workshop: admins, then members, each group by name. */
export async function listMembers(db: Database, workshopId: string): Promise<WorkshopMember[]> {
  const members: WorkshopMember[] = await db('memberships')
    .join('users', 'users.id', 'memberships.user_id')
    .where('memberships.workshop_id', workshopId)
    .orderBy(['memberships.role', 'users.name', 'users.id'])
    .select(
      'users.id',
      'users.name',
      'users.email',
      'memberships.role',
      'memberships.created_at as since',
    );
  return members;
}

export async function changeMembership(
  db: Database,
  workshopId: string,
  userId: string,
  role: WorkshopRole,
): Promise<void> {
  await db('memberships').where({ workshop_id: workshopId, user_id: userId }).update({ role });
}

export async function deleteMembership(
  db: Database,
  workshopId: string,
  userId: string,
): Promise<void> {
  await db('memberships').where({ workshop_id: workshopId, user_id: userId }).delete();
}

/** Stores a workshop's name and settings in place of those before. */
export async function putWorkshop(
  db: Database,
  { id, name, defaults }: { id: string; name: string; defaults: object },
): Promise<void> {
  await db('workshops')
    .where({ id })
    .update({ name, defaults: JSON.stringify(defaults) });
}

/** The id of the workshop that was made first; null while there is none. */
export async function findOldestWorkshop(db: Database): Promise<string | null> {
  const row: { id: string } | undefined = await db('workshops')
    .orderBy(['created_at', 'id'])
    .first('id');
  return row?.id ?? null;
}
