import type { Metadata } from 'next';
import { cache } from 'react';
import { Card } from '@/components/site/card';
import { orNotFound } from '@/components/site/or-not-found';
import { LinkButton } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { AcceptButton, AcceptWithAccount } from '@/components/workshops/accept-invitation';
import { AS } from '@/components/workshops/role-words';
import { SignOut } from '@/components/settings/sign-out';
import { currentPerson } from '@/lib/accounts/session';
import { lookAtInvitation, type InvitationView } from '@/lib/workshops';

export const metadata: Metadata = {
  title: 'Invitation',
  robots: { index: false, follow: false },
};

interface PageProps {
  params: Promise<{ token: string }>;
}

const look = cache((token: string) => orNotFound(lookAtInvitation(token)));

const OVER = {
  accepted: 'This invitation has been accepted already; its link works once.',
  withdrawn: 'This invitation has been withdrawn.',
  expired: 'This invitation has expired. Whoever sent it can send it again.',
} as const;

export default async function InvitationPage({ params }: PageProps) {
  const { token } = await params;
  const [invitation, person] = await Promise.all([look(token), currentPerson()]);
  const { state, email } = invitation;
  return (
    <Card title="Invitation">
      <Summary invitation={invitation} />
      {state === 'open' ? (
        <WayIn token={token} invitation={invitation} signedInAs={person?.email ?? null} />
      ) : (
        <>
          <Notice tone={state === 'accepted' ? 'plain' : 'caution'}>{OVER[state]}</Notice>
          {state === 'accepted' && person?.email === email ? (
            <LinkButton href={pathOf(invitation)}>Go there</LinkButton>
          ) : (
            <LinkButton href="/">To the front page</LinkButton>
          )}
        </>
      )}
    </Card>
  );
}

const pathOf = ({ workshop, notebook }: InvitationView) =>
  notebook ? `/notebooks/${notebook.id}` : `/workshops/${workshop.id}`;

function Summary({ invitation }: { invitation: InvitationView }) {
  const { workshop, notebook, role, email, invitedBy, expiresAt, state } = invitation;
  const rows = [
    ...(notebook ? [['Notebook', notebook.title] as const] : []),
    ['Workshop', workshop.name] as const,
    ['As', AS[role]] as const,
    ['From', invitedBy || 'somebody who has left'] as const,
    ['To', email] as const,
  ];
  return (
    <dl className="border border-hairline">
      {rows.map(([label, value]) => (
        <div
          key={label}
          className="grid grid-cols-[6rem_minmax(0,1fr)] items-baseline border-b border-hairline px-3 py-1.5 last:border-b-0"
        >
          <dt className="text-small text-soft">{label}</dt>
          <dd className="font-medium [overflow-wrap:anywhere]">{value}</dd>
        </div>
      ))}
      {state === 'open' && (
        <div className="grid grid-cols-[6rem_minmax(0,1fr)] items-baseline px-3 py-1.5">
          <dt className="text-small text-soft">Valid until</dt>
          <dd>
            <Moment at={expiresAt} />
          </dd>
        </div>
      )}
    </dl>
  );
}

interface WayInProps {
  token: string;
  invitation: InvitationView;
  signedInAs: string | null;
}

/** What whoever looks can do: accept, sign in, make an account, or see why they cannot. */
function WayIn({ token, invitation: { email, hasAccount }, signedInAs }: WayInProps) {
  if (signedInAs === email) return <AcceptButton token={token} />;
  if (signedInAs !== null) {
    return (
      <>
        <Notice tone="caution" title="This invitation is for another address.">
          <p className="[overflow-wrap:anywhere]">
            You are signed in as {signedInAs}. Sign out, and open the link again to accept as{' '}
            {email}; or ask for an invitation to the address you use.
          </p>
        </Notice>
        <SignOut />
      </>
    );
  }
  if (!hasAccount) return <AcceptWithAccount token={token} email={email} />;
  const query = new URLSearchParams({ next: `/invitations/${token}`, email });
  return (
    <>
      <p>Sign in with this address to accept.</p>
      <LinkButton look="main" className="w-full" href={`/sign-in?${query.toString()}`}>
        Sign in
      </LinkButton>
    </>
  );
}
