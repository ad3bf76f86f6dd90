import { z } from 'zod';
import { TOLERANCE_CLASSES, type WorkshopSettings } from '@/lib/accounts';

const field = (max: number) => z.string().trim().max(max).default('');

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
  };
}
