'use client';

import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

const SENTENCES: Record<string, string> = {
  CredentialsSignin: 'This e-mail address and password do not belong together.',
  'bad-credentials': 'This e-mail address and password do not belong together.',
  'too-many': 'Too many attempts; wait a few minutes before the next one.',
};

export function sayRefusal(code: string | null | undefined): string | null {
  if (!code) return null;
  return SENTENCES[code] ?? 'Signing in did not work just now; try again in a moment.';
}

interface SignInFormProps {
  next: string;
  refusal: string | null;
}

export function SignInForm({ next, refusal }: SignInFormProps) {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [fault, setFault] = useState(sayRefusal(refusal));
  const [busy, setBusy] = useState(false);

  const submit = async () => {
    setBusy(true);
    setFault(null);
    const answer = await signIn('credentials', { email, password, redirect: false }).catch(
      () => null,
    );
    if (answer?.ok && !answer.error) {
      window.location.assign(next);
      return;
    }
    setFault(sayRefusal(answer?.error ?? 'unreachable'));
    setBusy(false);
  };

  return (
    <form
      className="space-y-4"
      method="post"
      onSubmit={(event) => {
        event.preventDefault();
        void submit();
      }}
    >
      {fault && <Notice tone="fault">{fault}</Notice>}
      <Field
        label="E-mail address"
        type="email"
        name="email"
        autoComplete="username"
        required
        value={email}
        onChange={(event) => setEmail(event.target.value)}
      />
      <Field
        label="Password"
        type="password"
        name="password"
        autoComplete="current-password"
        required
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" look="main" className="w-full" disabled={busy}>
        {busy ? 'Signing in…' : 'Sign in'}
      </Button>
    </form>
  );
}
