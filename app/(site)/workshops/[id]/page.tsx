import type { Metadata } from 'next';
import { orNotFound } from '@/components/site/or-not-found';
import { Members } from '@/components/workshops/members';
import { WorkshopFrame } from '@/components/workshops/workshop-frame';
import { ALLOWED_IN_WORKSHOP } from '@/lib/access';
import { personForPage } from '@/lib/accounts/session';
import { listInvitations, listMembers, readWorkshop } from '@/lib/workshops';

export const metadata: Metadata = { title: 'Members' };

interface PageProps {
  params: Promise<{ id: string }>;
}

export default async function MembersPage({ params }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/workshops/${id}`);
  const workshop = await orNotFound(readWorkshop(person, id));
  const mayChange = ALLOWED_IN_WORKSHOP[workshop.role].has('members.change');
  const [members, invitations] = await Promise.all([
    listMembers(person, id),
    mayChange ? listInvitations(person, { workshop: id }) : [],
  ]);
  return (
    <WorkshopFrame workshop={workshop} part="members">
      <Members
        workshop={{ id, name: workshop.name }}
        personId={person.id}
        mayChange={mayChange}
        members={members}
        invitations={invitations}
      />
    </WorkshopFrame>
  );
}
