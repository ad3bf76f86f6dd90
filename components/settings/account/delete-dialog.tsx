'use client';

import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { useAsking } from '@/components/accounts/use-asking';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

interface DeleteDialogProps {
  email: string;
  hasPassword: boolean;
  onClose: () => void;
}

/** Deleting the account: what goes, what stays, what stands in the way, and the proof that it is meant. */
export function DeleteDialog({ email, hasPassword, onClose }: DeleteDialogProps) {
  const [typed, setTyped] = useState('');
  const field = hasPassword ? 'password' : 'email';
  const { busy, fault, faults, run } = useAsking([field]);
  const inTheWay = Object.entries(faults).filter(([name]) => name !== field);
  const submit = async () => {
    const body = { [field]: typed };
    if (!(await run(() => ask('/api/account', { method: 'DELETE', body })))) return;
    await signOut({ callbackUrl: '/' });
  };
  return (
    <Dialog title="Delete my account" onClose={onClose}>
      <form
        className="space-y-4"
        onSubmit={(event) => {
          event.preventDefault();
          void submit();
        }}
      >
        <p>
          Notebooks and workshops that only you are in are deleted with all their versions. What you
          wrote in notebooks of others stays there under “former member”, and so do client links you
          made for them. This cannot be undone.
        </p>
        {inTheWay.length > 0 ? (
          <Notice tone="fault" title="Others still need you">
            <ul className="list-disc space-y-1 pl-5">
              {inTheWay.map(([name, message]) => (
                <li key={name}>{message}</li>
              ))}
            </ul>
          </Notice>
        ) : (
          fault && <Notice tone="fault">{fault}</Notice>
        )}
        <Field
          label={hasPassword ? 'Your password' : `Type ${email}`}
          type={field}
          autoComplete={hasPassword ? 'current-password' : 'off'}
          required
          value={typed}
          fault={faults[field] ?? null}
          onChange={(event) => setTyped(event.target.value)}
        />
        <div className="flex flex-wrap justify-end gap-2">
          <Button onClick={onClose}>Keep my account</Button>
          <Button type="submit" look="warn" disabled={busy || typed === ''}>
            {busy ? 'Deleting…' : 'Delete for good'}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
