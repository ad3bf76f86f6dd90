export { created, done, download, revalidated } from './answer';
export { NOTEBOOK_BODY, readBytes } from './body';
export { ExportFormat, exportFile } from './export';
export { guarded } from './guarded';
export { picture } from './picture';
export { route } from './route';
