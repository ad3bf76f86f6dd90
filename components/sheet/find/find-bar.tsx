'use client';

import { useEffect, useId, useMemo, useRef, useState, type KeyboardEvent } from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import { Button } from '@/components/ui/button';
import { findHits, firstFrom, replaceHits, type Hit, type Query } from './find-hits';
import { elementOf, showHits } from './show-hits';

/** Asked for from outside: opened again (0), or a step on or back. Each has a number of its own. */
export interface FindRequest {
  by: -1 | 0 | 1;
  number: number;
}

interface FindBarProps {
  content: NotebookContent;
  request: FindRequest;
  /** What was looked for last on this sheet. */
  last: Query;
  /** The cell that was in hand when the bar was opened: the search begins there. */
  near: string | null;
  mayWrite: boolean;
  onQuery: (query: Query) => void;
  onReplace: (content: NotebookContent) => void;
  /** Opens whatever is folded over a cell. */
  onShow: (id: string) => void;
  /** Takes a place in hand. */
  onTake: (hit: Hit) => void;
  onClose: () => void;
}

const BOX =
  'min-h-9 min-w-0 border border-rule bg-hand px-2 font-mono text-source placeholder:font-sans placeholder:text-soft';

/** The strip above the sheet in which one looks for something: how often it stands there, and where. */
export function FindBar(props: FindBarProps) {
  const { content, request, last, near, mayWrite, onQuery, onReplace, onShow, onTake, onClose } =
    props;
  const [query, setQuery] = useState(last);
  const [at, setAt] = useState<number | null>(null);
  const [other, setOther] = useState('');
  const [replacing, setReplacing] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  const ids = useId();
  const hits = useMemo(() => findHits(content.cells, query), [content, query]);
  const index = at === null ? null : Math.min(at, hits.length - 1);
  const current = index === null ? null : (hits[index] ?? null);

  const scrollTo = (hit: Hit) => {
    onShow(hit.id);
    requestAnimationFrame(() => elementOf(hit)?.scrollIntoView({ block: 'center' }));
  };
  const go = (next: number) => {
    if (hits.length === 0) return;
    const wrapped = (next + hits.length) % hits.length;
    setAt(wrapped);
    const hit = hits[wrapped];
    if (hit) scrollTo(hit);
  };
  const step = (by: -1 | 1) =>
    go(index === null ? firstFrom(hits, content.cells, near) : index + by);
  const look = (next: Query) => {
    setQuery(next);
    onQuery(next);
    const found = findHits(content.cells, next);
    const first = firstFrom(found, content.cells, current?.id ?? near);
    setAt(found.length === 0 ? null : first);
    const hit = found[first];
    if (hit) scrollTo(hit);
  };

  const latest = useRef({ step });
  useEffect(() => {
    latest.current = { step };
  });
  const { by, number } = request;
  useEffect(() => {
    if (by === 0) {
      input.current?.focus({ preventScroll: true });
      input.current?.select();
    } else latest.current.step(by);
  }, [by, number]);

  useEffect(() => showHits(query.text, hits, current), [query, hits, current]);

  const replace = (chosen: readonly Hit[]) => {
    onReplace({ ...content, cells: replaceHits(content.cells, chosen, other) });
  };

  const onKey = (event: KeyboardEvent) => {
    if (event.key === 'Escape') onClose();
    else if (event.key === 'Enter' && event.target === input.current) {
      if ((event.ctrlKey || event.metaKey) && current) onTake(current);
      else step(event.shiftKey ? -1 : 1);
    } else return;
    event.preventDefault();
    event.stopPropagation();
  };

  const place = current && content.cells.findIndex(({ id }) => id === current.id) + 1;
  const count =
    query.text === ''
      ? ''
      : hits.length === 0
        ? 'Not on this sheet'
        : index === null
          ? `${hits.length} found`
          : `${index + 1} of ${hits.length}, in cell ${place}`;

  return (
    <div
      role="search"
      aria-label="Find on this sheet"
      onKeyDown={onKey}
      className="sticky top-0 z-30 block border border-l-4 border-ochre bg-sheet px-3 py-2 print:hidden"
    >
      <div className="flex flex-wrap items-center gap-x-3 gap-y-2">
        <label htmlFor={`${ids}-text`} className="text-small font-medium max-sm:sr-only">
          Find
        </label>
        <input
          id={`${ids}-text`}
          ref={input}
          type="text"
          value={query.text}
          onChange={(event) => look({ ...query, text: event.target.value })}
          placeholder="In sources, notes and headings"
          autoComplete="off"
          autoCapitalize="off"
          spellCheck={false}
          className={`${BOX} grow sm:max-w-72`}
        />
        <label className="flex items-center gap-1.5 text-small">
          <input
            type="checkbox"
            checked={query.marksOnly}
            onChange={(event) => look({ ...query, marksOnly: event.target.checked })}
            className="size-4 accent-snapline"
          />
          Only the mark of this name
        </label>
        <span role="status" className="min-w-36 font-mono text-small tabular-nums">
          {count}
        </span>
        <span className="ml-auto flex flex-wrap gap-1">
          <Button look="quiet" disabled={hits.length === 0} onClick={() => step(-1)}>
            Before
          </Button>
          <Button look="quiet" disabled={hits.length === 0} onClick={() => step(1)}>
            Next
          </Button>
          {mayWrite && (
            <>
              <Button look="quiet" disabled={!current} onClick={() => current && onTake(current)}>
                Open it
              </Button>
              <Button
                look="quiet"
                aria-expanded={replacing}
                onClick={() => setReplacing(!replacing)}
              >
                Replace
              </Button>
            </>
          )}
          <Button look="quiet" onClick={onClose}>
            Close
          </Button>
        </span>
      </div>
      {replacing && (
        <div className="mt-2 flex flex-wrap items-center gap-x-3 gap-y-2 border-t border-hairline pt-2">
          <label htmlFor={`${ids}-other`} className="text-small font-medium">
            by
          </label>
          <input
            id={`${ids}-other`}
            type="text"
            value={other}
            onChange={(event) => setOther(event.target.value)}
            autoComplete="off"
            autoCapitalize="off"
            spellCheck={false}
            className={`${BOX} grow sm:max-w-72`}
          />
          <Button disabled={!current} onClick={() => current && replace([current])}>
            This one
          </Button>
          <Button disabled={hits.length === 0} onClick={() => replace(hits)}>
            {hits.length > 1 ? `All ${hits.length}` : 'All'}
          </Button>
        </div>
      )}
    </div>
  );
}
