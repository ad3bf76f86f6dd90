'use client';

import type { NotebookCell, NotebookSettings } from '@/lib/notebooks/content';
import { Pictogram } from './pictogram';
import { STARTERS } from './sheets';

interface StartersProps {
  /** Takes the cells of the chosen starter, and the settings its figures are meant for. */
  onChoose: (cells: NotebookCell[], settings: NotebookSettings) => void;
}

/** Three pieces of work to begin an empty sheet from, each with a drawing of what it sets out. */
export function Starters({ onChoose }: StartersProps) {
  return (
    <ul className="grid gap-3 sm:grid-cols-3" aria-label="Starters">
      {STARTERS.map(({ name, title, about, cells, settings }) => (
        <li key={name} className="flex">
          <button
            type="button"
            onClick={() => onChoose(structuredClone([...cells]), { ...settings })}
            className="group flex w-full gap-3 border border-rule bg-sheet p-3 text-left hover:border-ink hover:bg-hand sm:flex-col"
          >
            <span className="block size-20 shrink-0 sm:size-28">
              <Pictogram name={name} />
            </span>
            <span className="block">
              <span className="block font-serif text-figure font-semibold underline-offset-4 group-hover:underline">
                {title}
              </span>
              <span className="mt-0.5 block text-small text-soft">{about}</span>
            </span>
          </button>
        </li>
      ))}
    </ul>
  );
}
