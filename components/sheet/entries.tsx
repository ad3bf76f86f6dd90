'use client';

import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { Button } from '@/components/ui/button';
import { Gap } from './cell-tools';
import type { Hand, SheetActions } from './cells';
import { DimensionCell } from './dimension-cell';
import { FoldedCell } from './folded-cell';
import { NoteCell } from './note-cell';
import { SectionCell } from './section-cell';
import { blocksOf, sectionSizes, type Folds } from './state/blocks';
import type { ShownLine } from './state/shown';
import type { Evaluation } from './state/use-evaluation';

interface EntriesProps {
  content: NotebookContent;
  evaluation: Evaluation;
  hand: Hand | null;
  folds: Folds;
  mayWrite: boolean;
  actions: SheetActions;
}

const NONE: readonly ShownLine[] = [];
/** From so many cells on, those out of sight are not laid out. */
const LAZY_FROM = 30;

/** The entries of the sheet, one under another, and the place where the next one is begun. */
export function Entries(props: EntriesProps) {
  const { content, evaluation, hand, folds, mayWrite, actions } = props;
  const { cells } = content;
  const lazy = cells.length >= LAZY_FROM;
  const sizes = sectionSizes(cells);
  const late = evaluation.state === 'slow' || evaluation.state === 'failed';

  return (
    <>
      {cells.length === 0 && <EmptySheet mayWrite={mayWrite} />}
      <div>
        {blocksOf(cells, folds).map(({ from, cells: [cell] }) => {
          if (!cell) return null;
          const common = {
            cell,
            place: from + 1,
            readOnly: !mayWrite,
            actions,
          };
          return (
            <div key={cell.id} className={mayWrite ? undefined : 'mb-5'}>
              {mayWrite && <Gap before={cell.id} actions={actions} />}
              <Entry
                {...common}
                lines={evaluation.shown.get(cell.id) ?? NONE}
                hand={hand?.id === cell.id ? hand : null}
                folded={folds.has(cell.id)}
                count={sizes.get(cell.id) ?? 0}
                greyed={late}
                lazy={lazy}
              />
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
          <Button onClick={() => actions.insert('section', null, 'after')}>Add a section</Button>
        </div>
      )}
    </>
  );
}

interface EntryProps {
  cell: NotebookCell;
  place: number;
  lines: readonly ShownLine[];
  hand: Hand | null;
  folded: boolean;
  count: number;
  greyed: boolean;
  lazy: boolean;
  readOnly: boolean;
  actions: SheetActions;
}

/** A cell as its kind and its fold have it. */
function Entry({ folded, count, lines, greyed, lazy, ...common }: EntryProps) {
  const { cell, hand, ...still } = common;
  if (cell.kind === 'section') return <SectionCell {...common} folded={folded} count={count} />;
  if (folded) return <FoldedCell {...still} cell={cell} lines={lines} />;
  if (cell.kind === 'note') return <NoteCell {...common} lazy={lazy} />;
  return (
    <DimensionCell {...still} cell={cell} hand={hand} lines={lines} greyed={greyed} lazy={lazy} />
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
