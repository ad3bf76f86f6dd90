'use client';

import { useState } from 'react';
import useSWR from 'swr';
import type { NotebookPerson } from '@/lib/notebooks/types';
import { ask, askFor, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice, Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

type Role = NotebookPerson['role'];

export const ROLE_WORDS: Record<Role, string> = {
  owner: 'owner: writes, shares and issues',
  editor: 'editor: writes and keeps versions',
  viewer: 'viewer: reads and exports',
};

const ROLES = Object.keys(ROLE_WORDS) as Role[];

interface PeopleDialogProps {
  notebookId: string;
  mayChange: boolean;
  onClose: () => void;
}

/** Who may open this notebook, and as what. */
export function PeopleDialog({ notebookId, mayChange, onClose }: PeopleDialogProps) {
  const path = `/api/notebooks/${notebookId}/people`;
  const { data, error, mutate } = useSWR<{ people: NotebookPerson[] }, unknown>(path, askFor);
  const [fault, setFault] = useState<string | null>(null);

  const change = async (work: () => Promise<unknown>) => {
    setFault(null);
    try {
      await work();
    } catch (refused) {
      setFault(sayFault(refused));
    }
    await mutate();
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
                <span className="block font-medium [overflow-wrap:anywhere]">{person.name}</span>
                <span className="block text-small text-soft [overflow-wrap:anywhere]">
                  {person.email}
                </span>
              </span>
              {mayChange ? (
                <span className="flex items-center gap-2">
                  <select
                    aria-label={`Role of ${person.name}`}
                    value={person.role}
                    className="min-h-9 rounded-cut border border-rule bg-sheet px-2 text-small"
                    onChange={(event) => {
                      const role = event.target.value as Role;
                      void change(() =>
                        ask(`${path}/${person.id}`, { method: 'PATCH', body: { role } }),
                      );
                    }}
                  >
                    {ROLES.map((role) => (
                      <option key={role}>{role}</option>
                    ))}
                  </select>
                  <Button
                    look="quiet"
                    aria-label={`Remove ${person.name}`}
                    onClick={() =>
                      void change(() => ask(`${path}/${person.id}`, { method: 'DELETE' }))
                    }
                  >
                    Remove
                  </Button>
                </span>
              ) : (
                <span className="text-small">{person.role}</span>
              )}
            </li>
          ))}
        </ul>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      {mayChange ? (
        <AddPerson onAdd={(body) => change(() => ask(path, { body }))} />
      ) : (
        <p className="text-small text-soft">Only an owner adds or removes people.</p>
      )}
    </Dialog>
  );
}

function AddPerson({ onAdd }: { onAdd: (body: { email: string; role: Role }) => Promise<void> }) {
  const [email, setEmail] = useState('');
  const [role, setRole] = useState<Role>('viewer');
  return (
    <form
      className="space-y-3 border-t border-rule pt-4"
      onSubmit={(event) => {
        event.preventDefault();
        void onAdd({ email: email.trim(), role }).then(() => setEmail(''));
      }}
    >
      <Field
        label="Add by e-mail address"
        type="email"
        required
        value={email}
        hint="They need an account here first."
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
        <Button type="submit" look="main">
          Add
        </Button>
      </div>
    </form>
  );
}
