import { randomUUID } from 'node:crypto';
import { database } from '@/db/client';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { insertUser } from '@/db/queries/users';
import { insertMembership, insertWorkshop } from '@/db/queries/workshops';
import type { Role } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { createNotebook } from '@/lib/notebooks';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';

/** Somebody with an account and nothing else. */
export async function newPerson(name = 'Orla Tindle'): Promise<Person> {
  const email = `${randomUUID()}@yard.example`;
  return { id: await insertUser(database(), { email, name, passwordHash: 'none' }), name, email };
}

export async function newWorkshop(
  admin: Person,
  name = 'Thornscar Yard',
  ...members: Person[]
): Promise<string> {
  const id = await insertWorkshop(database(), { name });
  await insertMembership(database(), id, admin.id, 'admin');
  for (const member of members) await insertMembership(database(), id, member.id, 'member');
  return id;
}

/** Cells as `kind: source`; a text without a kind is a dimension cell. Their ids are c1, c2, … */
export function contentWith(...cells: string[]): NotebookContent {
  return {
    format: 1,
    settings: { digits: 30, unit: 'mm', step: null, rounding: 'half-even' },
    cells: cells.map((text, index): NotebookCell => {
      const [, kind = 'dimension', source = text] =
        /^(note|section): ([^]*)$/.exec(text) ?? ([] as string[]);
      return { id: `c${index + 1}`, kind: kind as NotebookCell['kind'], source };
    }),
  };
}

export async function newNotebook(
  owner: Person,
  workshopId: string,
  title: string,
  ...cells: string[]
): Promise<string> {
  const made = await createNotebook(owner, { title, workshopId, content: contentWith(...cells) });
  return made.id;
}

export const give = (notebookId: string, person: Person, role: Role) =>
  putNotebookRole(database(), notebookId, person.id, role);

/** A notebook with a person in each role, somebody of its workshop without one, and a stranger. */
export async function newCast(...cells: string[]) {
  const [owner, editor, viewer, member, stranger] = await Promise.all([
    newPerson('Ona Thorn'),
    newPerson('Edwy Carr'),
    newPerson('Vera Moss'),
    newPerson('Mab Ling'),
    newPerson('Stig Farr'),
  ]);
  const workshop = await newWorkshop(owner, 'Thornscar Yard', editor, viewer, member);
  const notebook = await newNotebook(owner, workshop, 'Rose window', ...cells);
  await give(notebook, editor, 'editor');
  await give(notebook, viewer, 'viewer');
  return { owner, editor, viewer, member, stranger, workshop, notebook };
}

/** The letters that wait for somebody, oldest first. */
export async function lettersTo(person: Person) {
  const rows = await database()('outgoing_mail')
    .where({ recipient: person.email })
    .orderBy('queued_at')
    .select<{ letter: string }[]>('letter');
  return rows.map(
    ({ letter }) =>
      JSON.parse(letter) as {
        subject: string;
        name: string;
        paragraphs: string[];
        action: { url: string };
      },
  );
}
