/** How much a visitor without an account may put into the live cell of the front page. */
export const TRIAL_LIMITS = {
  /** Lines, blank ones and remarks included. */
  lines: 8,
  /** UTF-16 units of all lines together. */
  length: 400,
  /** Trials evaluated at once by one instance: visitors never take all children from those at work. */
  atOnce: 2,
} as const;

/** The settings of the live cell: those of a mason's sheet. */
export const TRIAL_SETTINGS = {
  digits: 30,
  unit: 'mm',
  step: '0.5 mm',
  rounding: 'half-even',
} as const;
