'use client';

import { useCallback, useEffect, useRef, useState, type RefObject } from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import { sameContent } from '@/lib/notebooks/merge';
import type { Saved, StaleHead } from '@/lib/notebooks/types';
import { ask, Refusal, sayFault } from '@/components/ui/ask';
import { isReached, subscribeToReach } from '@/components/ui/reach';
import type { Kept } from './use-notebook';

export type SaveState =
  | { kind: 'idle' }
  | { kind: 'keeping' }
  /** `again`: it is tried again by itself; otherwise only after the next change. */
  | { kind: 'failed'; fault: string; again: boolean };

/** `asked`: somebody changed the same, and a person is asked; nothing was saved. */
type SaveEnd = 'saved' | 'asked' | 'failed';

/** Milliseconds without a change after which the sheet saves itself, and the longest it waits while one writes on. */
const PAUSE = 4_000;
const LONGEST = 60_000;
/** Milliseconds before a save without an answer is tried again, doubled each time. */
const FIRST_AGAIN = 2_000;
const LAST_AGAIN = 60_000;
/** A request that outlives its page may have no more bytes than this (Fetch standard, keepalive). */
const OUTLIVES = 60_000;

/** A save as it was sent; until it has an answer it is sent again just so, and the server knows it again. */
interface Sent {
  base: number;
  content: NotebookContent;
  merge: true;
  byItself: boolean;
  note?: string;
}

interface Saving {
  id: string;
  /** Whether there is anything that this sheet may save. */
  isUnsaved: boolean;
  /** What is to be saved; another object when there is something new. */
  content: NotebookContent;
  latest: RefObject<{ kept: Kept; toSave: NotebookContent }>;
  /** A version that was saved on the server, and the content that it grew out of there. */
  onSaved: (kept: Kept, from: NotebookContent | null) => void;
  /** Somebody changed the same: the newest version, from which the questions follow. */
  onStale: (head: Kept) => void;
}

/** Saves the sheet after a pause, at once when asked to or when the page is left, and again when no answer came. */
export function useSaving(saving: Saving) {
  const { id, isUnsaved, content, latest } = saving;
  const [state, setState] = useState<SaveState>({ kind: 'idle' });
  const given = useRef(saving);
  useEffect(() => {
    given.current = saving;
  });
  /** What the server is asked about this notebook's head happens one after another. */
  const line = useRef<Promise<unknown>>(Promise.resolve());
  const unanswered = useRef<Sent | null>(null);
  /** What the server would not have: the same is not sent again by itself. */
  const refused = useRef<NotebookContent | null>(null);
  const since = useRef<number | null>(null);
  const attempts = useRef(0);
  const next = useRef(0);

  const inLine = useCallback(<T>(work: () => Promise<T>): Promise<T> => {
    const done = line.current.then(work);
    line.current = done.catch(() => undefined);
    return done;
  }, []);

  const send = useCallback(
    async (sent: Sent): Promise<SaveEnd> => {
      unanswered.current = sent;
      setState({ kind: 'keeping' });
      const body = JSON.stringify(sent);
      try {
        const saved = await ask<Saved>(`/api/notebooks/${id}/versions`, {
          body: sent,
          keepalive: body.length < OUTLIVES,
        });
        unanswered.current = null;
        since.current = null;
        attempts.current = 0;
        const { number, savedAt, author } = saved;
        const version = { number, savedAt, savedBy: author, byItself: sent.byItself };
        if (saved.content) {
          given.current.onSaved({ ...version, content: saved.content }, sent.content);
        } else given.current.onSaved({ ...version, content: sent.content }, null);
        setState({ kind: 'idle' });
        return 'saved';
      } catch (fault) {
        const refusal = fault instanceof Refusal ? fault : null;
        const head = refusal?.status === 409 ? (refusal.document.head as StaleHead) : undefined;
        if (head !== undefined) {
          unanswered.current = null;
          const { number, savedAt, author: savedBy } = head;
          given.current.onStale({ number, content: head.content, savedAt, savedBy });
          setState({ kind: 'idle' });
          return 'asked';
        }
        const status = refusal?.status ?? 0;
        const again = status === 0 || status === 429 || status >= 500;
        if (!again) {
          unanswered.current = null;
          since.current = null;
          refused.current = sent.content;
        }
        const wait = Math.min(LAST_AGAIN, FIRST_AGAIN * 2 ** attempts.current);
        attempts.current += 1;
        next.current = Date.now() + wait;
        setState({ kind: 'failed', fault: sayFault(fault), again });
        return 'failed';
      }
    },
    [id],
  );

  /** Saves what is there now; with a note it is kept by hand. */
  const save = useCallback(
    (byHand: { note: string } | null): Promise<SaveEnd> =>
      inLine(async () => {
        if (unanswered.current !== null) {
          const end = await send(unanswered.current);
          if (end !== 'saved') return end;
        }
        const { kept, toSave } = latest.current;
        const byItself = byHand === null;
        if (byItself && sameContent(toSave, kept.content)) return 'saved';
        const note = byHand?.note.trim() ?? '';
        return send({
          base: kept.number,
          content: toSave,
          merge: true,
          byItself,
          ...(note === '' ? {} : { note }),
        });
      }),
    [inLine, latest, send],
  );

  // Drawn anew with every change, so each change begins the pause again.
  useEffect(() => {
    if (!isUnsaved) {
      since.current = null;
      return;
    }
    const isRefused = state.kind === 'failed' && !state.again && refused.current === content;
    if (state.kind === 'keeping' || isRefused) return;
    const now = Date.now();
    since.current ??= now;
    const pause = Math.max(0, Math.min(PAUSE, since.current + LONGEST - now));
    const isAgain = state.kind === 'failed' && state.again;
    const wait = isAgain ? Math.max(0, next.current - now) : pause;
    const timer = setTimeout(() => void save(null), wait);
    return () => clearTimeout(timer);
  }, [isUnsaved, content, state, save]);

  useEffect(
    () =>
      subscribeToReach(() => {
        if (isReached() && unanswered.current !== null) void save(null);
      }),
    [save],
  );

  useEffect(() => {
    if (!isUnsaved) return;
    const hide = () => {
      if (document.visibilityState === 'hidden') void save(null);
    };
    const leave = () => void save(null);
    document.addEventListener('visibilitychange', hide);
    window.addEventListener('pagehide', leave);
    return () => {
      document.removeEventListener('visibilitychange', hide);
      window.removeEventListener('pagehide', leave);
    };
  }, [isUnsaved, save]);

  return { state, save, inLine, unanswered };
}
