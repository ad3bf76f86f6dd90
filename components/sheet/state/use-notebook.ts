'use client';

import { useCallback, useLayoutEffect, useMemo, useReducer, useRef, useState } from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import {
  keyOfConflict,
  mergeContents,
  sameContent,
  settle,
  withhold,
  type Side,
} from '@/lib/notebooks/merge';
import type { Change } from './changes';
import type { Draft } from './draft';
import { beginHistory, historyReducer } from './history';
import { changedCells, interned } from './interned';
import { askOn, openConflicts, type Questions } from './questions';
import { useDraft } from './use-draft';
import { useSaving } from './use-saving';

/** A version the server has acknowledged, which the sheet on the screen builds on. */
export interface Kept {
  number: number;
  content: NotebookContent;
  savedAt: string;
  savedBy: string;
  /** Saved after a pause, not kept by hand. */
  byItself?: boolean;
  /** This sheet saved it, and nothing of anybody else's came with it. */
  isOwn?: boolean;
}

/** Cells that somebody else has just changed, and who. */
export interface Fresh {
  ids: ReadonlySet<string>;
  by: string;
  number: number;
}

type Unsaved = Omit<Draft, 'at'>;

/**
 * The notebook on the screen: its history, what the server has of it, its draft. What others save comes in beneath what
 * is typed: the present content, and every step back, is brought together with it as the server would. Where both
 * changed the same, the text on the sheet stays; saving goes on with everything else, and leaves what is asked as the
 * newest version has it, so that an unanswered question neither overwrites anybody nor holds up other work.
 */
