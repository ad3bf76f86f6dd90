'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import useSWR from 'swr';
import type { NotebookPerson } from '@/lib/notebooks/types';
import type { InvitationLine } from '@/lib/workshops/types';
import { ask, askFor, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice, Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { WaitingInvitations } from '@/components/workshops/waiting-invitations';

type Role = NotebookPerson['role'];

const ROLE_WORDS: Record<Role, string> = {
  owner: 'owner: writes, shares and issues',
  editor: 'editor: writes and keeps versions',
  viewer: 'viewer: reads and exports',
};

const ROLES = Object.keys(ROLE_WORDS) as Role[];

interface PeopleDialogProps {
  notebookId: string;
  personId: string;
  mayChange: boolean;
  onClose: () => void;
}

/** A step that is asked about before it is done. */
type Step = { kind: 'leave' } | { kind: 'hand-over'; to: NotebookPerson };

/** Who may open this notebook, and as what; who has been invited to it. */
export default function PeopleDialog(props: PeopleDialogProps) {
  const { notebookId, personId, mayChange, onClose } = props;
  const router = useRouter();
  const base = `/api/notebooks/${notebookId}`;
  const path = `${base}/people`;
  const people = useSWR<{ people: NotebookPerson[] }, unknown>(path, askFor);
  const invitations = useSWR<{ invitations: InvitationLine[] }, unknown>(
    mayChange ? `${base}/invitations` : null,
    askFor,
  );
  const [fault, setFault] = useState<string | null>(null);
  const [said, say] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const [step, setStep] = useState<Step | null>(null);
  const { data, error } = people;

  /** Runs one request and fetches the lists anew; `words` says what has happened, if it has to be said. */
  const run = async <T,>(work: () => Promise<T>, words?: string | ((answer: T) => string)) => {
    setBusy(true);
    setFault(null);
    say(null);
    try {
      const answer = await work();
      if (words !== undefined) say(typeof words === 'string' ? words : words(answer));
      return true;
    } catch (refused) {
      setFault(sayFault(refused));
      return false;
    } finally {
      await Promise.all([people.mutate(), invitations.mutate()]).catch(() => undefined);
      setBusy(false);
    }
  };
  const add = (body: { email: string; role: Role }) =>
    run(
      () => ask<{ name?: string; invitation?: InvitationLine }>(path, { body }),
      ({ name, invitation }) =>
        invitation
          ? `There is no account with ${invitation.email} yet; an invitation is on its way.`
          : `${name ?? body.email} is on this notebook now.`,
    );
  const take = async (taken: Step) => {
    const done = await run(() =>
      taken.kind === 'leave'
        ? ask(`${base}/leave`, { method: 'POST' })
        : ask(`${base}/hand-over`, { body: { to: taken.to.id } }),
    );
    setStep(null);
    if (!done) return;
    if (taken.kind === 'leave') router.push('/notebooks');
    else {
      // One is no owner any more: the page is drawn anew with what an editor may do.
      router.refresh();
      onClose();
    }
  };

  return (
    <Dialog title="People on this notebook" onClose={onClose}>
      {error !== undefined && <Notice tone="fault">{sayFault(error)}</Notice>}
      {!data && error === undefined && <p className="text-soft">Fetching the list…</p>}
      {data && (
        <ul className="border-t border-hairline">
          {data.people.map((person) => (
            <li
              key={person.id}
              className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2"
            >
              <span className="min-w-0">
                <span className="block font-medium [overflow-wrap:anywhere]">
                  {person.name}
                  {person.id === personId && <span className="font-normal text-soft"> (you)</span>}
                </span>
                <span className="block text-small text-soft [overflow-wrap:anywhere]">
                  {person.email}
                </span>
              </span>
              {mayChange ? (
                <span className="flex flex-wrap items-center gap-x-2 gap-y-1">
                  <select
                    aria-label={`Role of ${person.name}`}
                    value={person.role}
                    disabled={busy}
                    className="min-h-9 rounded-cut border border-rule bg-sheet px-2 text-small"
                    onChange={(event) => {
                      const role = event.target.value as Role;
                      void run(() =>
                        ask(`${path}/${person.id}`, { method: 'PATCH', body: { role } }),
                      );
                    }}
                  >
                    {ROLES.map((role) => (
                      <option key={role}>{role}</option>
                    ))}
                  </select>
                  {person.id !== personId && (
                    <>
                      <Button
                        look="quiet"
                        disabled={busy}
                        aria-label={`Hand over to ${person.name}`}
                        onClick={() => setStep({ kind: 'hand-over', to: person })}
                      >
                        Hand over
                      </Button>
                      <Button
                        look="quiet"
                        disabled={busy}
                        aria-label={`Remove ${person.name}`}
                        onClick={() =>
                          void run(() => ask(`${path}/${person.id}`, { method: 'DELETE' }))
                        }
                      >
                        Remove
                      </Button>
                    </>
                  )}
                </span>
              ) : (
                <span className="text-small">{person.role}</span>
              )}
            </li>
          ))}
        </ul>
      )}
      {invitations.data && (
        <WaitingInvitations
          path={`${base}/invitations`}
          invitations={invitations.data.invitations}
          busy={busy}
          run={(work, words) => void run(work, words)}
        />
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      {said && <Notice tone="good">{said}</Notice>}
      {step && (
        <Confirmation
          step={step}
          busy={busy}
          onYes={() => void take(step)}
          onNo={() => setStep(null)}
        />
      )}
      {mayChange ? (
        <AddPerson busy={busy} onAdd={add} />
      ) : (
        <p className="text-small text-soft">Only an owner adds or removes people.</p>
      )}
      {!step && (
        <div className="border-t border-hairline pt-3">
          <Button look="quiet" className="-ml-1.5" onClick={() => setStep({ kind: 'leave' })}>
            Leave this notebook
          </Button>
        </div>
      )}
    </Dialog>
  );
}

interface ConfirmationProps {
  step: Step;
  busy: boolean;
  onYes: () => void;
  onNo: () => void;
}

function Confirmation({ step, busy, onYes, onNo }: ConfirmationProps) {
  const leaving = step.kind === 'leave';
  return (
    <Notice
      tone="caution"
      title={leaving ? 'Leave this notebook?' : `Hand the notebook over to ${step.to.name}?`}
    >
      <p className="[overflow-wrap:anywhere]">
        {leaving
          ? 'You can open it again only when an owner adds you. What you wrote stays.'
          : `${step.to.name} becomes an owner, and you become an editor.`}
      </p>
      <div className="mt-2 flex justify-end gap-2">
        <Button onClick={onNo}>{leaving ? 'Stay' : 'Keep it'}</Button>
        <Button look="warn" disabled={busy} onClick={onYes}>
          {leaving ? 'Leave' : 'Hand over'}
        </Button>
      </div>
    </Notice>
  );
}

interface AddPersonProps {
  busy: boolean;
  onAdd: (body: { email: string; role: Role }) => Promise<boolean>;
}

function AddPerson({ busy, onAdd }: AddPersonProps) {
  const [email, setEmail] = useState('');
  const [role, setRole] = useState<Role>('viewer');
  return (
    <form
      className="space-y-3 border-t border-rule pt-4"
      onSubmit={(event) => {
        event.preventDefault();
        void onAdd({ email: email.trim(), role }).then((done) => {
          if (done) setEmail('');
        });
      }}
    >
      <Field
        label="Add by e-mail address"
        type="email"
        required
        value={email}
        hint="Somebody without an account here gets an invitation by mail."
        onChange={(event) => setEmail(event.target.value)}
      />
      <Choice label="As" value={role} onChange={(event) => setRole(event.target.value as Role)}>
        {ROLES.map((one) => (
          <option key={one} value={one}>
            {ROLE_WORDS[one]}
          </option>
        ))}
      </Choice>
      <div className="flex justify-end">
        <Button type="submit" look="main" disabled={busy}>
          Add
        </Button>
      </div>
    </form>
  );
}
