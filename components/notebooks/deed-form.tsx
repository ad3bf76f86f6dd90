'use client';

import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import { useDeed } from './use-deed';

interface DeedFormProps {
  title: string;
  /** The word on the button that does it. */
  does: string;
  /** Whether it can be done as the form stands. */
  ready?: boolean;
  /** Does it; what it throws is shown. The caller closes the dialog or leaves the page. */
  onDo: () => Promise<unknown>;
  onClose: () => void;
  children: ReactNode;
}

/** A dialog that asks for one thing and does it. */
export function DeedForm(props: DeedFormProps) {
  const { title, does, ready = true, onDo, onClose, children } = props;
  const { busy, fault, run } = useDeed();
  return (
    <Dialog title={title} onClose={onClose}>
      <form
        className="space-y-4 text-left whitespace-normal"
        onSubmit={(event) => {
          event.preventDefault();
          void run(onDo);
        }}
      >
        {children}
        {fault && <Notice tone="fault">{fault}</Notice>}
        <div className="flex justify-end">
          <Button type="submit" look="main" disabled={busy || !ready}>
            {does}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
