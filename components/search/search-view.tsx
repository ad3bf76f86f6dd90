'use client';

import { useEffect, useState } from 'react';
import useSWRInfinite from 'swr/infinite';
import type { SearchAnswer } from '@/lib/notebooks/types';
import { askFor, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { SearchHits } from './search-hits';

interface SearchViewProps {
  query: string;
  archived: boolean;
  /** What the server found with the page. */
  first: SearchAnswer;
}

/** A pause in typing after which it is asked. */
const PAUSE_MS = 200;
const LONGEST = 200;

interface Asked {
  query: string;
  archived: boolean;
}

const addressOf = ({ query, archived }: Asked, after: string | null = null) => {
  const parameters = new URLSearchParams({ q: query });
  if (archived) parameters.set('archived', '1');
  if (after !== null) parameters.set('after', after);
  return parameters.toString();
};

/** A field, and what was found while one types; the address always says what is being looked at. */
export function SearchView({ query, archived, first }: SearchViewProps) {
  const [typed, setTyped] = useState(query);
  const [asked, setAsked] = useState<Asked>({ query, archived });
  const isFirst = asked.query === query && asked.archived === archived;
  const isEmpty = asked.query.trim() === '';

  const { data, error, size, setSize, isLoading, isValidating } = useSWRInfinite<
    SearchAnswer,
    unknown
  >(
    (index: number, before: SearchAnswer | null) => {
      if (isEmpty || (before !== null && before.next === null)) return null;
      return `/api/search?${addressOf(asked, index === 0 ? null : (before?.next ?? null))}`;
    },
    askFor,
    {
      keepPreviousData: true,
      revalidateFirstPage: false,
      revalidateOnFocus: false,
      ...(isFirst && !isEmpty ? { fallbackData: [first] } : {}),
    },
  );

  useEffect(() => {
    const next = { query: typed.trim(), archived: asked.archived };
    if (next.query === asked.query) return;
    const waiting = setTimeout(() => setAsked(next), PAUSE_MS);
    return () => clearTimeout(waiting);
  }, [typed, asked]);

  useEffect(() => {
    window.history.replaceState(null, '', isEmpty ? '/search' : `/search?${addressOf(asked)}`);
  }, [asked, isEmpty]);

  const pages = isEmpty ? [] : (data ?? []);
  const hits = pages.flatMap((page) => page.hits);
  const more = pages.at(-1)?.next ?? null;
  const waiting = typed.trim() !== asked.query || (isLoading && !isEmpty);

  return (
    <div className="space-y-5">
      <form
        role="search"
        aria-label="This search"
        className="space-y-2"
        onSubmit={(event) => {
          event.preventDefault();
          setAsked({ query: typed.trim(), archived: asked.archived });
        }}
      >
        <Field
          label="Look in titles, marks and text"
          type="search"
          autoFocus
          autoComplete="off"
          maxLength={LONGEST}
          value={typed}
          hint="Every word must be there, each as the beginning of a word. A single name is looked for among the marks too, as it is written."
          onChange={(event) => setTyped(event.target.value)}
        />
        <label className="flex w-fit items-center gap-2 text-small">
          <input
            type="checkbox"
            className="accent-ruddle"
            checked={asked.archived}
            onChange={(event) => setAsked({ ...asked, archived: event.target.checked })}
          />
          Look in the archived ones instead
        </label>
      </form>
      <p role="status" className="text-small text-soft">
        {waiting
          ? 'Looking…'
          : isEmpty
            ? 'You look in the notebooks that you have a role on.'
            : sayFound(hits.length, more !== null, asked)}
      </p>
      {error !== undefined && <Notice tone="fault">{sayFault(error)}</Notice>}
      {hits.length > 0 && <SearchHits hits={hits} />}
      {more !== null && (
        <div className="text-center">
          <Button disabled={isValidating} onClick={() => void setSize(size + 1)}>
            More of them
          </Button>
        </div>
      )}
    </div>
  );
}

function sayFound(count: number, more: boolean, { query, archived }: Asked): string {
  const which = archived ? 'archived notebook' : 'notebook';
  if (count === 0) {
    return `No ${which} of yours has “${query}”. Look for fewer words, or only for the beginning of one.`;
  }
  if (more) return `The first ${count} ${which}s with “${query}”, the likeliest first.`;
  return `${count} ${which}${count === 1 ? '' : 's'} with “${query}”.`;
}
