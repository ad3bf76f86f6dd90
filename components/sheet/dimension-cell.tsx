'use client';

import { memo } from 'react';
import type { NotebookCell } from '@/lib/notebooks/content';
import { CellTools } from './cell-tools';
import { cellAnchor, cellFocusId, focusCell, type SheetActions } from './cells';
import { onCellKey } from './cell-keys';
import { CopyMenu } from './copy-menu';
import { SourceEditor } from './editor/source-editor';
import { EntryLine } from './entry-line';
import { SourceText } from './source-text';
import type { ShownLine } from './state/shown';

interface DimensionCellProps {
  cell: NotebookCell;
  lines: readonly ShownLine[];
  /** Where the cell stands on the sheet, from 1: what a screen reader calls it. */
  place: number;
  open: boolean;
  greyed: boolean;
  lazy: boolean;
  readOnly: boolean;
  nonce: string | undefined;
  actions: SheetActions;
}

/** A dimension cell: its lines with their values, its source, and the source opened when in hand. */
export const DimensionCell = memo(function DimensionCell(props: DimensionCellProps) {
  const { cell, lines, place, open, greyed, lazy, readOnly, nonce, actions } = props;
  const { id } = cell;
  const results = lines.map((line) => line.result);
  const names = results.map((result) => result.mark).filter((mark) => mark !== null);
  const label = `Dimension cell ${place}${names.length > 0 ? `, ${names.join(', ')}` : ''}`;
  const text = <SourceText source={cell.source} results={results} />;

  const leave = (to: 'here' | 'before' | 'after') => {
    if (to === 'here') {
      actions.take(null);
      requestAnimationFrame(() => focusCell(id));
      return true;
    }
    return actions.step(id, to === 'before' ? -1 : 1);
  };

  const source = readOnly ? (
    <div className="pl-3">{text}</div>
  ) : open ? (
    <SourceEditor
      source={cell.source}
      kind="dimension"
      label={`Source of ${label}`}
      nonce={nonce}
      results={results}
      onWrite={(written) => actions.dispatch({ kind: 'write', id, source: written })}
      onLeave={leave}
      meanwhile={text}
    />
  ) : (
    <button
      type="button"
      id={cellFocusId(id)}
      data-entry={id}
      onClick={() => actions.take(id)}
      className="block w-full border-l-2 border-transparent pl-2.5 text-left hover:border-hairline"
    >
      <span className="sr-only">{`Open the source of ${label}: `}</span>
      {cell.source.trim() === '' ? (
        <span className="font-serif text-note italic text-soft">Empty: write a dimension here</span>
      ) : (
        text
      )}
    </button>
  );
  const single = lines.length === 1;

  return (
    <section
      id={cellAnchor(id)}
      aria-label={label}
      onKeyDown={(event) => onCellKey(event, id, open, actions)}
      className={`group/cell border px-3 py-2.5 max-sm:px-2 ${open ? 'border-snapline bg-hand' : 'border-transparent'} ${lazy ? 'entry-lazy' : ''} [break-inside:avoid]`}
    >
      <div className="space-y-5">
        {lines.map((line, index) => (
          <EntryLine
            key={index}
            line={line}
            greyed={greyed}
            full={open}
            source={single ? source : undefined}
            actions={<CopyMenu result={line.result} />}
          />
        ))}
        {!single && <div className="sm:ml-[6.125rem]">{source}</div>}
        {open && (
          <div className="sm:ml-[6.125rem]">
            <CellTools id={id} actions={actions} />
          </div>
        )}
      </div>
    </section>
  );
});
