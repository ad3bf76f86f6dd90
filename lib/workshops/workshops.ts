import { z } from 'zod';
import { inTransaction } from '@/db/client';
import { insertMembership, insertWorkshop, putWorkshop } from '@/db/queries/workshops';
import {
  LIMITS,
  WorkshopSettings,
  countAgainst,
  oneLine,
  readWorkshopSettings,
  type Person,
} from '@/lib/accounts';
import { record } from '@/lib/activity';
import { SettingsRequest } from '@/lib/evaluation';
import { holdWorkshop, openWorkshop } from './guard';
import type { WorkshopHead } from './types';

const WorkshopName = oneLine('The name of the workshop', 120);

export const NewWorkshop = z.strictObject({ name: WorkshopName });
export type NewWorkshop = z.infer<typeof NewWorkshop>;

const { start, issuing, titleBlock } = WorkshopSettings.shape;

/** A cutting step must be one that the language can read: new notebooks could not be evaluated with another. */
const Start = start.unwrap().superRefine(({ step }, context) => {
  for (const { message } of SettingsRequest.safeParse({ step }).error?.issues ?? []) {
    context.addIssue({ code: 'custom', path: ['step'], message });
  }
});

/** What is given of each group is the whole group; the logo has an address of its own. */
export const WorkshopChange = z
  .strictObject({
    name: WorkshopName.optional(),
    start: Start.optional(),
    issuing: issuing.unwrap().optional(),
    titleBlock: titleBlock.unwrap().omit({ logo: true }).optional(),
  })
  .refine((change) => Object.values(change).some((part) => part !== undefined), {
    error: 'Nothing to change is given; expected name, start, issuing or titleBlock.',
  });
export type WorkshopChange = z.infer<typeof WorkshopChange>;

/** @throws Failure `not-found` */
export async function readWorkshop(person: Person, id: string): Promise<WorkshopHead> {
  const { workshop, role } = await openWorkshop(person, 'workshop.read', id);
  const settings = readWorkshopSettings(workshop.defaults);
  return { id: workshop.id, name: workshop.name, settings, role };
}

/** Makes a further workshop, of which the person is the admin. @throws Failure `too-many` */
export async function makeWorkshop(person: Person, { name }: NewWorkshop): Promise<{ id: string }> {
  await countAgainst(LIMITS.makeWorkshop, person.id);
  return inTransaction(async (trx) => {
    const id = await insertWorkshop(trx, { name });
    await insertMembership(trx, id, person.id, 'admin');
    await record(trx, { deed: 'workshop.made', by: person.id, workshopId: id, subject: name });
    return { id };
  });
}

/** Changes name and settings, as far as they are given. @throws Failure `not-found`, `forbidden` */
export async function changeWorkshop(
  person: Person,
  id: string,
  change: WorkshopChange,
): Promise<void> {
  await inTransaction(async (trx) => {
    const { workshop } = await holdWorkshop(trx, person, 'workshop.change', id);
    const settings = readWorkshopSettings(workshop.defaults);
    const name = change.name ?? workshop.name;
    const defaults: WorkshopSettings = {
      start: change.start ?? settings.start,
      issuing: change.issuing ?? settings.issuing,
      titleBlock: { ...settings.titleBlock, ...change.titleBlock },
    };
    await putWorkshop(trx, { id, name, defaults });
    const parts = Object.keys(change).filter((part) => change[part as keyof WorkshopChange]);
    await record(trx, {
      deed: 'workshop.changed',
      by: person.id,
      workshopId: id,
      subject: name,
      details: { parts: parts.join(', ') },
    });
  });
}
