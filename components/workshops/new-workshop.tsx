'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

/** Makes a further workshop and opens it. */
export function NewWorkshop() {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [name, setName] = useState('');
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const make = async () => {
    setBusy(true);
    setFault(null);
    try {
      const { id } = await ask<{ id: string }>('/api/workshops', { body: { name } });
      router.push(`/workshops/${id}`);
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
    }
  };

  return (
    <>
      <Button look="main" onClick={() => setOpen(true)}>
        New workshop
      </Button>
      {open && (
        <Dialog title="New workshop" onClose={() => setOpen(false)}>
          <form
            className="space-y-4"
            onSubmit={(event) => {
              event.preventDefault();
              void make();
            }}
          >
            <Field
              label="Name"
              hint="It stands in the title blocks of its notebooks. You become its admin."
              required
              maxLength={120}
              value={name}
              onChange={(event) => setName(event.target.value)}
            />
            {fault && <Notice tone="fault">{fault}</Notice>}
            <div className="flex justify-end">
              <Button type="submit" look="main" disabled={busy || name.trim() === ''}>
                Make it
              </Button>
            </div>
          </form>
        </Dialog>
      )}
    </>
  );
}
