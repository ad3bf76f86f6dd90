export type { Letter } from './letter';
export { queueLetter } from './queue';
