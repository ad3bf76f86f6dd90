export { DEEDS, type Deed } from './deeds';
export { record, type Happening } from './record';
