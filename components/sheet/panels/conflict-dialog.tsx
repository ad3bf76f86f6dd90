'use client';

import { useState } from 'react';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import type { StaleHead } from '@/lib/notebooks/types';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { bringTogether, findDifferences, type Difference, type Side } from '../state/conflict';
import type { KeepState } from '../state/use-notebook';

interface ConflictDialogProps {
  base: NotebookContent;
  mine: NotebookContent;
  head: StaleHead;
  state: KeepState;
  onKeep: (content: NotebookContent) => void;
  onTakeTheirs: () => void;
  onClose: () => void;
}

/**
 * Somebody kept a version while this sheet was being written. Both texts stand side by side, cell
 * by cell; nothing is decided, and nothing lost, until a choice is made.
 */
export function ConflictDialog(props: ConflictDialogProps) {
  const { base, mine, head, state, onKeep, onTakeTheirs, onClose } = props;
  const texts = { base, mine, theirs: head.content };
  const differences = findDifferences(texts);
  const [made, setMade] = useState<ReadonlyMap<string, Side>>(new Map());
  const choices = new Map(differences.map(({ id, proposed }) => [id, made.get(id) ?? proposed]));
  const choose = (id: string, side: Side) => setMade(new Map(made).set(id, side));
  const chooseAll = (side: Side) => setMade(new Map(differences.map(({ id }) => [id, side])));

  return (
    <Dialog title={`${head.author} kept version ${head.number} meanwhile`} onClose={onClose} wide>
      <p>
        Version {head.number} was kept on <Moment at={head.savedAt} />, after you began. Choose for
        each cell that differs; what you choose becomes version {head.number + 1}. Version{' '}
        {head.number} stays in the list of versions, and your text stays in this browser until you
        have chosen.
      </p>
      <ul className="space-y-3">
        {differences.map((difference) => (
          <DifferenceRow
            key={difference.id}
            difference={difference}
            choice={choices.get(difference.id) ?? 'mine'}
            author={head.author}
            onChoose={(side) => choose(difference.id, side)}
          />
        ))}
      </ul>
      {differences.length === 0 && (
        <p>The cells of both are the same; only order or settings differ.</p>
      )}
      {state.kind === 'failed' && <Notice tone="fault">{state.fault}</Notice>}
      <div className="flex flex-wrap justify-between gap-2 border-t border-hairline pt-3">
        <div className="flex flex-wrap gap-2">
          <Button look="quiet" onClick={() => chooseAll('mine')}>
            Choose all of mine
          </Button>
          <Button look="quiet" onClick={() => chooseAll('theirs')}>
            Choose all of theirs
          </Button>
        </div>
        <div className="flex flex-wrap gap-2">
          <Button onClick={onTakeTheirs}>Take version {head.number}, put mine aside</Button>
          <Button
            look="main"
            disabled={state.kind === 'keeping'}
            onClick={() => onKeep(bringTogether(texts, choices))}
          >
            {state.kind === 'keeping' ? 'Keeping…' : `Keep as version ${head.number + 1}`}
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

interface DifferenceRowProps {
  difference: Difference;
  choice: Side;
  author: string;
  onChoose: (side: Side) => void;
}

const CHANGED = {
  mine: 'changed by you',
  theirs: 'changed by them',
  both: 'changed by both',
} as const;

const KINDS: Record<NotebookCell['kind'], string> = {
  dimension: 'Dimension cell',
  note: 'Note',
  section: 'Section',
};

function DifferenceRow({ difference, choice, author, onChoose }: DifferenceRowProps) {
  const { id, mine, theirs, changed } = difference;
  const sides = [
    { side: 'mine', cell: mine, name: 'Mine' },
    { side: 'theirs', cell: theirs, name: author },
  ] as const;
  return (
    <li>
      <fieldset>
        <legend className="text-small text-soft">
          {KINDS[(mine ?? theirs)?.kind ?? 'dimension']}, {CHANGED[changed]}
        </legend>
        <div className="grid sm:grid-cols-2">
          {sides.map(({ side, cell, name }) => (
            <label
              key={side}
              className={`flex min-w-0 cursor-pointer gap-2 border p-2.5 ${choice === side ? 'border-snapline bg-snapline-wash' : 'border-hairline'}`}
            >
              <input
                type="radio"
                name={`side-${id}`}
                checked={choice === side}
                onChange={() => onChoose(side)}
                className="mt-1 shrink-0 accent-snapline"
              />
              <span className="min-w-0">
                <span className="text-small font-semibold">{name}</span>
                <CellText cell={cell} />
              </span>
            </label>
          ))}
        </div>
      </fieldset>
    </li>
  );
}

function CellText({ cell }: { cell: NotebookCell | null }) {
  if (cell === null)
    return <span className="block text-small italic text-soft">not on the sheet</span>;
  const own = Object.entries(cell.settings ?? {}).map(
    ([name, value]) => `${name} ${value ?? 'none'}`,
  );
  return (
    <>
      <code className="block whitespace-pre-wrap font-mono text-small [overflow-wrap:anywhere]">
        {cell.source || '(empty)'}
      </code>
      {own.length > 0 && <span className="block text-small text-soft">{own.join(', ')}</span>}
    </>
  );
}
