import type { Knex } from 'knex';
import { findWorkshop, holdWorkshopRole, type Workshop } from '@/db/queries/workshops';
import { demandInWorkshop, type WorkshopAction } from '@/lib/access';
import { isId, type Person } from '@/lib/accounts';

/**
 * The workshop, for a person who may do this in it and is kept in it until the transaction ends.
 * @throws Failure `not-found` for an unknown workshop and for one the person does not belong to, alike; `forbidden`
 */
export async function workshopFor(
  trx: Knex.Transaction,
  person: Person,
  action: WorkshopAction,
  id: string,
): Promise<Workshop> {
  const workshop = isId(id) ? await findWorkshop(trx, id) : null;
  const role = workshop === null ? null : await holdWorkshopRole(trx, id, person.id);
  const members = new Map(role === null ? [] : [[person.id, role]]);
  demandInWorkshop({ kind: 'person', id: person.id }, action, workshop && { id, members });
  if (workshop === null) throw new Error('Access let a person through to no workshop.');
  return workshop;
}
