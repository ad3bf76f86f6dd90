'use client';

import { useState } from 'react';
import type { MemberWorkshop } from '@/lib/accounts/types';
import { Button } from '@/components/ui/button';
import { DuplicateDialog, type DeedNotebook } from './deed-dialogs';

interface DuplicateVersionProps {
  notebook: Omit<DeedNotebook, 'template'>;
  version: number;
  workshops: readonly MemberWorkshop[];
}

/** Makes a notebook of one's own from the version that is read. */
export function DuplicateVersion({ notebook, version, workshops }: DuplicateVersionProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Duplicate</Button>
      {open && (
        <DuplicateDialog
          notebook={{ ...notebook, template: false }}
          version={version}
          workshops={workshops}
          onClose={() => setOpen(false)}
        />
      )}
    </>
  );
}
