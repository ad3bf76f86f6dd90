'use client';

import { useId } from 'react';
import type { TemplateLine } from '@/lib/notebooks/types';
import { Pictogram } from './pictogram';
import { STARTERS } from './sheets';

interface ChooseStarterProps {
  /** The name of a starter, the id of a template, or `empty`. */
  chosen: string;
  templates: readonly TemplateLine[];
  onChange: (name: string) => void;
}

/** What a new notebook begins with: nothing, one of the starters, or a template of the workshop. */
export function ChooseStarter({ chosen, templates, onChange }: ChooseStarterProps) {
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
      {templates.length > 0 && (
        <div className="mt-3">
          <p className="text-small font-medium">Or with a template of the workshop</p>
          <ul className="mt-1 max-h-44 divide-y divide-hairline overflow-y-auto border border-rule">
            {templates.map(({ id, title, version }) => (
              <li key={id}>
                <label
                  className={`flex cursor-pointer items-baseline gap-2 px-3 py-1.5 text-small ${chosen === id ? 'bg-hand font-semibold' : 'hover:bg-hand'}`}
                >
                  <input
                    type="radio"
                    name={group}
                    value={id}
                    checked={chosen === id}
                    onChange={() => onChange(id)}
                    className="accent-ruddle"
                  />
                  <span className="min-w-0 [overflow-wrap:anywhere]">{title}</span>
                  <span className="ml-auto whitespace-nowrap font-normal text-soft">
                    version {version}
                  </span>
                </label>
              </li>
            ))}
          </ul>
        </div>
      )}
    </fieldset>
  );
}
