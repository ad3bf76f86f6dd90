import { z } from 'zod';
import {
  exportedRevision,
  writeNotebookCsv,
  writeNotebookJson,
  writeNotebookTex,
  type ExportedNotebook,
  type ExportedResults,
} from '@/lib/exports';
import { answerTo, questionOf } from '@/lib/notebooks';
import type { NotebookContent } from '@/lib/notebooks/content';
import type { OpenRevision } from '@/lib/notebooks/types';
import { download } from './answer';

export const ExportFormat = z.enum(['json', 'tex', 'csv'], {
  error: 'The format must be json, tex or csv.',
});
export type ExportFormat = z.infer<typeof ExportFormat>;

/** One version of a notebook, evaluated and written as a file to save. */
export async function exportFile(
  identity: Omit<ExportedNotebook, 'settings' | 'cells'>,
  content: NotebookContent,
  format: ExportFormat,
): Promise<Response> {
  const { settings, cells } = content;
  const notebook = { ...identity, settings, cells };
  const { engine, cells: results = [] } = await answerTo(questionOf(content));
  return written(notebook, results, engine, format);
}

/** An issued revision as a file to save, from its frozen results; nothing is evaluated. */
export function revisionFile(
  open: OpenRevision,
  format: ExportFormat,
  to: { forClient: boolean },
): Response {
  return written(exportedRevision(open, to), open.results, open.revision.engine, format);
}

function written(
  notebook: ExportedNotebook,
  results: ExportedResults,
  engine: string,
  format: ExportFormat,
): Response {
  const { title, version, revision } = notebook;
  const which = revision ? `revision ${revision.letter}` : `version ${version.number}`;
  const name = `${title}, ${which}.${format}`;
  switch (format) {
    case 'json':
      return download(writeNotebookJson(notebook, results, engine), 'application/json', name);
    case 'tex':
      return download(writeNotebookTex(notebook, results), 'application/x-tex', name);
    case 'csv':
      return download(writeNotebookCsv(notebook, results), 'text/csv', name);
  }
}
