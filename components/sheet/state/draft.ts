import type { NotebookContent } from '@/lib/notebooks/content';
import type { Questions } from './questions';

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
  /** What was sent to be saved and had no answer yet. */
  sent?: NotebookContent;
  /** Questions about it that had no answer yet. */
  asked?: Questions;
  /** ISO 8601, UTC. */
  at: string;
}

export type Shelf = 'typing' | 'aside';
export type Store = Pick<Storage, 'getItem' | 'setItem' | 'removeItem' | 'key' | 'length'>;

/** Whose draft: of a notebook, on a shelf. What is typed is of one tab, so that two never overwrite each other. */
export interface DraftPlace {
  notebook: string;
  shelf: Shelf;
  /** Empty for what belongs to no tab. */
  tab: string;
}

const FORM = 1;
const keyOf = ({ notebook, shelf, tab }: DraftPlace) =>
  `surdwork:${shelf}:${notebook}${tab === '' ? '' : `:${tab}`}`;

/** @returns whether the browser took it; a full or forbidden store says no instead of throwing. */
export function keepDraft(store: Store, place: DraftPlace, draft: Draft): boolean {
  try {
    store.setItem(keyOf(place), JSON.stringify({ form: FORM, ...draft }));
    return true;
  } catch {
    return false;
  }
}

export function findDraft(store: Store, place: DraftPlace): Draft | null {
  try {
    const text = store.getItem(keyOf(place));
    const kept: unknown = text === null ? null : JSON.parse(text);
    if (!isDraft(kept)) return null;
    const { base, from, content, at, asked, sent } = kept;
    return {
      ...{ base, from, content, at },
      ...(isQuestions(asked) ? { asked } : {}),
      ...(isContent(sent) ? { sent } : {}),
    };
  } catch {
    return null;
  }
}

export function dropDraft(store: Store, place: DraftPlace) {
  try {
    store.removeItem(keyOf(place));
  } catch {
    // A store that cannot be written holds nothing to drop.
  }
}

/** The tabs that have something typed in a notebook, the latest first. */
export function listTyping(store: Store, notebook: string): { tab: string; draft: Draft }[] {
  const whole = keyOf({ notebook, shelf: 'typing', tab: '' });
  const found: { tab: string; draft: Draft }[] = [];
  for (let index = 0; index < store.length; index += 1) {
    const key = store.key(index);
    if (key !== whole && !key?.startsWith(`${whole}:`)) continue;
    const tab = key.slice(whole.length + 1);
    const draft = findDraft(store, { notebook, shelf: 'typing', tab });
    if (draft) found.push({ tab, draft });
  }
  return found.sort((a, b) => (a.draft.at < b.draft.at ? 1 : -1));
}

/**
 * The draft that a tab goes on with: its own, or else the latest of a tab that is closed, which becomes
 * its own. Drafts of tabs that are open stay theirs; others that are left over wait for their turn.
 */
export function takeUpDraft(
  store: Store,
  notebook: string,
  tab: string,
  open: ReadonlySet<string>,
): Draft | null {
  const own: DraftPlace = { notebook, shelf: 'typing', tab };
  const mine = findDraft(store, own);
  if (mine) return mine;
  const left = listTyping(store, notebook).find((other) => !open.has(other.tab));
  if (!left) return null;
  if (keepDraft(store, own, left.draft)) dropDraft(store, { ...own, tab: left.tab });
  return left.draft;
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

/** Enough to be asked safely. */
function isQuestions(value: unknown): value is Questions {
  if (typeof value !== 'object' || value === null) return false;
  const { author, number, savedAt, conflicts } = value as Record<string, unknown>;
  return (
    typeof author === 'string' &&
    typeof number === 'number' &&
    typeof savedAt === 'string' &&
    Array.isArray(conflicts) &&
    conflicts.every((one: unknown) => typeof one === 'object' && one !== null && 'kind' in one)
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
