import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { insertNotebook, renameNotebook, setArchived, type Notebook } from '@/db/queries/notebooks';
import { putSearchTitle } from '@/db/queries/notebook-search';
import { insertVersion, type Version } from '@/db/queries/versions';
import { findWorkshop, holdWorkshopRole, listWorkshopsOf } from '@/db/queries/workshops';
import { Failure, can, demandInWorkshop, type Role } from '@/lib/access';
import { isId, readWorkshopSettings, type Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { canonicalContent, emptyContent, type NotebookContent } from './content';
import { guardedBy, holdFor, openFor } from './guard';
import { SavableContent } from './savable';
import { Title } from './title';
import { titleBlockIn } from './title-block';
import { keepSearchable } from './search-text';
import type { NotebookHead, OpenNotebook } from './types';
import { contentOf, getVersion } from './versions';

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

/**
 * Makes a notebook with its first version, in the given workshop or in the person's oldest one; the
 * person becomes its owner. Without content it starts from the workshop's values.
 * @throws Failure `not-found` for a workshop the person does not belong to, `invalid` for none at all
 */
export async function createNotebook(
  person: Person,
  { title, workshopId, content }: NewNotebook,
): Promise<{ id: string }> {
  return inTransaction(async (trx) => {
    const workshop = workshopId ?? (await listWorkshopsOf(trx, person.id))[0]?.id;
    if (workshop === undefined) {
      throw new Failure('invalid', 'You belong to no workshop, and a notebook needs one.');
    }
    const role = isId(workshop) ? await holdWorkshopRole(trx, workshop, person.id) : null;
    const found = role === null ? null : await findWorkshop(trx, workshop);
    const members = new Map(role === null ? [] : [[person.id, role]]);
    const actor = { kind: 'person', id: person.id } as const;
    demandInWorkshop(actor, 'notebooks.create', found && { id: workshop, members });
    const id = await insertNotebook(trx, { workshopId: workshop, title });
    await putNotebookRole(trx, id, person.id, 'owner');
    const first = canonicalContent(content ?? startOf(found?.defaults));
    await insertVersion(trx, { notebookId: id, number: 1, authorId: person.id, content: first });
    await keepSearchable(trx, { id, title, version: 1 }, first);
    await record(trx, {
      deed: 'notebook.made',
      by: person.id,
      workshopId: workshop,
      notebookId: id,
      subject: title,
    });
    return { id };
  });
}

/** No cells yet, and the settings that new notebooks of the workshop start from. */
function startOf(workshopSettings: unknown): NotebookContent {
  const { digits, unit, step, rounding } = readWorkshopSettings(workshopSettings).start;
  return { ...emptyContent(), settings: { digits, unit, step, rounding } };
}

/** The notebook as it was last saved. */
export async function readNotebook(person: Person, id: string): Promise<OpenNotebook> {
  const { notebook, role } = await openFor(person, 'notebook.read', id);
  const version = await getVersion(database(), id, notebook.head);
  return { notebook: headOf(person, notebook, role, version), content: contentOf(version) };
}

/** Renames, archives or brings back. The whole change or nothing of it. @throws Failure `archived` */
export async function changeNotebook(
  person: Person,
  id: string,
  { title, archived }: NotebookChange,
): Promise<void> {
  const about = (notebook: Notebook) => ({
    by: person.id,
    workshopId: notebook.workshop.id,
    notebookId: id,
    subject: notebook.title,
  });
  await inTransaction(async (trx) => {
    if (title !== undefined) {
      const { notebook } = await holdFor(trx, person, 'notebook.rename', id);
      if (notebook.archivedAt !== null && archived !== false) {
        throw new Failure(
          'archived',
          'This notebook is archived, so it keeps its title. An owner can bring it back.',
        );
      }
      if (notebook.title !== title) {
        await renameNotebook(trx, id, title);
        await putSearchTitle(trx, id, title);
        const details = { from: notebook.title };
        await record(trx, {
          ...about(notebook),
          deed: 'notebook.renamed',
          subject: title,
          details,
        });
      }
    }
    if (archived !== undefined) {
      const { notebook } = await holdFor(trx, person, 'notebook.archive', id);
      if ((notebook.archivedAt !== null) !== archived) {
        await setArchived(trx, id, archived);
        const deed = archived ? 'notebook.archived' : 'notebook.brought-back';
        await record(trx, { ...about(notebook), deed });
      }
    }
  });
}

function headOf(person: Person, notebook: Notebook, role: Role, version: Version): NotebookHead {
  const actor = { kind: 'person', id: person.id } as const;
  const { entries, block } = titleBlockIn(notebook, version.author.name);
  return {
    id: notebook.id,
    title: notebook.title,
    workshop: notebook.workshop,
    role,
    mayIssue:
      notebook.archivedAt === null &&
      can(actor, 'revisions.issue', guardedBy(notebook, person, role)),
    archivedAt: notebook.archivedAt?.toISOString() ?? null,
    version: version.number,
    savedAt: version.savedAt.toISOString(),
    savedBy: version.author.name,
    byItself: version.byItself,
    titleEntries: entries,
    titleBlock: block,
  };
}
