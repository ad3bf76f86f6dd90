import { z } from 'zod';
import { inTransaction } from '@/db/client';
import { putTitleBlock, type Notebook } from '@/db/queries/notebooks';
import { Failure } from '@/lib/access';
import {
  TOLERANCE_CLASSES,
  readWorkshopSettings,
  type Logo,
  type Person,
  type WorkshopSettings,
} from '@/lib/accounts';
import { record } from '@/lib/activity';
import { holdFor } from './guard';

const field = (max: number) =>
  z
    .string()
    .trim()
    .max(max)
    .regex(/^[^\p{Cc}\p{Cs}]*$/u, { error: 'It contains characters that cannot be printed.' })
    .default('');

/** What a notebook says of itself in the title block; empty fields follow the workshop. */
export const TitleBlockEntries = z.strictObject({
  identificationNumber: field(40),
  supplementaryTitle: field(200),
  creator: field(120),
  approvalPerson: field(120),
  /** Such as `1 of 3`. */
  sheet: field(20),
  toleranceClass: z.enum(TOLERANCE_CLASSES).nullable().default(null),
});
export type TitleBlockEntries = z.infer<typeof TitleBlockEntries>;

/** The data fields of a title block after ISO 7200, ready to be shown; kept with an issued revision. */
export interface TitleBlock {
  legalOwner: string;
  identificationNumber: string;
  title: string;
  supplementaryTitle: string;
  creator: string;
  approvalPerson: string;
  sheet: string;
  toleranceClass: TitleBlockEntries['toleranceClass'];
  logo: Logo | null;
}

interface Facts {
  notebook: { id: string; title: string };
  workshop: { name: string; settings: WorkshopSettings };
  entries: TitleBlockEntries;
  /** Whoever saved the version that is shown. */
  author: string;
}

/** How much of a notebook's id tells sheets apart by eye where no number was given. */
const SHORT_ID = 8;

/** The title block of one sheet: the notebook's own entries, then the workshop's, then what is known anyway. */
export function titleBlockOf({ notebook, workshop, entries, author }: Facts): TitleBlock {
  const { titleBlock, start } = workshop.settings;
  const number = entries.identificationNumber || notebook.id.slice(0, SHORT_ID);
  return {
    legalOwner: titleBlock.legalOwner || workshop.name,
    identificationNumber: `${titleBlock.identificationPrefix}${number}`,
    title: notebook.title,
    supplementaryTitle: entries.supplementaryTitle,
    creator: entries.creator || author,
    approvalPerson: entries.approvalPerson || titleBlock.approvalPerson,
    sheet: entries.sheet || '1',
    toleranceClass: entries.toleranceClass ?? start.toleranceClass,
    logo: titleBlock.logo,
  };
}

/** The notebook's own entries, and the title block that follows from them for a version of `author`. */
export function titleBlockIn(
  notebook: Notebook,
  author: string,
): { entries: TitleBlockEntries; block: TitleBlock } {
  const entries = TitleBlockEntries.parse(notebook.titleBlock);
  const settings = readWorkshopSettings(notebook.workshopSettings);
  const workshop = { name: notebook.workshop.name, settings };
  return { entries, block: titleBlockOf({ notebook, workshop, entries, author }) };
}

/**
 * Fills in the notebook's own entries, all of them at once; what is left out becomes empty.
 * @throws Failure `archived`
 */
export async function changeTitleBlock(
  person: Person,
  id: string,
  entries: TitleBlockEntries,
): Promise<void> {
  await inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'titleBlock.change', id);
    if (notebook.archivedAt !== null) {
      throw new Failure(
        'archived',
        'This notebook is archived, so its title block stays as it is. An owner can bring it back.',
      );
    }
    await putTitleBlock(trx, id, entries);
    await record(trx, {
      deed: 'titleBlock.changed',
      by: person.id,
      workshopId: notebook.workshop.id,
      notebookId: id,
      subject: notebook.title,
    });
  });
}
