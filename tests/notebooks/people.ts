import { randomUUID } from 'node:crypto';
import { database } from '@/db/client';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { insertUser } from '@/db/queries/users';
import { insertMembership, insertWorkshop } from '@/db/queries/workshops';
import type { Person } from '@/lib/accounts';
import { createNotebook } from '@/lib/notebooks';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';

/** A person with a workshop of their own, straight in the database. */
export async function newPerson(name: string): Promise<Person> {
  const db = database();
  const email = `${randomUUID()}@yard.example`;
  const id = await insertUser(db, { email, name, passwordHash: 'none' });
  const workshopId = await insertWorkshop(db, { name: `${name}’s yard` });
  await insertMembership(db, workshopId, id, 'admin');
  return { id, name, email };
}

export const dimension = (id: string, source: string): NotebookCell => ({
  id,
  kind: 'dimension',
  source,
});

export const contentOf = (...cells: NotebookCell[]): NotebookContent => ({
  format: 1,
  settings: { digits: 30, unit: 'mm', step: null, rounding: 'half-even' },
  cells,
});

/** A notebook of the owner's on which the others are editors. */
export async function newNotebook(
  owner: Person,
  content: NotebookContent,
  editors: readonly Person[] = [],
): Promise<string> {
  const { id } = await createNotebook(owner, { title: 'Window', content });
  for (const editor of editors) await putNotebookRole(database(), id, editor.id, 'editor');
  return id;
}
