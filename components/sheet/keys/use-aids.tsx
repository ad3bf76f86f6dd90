'use client';

import {
  lazy,
  Suspense,
  useCallback,
  useEffect,
  useMemo,
  useRef,
  useState,
  type ReactNode,
} from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import { Notice } from '@/components/ui/notice';
import { focusEntry, type CellActions, type Hand, type SheetActions } from '../cells';
import type { FindRequest } from '../find/find-bar';
import type { Query } from '../find/find-hits';
import { showPlace, usePlaces } from './use-places';

const loadFind = async () => (await import('../find/find-bar')).FindBar;
const loadRename = async () => (await import('../rename/rename-dialog')).RenameDialog;
const loadRestWords = async () => (await import('../editor/rest-words')).watchWords;
const loadKeys = async () => (await import('./keys-dialog')).KeysDialog;

/** A part that is not here while the connection is down must not take the sheet with it. */
function Unreachable() {
  return <Notice tone="caution">This could not be loaded; the connection may be down.</Notice>;
}

const orUnreachable = <P,>(load: () => Promise<(props: P) => ReactNode>) =>
  lazy(async () => ({
    default: await load().catch((): ((props: P) => ReactNode) => Unreachable),
  }));

const FindBar = orUnreachable(loadFind);
const RenameDialog = orUnreachable(loadRename);
const KeysDialog = orUnreachable(loadKeys);

/** Fetches these parts while the browser is idle, so that each opens at once. */
export function preloadAids() {
  for (const load of [loadFind, loadRename, loadKeys]) load().catch(() => null);
}

type AidActions = Pick<SheetActions, 'goTo' | 'jump' | 'markOf' | 'rename' | 'showKeys'>;

/** What had the focus and what was in hand before a search began. */
interface Before {
  focus: Element | null;
  hand: Hand | null;
}

interface AidsOptions {
  content: NotebookContent;
  hand: Hand | null;
  mayWrite: boolean;
  actions: CellActions;
}

/** Finding, renaming, going to definitions and the sheet of keys: their state, and what they put on the screen. */
export function useAids({
  content,
  hand,
  mayWrite,
  actions: { dispatch, take, reveal, marks },
}: AidsOptions) {
  const places = usePlaces(content, hand, take);
  const [finding, setFinding] = useState<FindRequest | null>(null);
  const [last, setLast] = useState<Query>({ text: '', marksOnly: false });
  const [renaming, setRenaming] = useState<string | null>(null);
  const [keysOpen, setKeysOpen] = useState(false);
  const [said, setSaid] = useState('');
  const [before, setBefore] = useState<Before | null>(null);
  const latest = useRef({ finding, hand });
  useEffect(() => {
    latest.current = { finding, hand };
  });

  const find = useCallback((by: FindRequest['by']) => {
    const now = latest.current;
    if (now.finding === null) setBefore({ focus: document.activeElement, hand: now.hand });
    const number = (now.finding?.number ?? 0) + 1;
    setFinding({ by: now.finding === null ? 0 : by, number });
  }, []);

  const { goTo, goBack, jump, markOf, isDefined } = places;
  const actions = useMemo<AidActions>(
    () => ({
      goTo,
      jump,
      markOf,
      rename(mark) {
        if (!mayWrite || !isDefined(mark)) return false;
        setRenaming(mark);
        return true;
      },
      showKeys: () => setKeysOpen(true),
    }),
    [goTo, jump, isDefined, markOf, mayWrite],
  );

  // Names in sources at rest answer to the pointer once this has been loaded; nothing waits for it.
  useEffect(() => {
    let stop: (() => void) | null = null;
    let gone = false;
    loadRestWords().then(
      (watchWords) => {
        if (!gone) stop = watchWords({ marks, goTo: actions.goTo, rename: actions.rename });
      },
      () => null,
    );
    return () => {
      gone = true;
      stop?.();
    };
  }, [actions, marks]);

  const stopFinding = () => {
    setFinding(null);
    const focus = before?.focus;
    if (focus instanceof HTMLElement && focus.isConnected) focus.focus({ preventScroll: true });
    else if (before?.hand) focusEntry(before.hand.id, before.hand.line);
  };

  const bar = finding && (
    <Suspense fallback={null}>
      <FindBar
        content={content}
        request={finding}
        last={last}
        near={before?.hand?.id ?? null}
        mayWrite={mayWrite}
        onQuery={setLast}
        onReplace={(replaced) => dispatch({ kind: 'replace', content: replaced })}
        onShow={reveal}
        onTake={({ id, kind, line, from, column }) => {
          setFinding(null);
          take(kind === 'dimension' ? { id, line, column } : { id, line: 0, column: from });
          requestAnimationFrame(() => showPlace(id));
        }}
        onClose={stopFinding}
      />
    </Suspense>
  );

  const dialogs = (
    <>
      <Suspense fallback={null}>
        {renaming !== null && (
          <RenameDialog
            mark={renaming}
            content={content}
            onClose={() => setRenaming(null)}
            onRename={(renamed, name, count) => {
              dispatch({ kind: 'replace', content: renamed });
              setRenaming(null);
              setSaid(
                `${renaming} is now ${name}, in ${count} ${count === 1 ? 'place' : 'places'}.`,
              );
            }}
          />
        )}
        {keysOpen && <KeysDialog onClose={() => setKeysOpen(false)} />}
      </Suspense>
      <div role="status" className="sr-only">
        {said}
      </div>
    </>
  );

  return {
    actions,
    keys: {
      find: () => find(0),
      findNext: () => find(1),
      findBefore: () => find(-1),
      keys: actions.showKeys,
      goBack: () => void goBack(),
    },
    bar,
    dialogs,
  };
}
