import type { NotebookContent } from '@/lib/notebooks/content';

/**
 * What was typed and not yet acknowledged by the server, kept in this browser. Two shelves: `typing`
 * follows every change; `aside` holds what a person chose to put aside, until they bring it back.
 */
export interface Draft {
  /** The version the typing began from. */
  base: number;
  /** The content of that version: a merge needs to know what either side changed. */
  from: NotebookContent;
  content: NotebookContent;
  /** ISO 8601, UTC. */
  at: string;
}

export type Shelf = 'typing' | 'aside';
export type Store = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

const FORM = 1;
const keyOf = (notebookId: string, shelf: Shelf) => `surdwork:${shelf}:${notebookId}`;

/** @returns whether the browser took it; a full or forbidden store says no instead of throwing. */
export function keepDraft(store: Store, notebookId: string, draft: Draft, shelf: Shelf = 'typing') {
  try {
    store.setItem(keyOf(notebookId, shelf), JSON.stringify({ form: FORM, ...draft }));
    return true;
  } catch {
    return false;
  }
}

export function findDraft(store: Store, notebookId: string, shelf: Shelf = 'typing'): Draft | null {
  try {
    const text = store.getItem(keyOf(notebookId, shelf));
    const kept: unknown = text === null ? null : JSON.parse(text);
    return isDraft(kept)
      ? { base: kept.base, from: kept.from, content: kept.content, at: kept.at }
      : null;
  } catch {
    return null;
  }
}

export function dropDraft(store: Store, notebookId: string, shelf: Shelf = 'typing') {
  try {
    store.removeItem(keyOf(notebookId, shelf));
  } catch {
    // A store that cannot be written holds nothing to drop.
  }
}

function isDraft(value: unknown): value is Draft & { form: number } {
  if (typeof value !== 'object' || value === null) return false;
  const { form, base, from, content, at } = value as Record<string, unknown>;
  return (
    form === FORM &&
    typeof base === 'number' &&
    typeof at === 'string' &&
    isContent(from) &&
    isContent(content)
  );
}

/** Enough to be drawn safely; the server checks the rest when it is kept. */
function isContent(value: unknown): value is NotebookContent {
  if (typeof value !== 'object' || value === null) return false;
  const { format, settings, cells } = value as Record<string, unknown>;
  return (
    format === 1 &&
    typeof settings === 'object' &&
    settings !== null &&
    Array.isArray(cells) &&
    cells.every(
      (cell: unknown) =>
        typeof cell === 'object' &&
        cell !== null &&
        typeof (cell as Record<string, unknown>).id === 'string' &&
        typeof (cell as Record<string, unknown>).source === 'string',
    )
  );
}
