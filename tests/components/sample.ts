import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';

export const dimension = (id: string, source: string): NotebookCell => ({
  id,
  kind: 'dimension',
  source,
});
export const note = (id: string, source: string): NotebookCell => ({ id, kind: 'note', source });

export function contentOf(...cells: NotebookCell[]): NotebookContent {
  return {
    format: 1,
    settings: { digits: 30, unit: 'mm', step: null, rounding: 'half-even' },
    cells,
  };
}

/** A browser store that lives in memory, as the real one does in a page. */
export function memoryStore(full = false) {
  const kept = new Map<string, string>();
  return {
    get length() {
      return kept.size;
    },
    key: (index: number) => [...kept.keys()][index] ?? null,
    getItem: (key: string) => kept.get(key) ?? null,
    setItem: (key: string, value: string) => {
      if (full) throw new DOMException('full', 'QuotaExceededError');
      kept.set(key, value);
    },
    removeItem: (key: string) => void kept.delete(key),
  };
}
