'use client';

import { useEffect, useMemo, useState } from 'react';
import useSWR from 'swr';
import type { NotebookCell } from '@/lib/notebooks/content';
import type { CommentsView, CommentThread, NotebookPerson } from '@/lib/notebooks/types';
import { askFor } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Drawer } from '@/components/ui/drawer';
import { commentDeeds } from './comment-deeds';
import { Composer } from './composer';
import { sayCell } from './say-cell';
import { Thread } from './thread';
import type { CommentsShown } from './use-sheet-comments';

export interface CommentsDrawerProps {
  notebookId: string;
  /** Null until it has been fetched. */
  view: CommentsView | null;
  cells: readonly NotebookCell[];
  shown: CommentsShown;
  personId: string;
  mayWrite: boolean;
  mayResolve: boolean;
  onChanged: () => Promise<unknown>;
  onShow: (cell: string | null) => void;
  onShowCell: (id: string) => void;
  onClose: () => void;
}

const BESIDE = '(min-width: 64rem)';

/** The comments on one cell, or on the whole notebook. */
export function CommentsDrawer(props: CommentsDrawerProps) {
  const { notebookId, view, cells, shown, mayWrite, onChanged, onShow, onShowCell, onClose } =
    props;
  const { cell, thread: asked } = shown;
  const { data } = useSWR<{ people: NotebookPerson[] }, unknown>(
    `/api/notebooks/${notebookId}/people`,
    askFor,
  );
  const [beginning, setBeginning] = useState(false);
  const deeds = useMemo(() => commentDeeds(notebookId, onChanged), [notebookId, onChanged]);
  const common = {
    ...props,
    deeds,
    names: view?.people ?? {},
    people: (data?.people ?? []).filter(({ id }) => id !== props.personId),
  };
  const place = cells.findIndex(({ id }) => id === cell);
  const own = cells[place];

  useEffect(() => {
    if (asked !== null) document.getElementById(`thread-${asked}`)?.focus();
  }, [asked]);

  const goTo = (id: string) => {
    if (!window.matchMedia(BESIDE).matches) onClose();
    onShowCell(id);
  };

  const threads = view?.threads ?? [];
  return (
    <Drawer title={own ? `Comments on ${sayCell(own, place + 1)}` : 'Comments'} onClose={onClose}>
      {view === null && <p className="text-soft">Fetching the comments…</p>}
      {view !== null &&
        (cell === null ? (
          <AllThreads {...common} threads={threads} onGo={goTo} />
        ) : (
          <div className="space-y-5">
            <CellThreads {...common} threads={threads.filter((one) => one.cell === cell)} />
            {mayWrite &&
              (threads.some((one) => one.cell === cell) && !beginning ? (
                <Button onClick={() => setBeginning(true)}>Begin another thread</Button>
              ) : (
                <Composer
                  key={String(beginning)}
                  label="Begin a thread"
                  does="Comment"
                  about={`${notebookId}-${cell}`}
                  people={common.people}
                  autoFocus={beginning}
                  onSend={(text) => deeds.begin(cell, text).then(() => setBeginning(false))}
                  {...(beginning ? { onCancel: () => setBeginning(false) } : {})}
                />
              ))}
            <div className="flex gap-2 border-t border-hairline pt-3">
              <Button look="quiet" className="-ml-1.5" onClick={() => onShow(null)}>
                All comments on this notebook
              </Button>
            </div>
          </div>
        ))}
    </Drawer>
  );
}

type ThreadsProps = Omit<Parameters<typeof Thread>[0], 'thread'> & {
  threads: readonly CommentThread[];
};

const isOpen = ({ resolvedAt }: CommentThread) => resolvedAt === null;

/** The threads of one cell: the open ones, and the resolved ones folded beneath. */
function CellThreads({ threads, ...common }: ThreadsProps) {
  const open = threads.filter(isOpen);
  const resolved = threads.filter((thread) => !isOpen(thread));
  return (
    <>
      {threads.length === 0 && <p className="text-soft">Nothing has been said about this cell.</p>}
      {open.map((thread) => (
        <Thread key={thread.id} {...common} thread={thread} />
      ))}
      {resolved.length > 0 && (
        <details open={open.length === 0}>
          <summary className="text-small text-snapline underline-offset-4 hover:underline">
            {resolved.length === 1 ? '1 resolved thread' : `${resolved.length} resolved threads`}
          </summary>
          <div className="mt-3 space-y-5">
            {resolved.map((thread) => (
              <Thread key={thread.id} {...common} thread={thread} />
            ))}
          </div>
        </details>
      )}
    </>
  );
}

interface AllThreadsProps extends ThreadsProps {
  cells: readonly NotebookCell[];
  onGo: (cell: string) => void;
}

/** All threads on the notebook, open or resolved, in the order of the sheet; those on cells that have gone come last. */
function AllThreads({ threads, cells, onGo, ...common }: AllThreadsProps) {
  const [resolved, setResolved] = useState(false);
  const places = new Map(cells.map((cell, index) => [cell.id, index]));
  const placeOf = ({ cell }: CommentThread) => places.get(cell) ?? cells.length;
  const asked = threads
    .filter((thread) => isOpen(thread) !== resolved)
    .sort((a, b) => placeOf(a) - placeOf(b));
  return (
    <div className="space-y-5">
      <div role="group" aria-label="Open or resolved" className="flex">
        {[false, true].map((which) => (
          <button
            key={String(which)}
            type="button"
            aria-pressed={resolved === which}
            onClick={() => setResolved(which)}
            className={`-ml-px min-h-9 border px-3 text-small first:ml-0 ${
              resolved === which ? 'border-ink bg-hand font-semibold' : 'border-rule text-snapline'
            }`}
          >
            {which ? 'Resolved' : 'Open'}{' '}
            {threads.filter((thread) => isOpen(thread) !== which).length}
          </button>
        ))}
      </div>
      {asked.length === 0 && (
        <p className="text-soft">
          {resolved
            ? 'No thread has been resolved.'
            : 'No thread is open. A cell’s mark in the margin begins one, as does Alt+Shift+M in the cell.'}
        </p>
      )}
      {asked.map((thread) => {
        const place = places.get(thread.cell);
        const cell = place === undefined ? undefined : cells[place];
        return (
          <section key={thread.id} className="space-y-2">
            <h3 className="text-small">
              {cell && place !== undefined ? (
                <Button look="quiet" className="-ml-1.5" onClick={() => onGo(thread.cell)}>
                  {sayCell(cell, place + 1)}
                </Button>
              ) : (
                <>
                  <span className="font-medium">{thread.cellName}</span>{' '}
                  <span className="text-soft">on a cell that is no longer on the sheet</span>
                </>
              )}
            </h3>
            <Thread {...common} thread={thread} />
          </section>
        );
      })}
    </div>
  );
}
