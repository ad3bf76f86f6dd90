import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import { findNotebook } from '@/db/queries/notebooks';
import { listTemplates, setTemplate } from '@/db/queries/templates';
import { listWorkshopsOf } from '@/db/queries/workshops';
import { Failure, canInWorkshop } from '@/lib/access';
import { isId, type Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { copyOf } from './copies';
import { holdFor } from './guard';
import { Title } from './title';
import type { TemplateLine } from './types';
import { workshopFor } from './workshop-guard';

export const TemplateChange = z.strictObject({ template: z.boolean() });

export const FromTemplate = z.strictObject({
  title: Title,
  workshopId: z.string({ error: 'The workshop is not given by its id.' }).optional(),
});
export type FromTemplate = z.infer<typeof FromTemplate>;

/**
 * Makes a notebook a template of its workshop, or no longer one: every member may then begin notebooks with its newest
 * version, and reads nothing else of it.
 * @throws Failure `archived` for making a template of an archived notebook
 */
export async function changeTemplate(
  person: Person,
  id: string,
  { template }: z.infer<typeof TemplateChange>,
): Promise<void> {
  await inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'notebook.template', id);
    if (template && notebook.archivedAt !== null) {
      throw new Failure(
        'archived',
        'This notebook is archived, so it cannot become a template. An owner can bring it back.',
      );
    }
    if ((notebook.templateSince !== null) === template) return;
    await setTemplate(trx, id, template);
    await record(trx, {
      deed: 'notebook.template',
      by: person.id,
      workshopId: notebook.workshop.id,
      notebookId: id,
      subject: notebook.title,
      details: { template },
    });
  });
}

/** The templates of all workshops the person belongs to, by workshop and title; archived ones left out. */
export async function templatesFor(person: Person): Promise<TemplateLine[]> {
  const workshops = await listWorkshopsOf(database(), person.id);
  const actor = { kind: 'person', id: person.id } as const;
  const mine = workshops.filter(({ id, role }) =>
    canInWorkshop(actor, 'templates.list', { id, members: new Map([[person.id, role]]) }),
  );
  const templates = await listTemplates(
    database(),
    mine.map(({ id }) => id),
  );
  return templates.map(({ changedAt, ...rest }) => ({
    ...rest,
    changedAt: changedAt.toISOString(),
  }));
}

/**
 * Makes a notebook of the person's own with the newest content of a template, by default in the template's workshop.
 * @throws Failure `not-found` for what is no template of a workshop of the person's, alike for what is no notebook
 */
export async function makeFromTemplate(
  person: Person,
  templateId: string,
  { title, workshopId }: FromTemplate,
): Promise<{ id: string }> {
  return inTransaction(async (trx) => {
    const notebook = isId(templateId) ? await findNotebook(trx, templateId) : null;
    if (notebook === null || notebook.templateSince === null || notebook.archivedAt !== null)
      throw unknownTemplate();
    try {
      await workshopFor(trx, person, 'templates.list', notebook.workshop.id);
    } catch (refused) {
      throw refused instanceof Failure ? unknownTemplate() : refused;
    }
    return copyOf(trx, person, {
      notebook,
      version: notebook.head,
      title,
      workshopId: workshopId ?? notebook.workshop.id,
      deed: 'notebook.made',
      note: `from the template “${notebook.title}”`,
    });
  });
}

const unknownTemplate = () =>
  new Failure('not-found', 'There is no such template in a workshop of yours.');
