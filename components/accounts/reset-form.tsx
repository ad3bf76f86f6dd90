'use client';

import { useState } from 'react';
import { ask } from '@/components/ui/ask';
import { Button, LinkButton } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useAsking } from './use-asking';

export function ResetForm({ token }: { token: string }) {
  const [password, setPassword] = useState('');
  const [done, setDone] = useState(false);
  const { busy, fault, faults, run } = useAsking(['password']);

  if (done) {
    return (
      <div className="space-y-4">
        <Notice tone="good">
          The new password is stored, and every session was ended. Sign in with it.
        </Notice>
        <LinkButton look="main" href="/sign-in" className="w-full">
          Sign in
        </LinkButton>
      </div>
    );
  }
  const submit = async () =>
    setDone(await run(() => ask('/api/passwords/reset', { body: { token, password } })));
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
        label="New password"
        type="password"
        name="password"
        autoComplete="new-password"
        required
        hint="At least 12 characters; a few plain words are good."
        value={password}
        fault={faults.password ?? null}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" look="main" className="w-full" disabled={busy}>
        {busy ? 'Storing…' : 'Store the new password'}
      </Button>
    </form>
  );
}
