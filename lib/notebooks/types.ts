import type { Role } from '@/lib/access';
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
}

export interface NotebookHead {
  id: string;
  title: string;
  workshop: NamedWorkshop;
  role: Role;
  archivedAt: Moment | null;
  version: number;
  savedAt: Moment;
  savedBy: string;
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
}

export interface OpenVersion {
  version: VersionLine;
  content: NotebookContent;
}

/** The answer to a save. `unchanged`: the content was that of the head already, no version was made. */
export interface Saved {
  number: number;
  savedAt: Moment;
  unchanged: boolean;
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
  opened: number;
  lastOpenedAt: Moment | null;
}

/** A link as shown once, at its making: only the hash of `token` is kept. */
export interface NewClientLink {
  id: string;
  token: string;
  url: string;
}

/** All that a client link gives away: no people, no addresses, no identities but the notebook's. */
export interface ClientView {
  notebook: { id: string; title: string; workshop: string };
  version: { number: number; savedAt: Moment };
  content: NotebookContent;
}
