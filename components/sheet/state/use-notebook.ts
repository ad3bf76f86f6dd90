'use client';

import { useCallback, useEffect, useReducer, useRef, useState } from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import type { StaleHead } from '@/lib/notebooks/types';
import { ask, Refusal, sayFault } from '@/components/ui/ask';
import { sameContent, type Change } from './changes';
import {
  dropDraft,
  findDraft,
  keepDraft,
  listTyping,
  takeUpDraft,
  type Draft,
  type DraftPlace,
} from './draft';
import { beginHistory, historyReducer } from './history';
import { claimTab, listOpenTabs } from './tab';

/** A version the server has acknowledged, which the sheet on the screen builds on. */
export interface Kept {
  number: number;
  content: NotebookContent;
  savedAt: string;
  savedBy: string;
}

export type KeepState = { kind: 'idle' } | { kind: 'keeping' } | { kind: 'failed'; fault: string };

/** Milliseconds after the last change before the draft is written to the browser's store. */
const DRAFT_PAUSE = 200;

const asideOf = (notebook: string): DraftPlace => ({ notebook, shelf: 'aside', tab: '' });

/** The notebook on the screen: its history, what the server has of it, and its draft. */
export function useNotebook(id: string, first: Kept, readOnly: boolean) {
  const [history, act] = useReducer(historyReducer, first.content, beginHistory);
  const [kept, setKept] = useState(first);
  const [keepState, setKeepState] = useState<KeepState>({ kind: 'idle' });
  const [conflict, setConflict] = useState<StaleHead | null>(null);
  const [found, setFound] = useState<Draft | null>(null);
  const [aside, setAside] = useState<Draft | null>(null);
  const [ready, setReady] = useState(false);
  const [elsewhere, setElsewhere] = useState(false);
  const [storeFull, setStoreFull] = useState(false);
  const { present } = history;
  const dirty = !readOnly && !sameContent(present, kept.content);

  const dispatch = useCallback(
    (change: Change) => act({ kind: 'change', change, at: performance.now() }),
    [],
  );
  const undo = useCallback(() => act({ kind: 'undo' }), []);
  const redo = useCallback(() => act({ kind: 'redo' }), []);

  /** Where this tab keeps what is typed; null until the tab has its name. */
  const typing = useRef<DraftPlace | null>(null);

  // The store is known only in the browser; what it holds replaces what the server sent.
  useEffect(() => {
    if (readOnly) return;
    let gone = false;
    const begin = async () => {
      const tab = await claimTab();
      const open = await listOpenTabs();
      if (gone) return;
      const draft = takeUpDraft(localStorage, id, tab, open);
      typing.current = { notebook: id, shelf: 'typing', tab };
      setAside(findDraft(localStorage, asideOf(id)));
      setElsewhere(
        listTyping(localStorage, id).some((other) => other.tab !== tab && open.has(other.tab)),
      );
      if (draft && !sameContent(draft.content, first.content)) {
        act({ kind: 'change', change: { kind: 'replace', content: draft.content }, at: 0 });
        setFound(draft);
        if (draft.base !== first.number) {
          const { number, content, savedAt, savedBy } = first;
          setKept({ ...first, number: draft.base, content: draft.from });
          setConflict({ number, content, savedAt, author: savedBy });
        }
      }
      setReady(true);
    };
    void begin();
    return () => {
      gone = true;
    };
  }, [id, first, readOnly]);

  const latest = useRef({ present, kept, dirty });
  useEffect(() => {
    latest.current = { present, kept, dirty };
  });

  const writeDraft = useCallback(() => {
    const now = latest.current;
    const place = typing.current;
    if (place === null) return;
    if (!now.dirty) {
      dropDraft(localStorage, place);
      return;
    }
    const { number: base, content: from } = now.kept;
    const at = new Date().toISOString();
    setStoreFull(!keepDraft(localStorage, place, { base, from, content: now.present, at }));
  }, []);

  useEffect(() => {
    if (!ready || readOnly) return;
    const timer = setTimeout(writeDraft, DRAFT_PAUSE);
    return () => clearTimeout(timer);
  }, [present, kept, ready, readOnly, writeDraft]);

  useEffect(() => {
    if (!dirty) return;
    const leave = (event: BeforeUnloadEvent) => {
      writeDraft();
      event.preventDefault();
    };
    const hide = () => writeDraft();
    window.addEventListener('beforeunload', leave);
    window.addEventListener('pagehide', hide);
    return () => {
      window.removeEventListener('beforeunload', leave);
      window.removeEventListener('pagehide', hide);
    };
  }, [dirty, writeDraft]);

  // Going to another page of ours takes the sheet off the screen without the browser leaving.
  // Only what is unkept is written then: a draft not read yet must not be dropped.
  const leaveSheet = useCallback(() => {
    if (latest.current.dirty) writeDraft();
  }, [writeDraft]);
  useEffect(() => leaveSheet, [leaveSheet]);

  /** Asks the server to keep `content` on top of version `base`; a moved head becomes a conflict. */
  const keep = useCallback(
    async (content: NotebookContent, base: number, note: string, keptBy: string) => {
      setKeepState({ kind: 'keeping' });
      try {
        const saved = await ask<{ number: number; savedAt: string }>(
          `/api/notebooks/${id}/versions`,
          { body: { base, content, ...(note.trim() ? { note: note.trim() } : {}) } },
        );
        setKept({ number: saved.number, content, savedAt: saved.savedAt, savedBy: keptBy });
        // At once, for who leaves the page now: this text is no draft any more.
        if (typing.current && sameContent(latest.current.present, content)) {
          dropDraft(localStorage, typing.current);
        }
        setKeepState({ kind: 'idle' });
        setConflict(null);
        setFound(null);
        return true;
      } catch (fault) {
        const head = fault instanceof Refusal && fault.status === 409 ? fault.document.head : null;
        if (head) setConflict(head as StaleHead);
        setKeepState(head ? { kind: 'idle' } : { kind: 'failed', fault: sayFault(fault) });
        return false;
      }
    },
    [id],
  );

  const putAside = useCallback(
    (onto: Kept) => {
      const draft: Draft = {
        base: kept.number,
        from: kept.content,
        content: present,
        at: new Date().toISOString(),
      };
      keepDraft(localStorage, asideOf(id), draft);
      setAside(draft);
      setKept(onto);
      setConflict(null);
      setFound(null);
      dispatch({ kind: 'replace', content: onto.content });
    },
    [dispatch, id, kept, present],
  );

  const bringBack = useCallback(() => {
    if (!aside) return;
    dispatch({ kind: 'replace', content: aside.content });
    dropDraft(localStorage, asideOf(id));
    setAside(null);
  }, [aside, dispatch, id]);

  return {
    content: present,
    dispatch,
    undo: history.past.length > 0 ? undo : null,
    removed: history.removed,
    redo: history.future.length > 0 ? redo : null,
    kept,
    dirty,
    keep,
    keepState,
    conflict,
    setConflict,
    found,
    forgetFound: () => setFound(null),
    aside,
    putAside,
    bringBack,
    elsewhere,
    storeFull,
  };
}

export type NotebookOnScreen = ReturnType<typeof useNotebook>;
