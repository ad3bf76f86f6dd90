/**
 * The cell language: reading lines, evaluating cells that share marks, and giving results.
 * Pure and synchronous. The application calls it through `lib/evaluation`, which bounds time and memory.
 */
export { certifyLine } from './certify';
export type { Certified, CertifiedLine } from './certify';
export {
  evaluateCells,
  evaluateExpression,
  expressionResult,
  findExpressionProblem,
  firstLine,
} from './evaluate';
export type { CellResults, EvaluationOptions } from './evaluate';
export { evaluateSource } from './evaluate-line';
export type { LineOptions, Outcome, Refusal } from './evaluate-line';
export { sizeOfPacked } from './packed-value';
export type { PackedValue } from './packed-value';
export { findDefinition, findPlaceProblem, refusedResult, resultOf } from './place';
export type { ErrorCode, Problem, Span } from './failure';
export type {
  AngleResult,
  Bare,
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
export {
  DEFAULT_SETTINGS,
  LENGTH_UNITS,
  MOST_DIGITS,
  ROUNDINGS,
  completeSettings,
  readStep,
} from './settings';
export type { LengthUnit, Settings } from './settings';
export { readCells } from './lines';
export type { CellSource, LineGraph, SourceLine } from './lines';
export { typesetMark } from './typeset';
