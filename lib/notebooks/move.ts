import { z } from 'zod';
import { inTransaction } from '@/db/client';
import { moveNotebook as putInWorkshop } from '@/db/queries/notebooks';
import { Failure } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { holdFor } from './guard';
import { workshopFor } from './workshop-guard';

export const MoveRequest = z.strictObject({
  workshopId: z.string({ error: 'The workshop is not given by its id.' }),
});
export type MoveRequest = z.infer<typeof MoveRequest>;

/**
 * Moves a notebook to another workshop. Everybody keeps their role; from then on that workshop's title block and rules
 * of issuing hold, and its admins read what is done. Revisions stay as they were issued. A template is one of its
 * workshop, so it is none where it comes to.
 * @throws Failure `not-found` for a workshop the person does not belong to, `invalid` for the one it is in, `archived`
 */
export async function moveNotebook(
  person: Person,
  id: string,
  { workshopId }: MoveRequest,
): Promise<void> {
  await inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'notebook.move', id);
    const target = await workshopFor(trx, person, 'notebooks.create', workshopId);
    if (target.id === notebook.workshop.id) {
      throw new Failure('invalid', `The notebook is in “${target.name}” already.`);
    }
    if (notebook.archivedAt !== null) {
      throw new Failure(
        'archived',
        'This notebook is archived, so it was not moved. An owner can bring it back.',
      );
    }
    await putInWorkshop(trx, id, target.id);
    const details = { from: notebook.workshop.id, to: target.id };
    // The admins of both workshops read of it.
    for (const at of [notebook.workshop.id, target.id]) {
      const deed = 'notebook.moved';
      const about = { by: person.id, notebookId: id, subject: notebook.title, details };
      await record(trx, { ...about, deed, workshopId: at });
    }
  });
}
