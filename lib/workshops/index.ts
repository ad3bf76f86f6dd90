export { InvitedAccount, acceptInvitation, acceptWithNewAccount, lookAtInvitation } from './accept';
export { ActivityQuery, exportActivity, readActivity } from './activity';
export { IMAGE_LIMITS } from './image';
export {
  WorkshopInvitation,
  invite,
  listInvitations,
  resendInvitation,
  withdrawInvitation,
} from './invitations';
export { logoByHash, putLogo, readLogo, readNotebookLogo, removeLogo } from './logo';
export {
  MemberChange,
  Parting,
  changeMember,
  leaveWorkshop,
  listMembers,
  removeMember,
} from './members';
export { shareNotebook } from './share';
export {
  NewWorkshop,
  WorkshopChange,
  changeWorkshop,
  makeWorkshop,
  readWorkshop,
} from './workshops';
export type * from './types';
