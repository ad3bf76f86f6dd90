import type { Num } from '../engine/index';

/**
 * Why a construction has no outcome, as data: no such point, line or circle exists, or the question does not fix one.
 * `gap` is the distance that is missed, above 0.
 */
export type None = { readonly kind: 'none' } & (
  | { readonly why: Plain }
  | { readonly why: 'parallel' | 'passes' | 'apart' | 'inside'; readonly gap: Num }
);

type Plain =
  | 'not-real'
  | 'no-line'
  | 'same-points'
  | 'no-radius'
  | 'in-line'
  | 'same-lines'
  | 'same-circles'
  | 'no-side'
  | 'two-meets'
  | 'equally-near';

export const none = (why: Plain): None => ({ kind: 'none', why });

export const isNone = (outcome: object): outcome is None =>
  'kind' in outcome && outcome.kind === 'none';

const SENTENCES: Readonly<Record<Plain, string>> = {
  'not-real': 'Coordinates, coefficients and radii are real numbers, and one of these is not.',
  'no-line':
    'In the equation a x + b y + c = 0 of a line a and b are not both 0, and here they are.',
  'same-points': 'Two different points were expected, and these two are the same point.',
  'no-radius': 'A radius above 0 was expected.',
  'in-line': 'A circle through three points needs a triangle, and these points lie in one line.',
  'same-lines': 'The two lines are one and the same, so they have no single point of meeting.',
  'same-circles': 'The two circles are one and the same, so they have no single point of meeting.',
  'no-side': 'An angle needs two sides, and one of these points lies at the vertex.',
  'two-meets':
    'They meet in two points: say which with a third argument, 1 for the left one (the lower one, if they stand one above the other), 2 for the other, or a point that it is nearest to.',
  'equally-near':
    'The two points of meeting are equally far from this point; a point nearer to one of them was expected.',
};

/** One plain sentence on what was met; `writeLength` gives a distance with its unit. */
export function explainNone(outcome: None, writeLength: (length: Num) => string): string {
  switch (outcome.why) {
    case 'parallel':
      return `The lines are parallel, ${writeLength(outcome.gap)} apart, so they do not meet.`;
    case 'passes':
      return `The line passes the circle at a distance of ${writeLength(outcome.gap)}, so they do not meet.`;
    case 'apart':
      return `The circles lie apart by ${writeLength(outcome.gap)}, so they do not meet.`;
    case 'inside':
      return `One circle lies inside the other, clear of it by ${writeLength(outcome.gap)}, so they do not meet.`;
    default:
      return SENTENCES[outcome.why];
  }
}
