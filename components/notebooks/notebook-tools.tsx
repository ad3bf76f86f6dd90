'use client';

import { useState, type ComponentType } from 'react';
import { ALLOWED } from '@/lib/access';
import type { MemberWorkshop } from '@/lib/accounts/types';
import type { NotebookLine } from '@/lib/notebooks/types';
import { Button } from '@/components/ui/button';
import { Disclosure, DISCLOSURE_ROW } from '@/components/ui/disclosure';
import {
  ArchiveDialog,
  DuplicateDialog,
  MoveDialog,
  RenameDialog,
  TemplateDialog,
  type DeedProps,
} from './deed-dialogs';

type Deed = 'rename' | 'duplicate' | 'move' | 'template' | 'archive';

const DIALOGS: Record<Deed, ComponentType<DeedProps>> = {
  rename: RenameDialog,
  duplicate: DuplicateDialog,
  move: MoveDialog,
  template: TemplateDialog,
  archive: ArchiveDialog,
};

/** What may be done with a notebook in this role; the server decides again. */
function deedsFor({ role, archivedAt }: NotebookLine): Deed[] {
  const inUse = archivedAt === null;
  return [
    ...(ALLOWED[role].has('notebook.rename') && inUse ? (['rename'] as const) : []),
    'duplicate' as const,
    ...(ALLOWED[role].has('notebook.archive') && inUse
      ? (['move', 'template', 'archive'] as const)
      : []),
  ];
}

const words = ({ template }: NotebookLine): Record<Deed, string> => ({
  rename: 'Rename',
  duplicate: 'Duplicate',
  move: 'Move to another workshop',
  template: template ? 'No longer a template' : 'Make it a template',
  archive: 'Archive',
});

interface NotebookToolsProps {
  notebook: NotebookLine;
  workshops: readonly MemberWorkshop[];
}

/** What can be done with a notebook as a whole, as far as the person's role goes. */
export function NotebookTools({ notebook, workshops }: NotebookToolsProps) {
  const [open, setOpen] = useState<Deed | null>(null);
  const Open = open === null ? null : DIALOGS[open];
  const says = words(notebook);
  return (
    <span className="inline-flex items-center gap-2">
      {notebook.archivedAt !== null && ALLOWED[notebook.role].has('notebook.archive') && (
        <Button
          look="quiet"
          aria-label={`Bring back ${notebook.title}`}
          onClick={() => setOpen('archive')}
        >
          Bring back
        </Button>
      )}
      <Disclosure
        label="More"
        name={`More with ${notebook.title}`}
        className="inline-flex min-h-7 items-center rounded-cut border border-rule bg-sheet px-2 text-small hover:border-ink"
      >
        {deedsFor(notebook).map((deed) => (
          <button key={deed} type="button" className={DISCLOSURE_ROW} onClick={() => setOpen(deed)}>
            {says[deed]}
          </button>
        ))}
      </Disclosure>
      {Open && <Open notebook={notebook} workshops={workshops} onClose={() => setOpen(null)} />}
    </span>
  );
}
