import { z } from 'zod';
import { CONTENT_LIMITS, DEFAULT_NOTEBOOK_SETTINGS, settingsField } from './content-values';

/**
 * What one version of a notebook holds. The same schema checks a save, a draft kept by the browser
 * and a seed; it is strict, so that a field nobody knows is refused instead of silently lost.
 */
const plural = (n: number, one: string) => `${n} ${one}${n === 1 ? '' : 's'}`;

export const NotebookSettings = z.strictObject({
  digits: z
    .int({ error: 'The number of digits must be a whole number.' })
    .min(1, { error: 'The number of digits must be at least 1.' })
    .max(CONTENT_LIMITS.digits, {
      error: `The number of digits can be at most ${CONTENT_LIMITS.digits}.`,
    }),
  unit: z.enum(['mm', 'cm', 'm', 'in', 'ft'], {
    error: 'The unit must be one of mm, cm, m, in, ft.',
  }),
  step: z
    .string()
    .trim()
    .min(1, {
      error: 'The cutting step is empty; write a length such as 0.5 mm, or null for none.',
    })
    .max(CONTENT_LIMITS.step, {
      error: `The cutting step is longer than ${CONTENT_LIMITS.step} characters.`,
    })
    .nullable(),
  rounding: z.enum(['half-even', 'half-up', 'up', 'down'], {
    error: 'The rounding must be one of half-even, half-up, up, down.',
  }),
});
export type NotebookSettings = z.infer<typeof NotebookSettings>;

/**
 * What one dimension cell is given in instead of the notebook's settings; what is left out follows
 * the notebook. A step of null asks for no cut size there.
 */
export const CellSettings = NotebookSettings.partial();
export type CellSettings = z.infer<typeof CellSettings>;

const CELL_KINDS = ['dimension', 'note', 'section'] as const;

const CellFields = z.strictObject({
  id: z
    .string()
    .regex(/^[A-Za-z0-9_-]+$/, {
      error: 'A cell id is made of letters, digits, hyphens and underscores.',
    })
    .max(CONTENT_LIMITS.cellId, {
      error: `A cell id is at most ${CONTENT_LIMITS.cellId} characters long.`,
    }),
  kind: z.enum(CELL_KINDS, { error: 'The kind of a cell is dimension, note or section.' }),
  source: z
    .string()
    .max(CONTENT_LIMITS.source, {
      error: (issue) =>
        `The source of a cell is ${plural((issue.input as string).length, 'character')} long; ` +
        `at most ${CONTENT_LIMITS.source} are allowed.`,
    })
    // A lone surrogate has no UTF-8 and so cannot be stored as it is.
    .regex(/^\P{Cs}*$/u, {
      error: (issue) => {
        const place = (issue.input as string).search(/\p{Cs}/u) + 1;
        return `The source of a cell has half of a character at place ${place}; delete it and type it anew.`;
      },
    }),
  settings: CellSettings.optional(),
});

/** A cell. The source of a section is its heading: one line, and it reaches to the next section. */
export const NotebookCell = CellFields.superRefine(({ kind, source, settings }, context) => {
  const refuse = (path: string, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  if (settings !== undefined && kind !== 'dimension') {
    refuse('settings', `A ${kind} has settings of its own; only a dimension cell can have them.`);
  }
  if (kind !== 'section') return;
  if (/[\r\n]/.test(source)) {
    refuse('source', 'The heading of a section has several lines; one line was expected.');
  }
  if (source.length > CONTENT_LIMITS.heading) {
    refuse(
      'source',
      `The heading of a section is ${source.length} characters long; ` +
        `at most ${CONTENT_LIMITS.heading} are allowed.`,
    );
  }
});
export type NotebookCell = z.infer<typeof NotebookCell>;

export const NotebookContent = z
  .strictObject({
    format: z.literal(1, { error: 'The format of the content must be 1.' }),
    settings: NotebookSettings,
    cells: z.array(NotebookCell).max(CONTENT_LIMITS.cells, {
      error: (issue) =>
        `The notebook has ${plural((issue.input as unknown[]).length, 'cell')}; ` +
        `at most ${CONTENT_LIMITS.cells} are allowed.`,
    }),
  })
  .superRefine((content, context) => {
    const seen = new Set<string>();
    content.cells.forEach((cell, index) => {
      if (seen.has(cell.id)) {
        context.addIssue({
          code: 'custom',
          path: ['cells', index, 'id'],
          message: `Two cells have the id “${cell.id}”; every cell needs its own.`,
        });
      }
      seen.add(cell.id);
    });
    const total = content.cells.reduce((sum, cell) => sum + cell.source.length, 0);
    if (total > CONTENT_LIMITS.total) {
      context.addIssue({
        code: 'custom',
        path: ['cells'],
        message:
          `The sources of all cells together are ${total} characters long; ` +
          `at most ${CONTENT_LIMITS.total} are allowed.`,
      });
    }
  });
export type NotebookContent = z.infer<typeof NotebookContent>;

/** A fresh notebook: default settings and no cells. */
export function emptyContent(): NotebookContent {
  return { format: 1, settings: { ...DEFAULT_NOTEBOOK_SETTINGS }, cells: [] };
}

/**
 * The same content with its fields in one fixed order, so that equal contents have equal JSON and
 * equal hashes whatever order a client sent the fields in. What a cell leaves out stays out, so that
 * content of before a field was known keeps its hash; settings that set nothing are left out too.
 */
export function canonicalContent(content: NotebookContent): NotebookContent {
  const { digits, unit, step, rounding } = content.settings;
  return {
    format: content.format,
    settings: { digits, unit, step, rounding },
    cells: content.cells.map(({ id, kind, source, settings }) => ({
      id,
      kind,
      source,
      ...settingsField(settings),
    })),
  };
}
