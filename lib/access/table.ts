/**
 * Who may do what: tables of roles × actions. They are the specification, the code and the source
 * of the tests; nothing else in the project decides about access.
 *
 * Standings on a notebook:
 * - `owner`, `editor`, `viewer`: roles that a person holds on it. `issuingEditor` is an editor of a
 *   notebook whose workshop lets editors issue revisions.
 * - `clientLink`: whoever holds the unguessable address of one notebook; no account.
 * - `revisionKey`: a script with a key for revisions, whose maker holds a role on the notebook.
 * - `none`: everybody else, signed in or not, members and admins of the notebook's workshop included.
 */
export const ROLES = ['owner', 'editor', 'viewer'] as const;
export type Role = (typeof ROLES)[number];

export const STANDINGS = [...ROLES, 'issuingEditor', 'clientLink', 'revisionKey', 'none'] as const;
export type Standing = (typeof STANDINGS)[number];

export const ACTIONS = [
  'notebook.read',
  'notebook.export',
  'notebook.duplicate',
  'notebook.leave',
  'notebook.rename',
  'notebook.archive',
  'notebook.move',
  'notebook.template',
  'titleBlock.change',
  'versions.list',
  'versions.read',
  'versions.save',
  'versions.restore',
  'versions.check',
  'presence.see',
  'comments.list',
  'comments.write',
  'comments.resolve',
  'revisions.list',
  'revisions.read',
  'revisions.issue',
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
  'notebook.duplicate',
  'notebook.leave',
  'versions.list',
  'versions.read',
  'presence.see',
  'comments.list',
  'comments.write',
  'revisions.list',
  'revisions.read',
  'people.list',
];
const editor: readonly Action[] = [
  ...viewer,
  'notebook.rename',
  'titleBlock.change',
  'versions.save',
  'versions.restore',
  'versions.check',
  'comments.resolve',
];
const owner: readonly Action[] = [
  ...editor,
  'notebook.archive',
  'notebook.move',
  'notebook.template',
  'revisions.issue',
  'people.change',
  'links.list',
  'links.change',
];

export const ALLOWED: Readonly<Record<Standing, ReadonlySet<Action>>> = {
  owner: new Set(owner),
  editor: new Set(editor),
  issuingEditor: new Set<Action>([...editor, 'revisions.issue']),
  viewer: new Set(viewer),
  clientLink: new Set<Action>(['client.read', 'client.export']),
  revisionKey: new Set<Action>(['revisions.list', 'revisions.read']),
  none: new Set<Action>(),
};

/** What a person is to a workshop. */
export const WORKSHOP_ROLES = ['admin', 'member'] as const;
export type WorkshopRole = (typeof WORKSHOP_ROLES)[number];

export const WORKSHOP_STANDINGS = [...WORKSHOP_ROLES, 'none'] as const;
export type WorkshopStanding = (typeof WORKSHOP_STANDINGS)[number];

export const WORKSHOP_ACTIONS = [
  'workshop.read',
  'workshop.leave',
  'workshop.change',
  'members.list',
  'members.change',
  'notebooks.create',
  'templates.list',
  'activity.read',
  'localMail.read',
] as const;
export type WorkshopAction = (typeof WORKSHOP_ACTIONS)[number];

const member: readonly WorkshopAction[] = [
  'workshop.read',
  'workshop.leave',
  'members.list',
  'notebooks.create',
  'templates.list',
];

export const ALLOWED_IN_WORKSHOP: Readonly<Record<WorkshopStanding, ReadonlySet<WorkshopAction>>> =
  {
    admin: new Set<WorkshopAction>([
      ...member,
      'workshop.change',
      'members.change',
      'activity.read',
      'localMail.read',
    ]),
    member: new Set(member),
    none: new Set<WorkshopAction>(),
  };

/**
 * What an API key may be for. It acts only within its scopes, and on a notebook only while its maker
 * holds a role there.
 */
export const KEY_SCOPES = ['evaluate', 'revisions'] as const;
export type KeyScope = (typeof KEY_SCOPES)[number];
