import type { Form } from './form';
import type { Interval, IntervalArithmetic } from './interval';
import type { Strikes } from './strikes';

/** The kinds of stand-in that are searched, in the order in which equals are told. */
export const FAMILIES = [
  'fraction',
  'root',
  'hypotenuse',
  'surd',
  'bisection',
  'classical',
] as const;

export type Family = (typeof FAMILIES)[number];

export interface Candidate {
  readonly family: Family;
  /** The value as a multiple of the base. */
  readonly form: Form;
  /** Asked only of those that come near, as there are thousands. */
  readonly strikes: () => Strikes;
  /** How it is struck, in one plain sentence. */
  readonly how: () => string;
  /** Author and source of a rule of the trade; null for what the search made up. */
  readonly source: string | null;
}

/** What the families are asked for: the target over the base, enclosed, and what the search may spend. */
export interface Wanted {
  readonly arithmetic: IntervalArithmetic;
  readonly ratio: Interval;
  /** What the base is called in sentences: `radius` or `unit`. */
  readonly base: string;
  /** Number of parts of the ring, where that was said. */
  readonly parts: number | null;
  readonly limits: SearchLimits;
}

/** One family's part of the search: its candidates, lazily, and the ranges in words. */
export interface Search {
  readonly family: Family;
  readonly candidates: Iterable<Candidate>;
  readonly ranges: string;
}

/** What a search may look at. All are counts, so that every machine covers the same. */
export interface SearchLimits {
  /** Most candidates of one family. */
  readonly candidates: number;
  /** Greatest denominator of a fraction. */
  readonly denominator: number;
  /** Greatest number of parts of the base for the legs of a right triangle. */
  readonly parts: number;
  /** Greatest leg, in those parts. */
  readonly leg: number;
  /** Greatest radicand c, factor b and divisor d of (a + b√c)/d. */
  readonly radicand: number;
  readonly factor: number;
  readonly divisor: number;
  /** Greatest number of parts of the circle in bisections, for a chord, which must stay exact, and for an angle. */
  readonly divisions: number;
  readonly angleDivisions: number;
  /** Most binary places of an enclosure; a tolerance that needs more is over this limit. */
  readonly bits: number;
  /** Most stand-ins in one answer. */
  readonly offers: number;
}

export const DEFAULT_SEARCH: SearchLimits = Object.freeze({
  candidates: 8000,
  denominator: 100_000,
  parts: 32,
  leg: 600,
  radicand: 15,
  factor: 12,
  divisor: 12,
  divisions: 544,
  angleDivisions: 70_000,
  bits: 2048,
  offers: 8,
});
