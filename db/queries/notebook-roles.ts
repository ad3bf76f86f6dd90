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
