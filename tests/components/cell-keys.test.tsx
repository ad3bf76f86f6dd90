import { act, fireEvent, render, renderHook, screen } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { KEYS, type Key, type KeyScope } from '@/components/sheet/cell-keys';
import { cellAnchor, entryId, type SheetActions } from '@/components/sheet/cells';
import { makeEditor } from '@/components/sheet/editor/make-editor';
import { editorKeys, findCommand, isPressed } from '@/components/sheet/keys/chord';
import { KeysDialog } from '@/components/sheet/keys/keys-dialog';
import { onCellKey } from '@/components/sheet/keys/on-cell-key';
import { useSheetKeys, type SheetKeyActions } from '@/components/sheet/keys/use-sheet-keys';

const NAMES: Readonly<Record<string, string>> = {
  '↑': 'ArrowUp',
  '↓': 'ArrowDown',
  Esc: 'Escape',
  Space: ' ',
};

/** The event that a keyboard gives for a key as the table writes it. */
function pressOf(written: string) {
  const parts = written.split('+');
  const name = parts.at(-1) ?? '';
  const letter = /^[A-Z]$/.test(name);
  return {
    key: NAMES[name] ?? (letter && !parts.includes('Shift') ? name.toLowerCase() : name),
    code: letter ? `Key${name}` : (NAMES[name] ?? name),
    ctrlKey: parts.includes('Mod') || parts.includes('Ctrl'),
    metaKey: false,
    altKey: parts.includes('Alt'),
    shiftKey: parts.includes('Shift') || name === '?',
  };
}

type Row = readonly [scope: KeyScope, written: string, run: string];

const rows: Row[] = KEYS.flatMap(({ scope, keys, runs }) =>
  keys.map((written, at): Row => [scope, written, runs[at] ?? '']),
);
const within = (...scopes: KeyScope[]) => rows.filter(([scope]) => scopes.includes(scope));

function actionsSpy() {
  const called = vi.fn();
  const spy = (name: string) => (): boolean => {
    called(name);
    return true;
  };
  const actions = new Proxy({} as SheetActions, {
    get: (_, name: string) => (name === 'markOf' ? () => 'R' : spy(name)),
  });
  return { actions, called };
}

/** Three lines of two cells as the sheet shows them, closed, with the focus on the middle one. */
function sheetOf(actions: SheetActions) {
  const entry = (id: string, line: number) => (
    <div data-row>
      <button id={entryId(id, line)} data-entry={id} data-testid={`${id}${line}`} />
      <span data-copy>
        <button onClick={() => actions.showKeys()}>Copy</button>
      </span>
    </div>
  );
  render(
    <>
      <section id={cellAnchor('a')}>{entry('a', 0)}</section>
      <section id={cellAnchor('b')} onKeyDown={(event) => onCellKey(event, 'b', actions)}>
        {entry('b', 0)}
        {entry('b', 1)}
      </section>
    </>,
  );
  const middle = screen.getByTestId('b0');
  act(() => middle.focus());
  return middle;
}

describe('the table of keys', () => {
  it('gives every key a command and says what it does', () => {
    for (const { keys, runs, does } of KEYS) {
      expect(runs).toHaveLength(keys.length);
      expect(does.length).toBeGreaterThan(8);
    }
  });

  it.each([
    ['on a closed line', ['sheet', 'cell', 'entry']],
    ['in an open source', ['sheet', 'cell', 'source']],
  ] as const)('has no key twice %s', (_, scopes) => {
    const keys = within(...scopes);
    for (const [, written] of keys) {
      const event = pressOf(written);
      expect(
        keys.filter(([, other]) => isPressed(other, event)).map(([, other]) => other),
        written,
      ).toEqual([written]);
    }
  });

  it('takes no letter by itself, and none of the keys that browsers do not give up', () => {
    const NOT_OURS = [
      'Mod+T',
      'Mod+N',
      'Mod+W',
      'Mod+L',
      'Mod+D',
      'Mod+Shift+T',
      'F5',
      'F11',
      'F12',
    ];
    for (const [, written] of rows) {
      expect(/^(Shift\+)?[A-Z0-9]$/.test(written), written).toBe(false);
      expect(NOT_OURS).not.toContain(written);
    }
  });

  it('tells a letter with Alt by its place, since a Mac writes another sign with it', () => {
    const event = { ...pressOf('Alt+Shift+C'), key: 'Ç' };
    expect(findCommand('cell', event)).toBe('copy');
    expect(findCommand('cell', { ...event, altKey: false })).toBeNull();
  });

  it('knows a command key held with Ctrl or with Cmd, and no key with one too many', () => {
    const undo = pressOf('Mod+Z');
    expect(findCommand('sheet', undo)).toBe('undo');
    expect(findCommand('sheet', { ...undo, ctrlKey: false, metaKey: true })).toBe('undo');
    expect(findCommand('sheet', { ...undo, altKey: true })).toBeNull();
    expect(findCommand('sheet', { ...undo, ctrlKey: false })).toBeNull();
  });
});

