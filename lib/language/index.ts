/**
 * The cell language: reading lines, evaluating cells that share marks, and giving results.
 * Pure and synchronous. The application calls it through `lib/evaluation`, which bounds time and memory.
 */
export { certifyLine } from './certify';
export type { Certified, CertifiedLine } from './certify';
export { evaluateCells, evaluateExpression, keyOf } from './evaluate';
export type { CellResults, EvaluationOptions, LinePlace } from './evaluate';
export type { ErrorCode, Problem, Span } from './failure';
export type {
  AngleResult,
  CircleResult,
  Coordinates,
  Cut,
  DecimalResult,
  DegreesMinutesSeconds,
  ErrorResult,
  Exact,
  FunctionResult,
  Inches,
  ItemResult,
  LineResult,
  ListResult,
  Notice,
  NumberPart,
  NumberResult,
  Omission,
  PointResult,
  Reach,
  Result,
  TruthResult,
} from './result';
export { DEFAULT_SETTINGS, LENGTH_UNITS, MOST_DIGITS, ROUNDINGS, readStep } from './settings';
export type { LengthUnit, Settings } from './settings';
export { markOfLine } from './lines';
export type { CellSource } from './lines';
export { typesetMark } from './typeset';
