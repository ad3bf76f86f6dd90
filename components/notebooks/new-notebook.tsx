'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { MemberWorkshop } from '@/lib/accounts/types';
import type { TemplateLine } from '@/lib/notebooks/types';
import { findStarter } from '@/components/starters/sheets';
import { ChooseStarter } from '@/components/starters/choose-starter';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice, Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

interface NewNotebookProps {
  workshops: readonly MemberWorkshop[];
  /** Of all these workshops. */
  templates: readonly TemplateLine[];
}

/** Begins a notebook and opens it. */
export function NewNotebook({ workshops, templates }: NewNotebookProps) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [title, setTitle] = useState('');
  const [workshopId, setWorkshopId] = useState(workshops[0]?.id ?? '');
  /** `empty`, the name of a starter, or the id of a template. */
  const [beginWith, setBeginWith] = useState('empty');
  const offered = templates.filter(({ workshop }) => workshop.id === workshopId);
  const template = offered.find(({ id }) => id === beginWith);
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const begin = async () => {
    setBusy(true);
    setFault(null);
    const starter = findStarter(beginWith);
    const content = starter && {
      format: 1,
      settings: starter.settings,
      cells: starter.cells,
    };
    try {
      const place = { title, ...(workshopId ? { workshopId } : {}) };
      const made = await (template
        ? ask<{ id: string }>(`/api/templates/${template.id}/notebooks`, { body: place })
        : ask<{ id: string }>('/api/notebooks', {
            body: { ...place, ...(content ? { content } : {}) },
          }));
      router.push(`/notebooks/${made.id}`);
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };

  return (
    <>
      <Button look="main" onClick={() => setOpen(true)}>
        New notebook
      </Button>
      {open && (
        <Dialog title="New notebook" onClose={() => setOpen(false)}>
          <form
            className="space-y-4"
            onSubmit={(event) => {
              event.preventDefault();
              void begin();
            }}
          >
            <Field
              label="Title"
              hint="What is set out, as it should stand in the title block."
              placeholder="Seventeen-light window"
              required
              autoFocus
              maxLength={200}
              value={title}
              onChange={(event) => setTitle(event.target.value)}
            />
            {workshops.length > 1 && (
              <Choice
                label="Workshop"
                value={workshopId}
                onChange={(event) => setWorkshopId(event.target.value)}
              >
                {workshops.map(({ id, name }) => (
                  <option key={id} value={id}>
                    {name}
                  </option>
                ))}
              </Choice>
            )}
            <ChooseStarter
              chosen={template || findStarter(beginWith) ? beginWith : 'empty'}
              templates={offered}
              onChange={setBeginWith}
            />
            {fault && <Notice tone="fault">{fault}</Notice>}
            <div className="flex justify-end">
              <Button type="submit" look="main" disabled={busy || title.trim() === ''}>
                {busy ? 'Opening…' : 'Begin'}
              </Button>
            </div>
          </form>
        </Dialog>
      )}
    </>
  );
}
