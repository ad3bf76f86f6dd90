import type { Result } from '@/lib/language';

/** The result schema as screens know it: types only, nothing of the language is run in a browser. */
export type { Result };
export type ListResult = Extract<Result, { kind: 'list' }>;
/** An item of a list, which may be a list itself, */
export type Item = ListResult['items'][number];
/** and one that is not. */
export type SingleItem = Exclude<Item, { kind: 'list' }>;
