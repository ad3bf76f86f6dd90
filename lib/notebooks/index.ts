export { answerTo, certificateFor, questionOf } from './answers';
export {
  CommentChange,
  NewComment,
  addComment,
  changeComment,
  readComments,
  withdrawComment,
} from './comments';
export {
  LinkRequest,
  createLink,
  listLinks,
  readByToken,
  readByTokenForExport,
  revokeLink,
} from './links';
export {
  NewNotebook,
  NotebookChange,
  changeNotebook,
  createNotebook,
  listNotebooks,
  readNotebook,
} from './notebooks';
export { NowQuery, findSeen, lookNow, type Now } from './now';
export {
  HandingOver,
  NewPerson,
  RoleChange,
  addPerson,
  changeRole,
  handOver,
  leaveNotebook,
  listPeople,
  removePerson,
} from './people';
export { TitleBlockEntries, changeTitleBlock, titleBlockIn, titleBlockOf } from './title-block';
export { SearchRequest, search } from './search';
export { TryRequest, tryLines } from './try-lines';
export { RestoreRequest, SaveRequest, restoreVersion, saveVersion } from './save';
export { ListQuery, listVersions, readForExport, readVersion } from './versions';
export type * from './types';
