'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';

/** Brings an archived notebook back from its own page. */
export function BringBack({ notebookId }: { notebookId: string }) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const bring = async () => {
    setBusy(true);
    setFault(null);
    try {
      await ask(`/api/notebooks/${notebookId}`, { method: 'PATCH', body: { archived: false } });
      router.refresh();
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };
  return (
    <>
      <Button look="quiet" disabled={busy} onClick={() => void bring()}>
        Bring it back
      </Button>
      {fault && <span className="text-ruddle">{fault}</span>}
    </>
  );
}
