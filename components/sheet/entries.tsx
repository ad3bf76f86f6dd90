'use client';

import { lazy, memo, Suspense } from 'react';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { Button } from '@/components/ui/button';
import { Gap } from './cell-tools';
import type { Hand, SheetActions } from './cells';
import { CommentMark } from './comments/comment-mark';
import { DimensionCell } from './dimension-cell';
import { FoldedCell } from './folded-cell';
import { Grip } from './grip';
import { NoteCell } from './note-cell';
import { SectionCell } from './section-cell';
import { blocksOf, sectionSizes, type Folds } from './state/blocks';
import type { Fresh } from './state/use-notebook';
import type { ShownLine } from './state/shown';
import type { Evaluation } from './state/use-evaluation';

interface EntriesProps {
  content: NotebookContent;
  evaluation: Evaluation;
  hand: Hand | null;
  folds: Folds;
  /** What somebody else has just changed. */
  fresh: Fresh | null;
  mayWrite: boolean;
  actions: SheetActions;
}

const NONE: readonly ShownLine[] = [];
/** From so many cells on, those out of sight are not laid out. */
const LAZY_FROM = 30;

/** The entries of the sheet, one under another, and the place where the next one is begun. */
export function Entries(props: EntriesProps) {
  const { content, evaluation, hand, folds, fresh, mayWrite, actions } = props;
  const { cells } = content;
  const sizes = sectionSizes(cells);
  const late = evaluation.state === 'slow' || evaluation.state === 'failed';

  return (
    <>
      {cells.length === 0 && <EmptySheet mayWrite={mayWrite} actions={actions} />}
      <div>
        {blocksOf(cells, folds).map(({ from, cells: [cell, ...hidden] }) =>
          cell ? (
            <Entry
              key={cell.id}
              cell={cell}
              from={from}
              until={from + 1 + hidden.length}
              lines={evaluation.shown.get(cell.id) ?? NONE}
              hand={hand?.id === cell.id ? hand : null}
              folded={folds.has(cell.id)}
              count={sizes.get(cell.id) ?? 0}
              greyed={late}
              freshBy={fresh?.ids.has(cell.id) === true ? fresh.by : null}
              isLazy={cells.length >= LAZY_FROM}
              readOnly={!mayWrite}
              actions={actions}
            />
          ) : null,
        )}
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
  /** Place of the cell among all cells, and of the first one that neither is it nor is hidden by it. */
  from: number;
  until: number;
  lines: readonly ShownLine[];
  hand: Hand | null;
  folded: boolean;
  /** Cells in a section. */
  count: number;
  greyed: boolean;
  /** Who has just changed it, if somebody else has. */
  freshBy: string | null;
  isLazy: boolean;
  readOnly: boolean;
  actions: SheetActions;
}

const KIND_NAMES: Record<NotebookCell['kind'], string> = {
  dimension: 'Dimension cell',
  note: 'Note',
  section: 'Section',
};

/** A cell as its kind and its fold have it, with the gap above and the grip beside it. */
const Entry = memo(function Entry(props: EntryProps) {
  const { cell, from, until, lines, hand, folded, count, greyed, isLazy, readOnly, actions } =
    props;
  const { freshBy } = props;
  const common = { cell, place: from + 1, readOnly, actions };
  return (
    <div
      data-block
      data-from={from}
      data-until={until}
      className={`group/block relative ${readOnly ? 'mb-5' : ''} ${freshBy === null ? '' : 'bg-ochre-wash [--surface:var(--ochre-wash)] outline-2 -outline-offset-2 outline-dashed outline-ochre'}`}
    >
      {freshBy !== null && (
        <p className="px-3 pt-1 text-small text-soft sm:ml-[6.125rem] print:hidden">
          Changed by {freshBy} just now
        </p>
      )}
      {!readOnly && (
        <>
          <Gap before={cell.id} actions={actions} />
          <Grip
            id={cell.id}
            name={`${KIND_NAMES[cell.kind]} ${from + 1}`}
            reachable={hand !== null}
            actions={actions}
          />
        </>
      )}
      <CommentMark
        id={cell.id}
        name={`${KIND_NAMES[cell.kind]} ${from + 1}`}
        reachable={readOnly}
      />
      {cell.kind === 'section' ? (
        <SectionCell {...common} hand={hand} folded={folded} count={count} />
      ) : folded ? (
        <FoldedCell {...common} lines={lines} />
      ) : cell.kind === 'note' ? (
        <NoteCell {...common} hand={hand} lazy={isLazy} />
      ) : (
        <DimensionCell {...common} hand={hand} lines={lines} greyed={greyed} lazy={isLazy} />
      )}
    </div>
  );
});

/** Fetched only for a sheet with nothing on it. */
const Starters = lazy(() =>
  import('@/components/starters/starters').then(({ Starters: component }) => ({
    default: component,
  })),
);

function EmptySheet({ mayWrite, actions }: { mayWrite: boolean; actions: SheetActions }) {
  return (
    <div className="px-3 py-6">
      <p className="font-serif text-head font-semibold">The sheet is empty.</p>
      <p className="mt-2 max-w-prose font-serif text-note text-soft">
        {mayWrite
          ? 'Begin with a dimension you were given, such as R = 1200 mm, and derive the others from it: s = R sqrt(2 - sqrt(2)). Or begin with one of these and write your own figures into it.'
          : 'Nothing has been written on it yet.'}
      </p>
      {mayWrite && (
        <div className="mt-5 min-h-60 print:hidden">
          <Suspense>
            <Starters
              onChoose={(cells, settings) =>
                actions.dispatch({ kind: 'replace', content: { format: 1, settings, cells } })
              }
            />
          </Suspense>
        </div>
      )}
    </div>
  );
}
