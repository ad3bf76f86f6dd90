'use client';

import { lazy, Suspense, useState } from 'react';
import { Button } from '@/components/ui/button';

/** Loaded when first asked for. */
const IssueDialog = lazy(() => import('./issue-dialog'));

export function IssueButton({ notebookId, head }: { notebookId: string; head: number }) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button look="main" onClick={() => setOpen(true)}>
        Issue a revision
      </Button>
      {open && (
        <Suspense>
          <IssueDialog notebookId={notebookId} head={head} onClose={() => setOpen(false)} />
        </Suspense>
      )}
    </>
  );
}
