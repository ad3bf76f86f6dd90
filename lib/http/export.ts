import { z } from 'zod';
import { writeNotebookJson, writeNotebookTex, type ExportedNotebook } from '@/lib/exports';
import { answerTo, questionOf } from '@/lib/notebooks';
import type { NotebookContent } from '@/lib/notebooks/content';
import { download } from './answer';

export const ExportFormat = z.enum(['json', 'tex'], { error: 'The format must be json or tex.' });
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
  const name = `${identity.title}, version ${identity.version.number}.${format}`;
  return format === 'json'
    ? download(writeNotebookJson(notebook, results, engine), 'application/json', name)
    : download(writeNotebookTex(notebook, results), 'application/x-tex', name);
}
