import type { Metadata } from 'next';
import Link from 'next/link';
import { ForgotForm } from '@/components/accounts/forgot-form';
import { Card } from '@/components/site/card';
import { hasLocalMailbox } from '@/lib/mail';

export const metadata: Metadata = { title: 'Forgotten your password?' };

export default function ForgotPage() {
  return (
    <Card title="Forgotten your password?">
      <ForgotForm localMail={hasLocalMailbox()} />
      <p className="text-small text-soft">
        Remembered?{' '}
        <Link href="/sign-in" className="text-snapline underline underline-offset-4">
          Sign in
        </Link>
      </p>
    </Card>
  );
}
