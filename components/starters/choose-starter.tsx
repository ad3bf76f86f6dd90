'use client';

import { useId } from 'react';
import { Pictogram } from './pictogram';
import { STARTERS } from './sheets';

interface ChooseStarterProps {
  /** The name of a starter, or `empty`. */
  chosen: string;
  onChange: (name: string) => void;
}

/** What a new notebook begins with: nothing, or one of the starters. */
export function ChooseStarter({ chosen, onChange }: ChooseStarterProps) {
  const group = useId();
  const choices = [{ name: 'empty' as const, title: 'An empty sheet' }, ...STARTERS];
  return (
    <fieldset>
      <legend className="text-small font-medium">Begin with</legend>
      <div className="mt-1 grid grid-cols-2 gap-2 sm:grid-cols-4">
        {choices.map(({ name, title }) => (
          <label
            key={name}
            className={`flex cursor-pointer flex-col gap-1.5 border p-2 text-small has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-snapline ${chosen === name ? 'border-ink bg-hand' : 'border-rule hover:border-ink'}`}
          >
            <span className="mx-auto block size-16">
              {name !== 'empty' && <Pictogram name={name} />}
              {name === 'empty' && (
                <span className="mx-auto mt-1 block h-14 w-11 border border-rule" />
              )}
            </span>
            <span className="flex items-baseline gap-1.5">
              <input
                type="radio"
                name={group}
                value={name}
                checked={chosen === name}
                onChange={() => onChange(name)}
                className="accent-ruddle"
              />
              {title}
            </span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
