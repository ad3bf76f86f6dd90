import type { Role } from '@/lib/access';
import type { CellAnswer } from '@/lib/evaluation';
import type { NotebookContent } from './content';
import type { TitleBlock, TitleBlockEntries } from './title-block';

export type { TitleBlock, TitleBlockEntries } from './title-block';

/** Moments are ISO 8601 strings in UTC throughout: they cross from server to browser unchanged. */
export type Moment = string;

export interface NamedWorkshop {
  id: string;
  name: string;
}

/** A line of the table of notebooks. `version` 0 means that nothing has been saved yet. */
export interface NotebookLine {
  id: string;
  title: string;
  workshop: NamedWorkshop;
  role: Role;
  version: number;
  changedAt: Moment;
  changedBy: string;
  archivedAt: Moment | null;
  /** Whether it is a template of its workshop. */
  template: boolean;
}

/** One page of the table of notebooks. */
export interface NotebookList {
  notebooks: NotebookLine[];
  /** How many the filters have altogether. */
  total: number;
  page: number;
  pages: number;
  /** The workshops to choose from. */
  workshops: NamedWorkshop[];
}

export interface NotebookHead {
  id: string;
  title: string;
  workshop: NamedWorkshop;
  role: Role;
  /** Whether the person may issue revisions of it. */
  mayIssue: boolean;
  archivedAt: Moment | null;
  version: number;
  savedAt: Moment;
  savedBy: string;
  /** Whether the newest version was saved by a sheet after a pause. */
  byItself: boolean;
  /** What the notebook itself says in its title block, and the whole of it as it is shown. */
  titleEntries: TitleBlockEntries;
  titleBlock: TitleBlock;
}

export interface OpenNotebook {
  notebook: NotebookHead;
  content: NotebookContent;
}

export interface VersionLine {
  number: number;
  author: string;
  savedAt: Moment;
  note: string | null;
  restoredFrom: number | null;
  /** The version with which it was brought together, being made on an older one. */
  mergedWith: number | null;
  /** Saved by the sheet after a pause, not kept by hand. */
  byItself: boolean;
}

export interface OpenVersion {
  version: VersionLine;
  content: NotebookContent;
}

/** The answer to a save. `unchanged`: the content was that of the head already, no version was made. */
export interface Saved {
  number: number;
  author: string;
  savedAt: Moment;
  unchanged: boolean;
  /** Brought together with a newer head than the one it was made on; `content` is what came of it. */
  merged: boolean;
  content?: NotebookContent;
}

/** What a refused save hands back, so that the two texts can be brought together. */
export interface StaleHead {
  number: number;
  author: string;
  savedAt: Moment;
  content: NotebookContent;
}

export interface NotebookPerson {
  id: string;
  name: string;
  email: string;
  role: Role;
}

export interface ClientLinkLine {
  id: string;
  label: string | null;
  madeAt: Moment;
  madeBy: string;
  revokedAt: Moment | null;
  /** The one revision it shows, by its letter; null for the latest issued. */
  revision: string | null;
  expiresAt: Moment | null;
  expired: boolean;
  hasPassphrase: boolean;
  clientName: string | null;
  clientEmail: string | null;
  opened: number;
  lastOpenedAt: Moment | null;
}

/** A link as shown at its making; only the hash of `token` is kept. */
export interface NewClientLink {
  id: string;
  token: string;
  url: string;
}

/** What owners see of one link beyond its line. */
export interface ClientLinkDetails {
  /** Null where the address cannot be made again, though the link goes on working. */
  url: string | null;
  /** When it was last opened, newest first; nothing of who did. */
  openings: Moment[];
}

/** What the holder of a client link meets. Of people it tells only what the title block tells. */
export type ClientView =
  | { kind: 'revision'; linkId: string; open: OpenRevision }
  | { kind: 'nothing-issued'; linkId: string; title: string; legalOwner: string }
  | { kind: 'passphrase'; linkId: string }
  | { kind: 'expired'; linkId: string; since: Moment };

/** That somebody has checked a version. */
export interface CheckLine {
  version: number;
  person: { id: string; name: string };
  checkedAt: Moment;
  remark: string | null;
}

