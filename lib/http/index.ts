export { created, done, download, revalidated, taggedAs } from './answer';
export { NOTEBOOK_BODY, readBytes, readForm } from './body';
export { ExportFormat, exportFile, revisionFile } from './export';
export { guarded } from './guarded';
export { LINK_PASS, passCookies, passOf } from './link-pass';
export { picture } from './picture';
export { route } from './route';
