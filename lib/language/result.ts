import type { Rounding, TowerStep } from '../engine/index';
import type { Problem } from './failure';

/** The result of one line, as the page, the exports, the endpoint and the command line give it. */
export type Result =
  | NumberResult
  | AngleResult
  | PointResult
  | LineResult
  | CircleResult
  | ListResult
  | FunctionResult
  | TruthResult
  | ErrorResult;

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
  /** null only where deciding went over a limit; the reason then says so. */
  straightedgeAndCompass: boolean | null;
  withTrisector: boolean | null;
  reason: string;
}

export interface Cut {
  value: string;
  step: string;
  rounding: Rounding;
  direction: 'up' | 'down' | 'exact';
}

/** A length as a rule in inches shows it, to the nearest 1/64 of an inch; a tie goes to the even one. */
export interface Inches {
  /** In inches, or in feet and inches when the unit is `ft`; parses back to the rounded length. */
  text: string;
  /** Parts of an inch that it was rounded to. */
  denominator: number;
  /** The rounded length less the exact one, in millimetres, to six decimals; `0` when they are the same. */
  error: string;
  direction: 'up' | 'down' | 'exact';
}

/** An angle in degrees, minutes and seconds, to a tenth of a second; a tie goes to the even one. */
export interface DegreesMinutesSeconds {
  /** Parses back to the rounded angle. */
  text: string;
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
  /** Only for a real length given in inches or feet. */
  inches?: Inches;
  /** Null when transcendental, and where working it out went over a limit (`omitted` then says so). */
  degree: number | null;
  minimalPolynomial: string[] | null;
  tower: TowerStep[] | null;
  reach: Reach;
  /** Parts left out because they went over a limit; the value itself is exact all the same. */
  omitted?: Omission[];
  /** k/n when the value is the root of unity e^(2πi·k/n) and not real, as in `1/7`. */
  partOfTurn?: string;
  /** Only for a value that `standin` gave: what it stands for and how well. */
  standIn?: StandInResult;
}

/** One constructible stand-in. Lengths are decimal strings in the unit of the result, for angles in degrees. */
export interface StandInOffer {
  /** In the cell language; parses back to the same value. */
  text: string;
  family: 'fraction' | 'root' | 'hypotenuse' | 'surd' | 'bisection' | 'classical';
  /** How it is struck, in one sentence. */
  how: string;
  /** Author of a rule of the trade. */
  source: string | null;
  /** Size of the error, rounded up, and on which side of the value the stand-in lies; `level` when that is not told apart. */
  error: { bound: string; direction: 'above' | 'below' | 'level' | 'exact' };
  /** Counts after Lemoine, and their sum. */
  strikes: { total: number; counts: string };
  stepped: SteppedResult | null;
}

/** Bounds that enclose a quantity: decimal strings rounded outwards. */
export interface Bounds {
  low: string;
  high: string;
}

/** What becomes of the stand-in when it is stepped round; `inside` when all lengths keep to the tolerance as well. */
export type SteppedResult = { parts: number; inside: boolean } & (
  | {
      kind: 'ring';
      /** Degrees that all steps together lack to a full turn. */
      gap: Bounds;
      miss: Bounds;
      /** The last division less the true one. */
      last: Bounds;
      worst: Bounds;
    }
  | { kind: 'run'; run: Bounds }
);

export interface StandInResult extends StandInOffer {
  /** The value it stands for, and the tolerance, in the cell language. */
  of: string;
  tolerance: string;
  /** What the search looked at. */
  covered: {
    family: StandInOffer['family'];
    ranges: string;
    examined: number;
    inside: number;
    complete: boolean;
  }[];
  /** Dearer ones, each closer than all before it. */
  others: StandInOffer[];
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
  dms: DegreesMinutesSeconds;
  reach: Reach;
  standIn?: StandInResult;
}

/** One coordinate, coefficient or radius: what a number result says of its value. */
export type NumberPart = Omit<NumberResult, keyof Parsed | 'partOfTurn' | 'standIn'>;

/** x to the right and y upwards. */
export interface Coordinates {
  x: NumberPart;
  y: NumberPart;
}

/** `text` and `tex` of a figure have its units in them; its reach is that of all its parts together. */
interface FigureResult extends Parsed {
  exact: Exact;
  /** Unit of the coordinates; null when they are plain numbers. */
  unit: string | null;
  reach: Reach;
}

export interface PointResult extends FigureResult {
  kind: 'point';
  coordinates: Coordinates;
}

export interface LineResult extends FigureResult {
  kind: 'line';
  /** Of a x + b y + c = 0, the first of a and b that is not 0 being 1; c has the unit. */
  coefficients: { a: NumberPart; b: NumberPart; c: NumberPart };
}

export interface CircleResult extends FigureResult {
  kind: 'circle';
  centre: Coordinates;
  radius: NumberPart;
}

/** A value as a result gives it, without what belongs to its line. */
export type Bare<T> = Omit<T, keyof Parsed>;

export interface ListResult extends Parsed {
  kind: 'list';
  /** All items with their units; the text parses back to the same list. */
  exact: Exact;
  /** Each item as it would be given on a line of its own. */
  items: ItemResult[];
}

export type ItemResult =
  | Bare<NumberResult>
  | Bare<AngleResult>
  | Bare<PointResult>
  | Bare<LineResult>
  | Bare<CircleResult>
  | Bare<ListResult>;

/** What a line gives that defines a function: it has no value of its own. */
export interface FunctionResult extends Parsed {
  kind: 'function';
  /** As it is called, with its parameters: `f(x, y)`. */
  signature: string;
  parameters: string[];
  /** Marks and functions of the notebook that its value reads, each once, in order. */
  reads: string[];
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
