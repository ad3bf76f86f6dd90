'use client';

import { useState } from 'react';
import useSWR from 'swr';
import type { ClientLinkLine, NewClientLink } from '@/lib/notebooks/types';
import { ask, askFor, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { CopyButton } from '@/components/ui/copy-button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';

interface LinksDialogProps {
  notebookId: string;
  onClose: () => void;
}

/** Read-only addresses of this notebook, for people without an account. */
export function LinksDialog({ notebookId, onClose }: LinksDialogProps) {
  const path = `/api/notebooks/${notebookId}/links`;
  const { data, error, mutate } = useSWR<{ links: ClientLinkLine[] }, unknown>(path, askFor);
  const [label, setLabel] = useState('');
  const [made, setMade] = useState<NewClientLink | null>(null);
  const [fault, setFault] = useState<string | null>(null);

  const change = async (work: () => Promise<void>) => {
    setFault(null);
    try {
      await work();
    } catch (refused) {
      setFault(sayFault(refused));
    }
    await mutate();
  };
  const make = () =>
    change(async () => {
      const body = label.trim() ? { label: label.trim() } : {};
      setMade(await ask<NewClientLink>(path, { body }));
      setLabel('');
    });

  return (
    <Dialog title="Client links" onClose={onClose}>
      <p className="text-small text-soft">
        Whoever has a link reads the kept versions of this sheet and exports them. Nobody changes
        anything through it, and it works until you revoke it.
      </p>
      {made && (
        <Notice tone="good" title="The link is made. It is shown only now; copy it.">
          <p className="my-2 border border-hairline bg-sheet p-2 font-mono text-small [overflow-wrap:anywhere]">
            {made.url}
          </p>
          <CopyButton text={made.url} label="Copy the link" />
        </Notice>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      <form
        className="flex items-end gap-2"
        onSubmit={(event) => {
          event.preventDefault();
          void make();
        }}
      >
        <div className="grow">
          <Field
            label="For whom"
            placeholder="The architect"
            value={label}
            maxLength={80}
            onChange={(event) => setLabel(event.target.value)}
          />
        </div>
        <Button type="submit" look="main" className="min-h-10">
          Make a link
        </Button>
      </form>
      {error !== undefined && <Notice tone="fault">{sayFault(error)}</Notice>}
      {data?.links.length === 0 && <p className="text-soft">No link has been made yet.</p>}
      {data && data.links.length > 0 && (
        <ul className="border-t border-hairline">
          {data.links.map((link) => (
            <li
              key={link.id}
              className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2"
            >
              <span className="min-w-0">
                <span className="block font-medium [overflow-wrap:anywhere]">
                  {link.label ?? 'Without a name'}
                </span>
                <span className="block text-small text-soft">
                  made <Moment at={link.madeAt} />
                  {`, opened ${link.opened === 1 ? 'once' : `${link.opened} times`}`}
                </span>
              </span>
              {link.revokedAt ? (
                <span className="text-small font-semibold text-ochre">revoked</span>
              ) : (
                <Button
                  look="warn"
                  aria-label={`Revoke the link ${link.label ?? 'without a name'}`}
                  onClick={() =>
                    void change(async () => {
                      await ask(`${path}/${link.id}`, { method: 'DELETE' });
                      if (made?.id === link.id) setMade(null);
                    })
                  }
                >
                  Revoke
                </Button>
              )}
            </li>
          ))}
        </ul>
      )}
    </Dialog>
  );
}
