'use client';

import { lazy, Suspense, useCallback, useEffect, useMemo, useState } from 'react';
import { SWRConfig } from 'swr';
import { ALLOWED } from '@/lib/access';
import type { NotebookHead, Now } from '@/lib/notebooks/types';
import type { NotebookContent } from '@/lib/notebooks/content';
import { TitleBlock } from '@/components/drawing/title-block';
import { Drawer } from '@/components/ui/drawer';
import { focusLine, type Hand, type SheetActions } from './cells';
import { CommentsContext } from './comments/comments-context';
import { useSheetComments } from './comments/use-sheet-comments';
import { preloadEditor } from './editor/source-editor';
import { Entries } from './entries';
import { preloadAids, useAids } from './keys/use-aids';
import { useSheetKeys } from './keys/use-sheet-keys';
import { NotesSet, preloadNotes } from './live-note';
import { MarkIndex } from './mark-index';
import { Removed } from './removed';
import { MARKS_BUTTON, SheetBar } from './sheet-bar';
import { SheetDialogs, type Panel } from './sheet-dialogs';
import { SheetLayout, zonesFor } from './sheet-layout';
import { SheetNews } from './sheet-news';
import { SinceLooked } from './since-looked';
import { BoundedCache } from './state/bounded-cache';
import { useArrival } from './state/use-arrival';
import { useFolds } from './state/folds';
import type { CellAnswer, Shown } from './state/shown';
import { useEvaluation } from './state/use-evaluation';
import { useNotebook, type Kept } from './state/use-notebook';
import { useNow } from './state/use-now';
import { useSheetActions } from './state/use-sheet-actions';
import type { Place } from './state/uses';
import { blockOf, titleFields } from './title-fields';
import { sayResult } from './wording';

export interface SheetProps {
  notebook: NotebookHead;
  content: NotebookContent;
  /** The figures as the server computed them with the page; null when it could not. */
  answers: CellAnswer[] | null;
  /** The notes as the server set them, by their sources. */
  notes: Readonly<Record<string, string>>;
  /** The person who looks. */
  personId: string;
  /** The version that they last had on the screen; null when they never had. */
  seenBefore: number | null;
  mayWrite: boolean;
  mayShare: boolean;
}

/** Answers kept in the browser: enough for undo to be at once. */
const ANSWERS = 80;

/** Milliseconds for which a cell that somebody else changed is marked. */
const FRESH = 12_000;
const NOBODY: Now['people'] = [];

const openedAs = (notebook: NotebookHead, content: NotebookContent): Kept => ({
  number: notebook.version,
  content,
  savedAt: notebook.savedAt,
  savedBy: notebook.savedBy,
  byItself: notebook.byItself,
});

/** Loaded when a proof is first asked for. */
const ProofDrawer = lazy(() =>
  import('./proof/proof-drawer').then(({ ProofDrawer: component }) => ({ default: component })),
);

const resultAt = (shown: Shown, { id, line }: Place) =>
  shown.get(id)?.find(({ result }) => result.line === line + 1)?.result ?? null;

export function Sheet(props: SheetProps) {
  const [cache] = useState(() => new BoundedCache(ANSWERS));
  return (
    <SWRConfig value={{ provider: () => cache }}>
      <NotesSet value={props.notes}>
        <SheetOnScreen {...props} />
      </NotesSet>
    </SWRConfig>
  );
}

