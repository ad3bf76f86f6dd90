import type { Result, Settings } from '@/lib/language/index';
import type { TitleBlock } from '@/lib/notebooks/title-block';
import {
  CAUTION,
  type ExportedCell,
  type ExportedNotebook,
  type ExportedResults,
  type ExportedRevision,
  resultsOf,
} from './notebook';

/** A whole notebook as data: results by the result schema, with the identity of the version they belong to. */
export interface NotebookDocument {
  schema: 1;
  /** Version of the engine that gave the results. */
  engine: string;
  notebook: { id: string; title: string; workshop: string };
  version: { number: number; author: string; savedAt: string };
  /** Only of an issued revision. */
  revision?: ExportedRevision;
  titleBlock?: TitleBlock;
  settings: Settings;
  cells: (ExportedCell & { results?: readonly Result[] })[];
  caution: string;
}

export function notebookDocument(
  notebook: ExportedNotebook,
  results: ExportedResults,
  engine: string,
): NotebookDocument {
  const { id, title, workshop, version, settings: whole, cells, revision, titleBlock } = notebook;
  return {
    schema: 1,
    engine,
    notebook: { id, title, workshop },
    version: { number: version.number, author: version.author, savedAt: version.savedAt },
    ...(revision === undefined ? {} : { revision }),
    ...(titleBlock === undefined ? {} : { titleBlock }),
    settings: {
      digits: whole.digits,
      unit: whole.unit,
      step: whole.step,
      rounding: whole.rounding,
    },
    cells: cells.map((cell) => {
      const { id, kind, source, settings } = cell;
      const own = { id, kind, source, ...(settings === undefined ? {} : { settings }) };
      return kind === 'dimension' ? { ...own, results: resultsOf(cell, results) } : own;
    }),
    caution: CAUTION,
  };
}

/** The document as text, indented, with a last line break. */
export function writeNotebookJson(
  notebook: ExportedNotebook,
  results: ExportedResults,
  engine: string,
): string {
  return `${JSON.stringify(notebookDocument(notebook, results, engine), null, 2)}\n`;
}
