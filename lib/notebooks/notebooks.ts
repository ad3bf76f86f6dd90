import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import {
  insertNotebook,
  listNotebooksOf,
  renameNotebook,
  setArchived,
  type Notebook,
} from '@/db/queries/notebooks';
import { putSearchTitle } from '@/db/queries/notebook-search';
import { insertVersion, type Version } from '@/db/queries/versions';
import { findWorkshopRole, listWorkshopsOf } from '@/db/queries/workshops';
import { Failure, type Role } from '@/lib/access';
import { isId, oneLine, type Person } from '@/lib/accounts';
import { canonicalContent, emptyContent } from './content';
import { holdFor, openFor } from './guard';
import { SavableContent } from './savable';
import { titleBlockIn } from './title-block';
import { keepSearchable } from './search-text';
import type { NotebookHead, NotebookLine, OpenNotebook } from './types';
import { contentOf, getVersion } from './versions';

const Title = oneLine('The title', 200);

export const NewNotebook = z.strictObject({
  title: Title,
  workshopId: z.string({ error: 'The workshop is not given by its id.' }).optional(),
  content: SavableContent.optional(),
});
export type NewNotebook = z.infer<typeof NewNotebook>;

export const NotebookChange = z
  .strictObject({ title: Title.optional(), archived: z.boolean().optional() })
  .refine((change) => change.title !== undefined || change.archived !== undefined, {
    error: 'Nothing to change is given; expected a title, archived, or both.',
  });
export type NotebookChange = z.infer<typeof NotebookChange>;

/** The notebooks on which the person has a role, last changed first; archived ones only when asked for. */
export async function listNotebooks(
  person: Person,
  { archived = false }: { archived?: boolean } = {},
): Promise<NotebookLine[]> {
  const entries = await listNotebooksOf(database(), person.id, { archived });
  return entries.map((entry) => ({
    id: entry.id,
    title: entry.title,
    workshop: entry.workshop,
    role: entry.role,
    version: entry.head,
    changedAt: (entry.savedAt ?? entry.changedAt).toISOString(),
    changedBy: entry.savedBy ?? '',
    archivedAt: entry.archivedAt?.toISOString() ?? null,
  }));
}

/**
 * Makes a notebook with its first version, in the given workshop or in the person's oldest one; the
 * person becomes its owner.
 * @throws Failure `not-found` for a workshop the person does not belong to, `invalid` for none at all
 */
export async function createNotebook(
  person: Person,
  { title, workshopId, content = emptyContent() }: NewNotebook,
): Promise<{ id: string }> {
  return inTransaction(async (trx) => {
    const workshop = workshopId ?? (await listWorkshopsOf(trx, person.id))[0]?.id;
    if (workshop === undefined) {
      throw new Failure('invalid', 'You belong to no workshop, and a notebook needs one.');
    }
    if (!isId(workshop) || (await findWorkshopRole(trx, workshop, person.id)) === null) {
      throw new Failure('not-found', 'There is no such workshop, or you do not belong to it.');
    }
    const id = await insertNotebook(trx, { workshopId: workshop, title });
    await putNotebookRole(trx, id, person.id, 'owner');
    const first = canonicalContent(content);
    await insertVersion(trx, { notebookId: id, number: 1, authorId: person.id, content: first });
    await keepSearchable(trx, { id, title, version: 1 }, first);
    return { id };
  });
}

/** The notebook as it was last saved. */
export async function readNotebook(person: Person, id: string): Promise<OpenNotebook> {
  const { notebook, role } = await openFor(person, 'notebook.read', id);
  const version = await getVersion(database(), id, notebook.head);
  return { notebook: headOf(notebook, role, version), content: contentOf(version) };
}

/** Renames, archives or brings back. The whole change or nothing of it. */
export async function changeNotebook(
  person: Person,
  id: string,
  { title, archived }: NotebookChange,
): Promise<void> {
  await inTransaction(async (trx) => {
    if (title !== undefined) {
      await holdFor(trx, person, 'notebook.rename', id);
      await renameNotebook(trx, id, title);
      await putSearchTitle(trx, id, title);
    }
    if (archived !== undefined) {
      const { notebook } = await holdFor(trx, person, 'notebook.archive', id);
      if ((notebook.archivedAt !== null) !== archived) await setArchived(trx, id, archived);
    }
  });
}

function headOf(notebook: Notebook, role: Role, version: Version): NotebookHead {
  const { entries, block } = titleBlockIn(notebook, version.author.name);
  return {
    id: notebook.id,
    title: notebook.title,
    workshop: notebook.workshop,
    role,
    archivedAt: notebook.archivedAt?.toISOString() ?? null,
    version: version.number,
    savedAt: version.savedAt.toISOString(),
    savedBy: version.author.name,
    titleEntries: entries,
    titleBlock: block,
  };
}
