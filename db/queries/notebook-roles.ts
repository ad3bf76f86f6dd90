import type { Knex } from 'knex';
import type { Database } from '../client';
import type { NotebookRole } from './notebooks';

interface RoleRow {
  notebook_id: string;
  user_id: string;
  role: NotebookRole;
}

export async function findNotebookRole(
  db: Database,
  notebookId: string,
  userId: string,
): Promise<NotebookRole | null> {
  const row = await db<RoleRow>('notebook_roles')
    .where({ notebook_id: notebookId, user_id: userId })
    .first();
  return row?.role ?? null;
}

/** Gives a person a role in a notebook, in place of the one held before. */
export async function putNotebookRole(
  db: Database,
  notebookId: string,
  userId: string,
  role: NotebookRole,
): Promise<void> {
  await db('notebook_roles')
    .insert({ notebook_id: notebookId, user_id: userId, role })
    .onConflict(['notebook_id', 'user_id'])
    .merge(['role']);
}

/** Takes a person's role away; whether there was one. */
export async function deleteNotebookRole(
  db: Database,
  notebookId: string,
  userId: string,
): Promise<boolean> {
  const gone = await db('notebook_roles')
    .where({ notebook_id: notebookId, user_id: userId })
    .delete();
  return gone > 0;
}

export interface NotebookPerson {
  id: string;
  name: string;
  email: string;
  role: NotebookRole;
}

/** Everybody with a role in the notebook: owners, editors, viewers, each group by name. */
export async function listNotebookPeople(
  db: Database,
  notebookId: string,
): Promise<NotebookPerson[]> {
  const people: NotebookPerson[] = await db('notebook_roles')
    .join('users', 'users.id', 'notebook_roles.user_id')
    .where('notebook_roles.notebook_id', notebookId)
    .orderBy(['notebook_roles.role', 'users.name', 'users.id'])
    .select('users.id', 'users.name', 'users.email', 'notebook_roles.role');
  return people;
}

/**
 * The owners' ids, held until the transaction ends, so that two owners who leave at the same time
 * cannot both believe the other one stays.
 */
export async function lockOwners(trx: Knex.Transaction, notebookId: string): Promise<string[]> {
  const rows = await trx<RoleRow>('notebook_roles')
    .where({ notebook_id: notebookId, role: 'owner' })
    .forUpdate()
    .select('user_id');
  return rows.map((row) => row.user_id);
}

export interface HeldRole {
  notebookId: string;
  title: string;
  role: NotebookRole;
  /** Whether nobody else owns the notebook. */
  onlyOwner: boolean;
}

/**
 * A person's roles on the notebooks of one workshop, held until the transaction ends. The notebooks
 * are held first, in the order of their ids, as whoever changes a role on one of them does.
 */
export async function lockRolesIn(
  trx: Knex.Transaction,
  workshopId: string,
  userId: string,
): Promise<HeldRole[]> {
  const ids = await trx('notebook_roles')
    .join('notebooks', 'notebooks.id', 'notebook_roles.notebook_id')
    .where({ 'notebooks.workshop_id': workshopId, 'notebook_roles.user_id': userId })
    .orderBy('notebooks.id')
    .pluck<string[]>('notebooks.id');
  const notebooks = await trx('notebooks')
    .whereIn('id', ids)
    .where({ workshop_id: workshopId })
    .orderBy('id')
    .forUpdate()
    .select<{ id: string; title: string }[]>('id', 'title');
  const roles = await trx<RoleRow>('notebook_roles')
    .whereIn(
      'notebook_id',
      notebooks.map(({ id }) => id),
    )
    .orderBy(['notebook_id', 'user_id'])
    .forUpdate()
    .select('notebook_id', 'user_id', 'role');
  return notebooks.flatMap(({ id, title }) => {
    const here = roles.filter((row) => row.notebook_id === id);
    const own = here.find((row) => row.user_id === userId);
    if (own === undefined) return [];
    const owners = here.filter((row) => row.role === 'owner');
    const onlyOwner = own.role === 'owner' && owners.length === 1;
    return [{ notebookId: id, title, role: own.role, onlyOwner }];
  });
}
