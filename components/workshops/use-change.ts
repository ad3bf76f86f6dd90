'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Refusal, sayFault } from '@/components/ui/ask';

export interface Change {
  /** The sentence of the last refusal. */
  fault: string | null;
  busy: boolean;
  /** Runs one request and draws the page anew; whether it was carried out. */
  run: (work: () => Promise<unknown>) => Promise<boolean>;
  /** The same, with a refusal that the caller deals with. */
  runOr: (work: () => Promise<unknown>, meet: (refusal: Refusal) => boolean) => Promise<boolean>;
}

/** One change of what the page shows, asked of the server. */
export function useChange(): Change {
  const router = useRouter();
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const runOr: Change['runOr'] = async (work, meet) => {
    setBusy(true);
    setFault(null);
    try {
      await work();
      router.refresh();
      return true;
    } catch (refused) {
      if (!(refused instanceof Refusal && meet(refused))) setFault(sayFault(refused));
      return false;
    } finally {
      setBusy(false);
    }
  };
  return { fault, busy, runOr, run: (work) => runOr(work, () => false) };
}
