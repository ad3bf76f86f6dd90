export { created, done, download, revalidated } from './answer';
export { NOTEBOOK_BODY } from './body';
export { guarded } from './guarded';
export { route } from './route';
