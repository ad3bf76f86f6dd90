import { useEffect, useMemo, useRef } from 'react';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { cellAnchor, type Hand, type SheetActions } from '../cells';
import { findDefinition, markDefinedBy } from '../editor/names';
import { headingsOf } from '../note-headings';
import { linesOf } from '../source-text';

/** Places remembered for the way back. */
const REMEMBERED = 50;

const isHeading = ({ kind, source }: NotebookCell) =>
  kind === 'section' || (kind === 'note' && headingsOf(source).length > 0);

/** Scrolls a cell into view, or the line of it that is in hand. */
export function showPlace(id: string) {
  const cell = document.getElementById(cellAnchor(id));
  (cell?.querySelector('.cm-editor') ?? cell)?.scrollIntoView({ block: 'nearest' });
}

export type PlaceActions = Pick<SheetActions, 'goTo' | 'jump' | 'markOf'> & {
  /** Back to where the last definition was gone to from. */
  goBack: () => boolean;
  /** Whether a line of the sheet defines a name. */
  isDefined: (name: string) => boolean;
};

/** Going from one place of the sheet to another, and back. The same functions for as long as the sheet is shown. */
export function usePlaces(
  content: NotebookContent,
  hand: Hand | null,
  take: (hand: Hand | null) => void,
): PlaceActions {
  const latest = useRef({ content, hand });
  useEffect(() => {
    latest.current = { content, hand };
  });
  const from = useRef<Hand[]>([]);

  return useMemo(() => {
    const takeAndShow = (place: Hand) => {
      take(place);
      requestAnimationFrame(() => showPlace(place.id));
      return true;
    };
    return {
      goTo(name) {
        const place = findDefinition(latest.current.content.cells, name);
        if (place === null) return false;
        const before = latest.current.hand;
        if (before) from.current = [...from.current, before].slice(-REMEMBERED);
        return takeAndShow(place);
      },
      goBack() {
        const back = from.current.pop();
        const isThere = latest.current.content.cells.some(({ id }) => id === back?.id);
        return back !== undefined && isThere && takeAndShow(back);
      },
      isDefined: (name) => findDefinition(latest.current.content.cells, name) !== null,
      markOf(id, line) {
        const cell = latest.current.content.cells.find((one) => one.id === id);
        const text = cell?.kind === 'dimension' ? linesOf(cell.source)[line] : undefined;
        return markDefinedBy(text ?? '');
      },
      jump(id, by, to) {
        const { cells } = latest.current.content;
        const others =
          by > 0
            ? cells.slice(cells.findIndex((cell) => cell.id === id) + 1)
            : cells
                .slice(
                  0,
                  cells.findIndex((cell) => cell.id === id),
                )
                .reverse();
        // A cell that is folded away with its section has nothing on the page to go to.
        const next = others.find(
          (cell) =>
            (to === 'cell' || isHeading(cell)) && document.getElementById(cellAnchor(cell.id)),
        );
        if (!next) return false;
        take(null);
        requestAnimationFrame(() => {
          const cell = document.getElementById(cellAnchor(next.id));
          (cell?.querySelector<HTMLElement>('[data-entry]') ?? cell)?.focus();
          cell?.scrollIntoView({ block: 'nearest' });
        });
        return true;
      },
    };
  }, [take]);
}
