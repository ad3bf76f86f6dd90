'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { CheckLine } from '@/lib/notebooks/types';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';

interface VersionChecksProps {
  notebookId: string;
  number: number;
  checks: readonly CheckLine[];
  /** Whether the person may check it and has not done so. */
  mayCheck: boolean;
}

/** Who has checked a version, and the place to say so oneself. */
export function VersionChecks({ notebookId, number, checks, mayCheck }: VersionChecksProps) {
  const [open, setOpen] = useState(false);
  if (checks.length === 0 && !mayCheck) return null;
  return (
    <section
      aria-label="Checks"
      className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border border-rule bg-sheet px-4 py-2 print:hidden"
    >
      <ul className="min-w-0 text-small">
        {checks.length === 0 && <li className="text-soft">Nobody has checked this version yet.</li>}
        {checks.map(({ person, checkedAt, remark }) => (
          <li key={person.id} className="[overflow-wrap:anywhere]">
            <span className="font-semibold text-lichen">Checked</span> by {person.name},{' '}
            <Moment at={checkedAt} />
            {remark !== null && <span className="font-serif">: {remark}</span>}
          </li>
        ))}
      </ul>
      {mayCheck && <Button onClick={() => setOpen(true)}>I have checked version {number}</Button>}
      {open && (
        <CheckDialog notebookId={notebookId} number={number} onClose={() => setOpen(false)} />
      )}
    </section>
  );
}

interface CheckDialogProps {
  notebookId: string;
  number: number;
  onClose: () => void;
}

function CheckDialog({ notebookId, number, onClose }: CheckDialogProps) {
  const router = useRouter();
  const [remark, setRemark] = useState('');
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const say = async () => {
    setBusy(true);
    setFault(null);
    try {
      const body = remark.trim() === '' ? {} : { remark: remark.trim() };
      await ask(`/api/notebooks/${notebookId}/versions/${number}/checks`, { body });
      router.refresh();
      onClose();
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };

  return (
    <Dialog title={`Version ${number} is checked`} onClose={onClose}>
      <form
        className="space-y-4"
        onSubmit={(event) => {
          event.preventDefault();
          void say();
        }}
      >
        <p>
          You say with your name that you have checked the figures of version {number}. It stays
          said; a revision of this version can name you.
        </p>
        <Field
          label="Remark"
          hint="Optional: how it was checked, or what to mind."
          value={remark}
          maxLength={500}
          onChange={(event) => setRemark(event.target.value)}
        />
        {fault && <Notice tone="fault">{fault}</Notice>}
        <div className="flex justify-end">
          <Button type="submit" look="main" disabled={busy}>
            {busy ? 'Saying so…' : 'I have checked it'}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
