import type { Knex } from 'knex';
import { database, type Database } from '@/db/client';
import { findWorkshop, findWorkshopRole, lockMembers, type Workshop } from '@/db/queries/workshops';
import { demandInWorkshop, type WorkshopAction, type WorkshopRole } from '@/lib/access';
import { isId, type Person } from '@/lib/accounts';

export interface OpenedWorkshop {
  workshop: Workshop;
  role: WorkshopRole;
}

/**
 * The workshop, for a person who may do this in it.
 * @throws Failure `not-found` for an unknown workshop and for one the person does not belong to,
 *   alike; `forbidden` for a member where an admin is needed
 */
export async function openWorkshop(
  person: Person,
  action: WorkshopAction,
  id: string,
  db: Database = database(),
): Promise<OpenedWorkshop> {
  const workshop = isId(id) ? await findWorkshop(db, id) : null;
  const role = workshop === null ? null : await findWorkshopRole(db, id, person.id);
  return demanded(person, action, workshop, role);
}

export interface HeldWorkshop extends OpenedWorkshop {
  /** Everybody's role, as it stays until the transaction ends. */
  members: Map<string, WorkshopRole>;
}

/**
 * The same inside a transaction that is going to change the workshop or its people: everybody's
 * membership is held first, so that changes happen one after another and rights are those of that
 * moment.
 */
export async function holdWorkshop(
  trx: Knex.Transaction,
  person: Person,
  action: WorkshopAction,
  id: string,
): Promise<HeldWorkshop> {
  const members = isId(id) ? await lockMembers(trx, id) : new Map<string, WorkshopRole>();
  const workshop = isId(id) ? await findWorkshop(trx, id) : null;
  return { ...demanded(person, action, workshop, members.get(person.id) ?? null), members };
}

function demanded(
  person: Person,
  action: WorkshopAction,
  workshop: Workshop | null,
  role: WorkshopRole | null,
): OpenedWorkshop {
  const members = new Map(role === null ? [] : [[person.id, role]]);
  const guarded = workshop === null ? null : { id: workshop.id, members };
  demandInWorkshop({ kind: 'person', id: person.id }, action, guarded);
  if (workshop === null || role === null) {
    throw new Error('Access let a person through to a workshop they do not belong to.');
  }
  return { workshop, role };
}
