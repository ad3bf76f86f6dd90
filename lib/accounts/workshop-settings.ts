import { z } from 'zod';

/** Tolerance classes of ISO 2768-1 for linear dimensions: fine, medium, coarse, very coarse. */
export const TOLERANCE_CLASSES = ['f', 'm', 'c', 'v'] as const;
export type ToleranceClass = (typeof TOLERANCE_CLASSES)[number];

const line = (max: number) =>
  z
    .string()
    .trim()
    .max(max)
    .regex(/^[^\p{Cc}\p{Cs}]*$/u, { error: 'It contains characters that cannot be printed.' })
    .default('');
const shortText = line(120);

/** The workshop's logo: the SHA-256 of the stored file, by which it is found, and its size in pixels. */
export const Logo = z.strictObject({
  hash: z.string().regex(/^[0-9a-f]{64}$/),
  width: z.int().min(1),
  height: z.int().min(1),
});
export type Logo = z.infer<typeof Logo>;

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
      identificationPrefix: line(20),
      approvalPerson: shortText,
      logo: Logo.nullable().default(null),
    })
    .prefault({}),
});
export type WorkshopSettings = z.infer<typeof WorkshopSettings>;

/** The settings as stored, with what is left out filled in. */
export function readWorkshopSettings(stored: unknown): WorkshopSettings {
  return WorkshopSettings.parse(stored);
}
