import type {
  CellSettings,
  NotebookCell,
  NotebookContent,
  NotebookSettings,
} from '@/lib/notebooks/content';
import { settingsField } from '@/lib/notebooks/content-values';
import { sameCell } from '@/lib/notebooks/merge';

/** Everything a person can do to what is on the sheet. */
export type Change =
  | { kind: 'write'; id: string; source: string }
  /** Cells that go in together, at a place counted before they are in. */
  | { kind: 'insert'; cells: readonly NotebookCell[]; at: number }
  | { kind: 'delete'; ids: readonly string[] }
  /** Cells that stand together go elsewhere together; the place is counted before they are taken out. */
  | { kind: 'move'; ids: readonly string[]; at: number }
  | { kind: 'set'; settings: Partial<NotebookSettings> }
  /** The settings of one cell as a whole; empty ones follow the notebook again. */
  | { kind: 'set-cell'; id: string; settings: CellSettings }
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
      const taken = new Set(cells.map((cell) => cell.id));
      const fresh = change.cells.filter((cell) => !taken.has(cell.id));
      if (fresh.length === 0) return content;
      return { ...content, cells: cells.toSpliced(change.at, 0, ...fresh) };
    }
    case 'delete': {
      const left = cells.filter((cell) => !change.ids.includes(cell.id));
      return left.length === cells.length ? content : { ...content, cells: left };
    }
    case 'move': {
      const moved = cells.filter((cell) => change.ids.includes(cell.id));
      const before = cells.slice(0, change.at).filter((cell) => !change.ids.includes(cell.id));
      const after = cells.slice(change.at).filter((cell) => !change.ids.includes(cell.id));
      const order = [...before, ...moved, ...after];
      return order.every((cell, index) => cell === cells[index])
        ? content
        : { ...content, cells: order };
    }
    case 'set':
      return { ...content, settings: { ...content.settings, ...change.settings } };
    case 'set-cell': {
      const at = cells.findIndex((cell) => cell.id === change.id);
      const cell = cells[at];
      if (!cell) return content;
      const { id, kind, source } = cell;
      const tailored = { id, kind, source, ...settingsField(change.settings) };
      return sameCell(cell, tailored) ? content : { ...content, cells: cells.with(at, tailored) };
    }
    case 'replace':
      return change.content;
  }
}

/** An id that no other cell of any notebook is likely to have: 96 random bits. */
export function newCellId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(12));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}
