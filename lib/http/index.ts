export { created, done, download, revalidated } from './answer';
export { NOTEBOOK_BODY } from './body';
export { route } from './route';
