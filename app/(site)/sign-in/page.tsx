import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/accounts/sign-in-form';
import { Card } from '@/components/site/card';
import { openIdSettings } from '@/lib/accounts';
import { safeNextPath } from '@/lib/accounts/next-path';
import { currentPerson } from '@/lib/accounts/session';

export const metadata: Metadata = { title: 'Sign in' };

interface PageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const one = (value: string | string[] | undefined) => (typeof value === 'string' ? value : null);

export default async function SignInPage({ searchParams }: PageProps) {
  const query = await searchParams;
  const next = safeNextPath(one(query.next));
  if (await currentPerson()) redirect(next);
  return (
    <Card title="Sign in">
      <SignInForm
        next={next}
        address={one(query.email) ?? ''}
        refusal={one(query.error)}
        service={openIdSettings()?.name ?? null}
      />
      <p className="text-small">
        <Link href="/forgot" className="text-snapline underline underline-offset-4">
          Forgotten your password?
        </Link>
      </p>
      <p className="text-small text-soft">
        No account yet?{' '}
        <Link href="/sign-up" className="text-snapline underline underline-offset-4">
          Make one for your workshop
        </Link>
      </p>
    </Card>
  );
}
