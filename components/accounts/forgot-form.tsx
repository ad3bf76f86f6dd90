'use client';

import { useState } from 'react';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { LocalMailHint } from './look-into-mail';
import { useAsking } from './use-asking';

export function ForgotForm({ localMail }: { localMail: boolean }) {
  const [email, setEmail] = useState('');
  const [asked, setAsked] = useState(false);
  const { busy, fault, faults, run } = useAsking(['email']);

  if (asked) {
    return (
      <div className="space-y-4">
        <Notice tone="good" title="Look into your mail">
          <p className="[overflow-wrap:anywhere]">
            If <strong>{email.trim()}</strong> is the address of an account, a letter is on its way
            to it. The link in it is valid for one hour.
          </p>
        </Notice>
        {localMail && <LocalMailHint />}
        <Button onClick={() => setAsked(false)}>Enter another address</Button>
      </div>
    );
  }
  const submit = async () =>
    setAsked(await run(() => ask('/api/passwords/forgotten', { body: { email } })));
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
        hint="A letter goes there, with a link to choose a new password."
        value={email}
        fault={faults.email ?? null}
        onChange={(event) => setEmail(event.target.value)}
      />
      <Button type="submit" look="main" className="w-full" disabled={busy}>
        {busy ? 'Asking…' : 'Ask for a new password'}
      </Button>
    </form>
  );
}
