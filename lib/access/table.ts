/**
 * Who may do what: one table of roles × actions. It is the specification, the code and the source
 * of the tests; nothing else in the project decides about access to a notebook.
 *
 * - `owner`, `editor`, `viewer`: roles that a person holds on one notebook.
 * - `clientLink`: whoever holds the unguessable address of one notebook; no account.
 * - `none`: everybody else, signed in or not, members of the notebook's workshop included.
 */
export const ROLES = ['owner', 'editor', 'viewer'] as const;
export type Role = (typeof ROLES)[number];

export const STANDINGS = [...ROLES, 'clientLink', 'none'] as const;
export type Standing = (typeof STANDINGS)[number];

export const ACTIONS = [
  'notebook.read',
  'notebook.export',
  'notebook.rename',
  'notebook.archive',
  'versions.list',
  'versions.read',
  'versions.save',
  'versions.restore',
  'people.list',
  'people.change',
  'links.list',
  'links.change',
  'client.read',
  'client.export',
] as const;
export type Action = (typeof ACTIONS)[number];

const viewer: readonly Action[] = [
  'notebook.read',
  'notebook.export',
  'versions.list',
  'versions.read',
  'people.list',
];
const editor: readonly Action[] = [
  ...viewer,
  'notebook.rename',
  'versions.save',
  'versions.restore',
];
const owner: readonly Action[] = [
  ...editor,
  'notebook.archive',
  'people.change',
  'links.list',
  'links.change',
];

export const ALLOWED: Readonly<Record<Standing, ReadonlySet<Action>>> = {
  owner: new Set(owner),
  editor: new Set(editor),
  viewer: new Set(viewer),
  clientLink: new Set<Action>(['client.read', 'client.export']),
  none: new Set<Action>(),
};

/** What an API key may be for. A key never opens a notebook: it acts only within its scopes. */
export const KEY_SCOPES = ['evaluate'] as const;
export type KeyScope = (typeof KEY_SCOPES)[number];
