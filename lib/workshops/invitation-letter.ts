import type { Invitation } from '@/db/queries/invitations';
import { env } from '@/lib/env';
import type { Letter } from '@/lib/mail';
import type { Role, WorkshopRole } from '@/lib/access';

type Asked = Pick<Invitation, 'workshop' | 'notebook' | 'role' | 'email' | 'expiresAt'>;

/** What each role lets a person do, in a few words. */
const MEANS: Record<Role | WorkshopRole, string> = {
  admin: 'As an admin you make notebooks, invite people and decide how the workshop works.',
  member: 'As a member you make notebooks there and see those that are shared with you.',
  owner: 'As an owner you write in it, share it and issue revisions.',
  editor: 'As an editor you write in it and keep versions.',
  viewer: 'As a viewer you read it and export its figures.',
};

export const AS: Record<Role | WorkshopRole, string> = {
  admin: 'an admin',
  member: 'a member',
  owner: 'an owner',
  editor: 'an editor',
  viewer: 'a viewer',
};

/** The letter that brings an invitation. Its link is the only place where the token appears. */
export function invitationLetter(inviter: string, asked: Asked, token: string): Letter {
  const { workshop, notebook, role, email, expiresAt } = asked;
  const what = notebook === null ? `“${workshop.name}”` : `“${notebook.title}”`;
  const where = notebook === null ? 'the workshop ' : 'the notebook ';
  const of = notebook === null ? '' : ` of ${workshop.name}`;
  return {
    to: email,
    subject: `${inviter} invites you to ${what}`.slice(0, 300),
    paragraphs: [
      `${inviter} invites you to ${where}${what}${of} on Surdwork, as ${AS[role]}.`,
      MEANS[role],
      `The link is for ${email} alone, works once and is valid until ${expiresAt.toISOString().slice(0, 10)}. Without an account you make one there, in a minute.`,
    ],
    action: {
      label: 'Look at the invitation',
      url: new URL(`/invitations/${token}`, env().NEXTAUTH_URL).href,
    },
    reason: `You get this letter because ${inviter} entered your address. If you do not know them, do nothing; nothing happens unless you accept.`,
  };
}
