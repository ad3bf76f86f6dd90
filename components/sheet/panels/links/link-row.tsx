'use client';

import { useState } from 'react';
import useSWR from 'swr';
import type { ClientLinkDetails, ClientLinkLine } from '@/lib/notebooks/types';
import { askFor } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { CopyButton } from '@/components/ui/copy-button';
import { Field } from '@/components/ui/field';
import { Moment } from '@/components/ui/moment';

interface LinkRowProps {
  /** Of the notebook's links in the API. */
  path: string;
  link: ClientLinkLine;
  onRevoke: () => void;
  /** Whether it was changed. */
  onPassphrase: (passphrase: string | null) => Promise<boolean>;
}

/** One link: what it shows, to whom, how often it was opened; more on demand. */
export function LinkRow({ path, link, onRevoke, onPassphrase }: LinkRowProps) {
  const [open, setOpen] = useState(false);
  const name = link.label ?? 'Without a name';
  const ended = link.revokedAt !== null;
  return (
    <li className="border-b border-hairline py-2.5">
      <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1">
        <div className="min-w-0 grow basis-60">
          <p className="font-medium [overflow-wrap:anywhere]">{name}</p>
          <p className="text-small text-soft [overflow-wrap:anywhere]">
            {link.revision === null ? 'the latest revision' : `only revision ${link.revision}`}
            {link.hasPassphrase && ', with a passphrase'}
            {link.clientEmail !== null && `, letters to ${link.clientEmail}`}
            {link.expiresAt !== null && (
              <>
                {link.expired ? ', expired ' : ', opens until '}
                <Moment at={link.expiresAt} />
              </>
            )}
          </p>
          <p className="text-small text-soft">
            made <Moment at={link.madeAt} dayOnly />
            {`, opened ${link.opened === 1 ? 'once' : `${link.opened} times`}`}
          </p>
        </div>
        <div className="flex items-center gap-2">
          {ended ? (
            <span className="text-small font-semibold text-ochre">revoked</span>
          ) : (
            link.expired && <span className="text-small font-semibold text-ochre">expired</span>
          )}
          <Button
            look="quiet"
            aria-expanded={open}
            aria-label={`More about the link ${name}`}
            onClick={() => setOpen(!open)}
          >
            {open ? 'Less' : 'More'}
          </Button>
          {!ended && (
            <Button look="warn" aria-label={`Revoke the link ${name}`} onClick={onRevoke}>
              Revoke
            </Button>
          )}
        </div>
      </div>
      {open && <Details path={path} link={link} onPassphrase={onPassphrase} />}
    </li>
  );
}

function Details({ path, link, onPassphrase }: Omit<LinkRowProps, 'onRevoke'>) {
  const { data } = useSWR<ClientLinkDetails>(`${path}/${link.id}`, askFor);
  const [passphrase, setPassphrase] = useState('');
  const [said, setSaid] = useState('');
  const change = async (to: string | null) => {
    if (!(await onPassphrase(to))) return;
    setPassphrase('');
    setSaid(to === null ? 'It asks for no passphrase any more.' : 'The passphrase is changed.');
  };
  if (!data) return <p className="mt-2 text-small text-soft">Looking it up…</p>;
  return (
    <div className="mt-2 space-y-3 border-l-2 border-hairline pl-3">
      {link.revokedAt === null &&
        (data.url === null ? (
          <p className="text-small">
            The address cannot be shown again: the link was made before addresses could be, or the
            secret of this installation was changed since. It goes on working for whoever has it; to
            send it to somebody else, make a new link.
          </p>
        ) : (
          <div className="flex flex-wrap items-center gap-2">
            <span className="min-w-0 grow border border-hairline bg-sheet p-2 font-mono text-small [overflow-wrap:anywhere]">
              {data.url}
            </span>
            <CopyButton text={data.url} label="Copy the link" />
          </div>
        ))}
      {link.revokedAt === null && (
        <form
          className="flex flex-wrap items-end gap-2"
          autoComplete="off"
          onSubmit={(event) => {
            event.preventDefault();
            void change(passphrase);
          }}
        >
          <div className="min-w-40 grow">
            <Field
              label={link.hasPassphrase ? 'Another passphrase' : 'Ask for a passphrase'}
              hint="At least 8 characters. Whoever is in is asked anew."
              minLength={8}
              maxLength={200}
              required
              value={passphrase}
              onChange={(event) => setPassphrase(event.target.value)}
            />
          </div>
          <Button type="submit">Change</Button>
          {link.hasPassphrase && <Button onClick={() => void change(null)}>Ask for none</Button>}
          <span role="status" className="basis-full text-small">
            {said}
          </span>
        </form>
      )}
      <div className="text-small">
        <p className="font-medium">Opened</p>
        {data.openings.length === 0 ? (
          <p className="text-soft">Not yet.</p>
        ) : (
          <ol className="max-h-32 columns-2 overflow-y-auto text-soft max-sm:columns-1">
            {data.openings.map((at, index) => (
              <li key={`${at} ${index}`}>
                <Moment at={at} />
              </li>
            ))}
          </ol>
        )}
      </div>
    </div>
  );
}
