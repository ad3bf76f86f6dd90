'use client';

import { useCallback, useMemo, useSyncExternalStore } from 'react';
import type { Folds } from './blocks';

const keyOf = (personId: string, notebookId: string) => `surdwork:folds:${personId}:${notebookId}`;

const listeners = new Set<() => void>();
/** What was folded where the browser refuses to store: it lasts as long as the page. */
const unstored = new Map<string, string>();

function readText(key: string): string {
  const here = unstored.get(key);
  if (here !== undefined) return here;
  try {
    return localStorage.getItem(key) ?? '';
  } catch {
    return '';
  }
}

function writeText(key: string, text: string) {
  try {
    if (text === '') localStorage.removeItem(key);
    else localStorage.setItem(key, text);
    unstored.delete(key);
  } catch {
    unstored.set(key, text);
  }
  for (const listener of listeners) listener();
}

function subscribe(listener: () => void) {
  listeners.add(listener);
  window.addEventListener('storage', listener);
  return () => {
    listeners.delete(listener);
    window.removeEventListener('storage', listener);
  };
}

/** Ids one after another; no cell's id holds a blank. */
const readFolds = (text: string): Folds => new Set(text.split(' ').filter((id) => id !== ''));

export interface FoldStore {
  folds: Folds;
  setFold: (id: string, folded: boolean) => void;
}

/** What a person has folded on a notebook, kept in this browser and nowhere else. */
export function useFolds(personId: string, notebookId: string): FoldStore {
  const key = keyOf(personId, notebookId);
  const text = useSyncExternalStore(
    subscribe,
    () => readText(key),
    () => '',
  );
  const folds = useMemo(() => readFolds(text), [text]);
  const setFold = useCallback(
    (id: string, folded: boolean) => {
      const next = new Set(readFolds(readText(key)));
      if (folded) next.add(id);
      else next.delete(id);
      writeText(key, [...next].join(' '));
    },
    [key],
  );
  return { folds, setFold };
}
