'use client';

import {
  memo,
  startTransition,
  useDeferredValue,
  useEffect,
  useId,
  useMemo,
  useState,
  type MouseEvent,
} from 'react';
import { Mark } from '@/components/drawing/balloon';
import type { NotebookContent } from '@/lib/notebooks/content';
import { cellAnchor, type SheetActions } from './cells';
import { HeadingList } from './sheet-index';
import { filterMarks, listHeadings, listMarks, type IndexedMark } from './state/index-entries';
import type { Shown } from './state/shown';
import type { Place } from './state/uses';

interface MarkIndexProps {
  content: NotebookContent;
  shown: Shown;
  mayWrite: boolean;
  actions: Pick<SheetActions, 'showLine' | 'rename'>;
}

/** From so many marks on there is something to look for. */
const FILTER_FROM = 6;

/** Milliseconds without a change before the index follows. */
const CALM = 300;

/** A value once it has stopped changing for a moment. */
function useCalm<T>(value: T): T {
  const [calm, setCalm] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => startTransition(() => setCalm(value)), CALM);
    return () => clearTimeout(timer);
  }, [value]);
  return calm;
}

/** The marks of the sheet in hand: size, exact value, section and who reads them; and its headings. */
export function MarkIndex(props: MarkIndexProps) {
  // Typing does not wait for the index, and the index waits until it pauses.
  return (
    <Listing
      content={useCalm(props.content)}
      shown={useDeferredValue(props.shown)}
      mayWrite={props.mayWrite}
      actions={props.actions}
    />
  );
}

const Listing = memo(function Listing({ content, shown, mayWrite, actions }: MarkIndexProps) {
  const [sought, setSought] = useState('');
  const fieldId = useId();
  const marks = useMemo(() => listMarks(content, shown), [content, shown]);
  const headings = useMemo(() => listHeadings(content), [content]);
  const found = filterMarks(marks, sought);
  if (marks.length === 0 && headings.length === 0) {
    return (
      <p className="text-small text-soft">Marks and headings are listed here as you write them.</p>
    );
  }
  return (
    <div className="space-y-6">
      {marks.length > 0 && (
        <section aria-label="Marks">
          <div className="mb-1 flex items-baseline justify-between gap-3">
            <h2 className="text-small font-semibold">Marks</h2>
            <span role="status" className="text-small text-soft">
              {sought.trim() === '' ? marks.length : `${found.length} of ${marks.length}`}
            </span>
          </div>
          {marks.length >= FILTER_FROM && (
            <div className="mb-2">
              <label htmlFor={fieldId} className="sr-only">
                Look for a mark
              </label>
              <input
                id={fieldId}
                type="search"
                value={sought}
                placeholder="Look for a mark"
                onChange={(event) => setSought(event.target.value)}
                className="w-full rounded-cut border border-rule bg-sheet px-2 py-1 text-small placeholder:text-soft"
              />
            </div>
          )}
          <ul className="border-t border-rule">
            {found.map((entry) => (
              <Row
                key={`${entry.id}:${entry.line}`}
                entry={entry}
                goTo={actions.showLine}
                onRename={mayWrite ? actions.rename : null}
              />
            ))}
          </ul>
          {found.length === 0 && <p className="py-1 text-small text-soft">No mark is like that.</p>}
        </section>
      )}
      <HeadingList headings={headings} onGo={(id) => actions.showLine(id, 0)} />
    </div>
  );
});

interface RowProps {
  entry: IndexedMark;
  goTo: (id: string, line: number) => void;
  onRename: ((mark: string) => boolean) | null;
}

function Row({ entry, goTo, onRename }: RowProps) {
  const { mark, size, faulty, exact, section, usedBy } = entry;
  const goes = ({ id, line }: Place) => ({
    href: `#${cellAnchor(id)}`,
    onClick: (event: MouseEvent) => {
      event.preventDefault();
      goTo(id, line);
    },
  });
  return (
    <li className="group/mark relative border-b border-hairline py-1 text-small">
      <a
        {...goes(entry)}
        className="flex items-baseline justify-between gap-3 hover:bg-snapline-wash"
      >
        <span className="min-w-0 truncate text-base">
          <Mark mark={mark} />
        </span>
        <span className={`shrink-0 font-mono tabular-nums ${faulty ? 'text-ruddle' : ''}`}>
          {size}
        </span>
      </a>
      {onRename && (
        <button
          type="button"
          onClick={() => onRename(mark)}
          className="absolute bottom-1 right-0 bg-sheet pl-2 text-snapline opacity-0 hover:underline focus-visible:opacity-100 group-hover/mark:opacity-100 pointer-coarse:opacity-100"
        >
          Rename<span className="sr-only">{` ${mark}`}</span>
        </button>
      )}
      {exact !== null && <p className="truncate font-mono text-soft">{exact}</p>}
      {(section !== null || usedBy.length > 0) && (
        <p className="text-soft">
          {section}
          {section !== null && usedBy.length > 0 && ' · '}
          {usedBy.length > 0 && 'used by '}
          {usedBy.map((reader, index) => (
            <span key={`${reader.id}:${reader.line}`}>
              {index > 0 && ', '}
              <a
                {...goes(reader)}
                className="text-snapline underline decoration-hairline underline-offset-2 hover:decoration-current"
              >
                {reader.mark === null ? 'a line' : <Mark mark={reader.mark} />}
              </a>
            </span>
          ))}
        </p>
      )}
    </li>
  );
}
