import { Failure } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { addPerson, type NewPerson } from '@/lib/notebooks';
import type { NotebookPerson } from '@/lib/notebooks/types';
import { invite } from './invitations';
import type { InvitationLine } from './types';

export type Shared =
  { kind: 'added'; person: NotebookPerson } | { kind: 'invited'; invitation: InvitationLine };

/**
 * Gives a role on a notebook to the person with this e-mail address, or invites the address where it
 * has no account.
 * @throws Failure `already-added`, `limit-reached`, `too-many`
 */
export async function shareNotebook(person: Person, id: string, asked: NewPerson): Promise<Shared> {
  try {
    return { kind: 'added', person: await addPerson(person, id, asked) };
  } catch (refused) {
    if (!(refused instanceof Failure) || refused.code !== 'unknown-email') throw refused;
    return { kind: 'invited', invitation: await invite(person, { notebook: id }, asked) };
  }
}
