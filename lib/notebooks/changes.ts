import { z } from 'zod';
import { database, type Database } from '@/db/client';
import { findWords, putWords } from '@/db/queries/version-words';
import { listAuthorsBetween } from '@/db/queries/versions';
import type { Person } from '@/lib/accounts';
import { WORDING, describeChanges, sayChanges, type WordsOfChange } from './changes-in-words';
import { openFor } from './guard';
import type { Changes } from './types';
import { contentOf, getVersion } from './versions';

const VersionNumber = z
  .string({ error: 'A version is given by its number.' })
  .regex(/^[1-9]\d{0,9}$/, { error: 'A version is given by its number.' })
  .transform(Number);

export const ChangesQuery = z.strictObject({ from: VersionNumber, to: VersionNumber });
export type ChangesQuery = z.infer<typeof ChangesQuery>;

/**
 * What became of a notebook between two versions, in words, and who but the asking person saved in between.
 * @throws Failure `not-found`
 */
export async function readChanges(
  person: Person,
  id: string,
  { from, to }: ChangesQuery,
): Promise<Changes> {
  await openFor(person, 'versions.read', id);
  const db = database();
  const authors = await listAuthorsBetween(db, id, from, to);
  const words = await wordsBetween(db, id, from, to);
  return {
    from,
    to,
    by: authors.filter((author) => author.id !== person.id).map(({ name }) => name),
    words: sayChanges(words),
  };
}

/** The words for one pair of versions, worked out now. @throws Failure `not-found` */
async function wordsBetween(
  db: Database,
  id: string,
  from: number,
  to: number,
): Promise<WordsOfChange> {
  const [before, after] = [await getVersion(db, id, from), await getVersion(db, id, to)];
  return describeChanges(contentOf(before), contentOf(after));
}

export interface Pair {
  from: number;
  to: number;
}

/** UTF-16 units of contents that one request reads for words; what is left is done by the next one. */
const READ_AT_ONCE = 8_000_000;

const Words = z.object({ items: z.array(z.string()), follow: z.number() });

/**
 * The words for pairs of versions, by `from-to`. Versions never change, so what is worked out once is kept; null where
 * there was too much to read this time.
 */
export async function wordsFor(
  id: string,
  pairs: readonly Pair[],
): Promise<Map<string, WordsOfChange | null>> {
  const db = database();
  const stored = await findWords(db, id, WORDING, pairs);
  const words = new Map<string, WordsOfChange | null>();
  const fresh: (Pair & { words: WordsOfChange })[] = [];
  let read = 0;
  for (const pair of pairs) {
    const key = `${pair.from}-${pair.to}`;
    const known = Words.safeParse(stored.get(key));
    if (known.success) words.set(key, known.data);
    else if (read > READ_AT_ONCE) words.set(key, null);
    else {
      const [before, after] = [
        await getVersion(db, id, pair.from),
        await getVersion(db, id, pair.to),
      ];
      read += sizeOf(before.content) + sizeOf(after.content);
      const said = describeChanges(contentOf(before), contentOf(after));
      words.set(key, said);
      fresh.push({ ...pair, words: said });
    }
  }
  await putWords(db, id, WORDING, fresh);
  return words;
}

const sizeOf = (content: unknown) => JSON.stringify(content).length;
