'use client';

import { useState } from 'react';
import useSWR from 'swr';
import type { ClientLinkLine, NewClientLink } from '@/lib/notebooks/types';
import { ask, askFor, sayFault } from '@/components/ui/ask';
import { CopyButton } from '@/components/ui/copy-button';
import { Dialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import { LinkForm, type LinkWish } from './links/link-form';
import { LinkRow } from './links/link-row';

interface LinksDialogProps {
  notebookId: string;
  onClose: () => void;
}

/** Read-only addresses of what this notebook has issued, for people without an account. */
export default function LinksDialog({ notebookId, onClose }: LinksDialogProps) {
  const path = `/api/notebooks/${notebookId}/links`;
  const { data, error, mutate } = useSWR<{ links: ClientLinkLine[] }, unknown>(path, askFor);
  const [made, setMade] = useState<NewClientLink | null>(null);
  const [fault, setFault] = useState<string | null>(null);

  const change = async (work: () => Promise<void>): Promise<boolean> => {
    setFault(null);
    try {
      await work();
      return true;
    } catch (refused) {
      setFault(sayFault(refused));
      return false;
    } finally {
      await mutate();
    }
  };
  const make = (wish: LinkWish) =>
    change(async () => {
      setMade(await ask<NewClientLink>(path, { body: wish }));
    });
  const revoke = (link: ClientLinkLine) =>
    change(async () => {
      await ask(`${path}/${link.id}`, { method: 'DELETE' });
      if (made?.id === link.id) setMade(null);
    });

  return (
    <Dialog title="Client links" onClose={onClose}>
      <p className="text-small text-soft">
        Whoever has a link reads what was issued of this sheet, and exports it, without an account.
        Nobody changes anything through it, and it ends at once when you revoke it.
      </p>
      {made && (
        <Notice tone="good" title="The link is made.">
          <p className="my-2 border border-hairline bg-sheet p-2 font-mono text-small [overflow-wrap:anywhere]">
            {made.url}
          </p>
          <CopyButton text={made.url} label="Copy the link" />
        </Notice>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      <LinkForm notebookId={notebookId} onMake={make} />
      {error !== undefined && <Notice tone="fault">{sayFault(error)}</Notice>}
      {data?.links.length === 0 && <p className="text-soft">No link has been made yet.</p>}
      {data && data.links.length > 0 && (
        <ul className="border-t border-hairline">
          {data.links.map((link) => (
            <LinkRow
              key={link.id}
              path={path}
              link={link}
              onRevoke={() => void revoke(link)}
              onPassphrase={(passphrase) =>
                change(() => ask(`${path}/${link.id}`, { method: 'PATCH', body: { passphrase } }))
              }
            />
          ))}
        </ul>
      )}
    </Dialog>
  );
}
