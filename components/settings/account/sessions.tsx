'use client';

import { signOut } from 'next-auth/react';
import { useRouter } from 'next/navigation';
import { useAsking } from '@/components/accounts/use-asking';
import type { SessionLine } from '@/lib/accounts/types';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';

/** Where the person is signed in; each can be ended at once, and all together. */
export function Sessions({ sessions }: { sessions: readonly SessionLine[] }) {
  const router = useRouter();
  const { busy, fault, run } = useAsking([]);
  const end = async (id: string) => {
    await run(() => ask(`/api/sessions/${id}`, { method: 'DELETE' }));
    router.refresh();
  };
  const endAll = async () => {
    const done = await run(() => ask('/api/sessions', { method: 'DELETE' }));
    if (done) await signOut({ callbackUrl: '/' });
  };
  return (
    <div className="space-y-3">
      {fault && <Notice tone="fault">{fault}</Notice>}
      <ul className="border-t border-hairline">
        {sessions.map((session) => (
          <li
            key={session.id}
            className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2"
          >
            <span className="min-w-0">
              <span className="block font-medium">{session.device}</span>
              <span className="block text-small text-soft">
                begun <Moment at={session.begunAt} />, last used <Moment at={session.seenAt} />
              </span>
            </span>
            {session.current ? (
              <span className="text-small font-semibold text-lichen">this one</span>
            ) : (
              <Button
                look="warn"
                disabled={busy}
                aria-label={`End the session with ${session.device}`}
                onClick={() => void end(session.id)}
              >
                End
              </Button>
            )}
          </li>
        ))}
      </ul>
      <Button disabled={busy} onClick={() => void endAll()}>
        Sign out everywhere
      </Button>
    </div>
  );
}
