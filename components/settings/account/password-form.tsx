'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useAsking } from '@/components/accounts/use-asking';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

const EMPTY = { current: '', password: '' };

export function PasswordForm() {
  const router = useRouter();
  const [values, setValues] = useState(EMPTY);
  const [done, setDone] = useState(false);
  const { busy, fault, faults, run } = useAsking(['current', 'password']);
  const submit = async () => {
    setDone(false);
    if (!(await run(() => ask('/api/account/password', { body: values })))) return;
    setValues(EMPTY);
    setDone(true);
    router.refresh();
  };
  return (
    <form
      className="space-y-3"
      method="post"
      onSubmit={(event) => {
        event.preventDefault();
        void submit();
      }}
    >
      {fault && <Notice tone="fault">{fault}</Notice>}
      {done && <Notice tone="good">The password was changed, and all other sessions ended.</Notice>}
      <Field
        label="Present password"
        type="password"
        autoComplete="current-password"
        required
        value={values.current}
        fault={faults.current ?? null}
        onChange={(event) => setValues({ ...values, current: event.target.value })}
      />
      <Field
        label="New password"
        type="password"
        autoComplete="new-password"
        required
        hint="At least 12 characters; a few plain words are good."
        value={values.password}
        fault={faults.password ?? null}
        onChange={(event) => setValues({ ...values, password: event.target.value })}
      />
      <Button type="submit" disabled={busy || values.current === '' || values.password === ''}>
        {busy ? 'Changing…' : 'Change the password'}
      </Button>
    </form>
  );
}
