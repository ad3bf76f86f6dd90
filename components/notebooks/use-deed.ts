'use client';

import { useState } from 'react';
import { sayFault } from '@/components/ui/ask';

/** One thing asked of the server from a dialog: whether it is under way, and why it was refused. */
export function useDeed() {
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const run = async (work: () => Promise<unknown>) => {
    setBusy(true);
    setFault(null);
    try {
      await work();
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };
  return { busy, fault, run };
}
