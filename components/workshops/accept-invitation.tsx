'use client';

import { useRouter } from 'next/navigation';
import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { Refusal, ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { fieldFaults } from '@/components/accounts/use-asking';

/** The one button of whoever is signed in with the invited address. */
export function AcceptButton({ token }: { token: string }) {
  const router = useRouter();
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const accept = async () => {
    setBusy(true);
    setFault(null);
    try {
      const { path } = await ask<{ path: string }>(`/api/invitations/${token}`, { method: 'POST' });
      router.push(path);
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };
  return (
    <>
      {fault && <Notice tone="fault">{fault}</Notice>}
      <Button look="main" className="w-full" disabled={busy} onClick={() => void accept()}>
        Accept
      </Button>
    </>
  );
}

/** Makes an account for the invited address, accepts, and signs in. */
export function AcceptWithAccount({ token, email }: { token: string; email: string }) {
  const [name, setName] = useState('');
  const [password, setPassword] = useState('');
  const [faults, setFaults] = useState<Partial<Record<string, string>>>({});
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const make = async () => {
    setBusy(true);
    setFault(null);
    setFaults({});
    try {
      const body = { name, password };
      const { path } = await ask<{ path: string }>(`/api/invitations/${token}/account`, { body });
      await signIn('credentials', { email, password, redirect: false });
      window.location.assign(path);
    } catch (refused) {
      const placed = refused instanceof Refusal ? fieldFaults(refused) : {};
      setFaults(placed);
      if (Object.keys(placed).length === 0) setFault(sayFault(refused));
      setBusy(false);
    }
  };

  return (
    <form
      className="space-y-4"
      method="post"
      onSubmit={(event) => {
        event.preventDefault();
        void make();
      }}
    >
      <Field
        label="E-mail address"
        type="email"
        name="email"
        autoComplete="username"
        readOnly
        value={email}
        hint="The invitation proves that it is yours."
      />
      <Field
        label="Your name"
        name="name"
        autoComplete="name"
        required
        value={name}
        fault={faults.name ?? null}
        onChange={(event) => setName(event.target.value)}
      />
      <Field
        label="Password"
        type="password"
        name="password"
        autoComplete="new-password"
        required
        hint="At least 12 characters; a few plain words are good."
        value={password}
        fault={faults.password ?? null}
        onChange={(event) => setPassword(event.target.value)}
      />
      {fault && <Notice tone="fault">{fault}</Notice>}
      <Button type="submit" look="main" className="w-full" disabled={busy}>
        {busy ? 'Making the account…' : 'Make an account and accept'}
      </Button>
    </form>
  );
}