/** An issued revision as lists show it. */
export interface RevisionLine {
  letter: string;
  version: number;
  purpose: string;
  note: string | null;
  issuedBy: string;
  issuedAt: Moment;
  checkedBy: string | null;
  engine: string;
  /** On paper too: two sheets with the same code were printed from the same revision. */
  checkCode: string;
  /** The newest letter, where that is another one. */
  supersededBy: string | null;
}

/** A revision with all that is frozen in it. */
export interface OpenRevision {
  notebook: { id: string; title: string };
  version: { number: number; savedAt: Moment };
  revision: RevisionLine;
  titleBlock: TitleBlock;
  content: NotebookContent;
  results: Pick<CellAnswer, 'id' | 'results'>[];
}

/** What there is to know before a version is issued. */
export interface IssueProspect {
  version: number;
  /** Letter that it would get now. */
  letter: string;
  /** Lines with a fault instead of a value. */
  faults: number;
  checks: CheckLine[];
  checkNeeded: boolean;
  /** Why it cannot be issued yet, and who could change that; null when nothing stands in the way. */
  hindrance: string | null;
  /** Live links to the latest revision whose client would get a letter. */
  letters: number;
}

export interface Issued {
  letter: string;
  version: number;
  checkCode: string;
  /** Letters to clients that were queued. */
  letters: number;
}

/** One field of one line in which the engine now says something else than what was issued. */
export interface Difference {
  cell: string;
  line: number;
  mark: string | null;
  source: string;
  field: string;
  frozen: string | null;
  now: string | null;
}

export interface Reevaluation {
  letter: string;
  /** Version of the engine whose results are frozen, and of the one that is asked now. */
  engineThen: string;
  engineNow: string;
  lines: number;
  differences: Difference[];
}

/** One thing said in a thread. The text names those it mentions by id (`comment-text.ts`); a withdrawn one has none. */
export interface CommentLine {
  id: string;
  author: { id: string; name: string };
  text: string;
  saidAt: Moment;
  editedAt: Moment | null;
  withdrawn: boolean;
}

/** A thread of comments on one cell: what began it, then the answers. */
export interface CommentThread {
  id: string;
  cell: string;
  /** What the cell was called when the thread began. */
  cellName: string;
  resolvedAt: Moment | null;
  resolvedBy: string | null;
  comments: CommentLine[];
}

export interface CommentsView {
  threads: CommentThread[];
  /** Names of those who are mentioned, by id. */
  people: Record<string, string>;
}

export interface MadeComment {
  id: string;
  thread: string;
}

export interface SnippetPiece {
  text: string;
  /** Whether it is one of the words looked for. */
  found: boolean;
}

/** A place in a notebook's text: the cell, and what stands around the words found. */
export interface Snippet {
  cell: string;
  pieces: SnippetPiece[];
}

export interface SearchHit {
  id: string;
  title: string;
  workshop: NamedWorkshop;
  role: Role;
  archivedAt: Moment | null;
  changedAt: Moment;
  /** Lines that define the mark looked for, or one that begins so. */
  marks: { cell: string; line: number; mark: string; definition: string }[];
  snippet: Snippet | null;
}

export interface SearchAnswer {
  hits: SearchHit[];
  /** Where the next page begins; null behind the last. */
  next: string | null;
}

/** A template, as members of its workshop see it: nothing of its content, people or earlier versions. */
export interface TemplateLine {
  id: string;
  title: string;
  workshop: NamedWorkshop;
  version: number;
  changedAt: Moment;
}

/** What is news on a notebook; without times, so that it is the same text until something happens. */
export interface Now {
  head: number;
  archived: boolean;
  role: Role;
  /** Changes whenever its comments do. */
  comments: string;
  /** The others who have it on the screen. */
  people: { id: string; name: string; cell: string | null }[];
}

/** What became of a notebook between two versions, in words; `by` are the others who saved in between. */
export interface Changes {
  from: number;
  to: number;
  by: string[];
  /** A sentence without its subject and full stop; sources stand between backticks. */
  words: string;
}

/** An entry of the history: one version, or a run of those that one person's sheet saved by itself; newest first. */
export interface HistoryEntry {
  /** What changed, as a clause; null for the first version, and where it is not worked out yet. */
  words: string | null;
  versions: (VersionLine & { words: string | null })[];
}
