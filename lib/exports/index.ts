/** Writers of whole notebooks and of single results. Pure: the caller evaluates first. */
export { writeNotebookCsv } from './csv';
export { notebookDocument, writeNotebookJson } from './json';
export type { NotebookDocument } from './json';
export { CAUTION } from './notebook';
export type { ExportedCell, ExportedNotebook, ExportedResults } from './notebook';
export { exportedRevision } from './revision';
export { cellTex, writeNotebookTex } from './tex';
export { resultTex } from './tex-result';
