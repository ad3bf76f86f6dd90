import { randomUUID } from 'node:crypto';
import { database } from '@/db/client';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { insertNotebook } from '@/db/queries/notebooks';
import { insertUser } from '@/db/queries/users';
import { insertVersion } from '@/db/queries/versions';
import { insertWorkshop } from '@/db/queries/workshops';
import type { Person } from '@/lib/accounts';
import { canonicalContent, type NotebookContent } from '@/lib/notebooks/content';

export interface Scene {
  notebook: string;
  workshop: string;
  owner: Person;
  editor: Person;
  viewer: Person;
  stranger: Person;
}

export async function newPerson(name: string): Promise<Person> {
  const email = `${name.toLowerCase()}.${randomUUID()}@quarrymoor.example`;
  const id = await insertUser(database(), { email, name, passwordHash: 'none' });
  return { id, name, email };
}

/** One dimension cell for each source. */
export const contentOf = (...sources: string[]): NotebookContent => ({
  format: 1,
  settings: { digits: 12, unit: 'mm', step: '0.5 mm', rounding: 'half-even' },
  cells: sources.map((source, index) => ({ id: `c${index + 1}`, kind: 'dimension', source })),
});

/** A notebook whose first version is by its owner, with a person in each role and one in none. */
export async function newScene(
  sources: string[] = ['R = 1200 mm', 's = R sqrt(2)'],
  settings: Record<string, unknown> = {},
): Promise<Scene> {
  const [owner, editor, viewer, stranger] = await Promise.all([
    newPerson('Owain'),
    newPerson('Edda'),
    newPerson('Vigo'),
    newPerson('Strand'),
  ]);
  const db = database();
  const workshop = await insertWorkshop(db, { name: 'Quarrymoor Yard', defaults: settings });
  const notebook = await insertNotebook(db, { workshopId: workshop, title: 'Rose window' });
  await putNotebookRole(db, notebook, owner.id, 'owner');
  await putNotebookRole(db, notebook, editor.id, 'editor');
  await putNotebookRole(db, notebook, viewer.id, 'viewer');
  const scene = { notebook, workshop, owner, editor, viewer, stranger };
  await addVersion(scene, 1, owner, contentOf(...sources));
  return scene;
}

export async function addVersion(
  { notebook }: Scene,
  number: number,
  author: Person,
  content: NotebookContent,
): Promise<void> {
  await database().transaction((trx) =>
    insertVersion(trx, {
      notebookId: notebook,
      number,
      authorId: author.id,
      content: canonicalContent(content),
    }),
  );
}
