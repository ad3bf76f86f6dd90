'use client';

import { useState } from 'react';
import { ask } from '@/components/ui/ask';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useAsking } from './use-asking';

/** A button, because programs that look through mail follow links and must confirm nothing by it. */
export function ConfirmButton({ token }: { token: string }) {
  const { busy, fault, run } = useAsking([]);
  const [made, setMade] = useState(false);
  if (made) {
    return (
      <div className="space-y-4">
        <Notice tone="good">The address is confirmed and the account is made.</Notice>
        <LinkButton look="main" href="/sign-in" className="w-full">
          Sign in
        </LinkButton>
      </div>
    );
  }
  const confirm = async () =>
    setMade(await run(() => ask('/api/accounts/confirm', { body: { token } })));
  return (
    <div className="space-y-4">
      {fault && <Notice tone="fault">{fault}</Notice>}
      <Button look="main" className="w-full" disabled={busy} onClick={() => void confirm()}>
        {busy ? 'Confirming…' : 'Confirm the address'}
      </Button>
    </div>
  );
}
