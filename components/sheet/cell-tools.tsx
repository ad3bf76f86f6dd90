'use client';

import type { NotebookCell } from '@/lib/notebooks/content';
import { Button } from '@/components/ui/button';
import type { SheetActions } from './cells';

type Kind = NotebookCell['kind'];

interface CellToolsProps {
  id: string;
  kind: Kind;
  folded?: boolean;
  /** The mark that the line in hand defines, if it does. */
  mark?: string | null;
  actions: SheetActions;
}

/** What can be done with the cell that is in hand or pointed at. Every one also has a key. */
export function CellTools({ id, kind, folded = false, mark = null, actions }: CellToolsProps) {
  return (
    <div
      role="group"
      aria-label="This cell"
      className="flex flex-wrap gap-x-1 gap-y-0.5 border-t border-hairline pt-1 print:hidden"
    >
      <Button look="quiet" onClick={() => actions.insert('dimension', id, 'after')}>
        Dimension below
      </Button>
      <Button look="quiet" onClick={() => actions.insert('note', id, 'after')}>
        Note below
      </Button>
      <Button look="quiet" onClick={() => actions.insert('section', id, 'after')}>
        Section below
      </Button>
      <Button look="quiet" onClick={() => actions.move(id, -1)}>
        Move up
      </Button>
      <Button look="quiet" onClick={() => actions.move(id, 1)}>
        Move down
      </Button>
      <Button look="quiet" onClick={() => actions.duplicate(id)}>
        Duplicate
      </Button>
      <Button look="quiet" onClick={() => actions.fold(id)}>
        {kind === 'section' && folded ? 'Open' : 'Fold'}
      </Button>
      {mark !== null && (
        <Button look="quiet" onClick={() => actions.rename(mark)}>
          Rename {mark}
        </Button>
      )}
      <Button look="quiet" onClick={() => actions.comment(id)}>
        Comment
      </Button>
      <Button look="quiet" onClick={() => actions.remove(id)}>
        Delete
      </Button>
    </div>
  );
}

const HERE: Record<Kind, string> = {
  dimension: 'Dimension here',
  note: 'Note here',
  section: 'Section here',
};

interface GapProps {
  before: string;
  actions: SheetActions;
}

/** The gap above a cell, where another can be put. By keyboard the cell's own tools do the same. */
export function Gap({ before, actions }: GapProps) {
  return (
    <div className="group/gap relative h-5 print:hidden" aria-hidden="true">
      <div className="absolute inset-x-0 top-1/2 flex -translate-y-1/2 items-center gap-2 bg-sheet opacity-0 transition-opacity group-hover/gap:opacity-100">
        <span className="h-px w-8 border-t border-dashed border-rule" />
        {(Object.keys(HERE) as Kind[]).map((kind) => (
          <button
            key={kind}
            type="button"
            tabIndex={-1}
            className="px-1 text-small text-snapline hover:underline"
            onClick={() => actions.insert(kind, before, 'before')}
          >
            {HERE[kind]}
          </button>
        ))}
        <span className="h-px grow border-t border-dashed border-rule" />
      </div>
    </div>
  );
}
