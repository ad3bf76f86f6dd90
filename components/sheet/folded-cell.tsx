'use client';

import type { NotebookCell } from '@/lib/notebooks/content';
import { Mark } from '@/components/drawing/balloon';
import { cellAnchor, entryId, type SheetActions } from './cells';
import { onCellKey } from './keys/on-cell-key';
import type { ShownLine } from './state/shown';
import { sayBriefly } from './wording';

interface FoldedCellProps {
  cell: NotebookCell;
  lines: readonly ShownLine[];
  place: number;
  readOnly: boolean;
  actions: SheetActions;
}

/** The first words of a note, without the signs of its Markdown. */
const beginningOf = (source: string) =>
  source
    .replace(/[#*_`>]/g, '')
    .trim()
    .split('\n')[0] ?? '';

/** A cell of which one line is shown: its marks with their sizes, or how a note begins. */
export function FoldedCell({ cell, lines, place, readOnly, actions }: FoldedCellProps) {
  const { id, kind, source } = cell;
  const name = kind === 'note' ? `Note ${place}` : `Dimension cell ${place}`;
  const marked = lines.filter(({ result }) => result.mark !== null);
  return (
    <section
      id={cellAnchor(id)}
      aria-label={`${name}, folded`}
      onKeyDown={readOnly ? undefined : (event) => onCellKey(event, id, actions)}
      className="px-3 max-sm:px-2"
    >
      <button
        type="button"
        id={entryId(id, 0)}
        data-entry={id}
        aria-expanded={false}
        aria-label={`Open ${name}`}
        onClick={() => actions.fold(id)}
        className="flex w-full flex-wrap gap-x-5 gap-y-1 border-y border-dashed border-hairline py-1.5 text-left text-base hover:border-rule hover:bg-snapline-wash sm:pl-[6.125rem]"
      >
        {kind === 'note' || marked.length === 0 ? (
          <span className="min-w-0 truncate font-serif italic text-soft">
            {beginningOf(source) || 'Empty'}
          </span>
        ) : (
          marked.map(({ result }) => (
            <span key={result.line} className="whitespace-nowrap">
              <Mark mark={result.mark ?? ''} />
              <span className="ml-1.5 font-mono text-small tabular-nums text-soft">
                {sayBriefly(result)}
              </span>
            </span>
          ))
        )}
      </button>
    </section>
  );
}
