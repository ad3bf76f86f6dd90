'use client';

import { labelOf, type Mentionable } from './mention-text';

interface MentionListProps {
  id: string;
  offers: readonly Mentionable[];
  /** Everybody, so that namesakes are told apart. */
  people: readonly Mentionable[];
  chosen: number;
  onTake: (person: Mentionable) => void;
}

/** The people whose name begins as it was typed, under the box; the focus stays in the box. */
export function MentionList({ id, offers, people, chosen, onTake }: MentionListProps) {
  return (
    <ul
      id={id}
      role="listbox"
      aria-label="People to mention"
      className="absolute inset-x-0 top-full z-10 border border-ink bg-sheet py-1 text-small shadow-[3px_3px_0_var(--hairline)]"
    >
      {offers.map((person, index) => (
        <li
          key={person.id}
          id={`${id}-${index}`}
          role="option"
          aria-selected={index === chosen}
          // Before the box loses the focus.
          onPointerDown={(event) => {
            event.preventDefault();
            onTake(person);
          }}
          className={`cursor-pointer border-l-2 px-3 py-1 [overflow-wrap:anywhere] ${
            index === chosen ? 'border-snapline bg-snapline-wash' : 'border-transparent'
          }`}
        >
          {labelOf(person, people)}
        </li>
      ))}
    </ul>
  );
}
