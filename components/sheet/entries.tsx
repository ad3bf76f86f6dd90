'use client';

import type { NotebookContent } from '@/lib/notebooks/content';
import { Button } from '@/components/ui/button';
import { Gap } from './cell-tools';
import type { Hand, SheetActions } from './cells';
import { DimensionCell } from './dimension-cell';
import { NoteCell } from './note-cell';
import type { ShownLine } from './state/shown';
import type { Evaluation } from './state/use-evaluation';

interface EntriesProps {
  content: NotebookContent;
  evaluation: Evaluation;
  hand: Hand | null;
  mayWrite: boolean;
  actions: SheetActions;
}

const NONE: readonly ShownLine[] = [];
/** From so many cells on, those out of sight are not laid out. */
const LAZY_FROM = 30;

/** The entries of the sheet, one under another, and the place where the next one is begun. */
export function Entries(props: EntriesProps) {
  const { content, evaluation, hand, mayWrite, actions } = props;
  const { cells } = content;
  const lazy = cells.length >= LAZY_FROM;
  const late = evaluation.state === 'slow' || evaluation.state === 'failed';

  return (
    <>
      {cells.length === 0 && <EmptySheet mayWrite={mayWrite} />}
      <div>
        {cells.map((cell, index) => {
          const lines = evaluation.shown.get(cell.id) ?? NONE;
          const common = {
            cell,
            place: index + 1,
            hand: hand?.id === cell.id ? hand : null,
            lazy,
            readOnly: !mayWrite,
            actions,
          };
          return (
            <div key={cell.id} className={mayWrite ? undefined : 'mb-5'}>
              {mayWrite && <Gap before={cell.id} actions={actions} />}
              {cell.kind === 'note' ? (
                <NoteCell {...common} />
              ) : (
                <DimensionCell {...common} lines={lines} greyed={late} />
              )}
            </div>
          );
        })}
      </div>
      {mayWrite && (
        <div className="mt-6 flex flex-wrap gap-2 px-3 sm:ml-[6.125rem] print:hidden">
          <Button onClick={() => actions.insert('dimension', null, 'after')}>
            Add a dimension
          </Button>
          <Button onClick={() => actions.insert('note', null, 'after')}>Add a note</Button>
        </div>
      )}
    </>
  );
}

function EmptySheet({ mayWrite }: { mayWrite: boolean }) {
  return (
    <div className="px-3 py-8 sm:ml-[6.125rem]">
      <p className="font-serif text-head font-semibold">The sheet is empty.</p>
      <p className="mt-2 max-w-prose font-serif text-note text-soft">
        {mayWrite
          ? 'Begin with a dimension you were given, such as R = 1200 mm, and derive the others from it: s = R sqrt(2 - sqrt(2)). A note says where they come from.'
          : 'Nothing has been written on it yet.'}
      </p>
    </div>
  );
}
