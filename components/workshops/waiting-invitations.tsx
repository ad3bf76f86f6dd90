'use client';

import type { InvitationLine } from '@/lib/workshops/types';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';

interface WaitingInvitationsProps {
  /** Where they are sent again and withdrawn, an id left out. */
  path: string;
  invitations: readonly InvitationLine[];
  busy: boolean;
  /** Runs a request, then shows what has changed. */
  run: (work: () => Promise<unknown>, said: string) => void;
}

/** Invitations that nobody has accepted yet. */
export function WaitingInvitations({ path, invitations, busy, run }: WaitingInvitationsProps) {
  if (invitations.length === 0) return null;
  return (
    <section aria-label="Invitations that wait">
      <h3 className="mb-1 text-small font-semibold">Invited</h3>
      <ul className="border-t border-hairline">
        {invitations.map(({ id, email, role, invitedBy, expiresAt, expired }) => (
          <li
            key={id}
            className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2"
          >
            <span className="min-w-0">
              <span className="block font-medium [overflow-wrap:anywhere]">{email}</span>
              <span className="block text-small text-soft [overflow-wrap:anywhere]">
                as {role}
                {invitedBy && `, by ${invitedBy}`},{' '}
                {expired ? (
                  <strong className="font-semibold text-ochre">expired</strong>
                ) : (
                  <>
                    valid until <Moment at={expiresAt} dayOnly />
                  </>
                )}
              </span>
            </span>
            <span className="flex gap-2 max-sm:-ml-1.5">
              <Button
                look="quiet"
                disabled={busy}
                aria-label={`Send the invitation to ${email} again`}
                onClick={() =>
                  run(
                    () => ask(`${path}/${id}/letters`, { method: 'POST' }),
                    `The invitation is on its way to ${email} again.`,
                  )
                }
              >
                Send again
              </Button>
              <Button
                look="quiet"
                disabled={busy}
                aria-label={`Withdraw the invitation to ${email}`}
                onClick={() =>
                  run(
                    () => ask(`${path}/${id}`, { method: 'DELETE' }),
                    `The invitation to ${email} is withdrawn.`,
                  )
                }
              >
                Withdraw
              </Button>
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}
