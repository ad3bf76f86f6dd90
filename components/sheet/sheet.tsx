'use client';

import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { SWRConfig } from 'swr';
import type { NotebookHead } from '@/lib/notebooks/types';
import type { NotebookContent } from '@/lib/notebooks/content';
import { TitleBlock } from '@/components/drawing/title-block';
import { AT_END, cellAnchor, focusEntry, type Hand, type SheetActions } from './cells';
import { preloadEditor } from './editor/source-editor';
import { Entries } from './entries';
import { SheetBar } from './sheet-bar';
import { SheetDialogs, type Panel } from './sheet-dialogs';
import { SheetIndex } from './sheet-index';
import { SheetLayout, zonesFor } from './sheet-layout';
import { SheetNews } from './sheet-news';
import { BoundedCache } from './state/bounded-cache';
import { newCellId } from './state/changes';
import type { CellAnswer, Shown } from './state/shown';
import { useEvaluation } from './state/use-evaluation';
import { useNotebook } from './state/use-notebook';
import { linesOf } from './source-text';
import { titleFields } from './title-fields';
import { sayBriefly, sayResult } from './wording';

export interface SheetProps {
  notebook: NotebookHead;
  content: NotebookContent;
  /** The figures as the server computed them with the page; null when it could not. */
  answers: CellAnswer[] | null;
  /** Name of the person who looks. */
  personName: string;
  mayWrite: boolean;
  mayShare: boolean;
}

/** Answers kept in the browser: enough for undo to be at once. */
const ANSWERS = 80;

export function Sheet(props: SheetProps) {
  const [cache] = useState(() => new BoundedCache(ANSWERS));
  return (
    <SWRConfig value={{ provider: () => cache }}>
      <SheetOnScreen {...props} />
    </SWRConfig>
  );
}

function SheetOnScreen(props: SheetProps) {
  const { notebook, content: first, answers, personName, mayWrite } = props;
  const [kept] = useState({
    number: notebook.version,
    content: first,
    savedAt: notebook.savedAt,
    savedBy: notebook.savedBy,
  });
  const sheet = useNotebook(notebook.id, kept, !mayWrite);
  const { content, dispatch, undo, redo } = sheet;
  const evaluation = useEvaluation(content, answers);
  const [hand, setHand] = useState<Hand | null>(null);
  const [panel, setPanel] = useState<Panel | null>(null);
  const actions = useSheetActions(content, evaluation.shown, setHand, dispatch);

  useEffect(() => {
    if (!mayWrite) return;
    if ('requestIdleCallback' in window) window.requestIdleCallback(() => preloadEditor());
    else setTimeout(preloadEditor, 800);
  }, [mayWrite]);

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (!mayWrite || !(event.ctrlKey || event.metaKey) || event.altKey) return;
      const key = event.key.toLowerCase();
      if (key === 's') {
        event.preventDefault();
        if (sheet.dirty && panel === null) setPanel('keep');
        return;
      }
      const inField =
        event.target instanceof Element && event.target.closest('input, textarea, dialog');
      if (inField || (key !== 'z' && key !== 'y')) return;
      event.preventDefault();
      (key === 'y' || event.shiftKey ? redo : undo)?.();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [mayWrite, panel, redo, sheet.dirty, undo]);

  const spoken =
    hand !== null && evaluation.state === 'settled'
      ? (evaluation.shown.get(hand.id) ?? [])
          .filter(({ result }) => result.line === hand.line + 1)
          .map(({ result }) => sayResult(result))
          .join(' ')
      : '';

  return (
    <div className="space-y-3">
      <SheetBar
        notebook={notebook}
        sheet={sheet}
        evaluation={evaluation}
        mayWrite={mayWrite}
        mayShare={props.mayShare}
        onPanel={setPanel}
      />
      <SheetNews
        sheet={sheet}
        evaluation={evaluation}
        archived={notebook.archivedAt !== null}
        onPanel={setPanel}
      />
      <SheetLayout
        index={<SheetIndex content={content} shown={evaluation.shown} />}
        zones={zonesFor(content.cells.length)}
        foot={
          <TitleBlock
            fields={titleFields({
              workshop: notebook.workshop.name,
              title: notebook.title,
              id: notebook.id,
              version: sheet.kept.number,
              savedAt: sheet.kept.savedAt,
              savedBy: sheet.kept.savedBy,
              settings: content.settings,
            })}
          />
        }
      >
        <Entries
          content={content}
          evaluation={evaluation}
          hand={mayWrite ? hand : null}
          mayWrite={mayWrite}
          actions={actions}
        />
      </SheetLayout>
      <div role="status" aria-live="polite" className="sr-only">
        {spoken}
      </div>
      <SheetDialogs
        panel={panel}
        notebook={notebook}
        sheet={sheet}
        personName={personName}
        mayShare={props.mayShare}
        onClose={() => setPanel(null)}
      />
    </div>
  );
}

/** The actions of the cells: one object for as long as the sheet is on the screen. */
function useSheetActions(
  content: NotebookContent,
  shown: Shown,
  setHand: (hand: Hand | null) => void,
  dispatch: SheetActions['dispatch'],
): SheetActions {
  const latest = useRef(content);
  const figures = useRef(shown);
  useEffect(() => {
    latest.current = content;
    figures.current = shown;
  });
  const at = useCallback(
    (id: string) => latest.current.cells.findIndex((cell) => cell.id === id),
    [],
  );

  return useMemo<SheetActions>(
    () => ({
      dispatch,
      take: setHand,
      marks: () =>
        [...figures.current.values()]
          .flat()
          .flatMap(({ result }) =>
            result.mark === null ? [] : [{ name: result.mark, size: sayBriefly(result) }],
          ),
      step({ id, line, column }, by) {
        const { cells } = latest.current;
        const own = cells[at(id)];
        if (own?.kind === 'dimension' && linesOf(own.source)[line + by] !== undefined) {
          setHand({ id, line: line + by, column });
          return true;
        }
        const next = cells[at(id) + by];
        if (!next) return false;
        const last = next.kind === 'dimension' ? linesOf(next.source).length - 1 : 0;
        setHand({ id: next.id, line: by < 0 ? last : 0, column });
        return true;
      },
      insert(kind, beside, where) {
        const cell = { id: newCellId(), kind, source: '' };
        const end = latest.current.cells.length;
        const place = beside === null ? end : at(beside) + (where === 'after' ? 1 : 0);
        dispatch({ kind: 'insert', cell, at: place });
        setHand({ id: cell.id, line: 0, column: AT_END });
      },
      move(id, by) {
        const focused = document.activeElement;
        dispatch({ kind: 'move', id, by });
        requestAnimationFrame(() => {
          if (focused instanceof HTMLElement) focused.focus();
          document.getElementById(cellAnchor(id))?.scrollIntoView({ block: 'nearest' });
        });
      },
      remove(id) {
        const { cells } = latest.current;
        const next = cells[at(id) + 1] ?? cells[at(id) - 1];
        dispatch({ kind: 'delete', id });
        setHand(null);
        requestAnimationFrame(() => {
          if (next) focusEntry(next.id);
        });
      },
    }),
    [at, dispatch, setHand],
  );
}
