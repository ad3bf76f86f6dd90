'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { WorkshopRole } from '@/lib/access';
import type { InvitationLine, MemberLine } from '@/lib/workshops/types';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Choice, Field } from '@/components/ui/field';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { PartingDialog } from './parting-dialog';
import { MEMBER_WORDS } from './role-words';
import { useChange } from './use-change';
import { WaitingInvitations } from './waiting-invitations';

interface MembersProps {
  workshop: { id: string; name: string };
  personId: string;
  mayChange: boolean;
  members: readonly MemberLine[];
  invitations: readonly InvitationLine[];
}

/** Who belongs to the workshop, and who has been asked to. */
export function Members(props: MembersProps) {
  const { workshop, personId, mayChange, members, invitations } = props;
  const router = useRouter();
  const { fault, busy, run } = useChange();
  const [said, say] = useState<string | null>(null);
  const [parting, setParting] = useState<MemberLine | null>(null);
  const path = `/api/workshops/${workshop.id}`;

  const change = (work: () => Promise<unknown>, words: string) => {
    say(null);
    void run(work).then((done) => {
      if (done) say(words);
    });
  };
  const changeRole = (member: MemberLine, role: WorkshopRole) =>
    change(
      () => ask(`${path}/members/${member.id}`, { method: 'PATCH', body: { role } }),
      `${member.name} is ${role === 'admin' ? 'an admin' : 'a member'} now.`,
    );

  return (
    <div className="grid gap-8 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
      <section aria-labelledby="members" className="min-w-0 space-y-4">
        <h2 id="members" className="text-figure font-semibold">
          Members
        </h2>
        {fault && <Notice tone="fault">{fault}</Notice>}
        {said && <Notice tone="good">{said}</Notice>}
        <ul className="border border-rule bg-sheet">
          {members.map((member) => {
            const own = member.id === personId;
            return (
              <li
                key={member.id}
                className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline px-3 py-2 last:border-b-0"
              >
                <span className="min-w-0">
                  <span className="block font-medium [overflow-wrap:anywhere]">
                    {member.name}
                    {own && <span className="font-normal text-soft"> (you)</span>}
                  </span>
                  <span className="block text-small text-soft [overflow-wrap:anywhere]">
                    {member.email}, since <Moment at={member.since} dayOnly />
                  </span>
                </span>
                <span className="flex items-center gap-2">
                  {mayChange ? (
                    <select
                      aria-label={`Role of ${member.name}`}
                      value={member.role}
                      disabled={busy}
                      className="min-h-9 w-24 rounded-cut border border-rule bg-sheet px-2 text-small"
                      onChange={(event) => changeRole(member, event.target.value as WorkshopRole)}
                    >
                      {Object.keys(MEMBER_WORDS).map((role) => (
                        <option key={role}>{role}</option>
                      ))}
                    </select>
                  ) : (
                    <span className="text-small">{member.role}</span>
                  )}
                  {(own || mayChange) && (
                    <Button
                      look="quiet"
                      aria-label={own ? 'Leave the workshop' : `Remove ${member.name}`}
                      onClick={() => setParting(member)}
                    >
                      {own ? 'Leave' : 'Remove'}
                    </Button>
                  )}
                </span>
              </li>
            );
          })}
        </ul>
        <p className="text-small text-soft">
          Belonging to the workshop opens no notebook: each is seen by the people it is shared with.
        </p>
      </section>
      {mayChange && (
        <section aria-labelledby="invite" className="min-w-0 space-y-4">
          <h2 id="invite" className="text-figure font-semibold">
            Invite
          </h2>
          <InviteForm
            busy={busy}
            onInvite={(body) =>
              change(
                () => ask(`${path}/invitations`, { body }),
                `An invitation is on its way to ${body.email}.`,
              )
            }
          />
          <WaitingInvitations
            path={`${path}/invitations`}
            invitations={invitations}
            busy={busy}
            run={change}
          />
        </section>
      )}
      {parting && (
        <PartingDialog
          workshop={workshop}
          member={parting}
          own={parting.id === personId}
          others={members.filter(({ id }) => id !== parting.id)}
          onClose={() => setParting(null)}
          onDone={() => {
            if (parting.id === personId) router.push('/workshops');
            else say(`${parting.name} does not belong to the workshop any more.`);
            setParting(null);
          }}
        />
      )}
    </div>
  );
}

interface InviteFormProps {
  busy: boolean;
  onInvite: (asked: { email: string; role: WorkshopRole }) => void;
}

function InviteForm({ busy, onInvite }: InviteFormProps) {
  const [email, setEmail] = useState('');
  const [role, setRole] = useState<WorkshopRole>('member');
  return (
    <form
      className="space-y-3 border border-rule bg-sheet p-4"
      onSubmit={(event) => {
        event.preventDefault();
        onInvite({ email: email.trim(), role });
        setEmail('');
      }}
    >
      <Field
        label="E-mail address"
        type="email"
        required
        value={email}
        hint="They get a letter with a link that is valid for 14 days."
        onChange={(event) => setEmail(event.target.value)}
      />
      <Choice
        label="As"
        value={role}
        onChange={(event) => setRole(event.target.value as WorkshopRole)}
      >
        {Object.entries(MEMBER_WORDS).map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </Choice>
      <div className="flex justify-end">
        <Button type="submit" look="main" disabled={busy}>
          Invite
        </Button>
      </div>
    </form>
  );
}
