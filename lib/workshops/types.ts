import type { Role, WorkshopRole } from '@/lib/access';
import type { WorkshopSettings } from '@/lib/accounts';

/** Moments are ISO 8601 strings in UTC throughout. */
export type Moment = string;

export interface WorkshopHead {
  id: string;
  name: string;
  settings: WorkshopSettings;
  /** What the asking person is in it. */
  role: WorkshopRole;
}

export interface MemberLine {
  id: string;
  name: string;
  email: string;
  role: WorkshopRole;
  since: Moment;
}

/** An invitation that waits; never its token. */
export interface InvitationLine {
  id: string;
  email: string;
  role: WorkshopRole | Role;
  invitedBy: string;
  sentAt: Moment;
  expiresAt: Moment;
  expired: boolean;
}

/** What stands on the page that an invitation's link leads to. */
export interface InvitationView {
  state: 'open' | 'expired' | 'withdrawn' | 'accepted';
  workshop: { id: string; name: string };
  notebook: { id: string; title: string } | null;
  role: WorkshopRole | Role;
  email: string;
  invitedBy: string;
  expiresAt: Moment;
  /** Whether the address has an account already, so that signing in is the way. */
  hasAccount: boolean;
}

/** A notebook that would be left without an owner. */
export interface OwnedNotebook {
  id: string;
  title: string;
}

/** One line of the activity record, in words. */
export interface ActivityEntry {
  number: number;
  at: Moment;
  who: string;
  /** What was done, as it follows the name: `gave a role on`. */
  did: string;
  subject: string;
  notebookId: string | null;
  /** What else is known, in words: `editor, to Tam Orrowdale`. */
  more: string;
}
