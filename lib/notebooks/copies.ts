import type { Knex } from 'knex';
import { z } from 'zod';
import { inTransaction } from '@/db/client';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { insertNotebook, putTitleBlock, type Notebook } from '@/db/queries/notebooks';
import { insertVersion } from '@/db/queries/versions';
import { findWorkshopRole, listWorkshopsOf } from '@/db/queries/workshops';
import { Failure } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { record, type Deed } from '@/lib/activity';
import { canonicalContent } from './content';
import { openFor } from './guard';
import { keepSearchable } from './search-text';
import { Title } from './title';
import { TitleBlockEntries } from './title-block';
import { contentOf, getVersion } from './versions';
import { workshopFor } from './workshop-guard';

export const DuplicateRequest = z.strictObject({
  title: Title.optional(),
  workshopId: z.string({ error: 'The workshop is not given by its id.' }).optional(),
  /** The newest when left out. */
  version: z.int({ error: 'The version is a whole number.' }).min(1).optional(),
});
export type DuplicateRequest = z.infer<typeof DuplicateRequest>;

/**
 * Makes a notebook of the person's own with the content of one version of another, archived or not. Comments, people,
 * links, revisions and earlier versions stay behind. Without a workshop it is made where the other one is, if the person
 * belongs there, else in the person's oldest workshop.
 * @throws Failure `not-found` for an unknown notebook, version or workshop, `invalid` for somebody without a workshop
 */
export async function duplicateNotebook(
  person: Person,
  id: string,
  { title, workshopId, version }: DuplicateRequest,
): Promise<{ id: string }> {
  return inTransaction(async (trx) => {
    const { notebook } = await openFor(person, 'notebook.duplicate', id, trx);
    return copyOf(trx, person, {
      notebook,
      version: version ?? notebook.head,
      title: title ?? copyTitle(notebook.title),
      workshopId: workshopId ?? (await homeFor(trx, person, notebook.workshop.id)),
      deed: 'notebook.duplicated',
      note: `copied from “${notebook.title}”`,
    });
  });
}

const TITLE = 200;

/** `Copy of …`, cut to what a title may have. */
const copyTitle = (title: string) => `Copy of ${title}`.slice(0, TITLE).replace(/\p{Cs}$/u, '');

async function homeFor(trx: Knex.Transaction, person: Person, workshopId: string): Promise<string> {
  if ((await findWorkshopRole(trx, workshopId, person.id)) !== null) return workshopId;
  const [oldest] = await listWorkshopsOf(trx, person.id);
  if (oldest === undefined) {
    throw new Failure('invalid', 'You belong to no workshop, and a notebook needs one.');
  }
  return oldest.id;
}

interface Copy {
  notebook: Notebook;
  version: number;
  title: string;
  workshopId: string;
  deed: Deed;
  note: string;
}

/** Makes the copy; whoever may read the original has been found out. */
export async function copyOf(
  trx: Knex.Transaction,
  person: Person,
  { notebook, version, title, workshopId, deed, note }: Copy,
): Promise<{ id: string }> {
  const workshop = await workshopFor(trx, person, 'notebooks.create', workshopId);
  const original = await getVersion(trx, notebook.id, version);
  const content = canonicalContent(contentOf(original));
  const origin = { id: notebook.id, version };
  const id = await insertNotebook(trx, { workshopId: workshop.id, title, origin });
  await putNotebookRole(trx, id, person.id, 'owner');
  await putTitleBlock(trx, id, entriesForCopy(notebook));
  await insertVersion(trx, {
    notebookId: id,
    number: 1,
    authorId: person.id,
    content,
    note: `${note}, version ${version}`,
  });
  await keepSearchable(trx, { id, title, version: 1 }, content);
  await record(trx, {
    deed,
    by: person.id,
    workshopId: workshop.id,
    notebookId: id,
    subject: title,
    details: { from: notebook.id, version },
  });
  return { id };
}

/** What describes the work goes along; what tells one sheet from another, and who answers for it, does not. */
function entriesForCopy(notebook: Notebook): TitleBlockEntries {
  const { supplementaryTitle, toleranceClass } = TitleBlockEntries.parse(notebook.titleBlock);
  return TitleBlockEntries.parse({ supplementaryTitle, toleranceClass });
}
