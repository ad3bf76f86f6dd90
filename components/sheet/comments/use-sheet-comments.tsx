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
import useSWR from 'swr';
import { ALLOWED } from '@/lib/access';
import type { NotebookContent } from '@/lib/notebooks/content';
import type { CommentsView, NotebookHead } from '@/lib/notebooks/types';
import { askFor } from '@/components/ui/ask';
import { Notice } from '@/components/ui/notice';
import { focusLine } from '../cells';
import type { CommentsDrawerProps } from './comments-drawer';
import {
  COMMENTS_BUTTON,
  commentMarkId,
  type SheetComments,
  type ThreadCount,
} from './comments-context';

/** A part that is not here while the connection is down must not take the sheet with it. */
function Unreachable() {
  return <Notice tone="caution">This could not be loaded; the connection may be down.</Notice>;
}

const CommentsDrawer = lazy<(props: CommentsDrawerProps) => ReactNode>(() =>
  import('./comments-drawer').then(
    ({ CommentsDrawer: component }) => ({ default: component }),
    () => ({ default: Unreachable }),
  ),
);

interface Options {
  notebook: NotebookHead;
  content: NotebookContent;
  personId: string;
  /** Not archived. */
  inUse: boolean;
  /** Changes whenever the comments do, as the sheet hears every few seconds; null until it has. */
  stamp: string | null;
  /** Brings a cell into sight. */
  onShowCell: (id: string) => void;
}

/** What is shown of the comments: those of one cell, or with `cell` null all of them; `thread` is the one to begin at. */
export interface CommentsShown {
  cell: string | null;
  thread: string | null;
}

/** The thread that the address of the page leads to, as a letter gives it. */
function threadInAddress(): string | null {
  return new URLSearchParams(window.location.search).get('comment');
}

/** The comments of a sheet: their numbers for the margin, and the drawer in which they are read and written. */
export function useSheetComments(options: Options) {
  const { notebook, content, personId, inUse, stamp, onShowCell } = options;
  const path = `/api/notebooks/${notebook.id}/comments`;
  const [shown, setShown] = useState<CommentsShown | null>(null);
  const arrived = useRef(false);

  const show = useCallback((cell: string | null) => setShown({ cell, thread: null }), []);

  /** Whoever comes by a letter is led to the thread, once. */
  const arrive = ({ threads }: CommentsView) => {
    if (arrived.current) return;
    arrived.current = true;
    const asked = threadInAddress();
    const thread = threads.find(({ id }) => id === asked);
    if (!thread) return;
    onShowCell(thread.cell);
    setShown({ cell: thread.cell, thread: thread.id });
  };

  const { data, mutate } = useSWR<CommentsView, unknown>(path, askFor, {
    keepPreviousData: true,
    onSuccess: arrive,
  });

  useEffect(() => {
    if (stamp !== null) void mutate();
  }, [stamp, mutate]);

  const context = useMemo<SheetComments>(() => {
    const counts = new Map<string, ThreadCount>();
    for (const { cell, resolvedAt } of data?.threads ?? []) {
      const { open, resolved } = counts.get(cell) ?? { open: 0, resolved: 0 };
      counts.set(
        cell,
        resolvedAt === null ? { open: open + 1, resolved } : { open, resolved: resolved + 1 },
      );
    }
    const open = [...counts.values()].reduce((sum, count) => sum + count.open, 0);
    return { counts, open, mayWrite: inUse, show };
  }, [data, inUse, show]);

  const close = useCallback(() => {
    setShown((before) => {
      const cell = before?.cell ?? null;
      requestAnimationFrame(() => {
        const mark = document.getElementById(cell === null ? COMMENTS_BUTTON : commentMarkId(cell));
        if (mark) mark.focus();
        else if (cell !== null) focusLine(cell, 0);
      });
      return null;
    });
  }, []);

  const drawer = shown && (
    <Suspense>
      <CommentsDrawer
        key={shown.cell ?? 'all'}
        notebookId={notebook.id}
        view={data ?? null}
        cells={content.cells}
        shown={shown}
        personId={personId}
        mayWrite={inUse}
        mayResolve={inUse && ALLOWED[notebook.role].has('comments.resolve')}
        onChanged={() => mutate()}
        onShow={show}
        onShowCell={onShowCell}
        onClose={close}
      />
    </Suspense>
  );

  return { context, show, drawer };
}
