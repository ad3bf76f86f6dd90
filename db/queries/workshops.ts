import { randomUUID } from 'node:crypto';
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
