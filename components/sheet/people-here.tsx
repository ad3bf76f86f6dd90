import type { NotebookContent } from '@/lib/notebooks/content';
import type { Now } from '@/lib/notebooks/types';

interface PeopleHereProps {
  people: Now['people'];
  content: NotebookContent;
}

/** Shown by their initials; more than this are counted. */
const SHOWN = 5;

/** The first letters of the first and last word of a name. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/u);
  const [first = '', last = ''] = [words[0], words.length > 1 ? words.at(-1) : ''];
  return [first, last]
    .map((word) => [...word][0] ?? '')
    .join('')
    .toLocaleUpperCase('en');
}

/** Who else has the sheet on the screen, and which cell they have in hand. */
export function PeopleHere({ people, content }: PeopleHereProps) {
  if (people.length === 0) return null;
  const where = (cell: string | null) => {
    const place = content.cells.findIndex(({ id }) => id === cell) + 1;
    return place === 0 ? '' : `, at cell ${place}`;
  };
  const shown = people.slice(0, SHOWN);
  const more = people.slice(SHOWN);
  return (
    <ul aria-label="Here now" className="flex items-center gap-1.5 print:hidden">
      {shown.map(({ id, name, cell }) => (
        <li
          key={id}
          title={`${name}${where(cell)}`}
          className="flex size-7 items-center justify-center rounded-full border border-ink bg-sheet text-tag font-semibold"
        >
          <span aria-hidden>{initialsOf(name)}</span>
          <span className="sr-only">{`${name}${where(cell)}`}</span>
        </li>
      ))}
      {more.length > 0 && (
        <li title={more.map(({ name }) => name).join(', ')} className="text-small text-soft">
          <span aria-hidden>+{more.length}</span>
          <span className="sr-only">{`and ${more.map(({ name }) => name).join(', ')}`}</span>
        </li>
      )}
    </ul>
  );
}
