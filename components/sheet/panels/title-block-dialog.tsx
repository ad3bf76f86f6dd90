'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { NotebookHead, TitleBlockEntries } from '@/lib/notebooks/types';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice, Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { TOLERANCE_WORDS, type ToleranceClass } from '../tolerance-words';

interface TitleBlockDialogProps {
  notebook: NotebookHead;
  /** Whoever kept the version on the screen. */
  author: string;
  onClose: () => void;
}

type Written = Exclude<keyof TitleBlockEntries, 'toleranceClass'>;

/** What this sheet says in its title block; what is left empty follows the workshop. */
export default function TitleBlockDialog({ notebook, author, onClose }: TitleBlockDialogProps) {
  const router = useRouter();
  const [entries, setEntries] = useState(notebook.titleEntries);
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const { titleBlock: shown, titleEntries: own } = notebook;

  const fill = async () => {
    setBusy(true);
    setFault(null);
    try {
      await ask(`/api/notebooks/${notebook.id}/title-block`, { method: 'PATCH', body: entries });
      router.refresh();
      onClose();
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };
  /** What is shown while a field is empty. */
  const follows: Record<Written, string> = {
    identificationNumber: own.identificationNumber ? '' : shown.identificationNumber,
    supplementaryTitle: '',
    creator: author,
    approvalPerson: own.approvalPerson ? '' : shown.approvalPerson,
    sheet: '1',
  };
  const written = (name: Written, label: string, max: number, hint?: string) => (
    <Field
      label={label}
      hint={hint}
      maxLength={max}
      placeholder={follows[name]}
      value={entries[name]}
      onChange={(event) => setEntries({ ...entries, [name]: event.target.value })}
    />
  );

  return (
    <Dialog title="Title block" onClose={onClose}>
      <form
        className="space-y-4"
        onSubmit={(event) => {
          event.preventDefault();
          void fill();
        }}
      >
        <p className="text-small text-soft">
          Title and legal owner come from the notebook and its workshop. A field left empty shows
          what stands in it in grey.
        </p>
        <div className="grid gap-4 sm:grid-cols-2">
          {written('identificationNumber', 'Identification number', 40)}
          {written('sheet', 'Sheet', 20, 'Such as 1 of 3.')}
          <div className="sm:col-span-2">
            {written('supplementaryTitle', 'Supplementary title', 200)}
          </div>
          {written('creator', 'Created by', 120)}
          {written('approvalPerson', 'Approved by', 120)}
          <div className="sm:col-span-2">
            <Choice
              label="General tolerances after ISO 2768-1"
              value={entries.toleranceClass ?? ''}
              onChange={(event) =>
                setEntries({
                  ...entries,
                  toleranceClass: (event.target.value || null) as ToleranceClass | null,
                })
              }
            >
              <option value="">as the workshop has them</option>
              {Object.entries(TOLERANCE_WORDS).map(([value, words]) => (
                <option key={value} value={value}>
                  {words}
                </option>
              ))}
            </Choice>
          </div>
        </div>
        {fault && <Notice tone="fault">{fault}</Notice>}
        <div className="flex justify-end">
          <Button type="submit" look="main" disabled={busy}>
            Fill in
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
