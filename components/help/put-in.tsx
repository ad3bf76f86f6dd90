'use client';

import Link from 'next/link';
import { createContext, useContext, useEffect, useState, type ReactNode } from 'react';
import { ALLOWED } from '@/lib/access';
import type { NotebookLine } from '@/lib/notebooks/types';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { putLines, type PutAnswer } from './put-lines';

export interface Target {
  id: string;
  title: string;
}

interface Put {
  target: Target | null;
  put: (lines: string, where: Target) => Promise<string>;
  choose: (lines: string) => void;
  /** What became of the last press, and of which lines. */
  said: { lines: string; text: string } | null;
}

const PutContext = createContext<Put | null>(null);

function sayPut(answer: PutAnswer, { title }: Target): string {
  switch (answer.kind) {
    case 'version':
      return `On “${title}” as version ${answer.number}.`;
    case 'draft':
      return `On the sheet “${title}”, with your other changes; keep a version there.`;
    case 'nothing':
      return `“${title}” has these marks already.`;
  }
}

interface PutProviderProps {
  /** The sheet this page was opened from. */
  from: Target | null;
  children: ReactNode;
}

/** Knows where samples go: the sheet one came from, or the notebook that was chosen last. */
export function PutProvider({ from, children }: PutProviderProps) {
  const [target, setTarget] = useState(from);
  const [asking, setAsking] = useState<string | null>(null);
  const [said, setSaid] = useState<Put['said']>(null);

  const put = async (lines: string, where: Target) => {
    const text = await putLines(where.id, lines, localStorage).then(
      (answer) => sayPut(answer, where),
      sayFault,
    );
    setTarget(where);
    setSaid({ lines, text });
    return text;
  };

  return (
    <PutContext value={{ target, put, choose: setAsking, said }}>
      {children}
      {asking !== null && (
        <ChooseNotebook
          lines={asking}
          onClose={() => setAsking(null)}
          onChoose={(where) => {
            setAsking(null);
            void put(asking, where);
          }}
        />
      )}
    </PutContext>
  );
}

/** The press that puts lines into a notebook, and what became of it. */
export function PutIn({ lines, name }: { lines: string; name: string }) {
  const context = useContext(PutContext);
  const [busy, setBusy] = useState(false);
  if (context === null) return null;
  const { target, put, choose, said } = context;

  const press = async () => {
    if (target === null) return choose(lines);
    setBusy(true);
    await put(lines, target);
    setBusy(false);
  };

  return (
    <>
      <Button
        look="quiet"
        disabled={busy}
        onClick={() => void press()}
        aria-label={`Put ${name} into my notebook`}
      >
        Put into my notebook
      </Button>
      <span role="status" className="text-small text-soft">
        {said?.lines === lines && (
          <>
            {said.text}{' '}
            {target && (
              <Link
                href={`/notebooks/${target.id}`}
                className="text-snapline underline underline-offset-4"
              >
                Go there
              </Link>
            )}
          </>
        )}
      </span>
    </>
  );
}

interface ChooseNotebookProps {
  lines: string;
  onClose: () => void;
  onChoose: (notebook: Target) => void;
}

function ChooseNotebook({ lines, onClose, onChoose }: ChooseNotebookProps) {
  const [notebooks, setNotebooks] = useState<NotebookLine[] | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const [chosen, setChosen] = useState('');
  useEffect(() => {
    let gone = false;
    void ask<{ notebooks: NotebookLine[] }>('/api/notebooks?size=500').then(
      (answer) => {
        if (gone) return;
        const mine = answer.notebooks.filter(({ role }) => ALLOWED[role].has('versions.save'));
        setNotebooks(mine);
        setChosen(mine[0]?.id ?? '');
      },
      (refused) => setFault(sayFault(refused)),
    );
    return () => {
      gone = true;
    };
  }, []);
  const notebook = notebooks?.find(({ id }) => id === chosen);

  return (
    <Dialog title="Put into my notebook" onClose={onClose}>
      <pre className="overflow-x-auto border border-hairline bg-hand px-3 py-2 font-mono text-source">
        {lines}
      </pre>
      {fault && <Notice tone="fault">{fault}</Notice>}
      {notebooks?.length === 0 && (
        <p>
          You have no notebook that you may write in.{' '}
          <Link href="/notebooks">Begin one first.</Link>
        </p>
      )}
      {notebooks !== null && notebooks.length > 0 && (
        <form
          className="space-y-4"
          onSubmit={(event) => {
            event.preventDefault();
            if (notebook) onChoose({ id: notebook.id, title: notebook.title });
          }}
        >
          <Choice
            label="Notebook"
            hint="The lines become its last dimension cell, kept as a new version."
            value={chosen}
            onChange={(event) => setChosen(event.target.value)}
          >
            {notebooks.map(({ id, title }) => (
              <option key={id} value={id}>
                {title}
              </option>
            ))}
          </Choice>
          <div className="flex justify-end">
            <Button type="submit" look="main">
              Put it in
            </Button>
          </div>
        </form>
      )}
    </Dialog>
  );
}
