'use client';

import { memo, type ReactNode } from 'react';
import type { NotebookCell } from '@/lib/notebooks/content';
import { CellRows } from './cell-rows';
import { CellTools } from './cell-tools';
import { AT_END, cellAnchor, entryId, focusEntry, type Hand, type SheetActions } from './cells';
import { onCellKey } from './keys/on-cell-key';
import { CopyMenu } from './copy-menu';
import { markDefinedBy } from './editor/names';
import { ProofButton } from './proof-button';
import { SourceEditor } from './editor/source-editor';
import { linesOf } from './source-text';
import { joinAfter, joinBefore, replaceLine, type LineEdit } from './state/line-edits';
import type { ShownLine } from './state/shown';

interface DimensionCellProps {
  cell: NotebookCell;
  lines: readonly ShownLine[];
  /** Where the cell stands on the sheet, from 1: what a screen reader calls it. */
  place: number;
  /** The line of this cell that is in hand, if one is. */
  hand: Hand | null;
  greyed: boolean;
  lazy: boolean;
  readOnly: boolean;
  actions: SheetActions;
}

/** A dimension cell: its lines with their values, and the source of the line in hand opened in place. */
export const DimensionCell = memo(function DimensionCell(props: DimensionCellProps) {
  const { cell, lines, place, hand, greyed, lazy, readOnly, actions } = props;
  const { id, source } = cell;
  const names = lines.map(({ result }) => result.mark).filter((mark) => mark !== null);
  const label = `Dimension cell ${place}${names.length > 0 ? `, ${names.join(', ')}` : ''}`;

  const edit = (made: LineEdit | null, stay = false) => {
    if (made === null) return false;
    actions.dispatch({ kind: 'write', id, source: made.source });
    if (!stay) actions.take({ id, line: made.line, column: made.column });
    return true;
  };

  const renderSource = (index: number, standing: ReactNode) => {
    const text = linesOf(source)[index] ?? '';
    const results = lines.flatMap(({ result }) => (result.line === index + 1 ? [result] : []));
    if (hand?.line === index) {
      return (
        <SourceEditor
          key={index}
          source={text}
          kind="dimension"
          column={hand.column}
          label={`Line ${index + 1} of ${label}`}
          results={results}
          meanwhile={standing}
          names={actions}
          onWrite={(written, cursor) =>
            edit(replaceLine(source, index, written, cursor), !written.includes('\n'))
          }
          onJoin={(side) =>
            edit(side === 'before' ? joinBefore(source, index) : joinAfter(source, index))
          }
          onLeave={(to, column) => {
            if (to !== 'here')
              return actions.step({ id, line: index, column }, to === 'before' ? -1 : 1);
            actions.take(null);
            requestAnimationFrame(() => focusEntry(id, index));
            return true;
          }}
        />
      );
    }
    const empty = text.trim() === '';
    return (
      <button
        type="button"
        id={entryId(id, index)}
        data-entry={id}
        onClick={() => actions.take({ id, line: index, column: AT_END })}
        className="-ml-3 block w-[calc(100%+0.75rem)] border-l-2 border-transparent pl-2.5 text-left hover:border-rule"
      >
        <span className="sr-only">{`Line ${index + 1} of ${label}: `}</span>
        {empty && source.trim() === '' ? (
          <span className="font-serif text-note italic text-soft">
            Empty: write a dimension here
          </span>
        ) : (
          standing
        )}
      </button>
    );
  };

  return (
    <section
      id={cellAnchor(id)}
      aria-label={label}
      onKeyDown={readOnly ? undefined : (event) => onCellKey(event, id, actions)}
      className={`border px-3 py-3 max-sm:px-2 ${hand ? 'border-snapline bg-hand [--surface:var(--hand)]' : 'border-transparent'} ${lazy ? 'entry-lazy' : ''}`}
    >
      <CellRows
        source={source}
        lines={lines}
        greyed={greyed}
        inHand={hand?.line ?? null}
        renderSource={readOnly ? undefined : renderSource}
        renderActions={({ result }) => (
          <>
            <ProofButton result={result} onOpen={() => actions.details(id, result.line - 1)} />
            <CopyMenu result={result} />
          </>
        )}
      />
      {hand && (
        <div className="mt-3 sm:ml-[6.125rem]">
          <CellTools
            id={id}
            kind="dimension"
            mark={markDefinedBy(linesOf(source)[hand.line] ?? '')}
            actions={actions}
          />
        </div>
      )}
    </section>
  );
});
