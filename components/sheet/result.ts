/** The result schema as screens know it: types only, nothing of the language is run in a browser. */
export type { Result } from '@/lib/language';
