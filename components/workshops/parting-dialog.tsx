'use client';

import { useState } from 'react';
import type { MemberLine, OwnedNotebook } from '@/lib/workshops/types';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useChange } from './use-change';

interface PartingDialogProps {
  workshop: { id: string; name: string };
  /** Whoever goes. */
  member: MemberLine;
  /** Whether that is the person who looks. */
  own: boolean;
  others: readonly MemberLine[];
  onClose: () => void;
  onDone: () => void;
}

/** Leaving a workshop, or taking somebody out of it; asks for a successor where one is needed. */
export function PartingDialog(props: PartingDialogProps) {
  const { workshop, member, own, others, onClose, onDone } = props;
  const { fault, busy, runOr } = useChange();
  const [notebooks, setNotebooks] = useState<OwnedNotebook[] | null>(null);
  const [successor, setSuccessor] = useState(others[0]?.id ?? '');

  const go = () => {
    const chosen: Record<string, string> = notebooks === null ? {} : { successor };
    const path = `/api/workshops/${workshop.id}`;
    const work = own
      ? () => ask(`${path}/leave`, { body: chosen })
      : () =>
          ask(`${path}/members/${member.id}?${new URLSearchParams(chosen).toString()}`, {
            method: 'DELETE',
          });
    void runOr(work, ({ code, document }) => {
      if (code !== 'successor-needed' || !Array.isArray(document.notebooks)) return false;
      setNotebooks(document.notebooks as OwnedNotebook[]);
      return true;
    }).then((done) => {
      if (done) onDone();
    });
  };

  return (
    <Dialog title={own ? 'Leave the workshop' : `Remove ${member.name}`} onClose={onClose}>
      <p className="[overflow-wrap:anywhere]">
        {own
          ? `You leave ${workshop.name}. Your roles on all its notebooks end with that; what you wrote stays.`
          : `${member.name} leaves ${workshop.name}. Their roles on all its notebooks end with that; what they wrote stays.`}
      </p>
      {notebooks && (
        <>
          <Notice tone="caution" title={own ? 'You alone own:' : `${member.name} alone owns:`}>
            <ul className="list-disc pl-5">
              {notebooks.map(({ id, title }) => (
                <li key={id} className="[overflow-wrap:anywhere]">
                  {title}
                </li>
              ))}
            </ul>
          </Notice>
          {others.length === 0 ? (
            <p>There is nobody else here who could own them.</p>
          ) : (
            <Choice
              label="Who owns them from now on"
              value={successor}
              onChange={(event) => setSuccessor(event.target.value)}
            >
              {others.map(({ id, name, email }) => (
                <option key={id} value={id}>
                  {name} ({email})
                </option>
              ))}
            </Choice>
          )}
        </>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      <div className="flex justify-end gap-2">
        <Button onClick={onClose}>{own ? 'Stay' : 'Keep'}</Button>
        <Button
          look="warn"
          disabled={busy || (notebooks !== null && successor === '')}
          onClick={go}
        >
          {own ? 'Leave' : 'Remove'}
        </Button>
      </div>
    </Dialog>
  );
}