function SheetOnScreen(props: SheetProps) {
  const { notebook, content: first, answers, mayWrite } = props;
  const [opened] = useState(() => openedAs(notebook, first));
  const sheet = useNotebook(notebook.id, opened, !mayWrite);
  const { content, dispatch, undo, redo } = sheet;
  const evaluation = useEvaluation(content, answers);
  const [hand, setHand] = useState<Hand | null>(null);
  const now = useNow(notebook.id, sheet, hand?.id ?? null);
  const [lookedAt, setLookedAt] = useState(props.seenBefore ?? opened.number);
  // What one saves oneself one has looked at.
  if (sheet.kept.isOwn === true && sheet.kept.number === lookedAt + 1)
    setLookedAt(sheet.kept.number);
  const [panel, setPanel] = useState<Panel | null>(null);
  const [said, say] = useState('');
  const [details, setDetails] = useState<Place | null>(null);
  const [listing, setListing] = useState(false);
  const { folds, setFold } = useFolds(props.personId, notebook.id);
  const { shown } = evaluation;
  const cellActions = useSheetActions({
    content,
    shown,
    folds,
    dispatch,
    setFold,
    setHand,
    setDetails,
    say,
  });
  const aids = useAids({ content, hand, mayWrite, actions: cellActions });
  const showCell = useCallback((id: string) => cellActions.showLine(id, 0), [cellActions]);
  useArrival(showCell);
  const { context, show, drawer } = useSheetComments({
    notebook,
    content,
    personId: props.personId,
    inUse: !(now?.archived ?? notebook.archivedAt !== null),
    stamp: now?.comments ?? null,
    onShowCell: showCell,
  });
  const actions = useMemo<SheetActions>(
    () => ({ ...cellActions, ...aids.actions, comment: show }),
    [cellActions, aids.actions, show],
  );

  // In its drawer the index makes room for what it leads to.
  const indexActions = useMemo(
    () => ({
      showLine(id: string, line: number) {
        setListing(false);
        actions.showLine(id, line);
      },
      rename: (mark: string) => actions.rename(mark),
    }),
    [actions],
  );

  useEffect(() => {
    const preload = () => {
      if (mayWrite) {
        preloadEditor();
        preloadNotes();
      }
      preloadAids();
    };
    if ('requestIdleCallback' in window) window.requestIdleCallback(preload);
    else setTimeout(preload, 800);
  }, [mayWrite]);

  // The page was asked for again and came with a newer version.
  const { take, fresh, forgetFresh } = sheet;
  useEffect(() => {
    if (notebook.version > sheet.kept.number) take(openedAs(notebook, first));
  }, [notebook, first, sheet.kept.number, take]);

  useEffect(() => {
    if (fresh === null) return;
    const timer = setTimeout(forgetFresh, FRESH);
    return () => clearTimeout(timer);
  }, [fresh, forgetFresh]);

  useSheetKeys({
    ...aids.keys,
    undo: mayWrite ? undo : null,
    redo: mayWrite ? redo : null,
    keep:
      mayWrite && (sheet.dirty || sheet.kept.byItself === true) && panel === null
        ? () => setPanel('keep')
        : null,
  });

  const spoken =
    hand !== null && evaluation.state === 'settled'
      ? (evaluation.shown.get(hand.id) ?? [])
          .filter(({ result }) => result.line === hand.line + 1)
          .map(({ result }) => sayResult(result))
          .join(' ')
      : '';

  const index = (
    <MarkIndex content={content} shown={shown} mayWrite={mayWrite} actions={indexActions} />
  );

  return (
    <CommentsContext value={context}>
      <div className="space-y-3">
        <SheetBar
          notebook={notebook}
          sheet={sheet}
          evaluation={evaluation}
          people={now?.people ?? NOBODY}
          mayWrite={mayWrite}
          mayShare={props.mayShare}
          onPanel={setPanel}
          onFind={aids.keys.find}
          onKeys={aids.keys.keys}
          onMarks={() => setListing(true)}
        />
        {aids.bar}
        <SinceLooked
          notebookId={notebook.id}
          from={lookedAt}
          to={sheet.kept.number}
          onDismiss={() => setLookedAt(sheet.kept.number)}
        />
        <SheetNews
          sheet={sheet}
          evaluation={evaluation}
          archived={now?.archived ?? notebook.archivedAt !== null}
          bringBack={ALLOWED[notebook.role].has('notebook.archive') ? notebook.id : null}
          onPanel={setPanel}
        />
        <SheetLayout
          index={index}
          narrow="elsewhere"
          zones={zonesFor(content.cells.length)}
          foot={
            <TitleBlock
              fields={titleFields({
                block: blockOf(notebook, sheet.kept.savedBy),
                version: sheet.kept.number,
                savedAt: sheet.kept.savedAt,
                settings: content.settings,
                logoAt: `/api/notebooks/${notebook.id}/logo`,
              })}
            />
          }
        >
          <Entries
            content={content}
            evaluation={evaluation}
            hand={mayWrite ? hand : null}
            folds={folds}
            fresh={fresh}
            mayWrite={mayWrite}
            actions={actions}
          />
        </SheetLayout>
        <div role="status" aria-live="polite" className="sr-only">
          {spoken}
        </div>
        <div role="status" aria-live="polite" className="sr-only">
          {said}
        </div>
        <Removed count={sheet.removed} onUndo={undo} />
        {listing && (
          <Drawer
            title="Marks"
            side="left"
            onClose={() => {
              setListing(false);
              document.getElementById(MARKS_BUTTON)?.focus();
            }}
          >
            {index}
          </Drawer>
        )}
        {details && (
          <Suspense>
            <ProofDrawer
              key={`${details.id}:${details.line}`}
              content={content}
              at={details}
              result={resultAt(shown, details)}
              mayWrite={mayWrite}
              actions={actions}
              onClose={() => {
                setDetails(null);
                focusLine(details.id, details.line);
              }}
            />
          </Suspense>
        )}
        <SheetDialogs
          panel={panel}
          notebook={notebook}
          sheet={sheet}
          personId={props.personId}
          mayShare={props.mayShare}
          onPanel={setPanel}
          onClose={() => setPanel(null)}
        />
        {drawer}
        {aids.dialogs}
      </div>
    </CommentsContext>
  );
}
