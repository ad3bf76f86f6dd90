'use client';

import { memo, useLayoutEffect, useRef, type KeyboardEvent } from 'react';
import type { NotebookCell } from '@/lib/notebooks/content';
import { CONTENT_LIMITS } from '@/lib/notebooks/content-values';
import { SectionRule } from '@/components/drawing/section-rule';
import { onCellKey } from './keys/on-cell-key';
import { CellTools } from './cell-tools';
import { AT_END, cellAnchor, entryId, focusEntry, type Hand, type SheetActions } from './cells';

interface SectionCellProps {
  cell: NotebookCell;
  place: number;
  hand: Hand | null;
  folded: boolean;
  /** Cells from this heading to the next. */
  count: number;
  readOnly: boolean;
  actions: SheetActions;
}

/** The heading of a section on its rule; the rule's sign folds all that follows up to the next. */
export const SectionCell = memo(function SectionCell(props: SectionCellProps) {
  const { cell, place, hand, folded, count, readOnly, actions } = props;
  const { id, source } = cell;
  const name = source.trim() === '' ? `Section ${place}` : source;

  return (
    <section
      id={cellAnchor(id)}
      aria-label={`Section ${place}: ${name}`}
      onKeyDown={readOnly ? undefined : (event) => onCellKey(event, id, actions)}
      className={`group/cell border px-3 py-2 max-sm:px-2 ${hand ? 'border-snapline bg-hand' : 'border-transparent'}`}
    >
      <SectionRule
        folded={folded}
        fold={
          <button
            type="button"
            aria-expanded={!folded}
            aria-label={folded ? `Open section ${name}` : `Fold section ${name}`}
            onClick={() => actions.fold(id)}
            className="grid size-7 shrink-0 place-items-center text-soft hover:text-ink print:hidden"
          >
            <FoldSign folded={folded} />
          </button>
        }
        note={folded ? (count === 1 ? '1 cell folded' : `${count} cells folded`) : null}
      >
        {hand ? (
          <HeadingEditor id={id} source={source} hand={hand} actions={actions} place={place} />
        ) : readOnly ? (
          name
        ) : (
          <button
            type="button"
            id={entryId(id, 0)}
            data-entry={id}
            onClick={() => actions.take({ id, line: 0, column: AT_END })}
            className="text-left hover:underline decoration-rule decoration-1 underline-offset-4"
          >
            {source.trim() === '' ? <span className="italic text-soft">Untitled</span> : source}
          </button>
        )}
      </SectionRule>
      {hand && (
        <div className="mt-2 sm:ml-[6.125rem]">
          <CellTools id={id} kind="section" folded={folded} actions={actions} />
        </div>
      )}
    </section>
  );
});

/** A wedge that points along the rule while folded and down while open. */
function FoldSign({ folded }: { folded: boolean }) {
  return (
    <svg viewBox="0 0 16 16" className="size-4" aria-hidden="true">
      <path
        d={folded ? 'M4 2L13 8L4 14Z' : 'M2 4L14 4L8 13Z'}
        fill={folded ? 'currentColor' : 'none'}
        stroke="currentColor"
        strokeWidth="1.2"
      />
    </svg>
  );
}

interface HeadingEditorProps {
  id: string;
  source: string;
  hand: Hand;
  place: number;
  actions: SheetActions;
}

function HeadingEditor({ id, source, hand, place, actions }: HeadingEditorProps) {
  const field = useRef<HTMLInputElement>(null);
  const { column } = hand;
  useLayoutEffect(() => {
    const at = Math.min(column, field.current?.value.length ?? 0);
    field.current?.focus();
    field.current?.setSelectionRange(at, at);
  }, [column]);

  const leave = () => {
    actions.take(null);
    requestAnimationFrame(() => focusEntry(id));
  };
  const onKey = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.ctrlKey || event.metaKey || event.altKey || event.nativeEvent.isComposing) return;
    const by = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : null;
    const at = event.currentTarget.selectionStart ?? 0;
    if (event.key === 'Escape' || event.key === 'Enter') leave();
    else if (by === null || !actions.step({ id, line: 0, column: at }, by)) return;
    event.preventDefault();
    event.stopPropagation();
  };

  return (
    <input
      ref={field}
      value={source}
      maxLength={CONTENT_LIMITS.heading}
      aria-label={`Heading of section ${place}`}
      placeholder="Heading of the section"
      onChange={(event) => actions.dispatch({ kind: 'write', id, source: event.target.value })}
      onKeyDown={onKey}
      className="w-full border-b border-snapline bg-transparent placeholder:italic placeholder:text-soft"
    />
  );
}
