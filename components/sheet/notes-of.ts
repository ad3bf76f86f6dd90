import 'server-only';
import type { NotebookContent } from '@/lib/notebooks/content';
import { renderNote } from './note';

/** The notes of a notebook set as HTML, by their sources. */
export function notesOf({ cells }: NotebookContent): Record<string, string> {
  const notes = cells.filter(({ kind }) => kind === 'note');
  return Object.fromEntries(notes.map(({ source }) => [source, renderNote(source)]));
}
