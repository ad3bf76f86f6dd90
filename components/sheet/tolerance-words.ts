import type { TitleBlock } from '@/lib/notebooks/types';

export type ToleranceClass = NonNullable<TitleBlock['toleranceClass']>;

/** The classes of ISO 2768-1 for linear dimensions, as that standard names them. */
export const TOLERANCE_WORDS: Record<ToleranceClass, string> = {
  f: 'class f, fine',
  m: 'class m, medium',
  c: 'class c, coarse',
  v: 'class v, very coarse',
};
