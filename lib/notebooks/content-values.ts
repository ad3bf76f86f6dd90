import type { CellSettings, NotebookSettings } from './content';

/**
 * Plain values about a notebook's content, without the schema that checks it: a browser needs these at once and the
 * schema only where a draft is read.
 */
export const CONTENT_LIMITS = {
  /** Cells in a notebook. */
  cells: 2_000,
  /** UTF-16 units of one cell's source. */
  source: 20_000,
  /** UTF-16 units of all sources together. */
  total: 1_000_000,
  /** UTF-16 units of a cell's id. */
  cellId: 40,
  /** Significant digits a notebook may ask its decimals to have. */
  digits: 1000,
  /** UTF-16 units of a cutting step such as `0.5 mm`. */
  step: 40,
  /** UTF-16 units of the heading of a section. */
  heading: 200,
} as const;

/** The settings of a notebook nobody has set yet (the defaults of the result schema). */
export const DEFAULT_NOTEBOOK_SETTINGS: NotebookSettings = {
  digits: 30,
  unit: 'mm',
  step: null,
  rounding: 'half-even',
};

const SETTING_NAMES = ['digits', 'unit', 'step', 'rounding'] as const;

/** The `settings` of a cell in their fixed order, or no such field where they set nothing. */
export function settingsField(settings: CellSettings | undefined): { settings?: CellSettings } {
  const set = SETTING_NAMES.filter((name) => settings?.[name] !== undefined);
  if (settings === undefined || set.length === 0) return {};
  return { settings: Object.fromEntries(set.map((name) => [name, settings[name]])) };
}
