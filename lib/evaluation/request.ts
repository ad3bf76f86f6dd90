import { z } from 'zod';
import { LENGTH_UNITS, ROUNDINGS, readStep } from '@/lib/language/settings';
import { EVALUATION_LIMITS } from './limits';

const step = z
  .string()
  .nullable()
  .superRefine((text, context) => {
    const reading = text === null ? null : readStep(text);
    if (reading?.kind === 'problem') context.addIssue({ code: 'custom', message: reading.message });
  });

/** Settings of an evaluation, each with its default when it is left out. */
export const SettingsRequest = z.strictObject({
  digits: z.int().min(1).optional(),
  unit: z.enum(LENGTH_UNITS).optional(),
  step: step.optional(),
  rounding: z.enum(ROUNDINGS).optional(),
});

const source = z.string().max(EVALUATION_LIMITS.sourceLength);

const cellId = z.string().max(200);

const CellRequest = z.strictObject({
  id: cellId,
  source,
  /** What is left out is as for all cells. */
  settings: SettingsRequest.optional(),
});

/** What can be asked: one expression, or cells that share marks. */
export const EvaluateRequest = z
  .strictObject({
    id: z.union([z.string().max(1_000), z.number()]).optional(),
    expression: source.optional(),
    cells: z.array(CellRequest).max(EVALUATION_LIMITS.cells).optional(),
    settings: SettingsRequest.optional(),
    /** Digests of earlier answers by the ids of their cells: cells that still have the same answer are left out. */
    have: z.record(cellId, z.string().max(40)).optional(),
  })
  .superRefine((request, context) => {
    if ((request.expression === undefined) === (request.cells === undefined)) {
      context.addIssue({
        code: 'custom',
        message: 'Either `expression` or `cells` was expected, and not both.',
      });
    }
    const had = Object.keys(request.have ?? {}).length;
    if (had > EVALUATION_LIMITS.cells) {
      const message = `There are digests of ${had} cells; the limit is ${EVALUATION_LIMITS.cells}.`;
      context.addIssue({ code: 'custom', path: ['have'], message });
    }
    const total = (request.cells ?? []).reduce((sum, cell) => sum + cell.source.length, 0);
    if (total > EVALUATION_LIMITS.totalLength) {
      const message = `The cells have ${total} characters together; the limit is ${EVALUATION_LIMITS.totalLength}.`;
      context.addIssue({ code: 'custom', path: ['cells'], message });
    }
  });

export type EvaluateRequest = z.infer<typeof EvaluateRequest>;

/** The first thing that is wrong with a request, in one sentence that names the place. */
export function describeIssues(error: z.ZodError): string {
  const [issue] = error.issues;
  if (issue === undefined) return 'The request cannot be read.';
  const place = issue.path.map(String).join('.');
  return place === '' ? issue.message : `${place}: ${issue.message}`;
}
