export { answersQueries } from '@/db/client';
export { addressOf } from './address';
export { isId } from './ids';
export { KeyRequest, createKey, holderOfKey, listKeys, revokeKey } from './keys';
export type { KeyHolder } from './keys';
export { LIMITS, countAgainst, takeBack } from './limits';
export { EmailAddress, Password, oneLine } from './fields';
export { Deletion, deleteAccount, hasPassword } from './delete-account';
export { exportAccount } from './export-account';
export {
  Forgotten,
  PasswordChange,
  Reset,
  changePassword,
  forgotPassword,
  isResetLink,
  resetPassword,
} from './new-password';
export { openIdSettings } from './open-id';
export { NameChange, changeName, signIn, workshopsOf } from './people';
export {
  Confirmation,
  SendAgain,
  SignUp,
  confirmSignUp,
  sendConfirmationAgain,
  signUp,
  signUpOf,
} from './sign-up';
export { endSession, listSessions, signOutEverywhere } from './sessions';
export { hashPassword, verifyPassword } from './passwords';
export { hashOf, newSecret } from './secrets';
export {
  Logo,
  TOLERANCE_CLASSES,
  WorkshopSettings,
  readWorkshopSettings,
} from './workshop-settings';
export type { ToleranceClass } from './workshop-settings';
export type { ApiKeyLine, MemberWorkshop, NewApiKey, Person, SessionLine } from './types';
