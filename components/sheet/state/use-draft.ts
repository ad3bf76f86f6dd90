'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import {
  dropDraft,
  findDraft,
  keepDraft,
  listTyping,
  takeUpDraft,
  type Draft,
  type DraftPlace,
} from './draft';
import { claimTab, listOpenTabs } from './tab';

/** Milliseconds after the last change before the draft is written to the browser's store. */
const DRAFT_PAUSE = 200;

const asideOf = (notebook: string): DraftPlace => ({ notebook, shelf: 'aside', tab: '' });

interface Drafting {
  id: string;
  readOnly: boolean;
  /** What is to be kept in this browser, or null where all of it is saved; another object when it is another. */
  draft: Omit<Draft, 'at'> | null;
  /** The same at this very moment. */
  draftNow: () => Omit<Draft, 'at'> | null;
  /** A draft was found that goes on the sheet. */
  onFound: (draft: Draft) => void;
}

/** What is typed and not saved, written to this browser's store as one types: the net under the saving. */
export function useDraft({ id, readOnly, draft, draftNow, onFound }: Drafting) {
  const [aside, setAside] = useState<Draft | null>(null);
  const [ready, setReady] = useState(false);
  const [elsewhere, setElsewhere] = useState(false);
  const [storeFull, setStoreFull] = useState(false);
  /** Where this tab keeps what is typed; null until the tab has its name. */
  const typing = useRef<DraftPlace | null>(null);
  const found = useRef(onFound);
  useEffect(() => {
    found.current = onFound;
  });

  // The store is known only in the browser; what it holds replaces what the server sent.
  useEffect(() => {
    if (readOnly) return;
    let gone = false;
    const begin = async () => {
      const tab = await claimTab();
      const open = await listOpenTabs();
      if (gone) return;
      const left = takeUpDraft(localStorage, id, tab, open);
      typing.current = { notebook: id, shelf: 'typing', tab };
      setAside(findDraft(localStorage, asideOf(id)));
      setElsewhere(
        listTyping(localStorage, id).some((other) => other.tab !== tab && open.has(other.tab)),
      );
      if (left) found.current(left);
      setReady(true);
    };
    void begin();
    return () => {
      gone = true;
    };
  }, [id, readOnly]);

  const writeDraft = useCallback(() => {
    const place = typing.current;
    if (place === null) return;
    const now = draftNow();
    if (now === null) dropDraft(localStorage, place);
    else setStoreFull(!keepDraft(localStorage, place, { ...now, at: new Date().toISOString() }));
  }, [draftNow]);

  useEffect(() => {
    if (!ready || readOnly) return;
    const timer = setTimeout(writeDraft, DRAFT_PAUSE);
    return () => clearTimeout(timer);
  }, [draft, ready, readOnly, writeDraft]);

  const isDirty = draft !== null;
  useEffect(() => {
    if (!isDirty) return;
    const leave = (event: BeforeUnloadEvent) => {
      writeDraft();
      // Only where leaving would lose something: a draft waits in the store.
      if (storeFull) event.preventDefault();
    };
    const hide = () => writeDraft();
    window.addEventListener('beforeunload', leave);
    window.addEventListener('pagehide', hide);
    return () => {
      window.removeEventListener('beforeunload', leave);
      window.removeEventListener('pagehide', hide);
    };
  }, [isDirty, storeFull, writeDraft]);

  // Going to another page of ours takes the sheet off the screen without the browser leaving.
  // Only what is unsaved is written then: a draft not read yet must not be dropped.
  const leaveSheet = useCallback(() => {
    if (draftNow() !== null) writeDraft();
  }, [draftNow, writeDraft]);
  useEffect(() => leaveSheet, [leaveSheet]);

  const layAside = useCallback(
    (put: Omit<Draft, 'at'>) => {
      const laid = { ...put, at: new Date().toISOString() };
      keepDraft(localStorage, asideOf(id), laid);
      setAside(laid);
    },
    [id],
  );
  const forgetAside = useCallback(() => {
    dropDraft(localStorage, asideOf(id));
    setAside(null);
  }, [id]);

  return { aside, layAside, forgetAside, ready, elsewhere, storeFull, writeDraft };
}
