import {
  ALLOWED,
  ALLOWED_IN_WORKSHOP,
  type Action,
  type KeyScope,
  type Role,
  type Standing,
  type WorkshopAction,
  type WorkshopRole,
  type WorkshopStanding,
} from './table';
import { Failure } from './failure';

/** Whoever asks: a signed-in person, the holder of a client link, a script with a key, or nobody. */
export type Actor =
  | { readonly kind: 'person'; readonly id: string }
  | { readonly kind: 'link'; readonly notebookId: string }
  | { readonly kind: 'key'; readonly personId: string; readonly scopes: readonly KeyScope[] }
  | { readonly kind: 'nobody' };

export const NOBODY: Actor = { kind: 'nobody' };

/** What has to be known of a notebook to decide: its identity and the roles people hold on it. */
export interface Guarded {
  readonly id: string;
  /** By person id; needs to hold no more than the asking person's entry. */
  readonly roles: ReadonlyMap<string, Role>;
  /** Whether its workshop lets editors issue revisions; left out, it does not. */
  readonly editorsIssue?: boolean;
}

/** The same of a workshop. */
export interface GuardedWorkshop {
  readonly id: string;
  readonly members: ReadonlyMap<string, WorkshopRole>;
}

export function standingOf(actor: Actor, notebook: Guarded | null): Standing {
  if (notebook === null) return 'none';
  if (actor.kind === 'person') {
    const role = notebook.roles.get(actor.id) ?? 'none';
    return role === 'editor' && notebook.editorsIssue === true ? 'issuingEditor' : role;
  }
  if (actor.kind === 'link') return actor.notebookId === notebook.id ? 'clientLink' : 'none';
  if (actor.kind === 'key') {
    const held = notebook.roles.has(actor.personId) && keyAllows(actor.scopes, 'revisions');
    return held ? 'revisionKey' : 'none';
  }
  return 'none';
}

export function workshopStandingOf(
  actor: Actor,
  workshop: GuardedWorkshop | null,
): WorkshopStanding {
  if (workshop === null || actor.kind !== 'person') return 'none';
  return workshop.members.get(actor.id) ?? 'none';
}

/** Whether the actor may do this to the notebook. Pure; an unknown notebook is `null`. */
export function can(actor: Actor, action: Action, notebook: Guarded | null): boolean {
  return ALLOWED[standingOf(actor, notebook)].has(action);
}

/** Whether the actor may do this in the workshop. Pure; an unknown workshop is `null`. */
export function canInWorkshop(
  actor: Actor,
  action: WorkshopAction,
  workshop: GuardedWorkshop | null,
): boolean {
  return ALLOWED_IN_WORKSHOP[workshopStandingOf(actor, workshop)].has(action);
}

/**
 * Demands the right and keeps quiet about what an outsider must not learn: an unknown notebook and
 * a foreign one fail alike with `not-found`; only who may read the notebook is told `forbidden`.
 */
export function demand(actor: Actor, action: Action, notebook: Guarded | null): void {
  if (can(actor, action, notebook)) return;
  if (!can(actor, 'notebook.read', notebook)) {
    throw new Failure('not-found', 'There is no such notebook, or it is not shared with you.');
  }
  const standing = AS_TOLD[standingOf(actor, notebook)];
  throw new Failure('forbidden', `You are ${standing} of this notebook; ${NEEDED[action]}.`);
}

/** The same for a workshop: whoever does not belong to it learns nothing of it. */
export function demandInWorkshop(
  actor: Actor,
  action: WorkshopAction,
  workshop: GuardedWorkshop | null,
): void {
  if (canInWorkshop(actor, action, workshop)) return;
  if (workshopStandingOf(actor, workshop) === 'none') {
    throw new Failure('not-found', 'There is no such workshop, or you do not belong to it.');
  }
  throw new Failure('forbidden', `You are a member of this workshop; ${NEEDED_HERE[action]}.`);
}

/** Whether a key with these scopes may be used for that. Default is no. */
export function keyAllows(scopes: readonly KeyScope[], wanted: KeyScope): boolean {
  return scopes.includes(wanted);
}

const AS_TOLD: Readonly<Record<Standing, string>> = {
  owner: 'an owner',
  editor: 'an editor',
  issuingEditor: 'an editor',
  viewer: 'a viewer',
  clientLink: 'a holder of a link',
  revisionKey: 'a holder of a key',
  none: 'no part',
};

const NEEDED: Readonly<Record<Action, string>> = {
  'notebook.read': 'reading it needs a role on it',
  'notebook.export': 'exporting it needs a role on it',
  'notebook.duplicate': 'duplicating it needs a role on it',
  'notebook.leave': 'leaving it needs a role on it',
  'notebook.rename': 'only owners and editors rename it',
  'notebook.archive': 'only owners archive it or bring it back',
  'notebook.move': 'only owners move it to another workshop',
  'notebook.template': 'only owners make it a template',
  'titleBlock.change': 'only owners and editors fill in its title block',
  'versions.list': 'its versions are for people with a role on it',
  'versions.read': 'its versions are for people with a role on it',
  'versions.save': 'only owners and editors save versions',
  'versions.restore': 'only owners and editors restore versions',
  'versions.check': 'only owners and editors check versions',
  'presence.see': 'who is here is shown to people with a role on it',
  'comments.list': 'its comments are for people with a role on it',
  'comments.write': 'commenting needs a role on it',
  'comments.resolve': 'only owners and editors resolve comments',
  'revisions.list': 'its revisions are for people with a role on it',
  'revisions.read': 'its revisions are for people with a role on it',
  'revisions.issue': 'only owners issue revisions, and editors where the workshop lets them',
  'people.list': 'its people are listed for people with a role on it',
  'people.change': 'only owners add, change or remove people',
  'links.list': 'only owners see its client links',
  'links.change': 'only owners make or revoke client links',
  'client.read': 'this needs a client link',
  'client.export': 'this needs a client link',
};

const NEEDED_HERE: Readonly<Record<WorkshopAction, string>> = {
  'workshop.read': 'reading it needs a membership',
  'workshop.leave': 'leaving it needs a membership',
  'workshop.change': 'only admins change its defaults, title block and name',
  'members.list': 'its members are listed for members',
  'members.change': 'only admins invite, change or remove members',
  'notebooks.create': 'making a notebook needs a membership',
  'templates.list': 'its templates are for members',
  'activity.read': 'only admins read its activity record',
  'localMail.read': 'only admins read the letters of a copy that keeps them to itself',
};
