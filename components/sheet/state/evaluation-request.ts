import type { NotebookContent } from '@/lib/notebooks/content';
import { settingsField } from '@/lib/notebooks/content-values';

/** What is asked of the evaluation for a notebook: its dimension cells that hold anything. */
export function evaluationRequest({ cells, settings }: NotebookContent) {
  const asked = cells
    .filter((cell) => cell.kind === 'dimension' && cell.source.trim() !== '')
    .map(({ id, source, settings: own }) => ({ id, source, ...settingsField(own) }));
  return { cells: asked, settings };
}
