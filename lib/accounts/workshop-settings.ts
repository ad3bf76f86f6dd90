import { z } from 'zod';

/** Tolerance classes of ISO 2768-1 for linear dimensions: fine, medium, coarse, very coarse. */
export const TOLERANCE_CLASSES = ['f', 'm', 'c', 'v'] as const;
export type ToleranceClass = (typeof TOLERANCE_CLASSES)[number];

const shortText = z.string().trim().max(120).default('');

/**
 * What a workshop decides for its notebooks. Stored as JSON; whatever an older row leaves out has
 * the value given here, so `{}` is a workshop that has decided nothing yet.
 */
export const WorkshopSettings = z.strictObject({
  /** What new notebooks start from. */
  start: z
    .strictObject({
      unit: z.enum(['mm', 'cm', 'm', 'in', 'ft']).default('mm'),
      step: z.string().trim().min(1).max(40).nullable().default(null),
      digits: z.int().min(1).max(1000).default(30),
      rounding: z.enum(['half-even', 'half-up', 'up', 'down']).default('half-even'),
      toleranceClass: z.enum(TOLERANCE_CLASSES).nullable().default(null),
    })
    .prefault({}),
  issuing: z
    .strictObject({
      /** Whether editors may issue revisions, or owners alone. */
      editorsIssue: z.boolean().default(false),
      /** Whether a version must have been checked by somebody other than its author. */
      checkNeeded: z.boolean().default(false),
    })
    .prefault({}),
  /** Fields of the title block after ISO 7200 that are the same on every sheet of the workshop. */
  titleBlock: z
    .strictObject({
      /** Empty: the name of the workshop. */
      legalOwner: shortText,
      /** Put before a notebook's identification number, such as `FY-`. */
      identificationPrefix: z.string().trim().max(20).default(''),
      approvalPerson: shortText,
    })
    .prefault({}),
});
export type WorkshopSettings = z.infer<typeof WorkshopSettings>;

/** The settings as stored, with what is left out filled in. */
export function readWorkshopSettings(stored: unknown): WorkshopSettings {
  return WorkshopSettings.parse(stored);
}
