export {
  ACTIONS,
  ALLOWED,
  ALLOWED_IN_WORKSHOP,
  KEY_SCOPES,
  ROLES,
  STANDINGS,
  WORKSHOP_ACTIONS,
  WORKSHOP_ROLES,
  WORKSHOP_STANDINGS,
} from './table';
export type {
  Action,
  KeyScope,
  Role,
  Standing,
  WorkshopAction,
  WorkshopRole,
  WorkshopStanding,
} from './table';
export {
  NOBODY,
  can,
  canInWorkshop,
  demand,
  demandInWorkshop,
  keyAllows,
  standingOf,
  workshopStandingOf,
} from './can';
export type { Actor, Guarded, GuardedWorkshop } from './can';
export { FAILURE_CODES, Failure } from './failure';
export type { FailureCode, FailureExtra, FieldFault } from './failure';
