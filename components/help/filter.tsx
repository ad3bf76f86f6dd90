'use client';

import { createContext, useContext, useId, useState, type ReactNode } from 'react';

const Wanted = createContext('');

const folded = (text: string) => text.toLowerCase().normalize('NFKD');

/** Whether every word that is looked for stands somewhere in the text. */
export function answersFilter(text: string, wanted: string): boolean {
  const within = folded(text);
  return folded(wanted)
    .split(/\s+/)
    .every((word) => within.includes(word));
}

interface FilterProps {
  /** The texts of all entries, to count those that are left. */
  texts: readonly string[];
  children: ReactNode;
}

/** A field that leaves on the page only the entries in which its words stand. */
export function Filter({ texts, children }: FilterProps) {
  const [wanted, setWanted] = useState('');
  const id = useId();
  const left = texts.filter((text) => answersFilter(text, wanted)).length;
  return (
    <Wanted value={wanted}>
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1 print:hidden">
        <label htmlFor={id} className="text-small font-medium">
          Look for
        </label>
        <input
          id={id}
          type="search"
          value={wanted}
          onChange={(event) => setWanted(event.target.value)}
          placeholder="chord, angle, inch …"
          className="min-h-9 w-64 max-w-full rounded-cut border border-rule bg-sheet px-3 text-base placeholder:text-soft"
        />
        <span role="status" className="text-small text-soft">
          {wanted.trim() === '' ? '' : left === 0 ? 'Nothing has these words.' : `${left} left`}
        </span>
      </div>
      {children}
    </Wanted>
  );
}

interface FilteredProps {
  /** Shown while one of these has the words that are looked for. */
  texts: readonly string[];
  children: ReactNode;
}

export function Filtered({ texts, children }: FilteredProps) {
  const wanted = useContext(Wanted);
  return <div hidden={!texts.some((text) => answersFilter(text, wanted))}>{children}</div>;
}
