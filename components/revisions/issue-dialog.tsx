'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import useSWR from 'swr';
import type { Issued, IssueProspect } from '@/lib/notebooks/types';
import { ask, askFor, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice, Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { TextArea } from '@/components/ui/text-area';

interface IssueDialogProps {
  notebookId: string;
  /** Versions count from 1 to this one, which is issued unless another is chosen. */
  head: number;
  /** What is on the screen has not been kept, so it is not what will be issued. */
  unkept?: boolean;
  onClose: () => void;
}

/** In plain words; whoever issues may write others. */
const PURPOSES = ['for comment', 'for approval', 'for manufacture', 'as built'];

/** Asks what the revision is for and who checked it, and tells what issuing will meet. */
export default function IssueDialog({ notebookId, head, unkept, onClose }: IssueDialogProps) {
  const router = useRouter();
  const path = `/api/notebooks/${notebookId}/revisions`;
  const [version, setVersion] = useState(head);
  const [purpose, setPurpose] = useState('for comment');
  const [note, setNote] = useState('');
  const [checkedBy, setCheckedBy] = useState('');
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const { data, error, mutate } = useSWR<IssueProspect, unknown>(
    `${path}/next?version=${version}`,
    askFor,
    { revalidateOnFocus: false },
  );

  const issue = async (prospect: IssueProspect) => {
    setBusy(true);
    setFault(null);
    const optional = {
      ...(note.trim() === '' ? {} : { note: note.trim() }),
      ...(checkedBy === '' ? {} : { checkedBy }),
    };
    try {
      const { letter } = await ask<Issued>(path, {
        body: { version, purpose: purpose.trim(), faults: prospect.faults, ...optional },
      });
      router.push(`/notebooks/${notebookId}/revisions/${letter}`);
      router.refresh();
    } catch (refused) {
      setFault(sayFault(refused));
      setBusy(false);
      await mutate();
    }
  };

  return (
    <Dialog title={data ? `Issue revision ${data.letter}` : 'Issue a revision'} onClose={onClose}>
      <p className="text-small text-soft">
        A revision is frozen when it is issued: its figures, settings and title block never change
        again. Clients read it through their links.
      </p>
      {unkept && version === head && (
        <Notice tone="caution" title="What you changed last is not in it">
          Version {head} is issued as it was kept. Keep your changes first to issue them too.
        </Notice>
      )}
      {error !== undefined && <Notice tone="fault">{sayFault(error)}</Notice>}
      {data && <Prospect prospect={data} />}
      <form
        className="space-y-4"
        onSubmit={(event) => {
          event.preventDefault();
          if (data) void issue(data);
        }}
      >
        <div className="grid gap-4 sm:grid-cols-2">
          <Choice
            label="Version"
            value={version}
            onChange={(event) => {
              setVersion(Number(event.target.value));
              setCheckedBy('');
            }}
          >
            {Array.from({ length: Math.min(head, 200) }, (_, index) => head - index).map(
              (number) => (
                <option key={number} value={number}>
                  {number === head ? `${number}, the newest` : number}
                </option>
              ),
            )}
          </Choice>
          <Choice
            label="Checked by"
            value={checkedBy}
            onChange={(event) => setCheckedBy(event.target.value)}
            hint={data?.checks.length === 0 ? 'Nobody has checked this version yet.' : undefined}
          >
            <option value="">
              {data?.checkNeeded ? 'the last who checked it' : 'nobody named'}
            </option>
            {data?.checks.map(({ person }) => (
              <option key={person.id} value={person.id}>
                {person.name}
              </option>
            ))}
          </Choice>
        </div>
        <Field
          label="Purpose"
          hint={`In plain words, such as ${PURPOSES.slice(0, -1).join(', ')} or ${PURPOSES.at(-1)}.`}
          list="purposes"
          required
          maxLength={120}
          value={purpose}
          onChange={(event) => setPurpose(event.target.value)}
        />
        <datalist id="purposes">
          {PURPOSES.map((one) => (
            <option key={one} value={one} />
          ))}
        </datalist>
        <TextArea
          label="What is new"
          hint="Optional. Clients read it on their page and in the letter about the revision."
          rows={3}
          maxLength={1000}
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
        {fault && <Notice tone="fault">{fault}</Notice>}
        <div className="flex justify-end">
          <Button
            type="submit"
            look="main"
            disabled={busy || !data || data.hindrance !== null || purpose.trim() === ''}
          >
            {busy ? 'Issuing…' : data ? `Issue revision ${data.letter}` : 'Looking it through…'}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

/** What is in the way, what is faulty, and who will be told. */
function Prospect({ prospect }: { prospect: IssueProspect }) {
  const { hindrance, faults, letters } = prospect;
  return (
    <>
      {hindrance !== null && (
        <Notice tone="fault" title="It cannot be issued yet">
          {hindrance}
        </Notice>
      )}
      {faults > 0 && (
        <Notice
          tone="caution"
          title={faults === 1 ? '1 line has a fault' : `${faults} lines have faults`}
        >
          Issued like this, the sheet shows them as they are.
        </Notice>
      )}
      {letters > 0 && (
        <p className="text-small">
          {letters === 1 ? '1 client gets' : `${letters} clients get`} a letter about it.
        </p>
      )}
    </>
  );
}
