import { DEEDS, type Deed } from './deeds';

/** Kinds of deeds that one looks for together: the beginnings of their names, and what they are called. */
const GROUPS = {
  accounts: { title: 'Signing in and accounts', of: ['session', 'account', 'password'] },
  people: { title: 'Members, invitations, roles', of: ['member', 'invitation', 'role'] },
  notebooks: { title: 'Notebooks', of: ['notebook', 'titleBlock', 'version', 'comment'] },
  issues: { title: 'Revisions, links, exports, keys', of: ['revision', 'link', 'key'] },
  workshop: { title: 'The workshop itself', of: ['workshop'] },
} as const;

export type DeedGroup = keyof typeof GROUPS;

export const DEED_GROUPS = Object.keys(GROUPS) as DeedGroup[];

export const titleOfGroup = (group: DeedGroup): string => GROUPS[group].title;

/** Exports leave the house, so they are looked for where revisions are, though a notebook is exported. */
const ELSEWHERE: Partial<Record<Deed, DeedGroup>> = { 'notebook.exported': 'issues' };

/** The deeds of a group. */
export function deedsOf(group: DeedGroup): Deed[] {
  return (Object.keys(DEEDS) as Deed[]).filter((deed) => groupOf(deed) === group);
}

function groupOf(deed: Deed): DeedGroup | undefined {
  const [beginning = ''] = deed.split('.');
  const isOf = (group: DeedGroup) => GROUPS[group].of.some((one: string) => one === beginning);
  return ELSEWHERE[deed] ?? DEED_GROUPS.find(isOf);
}
