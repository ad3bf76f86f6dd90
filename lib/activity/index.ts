export { DEEDS, type Deed } from './deeds';
export { DEED_GROUPS, deedsOf, titleOfGroup, type DeedGroup } from './groups';
export { record, type Happening } from './record';
