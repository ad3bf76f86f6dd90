import { ALLOWED, type Action, type KeyScope, type Role, type Standing } from './table';
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
}

export function standingOf(actor: Actor, notebook: Guarded | null): Standing {
  if (notebook === null) return 'none';
  if (actor.kind === 'person') return notebook.roles.get(actor.id) ?? 'none';
  if (actor.kind === 'link') return actor.notebookId === notebook.id ? 'clientLink' : 'none';
  return 'none';
}

/** Whether the actor may do this to the notebook. Pure; an unknown notebook is `null`. */
export function can(actor: Actor, action: Action, notebook: Guarded | null): boolean {
  return ALLOWED[standingOf(actor, notebook)].has(action);
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
  const role = standingOf(actor, notebook);
  const article = role === 'viewer' ? 'a' : 'an';
  throw new Failure('forbidden', `You are ${article} ${role} of this notebook; ${NEEDED[action]}.`);
}

/** Whether a key with these scopes may be used for that. Default is no. */
export function keyAllows(scopes: readonly KeyScope[], wanted: KeyScope): boolean {
  return scopes.includes(wanted);
}

const NEEDED: Readonly<Record<Action, string>> = {
  'notebook.read': 'reading it needs a role on it',
  'notebook.export': 'exporting it needs a role on it',
  'notebook.rename': 'only owners and editors rename it',
  'notebook.archive': 'only owners archive it or bring it back',
  'versions.list': 'its versions are for people with a role on it',
  'versions.read': 'its versions are for people with a role on it',
  'versions.save': 'only owners and editors save versions',
  'versions.restore': 'only owners and editors restore versions',
  'people.list': 'its people are listed for people with a role on it',
  'people.change': 'only owners add, change or remove people',
  'links.list': 'only owners see its client links',
  'links.change': 'only owners make or revoke client links',
  'client.read': 'this needs a client link',
  'client.export': 'this needs a client link',
};
