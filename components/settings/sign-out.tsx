'use client';

import { signOut } from 'next-auth/react';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';

/** Ends this session, or every session of the person. */
export function SignOut() {
  const leave = () => signOut({ callbackUrl: '/' });
  return (
    <div className="flex flex-wrap gap-2">
      <Button
        onClick={() => void ask('/api/sessions', { method: 'DELETE' }).finally(() => void leave())}
      >
        Sign out everywhere
      </Button>
      <Button onClick={() => void leave()}>Sign out</Button>
    </div>
  );
}
