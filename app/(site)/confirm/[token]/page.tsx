import type { Metadata } from 'next';
import { ConfirmButton } from '@/components/accounts/confirm-button';
import { Card } from '@/components/site/card';
import { LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { signUpOf } from '@/lib/accounts';

export const metadata: Metadata = {
  title: 'Confirm your e-mail address',
  robots: { index: false, follow: false },
};

interface PageProps {
  params: Promise<{ token: string }>;
}

export default async function ConfirmPage({ params }: PageProps) {
  const { token } = await params;
  const waiting = await signUpOf(token);
  return (
    <Card title="Confirm your e-mail address">
      {waiting === null ? (
        <>
          <Notice tone="caution">
            This link is not valid: it was used, its 24 hours are over, or its address is
            incomplete.
          </Notice>
          <div className="flex flex-wrap gap-2">
            <LinkButton href="/sign-in">Sign in</LinkButton>
            <LinkButton href="/sign-up">Make an account</LinkButton>
          </div>
        </>
      ) : (
        <>
          <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-4 gap-y-1 [overflow-wrap:anywhere]">
            <dt className="text-soft">Name</dt>
            <dd>{waiting.name}</dd>
            <dt className="text-soft">Workshop</dt>
            <dd>{waiting.workshop}</dd>
            <dt className="text-soft">E-mail</dt>
            <dd>{waiting.email}</dd>
          </dl>
          <p className="text-soft">
            If you did not ask for this account, close the page; nothing is made then.
          </p>
          <ConfirmButton token={token} />
        </>
      )}
    </Card>
  );
}
