import type { Rounding, TowerStep } from '../engine/index';
import type { Problem } from './failure';

/** The result of one line, as the page, the exports, the endpoint and the command line give it. */
export type Result = NumberResult | AngleResult | TruthResult | ErrorResult;

interface Line {
  /** 1-based line in its cell. */
  line: number;
  source: string;
  /** The mark that the line defines. */
  mark: string | null;
}

interface Parsed extends Line {
  /** TeX of the line as typed. */
  typeset: string;
  /** Readings of the line that a person may not expect, in plain sentences; mostly empty. */
  notices: Notice[];
}

export interface Notice {
  message: string;
  from: number;
  to: number;
}

export interface Exact {
  text: string;
  tex: string;
  staged: boolean;
}

export interface DecimalResult {
  re: string;
  im: string | null;
  digits: number;
  terminates: boolean;
}

export interface Reach {
  straightedgeAndCompass: boolean;
  withTrisector: boolean | null;
  reason: string;
}

export interface Cut {
  value: string;
  step: string;
  rounding: Rounding;
  direction: 'up' | 'down' | 'exact';
}

export interface NumberResult extends Parsed {
  kind: 'number';
  exact: Exact;
  unit: string | null;
  real: boolean;
  decimal: DecimalResult;
  /** Only for a real length when the settings have a step. */
  cut?: Cut;
  /** Null when transcendental, and where working it out went over a limit (`omitted` then says so). */
  degree: number | null;
  minimalPolynomial: string[] | null;
  tower: TowerStep[] | null;
  reach: Reach;
  /** Parts left out because they went over a limit; the value itself is exact all the same. */
  omitted?: Omission[];
}

export interface Omission {
  field: 'degree' | 'minimalPolynomial' | 'tower';
  code: string;
  message: string;
}

export interface AngleResult extends Parsed {
  kind: 'angle';
  exact: Exact;
  /** The angle in degrees. */
  decimal: DecimalResult;
  reach: Reach;
}

export interface TruthResult extends Parsed {
  kind: 'truth';
  truth: { value: boolean; reason: string };
}

export interface ErrorResult extends Line {
  kind: 'error';
  error: Problem;
  /** Null when the line does not parse. */
  typeset: string | null;
}
