import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { SignUpForm } from '@/components/accounts/sign-up-form';
import { Card } from '@/components/site/card';
import { currentPerson } from '@/lib/accounts/session';
import { hasLocalMailbox } from '@/lib/mail';

export const metadata: Metadata = { title: 'Make an account' };

export default async function SignUpPage() {
  if (await currentPerson()) redirect('/notebooks');
  return (
    <Card title="Make an account">
      <SignUpForm localMail={hasLocalMailbox()} />
      <p className="text-small text-soft">
        You have one?{' '}
        <Link href="/sign-in" className="text-snapline underline underline-offset-4">
          Sign in
        </Link>
      </p>
    </Card>
  );
}
