export { ACTIONS, ALLOWED, KEY_SCOPES, ROLES, STANDINGS } from './table';
export type { Action, KeyScope, Role, Standing } from './table';
export { NOBODY, can, demand, keyAllows, standingOf } from './can';
export type { Actor, Guarded } from './can';
export { FAILURE_CODES, Failure } from './failure';
export type { FailureCode, FailureExtra, FieldFault } from './failure';
