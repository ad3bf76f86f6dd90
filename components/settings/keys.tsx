'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { ApiKeyLine, NewApiKey } from '@/lib/accounts/types';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { CopyButton } from '@/components/ui/copy-button';
import { Choice, Field } from '@/components/ui/field';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';

/** What a key may be for, as the person ticks it and as the list says it. */
const SCOPES = {
  evaluate: { label: 'Evaluate expressions', short: 'evaluates' },
  revisions: { label: 'Read issued revisions of my notebooks', short: 'reads revisions' },
} as const satisfies Record<ApiKeyLine['scopes'][number], { label: string; short: string }>;
type Scope = keyof typeof SCOPES;
const ALL_SCOPES = Object.keys(SCOPES) as Scope[];

const EXPIRIES = {
  '30': '30 days',
  '90': '90 days',
  '365': 'a year',
  '': 'until revoked',
} as const;

/** The person's API keys: made here, shown once, revoked at once. */
export function Keys({ keys }: { keys: readonly ApiKeyLine[] }) {
  const router = useRouter();
  const [made, setMade] = useState<NewApiKey | null>(null);
  const [label, setLabel] = useState('');
  const [days, setDays] = useState('90');
  const [scopes, setScopes] = useState<readonly Scope[]>(['evaluate']);
  const [fault, setFault] = useState<string | null>(null);

  const change = async (work: () => Promise<void>) => {
    setFault(null);
    try {
      await work();
      router.refresh();
    } catch (refused) {
      setFault(sayFault(refused));
    }
  };
  const make = () =>
    change(async () => {
      const expiry = days === '' ? {} : { expiresInDays: Number(days) };
      setMade(
        await ask<NewApiKey>('/api/keys', { body: { label: label.trim(), scopes, ...expiry } }),
      );
      setLabel('');
    });
  const revoke = (key: ApiKeyLine) =>
    change(async () => {
      await ask(`/api/keys/${key.id}`, { method: 'DELETE' });
      if (made?.id === key.id) setMade(null);
    });

  return (
    <section aria-labelledby="keys" className="min-w-0 space-y-4">
      <h2 id="keys" className="text-figure font-semibold">
        API keys
      </h2>
      {made && (
        <Notice tone="good" title="The key is made. It is shown only now; copy it.">
          <p className="my-2 border border-hairline bg-sheet p-2 font-mono text-small [overflow-wrap:anywhere]">
            {made.key}
          </p>
          <CopyButton text={made.key} label="Copy the key" />
        </Notice>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      <form
        className="space-y-3 border border-rule bg-sheet p-4"
        onSubmit={(event) => {
          event.preventDefault();
          void make();
        }}
      >
        <div className="grid gap-3 sm:grid-cols-[minmax(0,1fr)_9rem]">
          <Field
            label="What for"
            placeholder="Saw in bay 2"
            required
            maxLength={120}
            value={label}
            onChange={(event) => setLabel(event.target.value)}
          />
          <Choice label="Valid" value={days} onChange={(event) => setDays(event.target.value)}>
            {Object.entries(EXPIRIES).map(([value, words]) => (
              <option key={words} value={value}>
                {words}
              </option>
            ))}
          </Choice>
        </div>
        <fieldset>
          <legend className="text-small font-medium">The key may</legend>
          <div className="mt-1 flex flex-wrap gap-x-6 gap-y-1">
            {ALL_SCOPES.map((scope) => (
              <label key={scope} className="flex min-h-7 items-center gap-2">
                <input
                  type="checkbox"
                  className="size-4 accent-ruddle"
                  checked={scopes.includes(scope)}
                  onChange={(event) =>
                    setScopes(
                      ALL_SCOPES.filter((one) =>
                        one === scope ? event.target.checked : scopes.includes(one),
                      ),
                    )
                  }
                />
                {SCOPES[scope].label}
              </label>
            ))}
          </div>
        </fieldset>
        <div className="flex justify-end">
          <Button type="submit" look="main" disabled={label.trim() === '' || scopes.length === 0}>
            Make a key
          </Button>
        </div>
      </form>
      {keys.length === 0 ? (
        <p className="text-soft">No key has been made yet.</p>
      ) : (
        <ul className="border-t border-hairline">
          {keys.map((key) => (
            <KeyRow key={key.id} line={key} onRevoke={() => void revoke(key)} />
          ))}
        </ul>
      )}
    </section>
  );
}

function KeyRow({ line, onRevoke }: { line: ApiKeyLine; onRevoke: () => void }) {
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2">
      <span className="min-w-0">
        <span className="block font-medium [overflow-wrap:anywhere]">
          {line.label} <span className="font-mono text-small text-soft">…{line.fragment}</span>
        </span>
        <span className="block text-small text-soft">
          {line.scopes.map((scope) => SCOPES[scope].short).join(' and ')}, made{' '}
          <Moment at={line.madeAt} dayOnly />
          {line.expiresAt && (
            <>
              , valid until <Moment at={line.expiresAt} dayOnly />
            </>
          )}
          {', '}
          {line.lastUsedAt ? (
            <>
              last used <Moment at={line.lastUsedAt} />
            </>
          ) : (
            'not used yet'
          )}
        </span>
      </span>
      {line.revokedAt ? (
        <span className="text-small font-semibold text-ochre">revoked</span>
      ) : (
        <Button look="warn" aria-label={`Revoke the key ${line.label}`} onClick={onRevoke}>
          Revoke
        </Button>
      )}
    </li>
  );
}