describe('every key of the table does something', () => {
  it.each(within('cell', 'entry'))('%s: %s (%s)', (_, written) => {
    const { actions, called } = actionsSpy();
    const middle = sheetOf(actions);
    const going = fireEvent.keyDown(middle, pressOf(written));
    expect(going, 'the browser does not act on it as well').toBe(false);
    expect(called.mock.calls.length > 0 || document.activeElement !== middle).toBe(true);
  });

  it.each(within('sheet'))('%s: %s (%s)', (_, written, run) => {
    const called = vi.fn();
    const commands = within('sheet').map(([, , name]) => [name, () => void called(name)]);
    renderHook(() => useSheetKeys(Object.fromEntries(commands) as SheetKeyActions));
    expect(fireEvent.keyDown(document.body, pressOf(written))).toBe(false);
    expect(called.mock.calls).toEqual([[run]]);
  });

  // Arrows need rows of text that have been laid out: they are pressed in a browser, in keyboard.test.ts.
  it.each(within('source').filter(([, , run]) => !run.startsWith('line')))(
    '%s: %s (%s)',
    (_, written, run) => {
      const called = vi.fn(() => true);
      const parent = document.body.appendChild(document.createElement('div'));
      const editor = makeEditor({
        parent,
        source: 'chord(R, turn/8)',
        kind: 'dimension',
        label: 'Line',
        column: 7,
        onWrite: called,
        onLeave: called,
        names: { marks: () => [], goTo: called, rename: called },
      });
      const content = parent.querySelector('.cm-content');
      if (!content) throw new Error('The editor did not open.');
      expect(fireEvent.keyDown(content, pressOf(written))).toBe(false);
      // Offering names and saying what one is stay within the editor.
      if (run !== 'offer' && run !== 'about') expect(called).toHaveBeenCalled();
      editor.destroy();
      parent.remove();
    },
  );

  it('in the editor under the name that the editor gives it', () => {
    expect(editorKeys('goTo')).toEqual(['F8']);
    expect(editorKeys('about')).toEqual(['Shift-F1']);
    expect(editorKeys('offer')).toEqual(['Ctrl-Space']);
    expect(editorKeys('lineBefore')).toEqual(['ArrowUp']);
    expect(editorKeys('accept')).toEqual(['Enter', 'Tab']);
  });
});

describe('keys that are not the sheet’s', () => {
  it('undo within a field is the field’s own', () => {
    const undo = vi.fn();
    const none = Object.fromEntries(within('sheet').map(([, , name]) => [name, undo]));
    renderHook(() => useSheetKeys(none as unknown as SheetKeyActions));
    render(<input aria-label="Title" />);
    expect(fireEvent.keyDown(screen.getByLabelText('Title'), pressOf('Mod+Z'))).toBe(true);
    expect(undo).not.toHaveBeenCalled();
  });

  it('a cell lets through what has no command', () => {
    const { actions, called } = actionsSpy();
    const middle = sheetOf(actions);
    for (const written of ['Tab', 'A', 'Mod+C', 'PageDown'])
      expect(fireEvent.keyDown(middle, pressOf(written)), written).toBe(true);
    expect(called).not.toHaveBeenCalled();
  });
});

describe('the sheet of keys', () => {
  it('lists every key of the table in its group', () => {
    HTMLDialogElement.prototype.showModal ??= function showModal(this: HTMLDialogElement) {
      this.open = true;
    };
    render(<KeysDialog onClose={() => undefined} />);
    const listed: readonly Key[] = KEYS;
    for (const { does, group } of listed) {
      const part = document.querySelector(`section[aria-label="${group}"]`);
      expect(part?.textContent).toContain(does);
    }
  });
});
