'use client';

import { useSyncExternalStore } from 'react';
import type { NotebookCell } from '@/lib/notebooks/content';
import { findZone } from '@/components/drawing/zones';
import { cellAnchor, type SheetActions } from '../cells';
import { linesOf } from '../source-text';
import { sectionOf } from '../state/blocks';
import { findUses, marksReadIn, type Place } from '../state/uses';
import { Part } from './part';

interface WherePartProps {
  cells: readonly NotebookCell[];
  at: Place;
  mark: string | null;
  actions: SheetActions;
}

const subscribeToNothing = () => () => undefined;

/** Where the value stands on the sheet, what it reads and what reads it. */
export function WherePart({ cells, at, mark, actions }: WherePartProps) {
  // The letters beside the sheet are known only once it is laid out, so never on the server.
  const zone = useSyncExternalStore(
    subscribeToNothing,
    () => findZone(document.getElementById(cellAnchor(at.id))),
    () => null,
  );
  const { definitions, readers } = findUses(cells);
  const section = sectionOf(cells, at.id);
  const place = cells.findIndex(({ id }) => id === at.id) + 1;
  const text = linesOf(cells[place - 1]?.source ?? '')[at.line] ?? '';
  const reads = [...marksReadIn(text)].flatMap((name) => definitions.get(name)?.slice(0, 1) ?? []);
  const used = mark === null ? [] : (readers.get(mark) ?? []);
  const where = [
    zone && `zone ${zone}`,
    section && `section ${section.source.trim() || 'Untitled'}`,
    `cell ${place}`,
    `line ${at.line + 1}`,
  ].filter(Boolean);
  return (
    <Part title="On the sheet">
      <p className="text-base">{`${mark === null ? 'Written' : 'Defined'} in ${where.join(', ')}.`}</p>
      <Lines title="Reads" places={reads} cells={cells} actions={actions} />
      <Lines title="Used by" places={used} cells={cells} actions={actions} />
      {mark !== null && used.length === 0 && (
        <p className="text-small text-soft">No other line uses it.</p>
      )}
    </Part>
  );
}

interface LinesProps {
  title: string;
  places: readonly Place[];
  cells: readonly NotebookCell[];
  actions: SheetActions;
}

function Lines({ title, places, cells, actions }: LinesProps) {
  if (places.length === 0) return null;
  const sources = new Map(cells.map(({ id, source }) => [id, linesOf(source)]));
  return (
    <>
      <h4 className="mt-2 text-small font-semibold">{title}</h4>
      <ul>
        {places.map(({ id, line }) => (
          <li key={`${id}:${line}`}>
            <button
              type="button"
              onClick={() => actions.showLine(id, line)}
              className="block w-full truncate py-0.5 text-left font-mono text-small text-snapline hover:underline"
            >
              {sources.get(id)?.[line]?.trim()}
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
