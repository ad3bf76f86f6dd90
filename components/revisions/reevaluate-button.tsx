'use client';

import { useState } from 'react';
import type { Reevaluation } from '@/lib/notebooks/types';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import { Differences } from './differences';

/** Works a revision out again with the engine of today, and shows whether it says the same. */
export function ReevaluateButton({ notebookId, letter }: { notebookId: string; letter: string }) {
  const [open, setOpen] = useState(false);
  const [answer, setAnswer] = useState<Reevaluation | null>(null);
  const [fault, setFault] = useState<string | null>(null);

  const look = async () => {
    setOpen(true);
    setAnswer(null);
    setFault(null);
    const path = `/api/notebooks/${notebookId}/revisions/${letter}/reevaluation`;
    try {
      setAnswer(await ask<Reevaluation>(path, { method: 'POST' }));
    } catch (refused) {
      setFault(sayFault(refused));
    }
  };

  return (
    <>
      <Button aria-label={`Work revision ${letter} out again`} onClick={() => void look()}>
        Work out again
      </Button>
      {open && (
        <Dialog
          title={`Revision ${letter}, worked out again`}
          wide={answer !== null && answer.differences.length > 0}
          onClose={() => setOpen(false)}
        >
          <div className="space-y-4 text-left">
            {fault && <Notice tone="fault">{fault}</Notice>}
            {answer === null && fault === null && <p role="status">Working it out…</p>}
            {answer && <Differences answer={answer} />}
          </div>
        </Dialog>
      )}
    </>
  );
}
