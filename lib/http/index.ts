export { created, done, download, revalidated } from './answer';
export { NOTEBOOK_BODY } from './body';
export { ExportFormat, exportFile } from './export';
export { guarded } from './guarded';
export { route } from './route';
