/** Bringing together what two people made of one content. Pure; runs in the browser and on the server alike. */
export { findHunks, type Hunk } from './align';
export {
  SETTINGS,
  keyOfConflict,
  mergeContents,
  type Conflict,
  type Merge,
  type SettingValue,
} from './merge';
export { findMoved } from './order';
export { sameCell, sameContent } from './same';
export { settle, withhold, type Side } from './settle';
