export { answersQueries } from '@/db/client';
export { addressOf } from './address';
export { isId } from './ids';
export { KeyRequest, createKey, holderOfKey, listKeys, revokeKey } from './keys';
export type { KeyHolder } from './keys';
export { LIMITS, countAgainst, takeBack } from './limits';
export {
  EmailAddress,
  Password,
  SignUp,
  oneLine,
  signIn,
  signOutEverywhere,
  signUp,
  workshopsOf,
} from './people';
export { hashPassword, verifyPassword } from './passwords';
export { hashOf, newSecret } from './secrets';
export {
  Logo,
  TOLERANCE_CLASSES,
  WorkshopSettings,
  readWorkshopSettings,
} from './workshop-settings';
export type { ToleranceClass } from './workshop-settings';
export type { ApiKeyLine, MemberWorkshop, NewApiKey, Person } from './types';
