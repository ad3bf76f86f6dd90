import type { NotebookCell, NotebookContent, NotebookSettings } from '@/lib/notebooks/content';

/** Everything a person can do to what is on the sheet. */
export type Change =
  | { kind: 'write'; id: string; source: string }
  | { kind: 'insert'; cell: NotebookCell; at: number }
  | { kind: 'delete'; id: string }
  | { kind: 'move'; id: string; by: -1 | 1 }
  | { kind: 'set'; settings: Partial<NotebookSettings> }
  | { kind: 'replace'; content: NotebookContent };

/**
 * The content after one change; the very same object when the change changes nothing, and every
 * untouched cell stays the same object, so that only what differs is drawn again.
 */
export function applyChange(content: NotebookContent, change: Change): NotebookContent {
  const { cells } = content;
  switch (change.kind) {
    case 'write': {
      const at = cells.findIndex((cell) => cell.id === change.id);
      const cell = cells[at];
      if (!cell || cell.source === change.source) return content;
      return { ...content, cells: cells.with(at, { ...cell, source: change.source }) };
    }
    case 'insert': {
      if (cells.some((cell) => cell.id === change.cell.id)) return content;
      return { ...content, cells: cells.toSpliced(change.at, 0, change.cell) };
    }
    case 'delete': {
      const left = cells.filter((cell) => cell.id !== change.id);
      return left.length === cells.length ? content : { ...content, cells: left };
    }
    case 'move': {
      const from = cells.findIndex((cell) => cell.id === change.id);
      const cell = cells[from];
      const to = from + change.by;
      if (!cell || to < 0 || to >= cells.length) return content;
      return { ...content, cells: cells.toSpliced(from, 1).toSpliced(to, 0, cell) };
    }
    case 'set':
      return { ...content, settings: { ...content.settings, ...change.settings } };
    case 'replace':
      return change.content;
  }
}

/** An id that no other cell of any notebook is likely to have: 96 random bits. */
export function newCellId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(12));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

export function sameContent(a: NotebookContent, b: NotebookContent): boolean {
  if (a === b) return true;
  const one = a.settings;
  const two = b.settings;
  return (
    one.digits === two.digits &&
    one.unit === two.unit &&
    one.step === two.step &&
    one.rounding === two.rounding &&
    a.cells.length === b.cells.length &&
    a.cells.every((cell, index) => sameCell(cell, b.cells[index]))
  );
}

export function sameCell(a: NotebookCell | undefined, b: NotebookCell | undefined): boolean {
  if (a === b) return true;
  return a?.id === b?.id && a?.kind === b?.kind && a?.source === b?.source;
}
