'use client';

import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { SendAgain } from './look-into-mail';

const UNCONFIRMED = 'unconfirmed';
const SERVICE = 'Signing in through the other service did not work; try again, or use a password.';

const SENTENCES: Record<string, string> = {
  CredentialsSignin: 'This e-mail address and password do not belong together.',
  'bad-credentials': 'This e-mail address and password do not belong together.',
  'too-many': 'Too many attempts; wait a few minutes before the next one.',
  [UNCONFIRMED]:
    'This e-mail address is not confirmed yet: open the link in the letter that was sent to it.',
  forbidden:
    'The other service does not vouch for an e-mail address of yours, so it opens no account.',
  OAuthSignin: SERVICE,
  OAuthCallback: SERVICE,
  Callback: SERVICE,
};

export function sayRefusal(code: string | null | undefined): string | null {
  if (!code) return null;
  return SENTENCES[code] ?? 'Signing in did not work just now; try again in a moment.';
}

interface SignInFormProps {
  next: string;
  /** Filled in where whoever sends the person here knows the address. */
  address: string;
  refusal: string | null;
  /** What people call the other service they may sign in through; null where there is none. */
  service: string | null;
}

export function SignInForm({ next, address, refusal, service }: SignInFormProps) {
  const [email, setEmail] = useState(address);
  const [password, setPassword] = useState('');
  const [code, setCode] = useState(refusal);
  const [busy, setBusy] = useState(false);
  const fault = sayRefusal(code);

  const submit = async () => {
    setBusy(true);
    setCode(null);
    const answer = await signIn('credentials', { email, password, redirect: false }).catch(
      () => null,
    );
    if (answer?.ok && !answer.error) {
      window.location.assign(next);
      return;
    }
    setCode(answer?.error ?? 'unreachable');
    setBusy(false);
  };

  return (
    <div className="space-y-4">
      {fault && <Notice tone="fault">{fault}</Notice>}
      {code === UNCONFIRMED && password !== '' && <SendAgain email={email} password={password} />}
      <form
        className="space-y-4"
        method="post"
        onSubmit={(event) => {
          event.preventDefault();
          void submit();
        }}
      >
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
      {service !== null && (
        <div className="border-t border-hairline pt-4">
          <Button
            className="w-full"
            disabled={busy}
            onClick={() => {
              setBusy(true);
              signIn('oidc', { callbackUrl: next }).catch(() => {
                setCode('OAuthSignin');
                setBusy(false);
              });
            }}
          >
            Continue with {service}
          </Button>
        </div>
      )}
    </div>
  );
}
