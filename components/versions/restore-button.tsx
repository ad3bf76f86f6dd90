'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';

interface RestoreButtonProps {
  notebookId: string;
  number: number;
  head: number;
}

/** Keeps an old version again as the newest. Nothing in between is lost. */
export function RestoreButton({ notebookId, number, head }: RestoreButtonProps) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const restore = async () => {
    setBusy(true);
    setFault(null);
    try {
      await ask(`/api/notebooks/${notebookId}/versions/${number}/restore`, {
        body: { base: head },
      });
      router.push(`/notebooks/${notebookId}`);
      router.refresh();
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };

  return (
    <>
      <Button
        look="quiet"
        onClick={() => setOpen(true)}
        aria-label={`Keep version ${number} again`}
      >
        Keep again
      </Button>
      {open && (
        <Dialog title={`Keep version ${number} again`} onClose={() => setOpen(false)}>
          <div className="space-y-4 text-left">
            <p>
              Version {number} becomes version {head + 1}, the newest. All versions up to {head}{' '}
              stay in the list.
            </p>
            {fault && <Notice tone="fault">{fault}</Notice>}
            <div className="flex justify-end">
              <Button look="main" disabled={busy} onClick={() => void restore()}>
                {busy ? 'Keeping…' : `Keep as version ${head + 1}`}
              </Button>
            </div>
          </div>
        </Dialog>
      )}
    </>
  );
}
