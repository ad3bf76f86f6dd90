'use client';

import { memo, type MouseEvent } from 'react';
import type { NotebookCell } from '@/lib/notebooks/content';
import { CellTools } from './cell-tools';
import { AT_END, cellAnchor, entryId, focusEntry, type Hand, type SheetActions } from './cells';
import { onCellKey } from './keys/on-cell-key';
import { SourceEditor } from './editor/source-editor';
import { LiveNote } from './live-note';

interface NoteCellProps {
  cell: NotebookCell;
  place: number;
  hand: Hand | null;
  lazy: boolean;
  readOnly: boolean;
  actions: SheetActions;
}

const NO_RESULTS = [] as const;

/** A note: set in the text serif; its Markdown opens beneath it when it is taken in hand. */
export const NoteCell = memo(function NoteCell(props: NoteCellProps) {
  const { cell, place, hand, lazy, readOnly, actions } = props;
  const { id } = cell;
  const open = hand !== null;
  const label = `Note ${place}`;

  const take = () => actions.take({ id, line: 0, column: AT_END });
  const leave = (to: 'here' | 'before' | 'after', column: number) => {
    if (to !== 'here') return actions.step({ id, line: 0, column }, to === 'before' ? -1 : 1);
    actions.take(null);
    requestAnimationFrame(() => focusEntry(id));
    return true;
  };

  // A press on the text opens it, except on a link or when a stretch of it is being selected.
  const press = (event: MouseEvent) => {
    const onLink = event.target instanceof Element && event.target.closest('a') !== null;
    if (!readOnly && !open && !onLink && getSelection()?.isCollapsed !== false) take();
  };

  return (
    <section
      id={cellAnchor(id)}
      aria-label={label}
      onKeyDown={readOnly ? undefined : (event) => onCellKey(event, id, actions)}
      className={`group/cell relative border px-3 py-2 max-sm:px-2 ${open ? 'border-snapline bg-hand [--surface:var(--hand)]' : 'border-transparent'} ${lazy ? 'entry-lazy' : ''}`}
    >
      <div className="space-y-3 sm:ml-[6.125rem]">
        <div onClick={press} className={open || readOnly ? undefined : 'cursor-text'}>
          {cell.source.trim() === '' && !open ? (
            <p className="font-serif text-note italic text-soft">Empty note</p>
          ) : (
            <LiveNote source={cell.source} />
          )}
        </div>
        {open ? (
          <>
            <SourceEditor
              source={cell.source}
              kind="note"
              column={hand.column}
              label={`Source of ${label}`}
              results={NO_RESULTS}
              onWrite={(source) => actions.dispatch({ kind: 'write', id, source })}
              onLeave={leave}
              meanwhile={
                <pre className="whitespace-pre-wrap font-mono text-source">{cell.source}</pre>
              }
            />
            <CellTools id={id} kind="note" actions={actions} />
          </>
        ) : readOnly ? null : (
          <button
            type="button"
            id={entryId(id, 0)}
            data-entry={id}
            onClick={take}
            className="absolute right-2 top-2 bg-sheet px-1.5 text-small text-snapline opacity-0 hover:underline focus-visible:opacity-100 group-hover/cell:opacity-100 print:hidden"
          >
            Write<span className="sr-only">{` ${label}`}</span>
          </button>
        )}
      </div>
    </section>
  );
});
