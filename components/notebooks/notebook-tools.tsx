'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { NotebookLine } from '@/lib/notebooks/types';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

/** Rename and archive, as far as the person's role goes. */
export function NotebookTools({ notebook }: { notebook: NotebookLine }) {
  const router = useRouter();
  const [open, setOpen] = useState<'rename' | 'archive' | null>(null);
  const [title, setTitle] = useState(notebook.title);
  const [fault, setFault] = useState<string | null>(null);
  const archived = notebook.archivedAt !== null;
  if (notebook.role === 'viewer') return null;

  const change = async (body: { title: string } | { archived: boolean }) => {
    setFault(null);
    try {
      await ask(`/api/notebooks/${notebook.id}`, { method: 'PATCH', body });
      setOpen(null);
      router.refresh();
    } catch (refused) {
      setFault(sayFault(refused));
    }
  };
  const close = () => {
    setOpen(null);
    setFault(null);
    setTitle(notebook.title);
  };

  return (
    <span className="inline-flex gap-1 max-md:-ml-1.5">
      <Button
        look="quiet"
        onClick={() => setOpen('rename')}
        aria-label={`Rename ${notebook.title}`}
      >
        Rename
      </Button>
      {notebook.role === 'owner' && (
        <Button
          look="quiet"
          onClick={() => setOpen('archive')}
          aria-label={`${archived ? 'Bring back' : 'Archive'} ${notebook.title}`}
        >
          {archived ? 'Bring back' : 'Archive'}
        </Button>
      )}
      {open === 'rename' && (
        <Dialog title="Rename the notebook" onClose={close}>
          <form
            className="space-y-4 text-left"
            onSubmit={(event) => {
              event.preventDefault();
              void change({ title });
            }}
          >
            <Field
              label="Title"
              required
              autoFocus
              maxLength={200}
              value={title}
              onChange={(event) => setTitle(event.target.value)}
            />
            {fault && <Notice tone="fault">{fault}</Notice>}
            <div className="flex justify-end">
              <Button type="submit" look="main" disabled={title.trim() === ''}>
                Rename
              </Button>
            </div>
          </form>
        </Dialog>
      )}
      {open === 'archive' && (
        <Dialog title={archived ? 'Bring it back' : 'Archive the notebook'} onClose={close}>
          <div className="space-y-4 text-left">
            <p className="[overflow-wrap:anywhere]">
              {archived
                ? `“${notebook.title}” returns to the notebooks in use and can be changed again.`
                : `“${notebook.title}” can still be read, by client links too, but not changed, until it is brought back.`}
            </p>
            {fault && <Notice tone="fault">{fault}</Notice>}
            <div className="flex justify-end">
              <Button look="main" onClick={() => void change({ archived: !archived })}>
                {archived ? 'Bring back' : 'Archive'}
              </Button>
            </div>
          </div>
        </Dialog>
      )}
    </span>
  );
}
