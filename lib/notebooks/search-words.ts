import type { SearchWords } from '@/db/queries/notebook-search';

/** Words of fewer signs are not in a full-text index of MariaDB as it is set by default, nor those of more. */
const SHORTEST = 3;
const LONGEST = 80;
const MOST = 10;

/** MariaDB's own list of words that a full-text index leaves out (its manual, “Full-Text Index Stopwords”, InnoDB). */
const COMMONEST = new Set(
  (
    'a about an are as at be by com de en for from how i in is it la of on or that the this to was what when where ' +
    'who will with und www'
  ).split(' '),
);

const isMark = (text: string) => /^\p{L}[\p{L}\d_]*$/u.test(text);

/**
 * What a person typed, as words of letters, digits and underscores alone: signs that mean something to the database
 * (+ - * " ( ) @ ~ < >) fall away with all others. The first ten words count.
 */
export function wordsOf(query: string): SearchWords {
  const text = query.normalize('NFC').trim();
  const words = [...new Set(text.match(/[\p{L}\p{M}\p{N}_]+/gu) ?? [])].slice(0, MOST);
  const isLong = (word: string) => {
    const { length } = [...word];
    return length >= SHORTEST && length <= LONGEST && !COMMONEST.has(word.toLowerCase());
  };
  return {
    long: words.filter(isLong),
    short: words.filter((word) => !isLong(word)),
    mark: isMark(text) ? text : null,
  };
}
