import { useEffect, useRef } from 'react';
import type { SheetCommand } from '../cell-keys';
import { findCommand } from './chord';

/** What each key of the sheet as a whole does; null where it cannot be done now. */
export type SheetKeyActions = Record<SheetCommand, (() => void) | null>;

/** In a field these belong to the field. */
const OF_FIELDS: ReadonlySet<SheetCommand> = new Set(['undo', 'redo']);

/** Listens for the keys that work anywhere on the page of a sheet. */
export function useSheetKeys(actions: SheetKeyActions) {
  const latest = useRef(actions);
  useEffect(() => {
    latest.current = actions;
  });

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const command = event.defaultPrevented ? null : findCommand('sheet', event);
      if (command === null) return;
      const { target } = event;
      if (target instanceof Element) {
        if (target.closest('dialog')) return;
        if (OF_FIELDS.has(command) && target.closest('input, textarea')) return;
      }
      // The browser's own undo or save would do something else, so it is kept from it in any case.
      event.preventDefault();
      latest.current[command]?.();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, []);
}
