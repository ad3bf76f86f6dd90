'use client';

import { createContext, memo, useContext, useEffect, useState } from 'react';
import { NOTE_LOOK } from './note-look';

type Render = (source: string) => string;

/** Notes that came set with the page, by their sources. */
export const NotesSet = createContext<Readonly<Record<string, string>>>({});

let loaded: Render | null = null;

async function loadRender(): Promise<Render> {
  loaded ??= (await import('./note')).renderNote;
  return loaded;
}

/** Fetches what sets notes while the browser is idle. */
export function preloadNotes() {
  void loadRender();
}

/**
 * A note as it is being written. What sets Markdown is large and the notes of a fresh page are set already, so it is
 * fetched only for a source that is new; until it is there, the source stands as typed.
 */
export const LiveNote = memo(function LiveNote({ source }: { source: string }) {
  const set = useContext(NotesSet);
  const [, renew] = useState(0);
  const html = (Object.hasOwn(set, source) ? set[source] : undefined) ?? loaded?.(source);
  const isMissing = html === undefined;
  useEffect(() => {
    if (!isMissing) return;
    let gone = false;
    void loadRender().then(() => {
      if (!gone) renew((count) => count + 1);
    });
    return () => {
      gone = true;
    };
  }, [isMissing]);
  if (isMissing) return <div className={`${NOTE_LOOK} whitespace-pre-wrap`}>{source}</div>;
  return <div className={NOTE_LOOK} dangerouslySetInnerHTML={{ __html: html }} />;
});
