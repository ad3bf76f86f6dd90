import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { headingsOf, type Heading } from '../note-headings';
import type { Result } from '../result';
import { sayBriefly } from '../wording';
import type { Shown } from './shown';
import { findUses, markDefinedIn, type Place } from './uses';

/** A mark as the index beside the sheet lists it. */
export interface IndexedMark extends Place {
  mark: string;
  /** Its cut size, or the figure that stands for it. */
  size: string;
  faulty: boolean;
  /** The exact value where it says more than the size does. */
  exact: string | null;
  /** Heading of the section in which it is defined; null before the first. */
  section: string | null;
  /** Lines that read it: their mark, or null for a statement or a value without a name. */
  usedBy: (Place & { mark: string | null })[];
}

export interface IndexedHeading extends Heading {
  id: string;
}

/** Of longer exact values only the degree is told; the entry itself shows the whole. */
const LONGEST_EXACT = 28;

export function listMarks({ cells }: NotebookContent, shown: Shown): IndexedMark[] {
  const { readers } = findUses(cells);
  const lines = new Map(cells.map(({ id, source }) => [id, source.split(/\r?\n/)]));
  let section: string | null = null;
  return cells.flatMap(({ id, kind, source }) => {
    if (kind === 'section') section = source.trim() || 'Untitled';
    const within = section;
    return (shown.get(id) ?? []).flatMap(({ result }): IndexedMark[] => {
      if (result.mark === null) return [];
      const size = sayBriefly(result);
      return [
        {
          id,
          line: result.line - 1,
          mark: result.mark,
          size,
          faulty: result.kind === 'error',
          exact: shortExact(result, size),
          section: within,
          usedBy: (readers.get(result.mark) ?? []).map((place) => ({
            ...place,
            mark: markDefinedIn(lines.get(place.id)?.[place.line] ?? ''),
          })),
        },
      ];
    });
  });
}

function shortExact(result: Result, size: string): string | null {
  // Of a list the count says enough; its table stands in the entry.
  if (!('exact' in result) || result.kind === 'list') return null;
  const { text } = result.exact;
  if (size.startsWith(text)) return null;
  if (text.length <= LONGEST_EXACT) return text;
  return result.kind === 'number' && result.degree !== null
    ? `exact, degree ${result.degree}`
    : 'exact';
}

/** Untouched notes stay the same object from one change to the next, so each is read once. */
const known = new WeakMap<NotebookCell, IndexedHeading[]>();

/** The headings of sections and of notes, in order. */
export function listHeadings({ cells }: NotebookContent): IndexedHeading[] {
  return cells.flatMap((cell) => {
    const { id, kind, source } = cell;
    if (kind === 'section') return [{ id, level: 1, text: source.trim() || 'Untitled' }];
    if (kind !== 'note') return [];
    const found = known.get(cell) ?? headingsOf(source).map((heading) => ({ ...heading, id }));
    known.set(cell, found);
    return found;
  });
}

/** Marks whose name, size, exact value or section holds what is looked for, however it is written. */
export function filterMarks(marks: readonly IndexedMark[], sought: string): IndexedMark[] {
  const text = sought.trim().toLowerCase();
  if (text === '') return [...marks];
  return marks.filter(({ mark, size, exact, section }) =>
    [mark, size, exact ?? '', section ?? ''].some((part) => part.toLowerCase().includes(text)),
  );
}
