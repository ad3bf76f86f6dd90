import { KEYS, type Key, type KeyScope } from '../cell-keys';

/** What a pressed key is told by; a React event and a native one both have it. */
export interface Pressed {
  key: string;
  code: string;
  ctrlKey: boolean;
  metaKey: boolean;
  altKey: boolean;
  shiftKey: boolean;
}

const SIGNS: Readonly<Record<string, string>> = {
  '↑': 'ArrowUp',
  '↓': 'ArrowDown',
  Esc: 'Escape',
  Space: ' ',
};

/** Signs that need Shift on some keyboards and not on others: only the sign itself is looked at. */
const isSign = (name: string) => /^[^\p{L}\p{N}\s]$/u.test(name) && !(name in SIGNS);

/** Whether a key as the table writes it, `Mod+Shift+Z`, is the one that was pressed. */
export function isPressed(written: string, event: Pressed): boolean {
  const parts = written.split('+');
  const name = parts.at(-1) ?? '';
  const held = new Set(parts.slice(0, -1));
  const mod = event.ctrlKey || event.metaKey;
  if (held.has('Ctrl') ? !event.ctrlKey : mod !== held.has('Mod')) return false;
  if (event.altKey !== held.has('Alt')) return false;
  if (event.shiftKey !== held.has('Shift') && !isSign(name)) return false;
  // With Alt a Mac writes another letter, so the place of the key on the keyboard counts.
  if (/^[A-Z]$/.test(name) && event.altKey) return event.code === `Key${name}`;
  return event.key.toLowerCase() === (SIGNS[name] ?? name).toLowerCase();
}

type CommandIn<S extends KeyScope> = Extract<Key, { scope: S }>['runs'][number];

/** The command that a pressed key has in a scope, or null. */
export function findCommand<S extends KeyScope>(scope: S, event: Pressed): CommandIn<S> | null {
  for (const entry of KEYS) {
    if (entry.scope !== scope) continue;
    const at = entry.keys.findIndex((written) => isPressed(written, event));
    if (at >= 0) return (entry.runs[at] as CommandIn<S> | undefined) ?? null;
  }
  return null;
}

/** The keys of a command of the source, as the editor writes them: `Shift-F8`. */
export function editorKeys(command: CommandIn<'source'> | CommandIn<'offer'>): string[] {
  return KEYS.flatMap(({ scope, keys, runs }) =>
    scope !== 'source' && scope !== 'offer'
      ? []
      : keys
          .filter((_, at) => runs[at] === command)
          .map((written) =>
            written
              .split('+')
              .map((part) => SIGNS[part] ?? part)
              .join('-')
              .replace(/ $/, 'Space'),
          ),
  );
}
