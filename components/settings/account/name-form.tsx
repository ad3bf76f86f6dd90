'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useAsking } from '@/components/accounts/use-asking';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

export function NameForm({ name }: { name: string }) {
  const router = useRouter();
  const [value, setValue] = useState(name);
  const { busy, fault, faults, run } = useAsking(['name']);
  const submit = async () => {
    const done = await run(() => ask('/api/account', { method: 'PATCH', body: { name: value } }));
    if (done) router.refresh();
  };
  return (
    <form
      className="space-y-3"
      onSubmit={(event) => {
        event.preventDefault();
        void submit();
      }}
    >
      {fault && <Notice tone="fault">{fault}</Notice>}
      <Field
        label="Your name"
        autoComplete="name"
        required
        maxLength={120}
        value={value}
        fault={faults.name ?? null}
        onChange={(event) => setValue(event.target.value)}
      />
      <Button type="submit" disabled={busy || value.trim() === '' || value.trim() === name}>
        {busy ? 'Storing…' : 'Store the name'}
      </Button>
    </form>
  );
}
