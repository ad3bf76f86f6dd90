import type { Metadata } from 'next';
import { ResetForm } from '@/components/accounts/reset-form';
import { Card } from '@/components/site/card';
import { LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { isResetLink } from '@/lib/accounts';

export const metadata: Metadata = {
  title: 'Choose a new password',
  robots: { index: false, follow: false },
};

interface PageProps {
  params: Promise<{ token: string }>;
}

export default async function ResetPage({ params }: PageProps) {
  const { token } = await params;
  return (
    <Card title="Choose a new password">
      {(await isResetLink(token)) ? (
        <ResetForm token={token} />
      ) : (
        <>
          <Notice tone="caution">
            This link is not valid: it was used, its hour is over, or its address is incomplete.
          </Notice>
          <LinkButton href="/forgot">Ask for a new one</LinkButton>
        </>
      )}
    </Card>
  );
}
