import type { Role, WorkshopRole } from '@/lib/access';

/** What each role of a workshop lets a person do, as it stands where one is chosen. */
export const MEMBER_WORDS: Record<WorkshopRole, string> = {
  member: 'member: makes notebooks here',
  admin: 'admin: also invites people and decides how it works',
};

export const AS: Record<Role | WorkshopRole, string> = {
  admin: 'an admin',
  member: 'a member',
  owner: 'an owner',
  editor: 'an editor',
  viewer: 'a viewer',
};
