'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { SaveState } from '../state/use-saving';

interface KeepDialogProps {
  next: number;
  state: SaveState;
  onKeep: (note: string) => void;
  onClose: () => void;
}

/** Keeps the sheet as its next version, with a line that says what changed. */
export function KeepDialog({ next, state, onKeep, onClose }: KeepDialogProps) {
  const [note, setNote] = useState('');
  return (
    <Dialog title={`Keep as version ${next}`} onClose={onClose}>
      <form
        className="space-y-4"
        onSubmit={(event) => {
          event.preventDefault();
          onKeep(note);
        }}
      >
        <Field
          label="What changed"
          hint="Optional. Shown beside the version, for whoever compares later."
          value={note}
          maxLength={200}
          autoFocus
          onChange={(event) => setNote(event.target.value)}
        />
        {state.kind === 'failed' && <Notice tone="fault">{state.fault}</Notice>}
        <div className="flex justify-end">
          <Button type="submit" look="main" disabled={state.kind === 'keeping'}>
            {state.kind === 'keeping' ? 'Keeping…' : `Keep version ${next}`}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
