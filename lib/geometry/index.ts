/**
 * Exact points, lines and circles on the engine: constructions, intersections, movements and measures.
 * Every decision (parallel, touching, the same, nearer) is the engine's exact sign of a number. What does not exist is
 * answered with `None`, as data; over a limit the engine's own failure is thrown, for its `attempt` to catch. All
 * coordinates are real and of one unit, which this folder does not know.
 */
export {
  areEqual,
  circleOfThree,
  circleThrough,
  lineThrough,
  makeCircle,
  makeLine,
  makePoint,
  pointAt,
} from './figures';
export type { Circle, Figure, Line, Point } from './figures';
export {
  bisectAngle,
  bisectPoints,
  footOf,
  middle,
  parallelThrough,
  perpendicular,
} from './construct';
export { cosineAt, cosineOfLines, distance, distanceToLine } from './measure';
export { distanceOfLines, meetAt } from './meet';
export { polar, reflectInLine, reflectInPoint, ring, rotate } from './move';
export { explainNone, isNone } from './none';
export type { None } from './none';
export type { TurnPart } from './move';
