'use client';

import { Button } from '@/components/ui/button';

interface RemovedProps {
  /** Cells that the last step took away; 0 for none. */
  count: number;
  onUndo: (() => void) | null;
}

/** What has just been deleted, with the way back; it stands until something else is done. */
export function Removed({ count, onUndo }: RemovedProps) {
  return (
    <div role="status" className="pointer-events-none sticky bottom-3 z-10 print:hidden">
      {count > 0 && onUndo && (
        <p className="pointer-events-auto mx-auto flex w-fit items-center gap-2 border border-ink bg-sheet py-1 pl-4 pr-2 text-base shadow-[3px_3px_0_var(--hairline)]">
          {count === 1 ? 'Cell deleted' : `${count} cells deleted`}
          <span aria-hidden="true">·</span>
          <Button look="quiet" onClick={onUndo}>
            Undo
          </Button>
        </p>
      )}
    </div>
  );
}
