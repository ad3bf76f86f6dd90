/** Tolerances of the shop: constructible stand-ins for values out of reach, with proven errors. */

export {
  type Candidate,
  DEFAULT_SEARCH,
  FAMILIES,
  type Family,
  type SearchLimits,
} from './candidate';
export { type Form, buildForm, writeForm, writeScaled, writeTimes } from './form';
export type { Fraction, Interval } from './interval';
export type { Closing } from './ring';
export {
  type Coverage,
  type Enclosed,
  type Judged,
  type StandIn,
  type StandInAnswer,
  type StandInRequest,
  type Target,
  boundOf,
  decimalsOf,
  findStandIns,
} from './stand-in';
export { type Strikes, writeStrikes } from './strikes';
