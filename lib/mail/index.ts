export type { Letter } from './letter';
export { hasLocalMailbox } from './local';
export { queueLetter } from './queue';