export function useNotebook(id: string, first: Kept, readOnly: boolean) {
  const [history, act] = useReducer(historyReducer, first.content, beginHistory);
  const [kept, setKept] = useState(first);
  const [questions, setQuestions] = useState<Questions | null>(null);
  const [found, setFound] = useState<Draft | null>(null);
  const [fresh, setFresh] = useState<Fresh | null>(null);
  const { present } = history;

  const open = useMemo(
    () => openConflicts(questions, present, kept.content),
    [questions, present, kept.content],
  );
  const toSave = useMemo(
    () => (open.length === 0 ? present : withhold(present, open, kept.content)),
    [present, open, kept.content],
  );
  const dirty = !readOnly && !sameContent(present, kept.content);
  const isUnsaved = dirty && !sameContent(toSave, kept.content);
  const draft = useMemo<Unsaved | null>(
    () => (dirty ? draftOf(kept, present, questions) : null),
    [dirty, kept, present, questions],
  );

  const latest = useRef({ present, kept, questions, toSave });
  const unsaved = useRef(draft);
  useLayoutEffect(() => {
    latest.current = { present, kept, questions, toSave };
    unsaved.current = draft;
  });

  const dispatch = useCallback(
    (change: Change) => act({ kind: 'change', change, at: performance.now() }),
    [],
  );
  const undo = useCallback(() => act({ kind: 'undo' }), []);
  const redo = useCallback(() => act({ kind: 'redo' }), []);

  /** Builds on a newer version from now on; `from` is the content that it grew out of. */
  const take = useCallback((head: Kept, grown: NotebookContent | null = null) => {
    const now = latest.current;
    const from = grown ?? now.kept.content;
    const content = interned(head.content, now.present, from);
    const version = { ...head, content };
    const merge = mergeContents(from, now.present, content);
    const asked = askOn(now.questions, from, version, merge.conflicts);
    const ids = new Set(changedCells(now.present, merge.content));
    // At once, for whatever follows before the next drawing.
    latest.current = {
      present: merge.content,
      kept: version,
      questions: asked,
      toSave: merge.content,
    };
    act({ kind: 'shift', from, to: content });
    setKept(version);
    setQuestions(asked);
    if (ids.size > 0) setFresh({ ids, by: head.savedBy, number: head.number });
  }, []);

  const onSaved = useCallback(
    (version: Kept, from: NotebookContent | null) => {
      if (from !== null) take(version, from);
      else {
        const own = { ...version, isOwn: true };
        latest.current = { ...latest.current, kept: own };
        setKept(own);
      }
      setFound(null);
    },
    [take],
  );

  const saving = useSaving({
    id,
    isUnsaved,
    content: toSave,
    latest,
    onSaved,
    onStale: take,
  });
  const { inLine, save, unanswered } = saving;

  /** The draft of this very moment, with what was sent and has no answer: it may be the newest version by now. */
  const draftNow = useCallback(() => {
    const sent = unanswered.current?.content;
    return unsaved.current && { ...unsaved.current, ...(sent === undefined ? {} : { sent }) };
  }, [unanswered]);

  const drafts = useDraft({
    id,
    readOnly,
    draft,
    draftNow,
    onFound: (left) => {
      if (sameContent(left.content, first.content)) return;
      act({ kind: 'change', change: { kind: 'replace', content: left.content }, at: 0 });
      setFound(left);
      const asked = left.asked ?? null;
      if (left.base === first.number) {
        setQuestions(asked);
        return;
      }
      const before = { ...first, number: left.base, content: left.from };
      latest.current = {
        present: left.content,
        kept: before,
        questions: asked,
        toSave: left.content,
      };
      take(first, grownFrom(left, first.content));
      setFresh(null);
    },
  });

  /** Takes the newest version in, once it is the turn of it. */
  const takeHead = useCallback(
    (read: () => Promise<Kept>) =>
      inLine(async () => {
        const head = await read();
        if (head.number > latest.current.kept.number) take(head);
      }),
    [inLine, take],
  );

  /** Answers the open questions, each by its key, and saves what came of it at once. */
  const answer = useCallback(
    (sides: ReadonlyMap<string, Side>) => {
      const content = open.reduce(
        (held, conflict) => settle(held, conflict, sides.get(keyOfConflict(conflict)) ?? 'mine'),
        latest.current.present,
      );
      dispatch({ kind: 'replace', content });
      setQuestions(null);
      latest.current = { ...latest.current, present: content, questions: null, toSave: content };
      return save(null);
    },
    [dispatch, open, save],
  );

  const { layAside, forgetAside, aside } = drafts;
  const putAside = useCallback(() => {
    const now = latest.current;
    layAside(draftOf(now.kept, now.present, null));
    setQuestions(null);
    setFound(null);
    dispatch({ kind: 'replace', content: now.kept.content });
  }, [dispatch, layAside]);

  const bringBack = useCallback(() => {
    if (!aside) return;
    const { content } = mergeContents(aside.from, aside.content, latest.current.present);
    dispatch({ kind: 'replace', content });
    forgetAside();
  }, [aside, dispatch, forgetAside]);

  const forgetFresh = useCallback(() => setFresh(null), []);
  const asked = useMemo(
    () => (questions !== null && open.length > 0 ? { ...questions, conflicts: open } : null),
    [questions, open],
  );

  return {
    content: present,
    dispatch,
    undo: history.past.length > 0 ? undo : null,
    removed: history.removed,
    redo: history.future.length > 0 ? redo : null,
    kept,
    dirty,
    save,
    saveState: saving.state,
    questions: asked,
    answer,
    take,
    takeHead,
    fresh,
    forgetFresh,
    found,
    forgetFound: () => setFound(null),
    aside,
    putAside,
    bringBack,
    elsewhere: drafts.elsewhere,
    storeFull: drafts.storeFull,
  };
}

export type NotebookOnScreen = ReturnType<typeof useNotebook>;

/** The number that a version kept by hand now has: that of what was saved by itself, when nothing was changed since. */
export const nextNumber = ({ kept, dirty }: Pick<NotebookOnScreen, 'kept' | 'dirty'>) =>
  kept.byItself === true && !dirty ? kept.number : kept.number + 1;

const draftOf = (kept: Kept, content: NotebookContent, asked: Questions | null): Unsaved => ({
  base: kept.number,
  from: kept.content,
  content,
  ...(asked === null ? {} : { asked }),
});

/** The content that the newest version grew out of: what this tab had sent, where its answer was lost. */
function grownFrom({ from, sent }: Draft, head: NotebookContent): NotebookContent {
  if (sent === undefined) return from;
  const { content, conflicts } = mergeContents(from, sent, head);
  return conflicts.length === 0 && sameContent(content, head) ? sent : from;
}
