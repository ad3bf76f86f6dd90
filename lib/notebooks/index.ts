export { answerTo, certificateFor, isHurried, questionOf } from './answers';
export { CheckRequest, checkVersion, listChecks } from './checks';
export {
  CommentChange,
  NewComment,
  addComment,
  changeComment,
  readComments,
  withdrawComment,
} from './comments';
export { DuplicateRequest, duplicateNotebook } from './copies';
export {
  PassphraseForm,
  countOpening,
  exportByToken,
  readByToken,
  tryPassphrase,
} from './client-view';
export type { Asker } from './guard';
export { IssueRequest, issueRevision, prospectOfIssue } from './issue';
export { PASS_SECONDS } from './link-tokens';
export {
  LinkChange,
  LinkRequest,
  changeLink,
  createLink,
  listLinks,
  readLink,
  revokeLink,
} from './links';
export { ListRequest, listNotebooks } from './list';
export { MoveRequest, moveNotebook } from './move';
export {
  NewNotebook,
  NotebookChange,
  changeNotebook,
  createNotebook,
  readNotebook,
} from './notebooks';
export { ChangesQuery, readChanges } from './changes';
export { EntriesQuery, listHistory } from './version-entries';
export { NowQuery, findSeen, lookNow } from './now';
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
export { listRevisions, readRevision, reevaluateRevision, revisionTag } from './revisions';
export {
  FromTemplate,
  TemplateChange,
  changeTemplate,
  makeFromTemplate,
  templatesFor,
} from './templates';
export { recordExport } from './record-export';
export { TryRequest, tryLines } from './try-lines';
export { RestoreRequest, SaveRequest, restoreVersion, saveVersion } from './save';
export { ListQuery, listVersions, readForExport, readVersion } from './versions';
export type * from './types';
