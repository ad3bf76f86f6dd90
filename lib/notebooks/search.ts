import { z } from 'zod';
import { database } from '@/db/client';
import {
  findHits,
  listMarksLike,
  CELL_BREAK,
  type Hit,
  type HitPlace,
} from '@/db/queries/notebook-search';
import { Failure } from '@/lib/access';
import { isId, type Person } from '@/lib/accounts';
import { wordsOf } from './search-words';
import { snippetOf } from './snippet';
import type { SearchAnswer, SearchHit } from './types';

const PAGE = 20;
/** Definitions shown of one notebook. */
const MARKS = 3;

const SEARCH_LENGTH = 200;

export const SearchRequest = z.strictObject({
  q: z
    .string({ error: 'The words to look for are given once.' })
    .max(SEARCH_LENGTH, { error: `At most ${SEARCH_LENGTH} characters can be looked for.` })
    .default(''),
  archived: z.enum(['0', '1']).default('0'),
  /** Where the page before ended, as it said. */
  after: z.string().max(120).optional(),
});
export type SearchRequest = z.infer<typeof SearchRequest>;

/**
 * Looks for words in the titles and texts, and for a name among the marks, of all notebooks on which the person has a
 * role: archived ones only when asked for. All words must be there, each as the beginning of a word; neither case nor
 * accents count, except that a mark is looked for as it is written. Twenty at a time.
 * @throws Failure `invalid` for a place that no page gave
 */
export async function search(person: Person, request: SearchRequest): Promise<SearchAnswer> {
  const words = wordsOf(request.q);
  const after = request.after === undefined ? null : readPlace(request.after);
  if (words.long.length + words.short.length === 0) return { hits: [], next: null };
  const archived = request.archived === '1';
  const db = database();
  const found = await findHits(db, person.id, { words, archived, after, limit: PAGE + 1 });
  const hits = found.slice(0, PAGE);
  const ids = hits.map(({ id }) => id);
  const marks =
    words.mark === null || ids.length === 0
      ? []
      : await listMarksLike(db, ids, words.mark, PAGE * MARKS * 4);
  const last = hits.at(-1);
  return {
    hits: hits.map((hit): SearchHit => ({
      id: hit.id,
      title: hit.title,
      workshop: hit.workshop,
      role: hit.role,
      archivedAt: hit.archivedAt?.toISOString() ?? null,
      changedAt: hit.changedAt.toISOString(),
      marks: marks
        .filter(({ notebookId }) => notebookId === hit.id)
        .slice(0, MARKS)
        .map(({ cellId, line, mark, definition }) => ({ cell: cellId, line, mark, definition })),
      // Short words alone are looked for in titles and among marks.
      snippet:
        words.long.length === 0 ? null : snippetOf(cellsOf(hit), [...words.long, ...words.short]),
    })),
    next: found.length > PAGE && last !== undefined ? writePlace(last) : null,
  };
}

const cellsOf = ({ body, cells }: Hit) =>
  body.split(CELL_BREAK).map((text, at) => ({ id: cells[at] ?? '', text }));

const Place = z.tuple([z.int().min(0).max(3), z.int(), z.string().refine(isId)]);

const writePlace = ({ rank, changedAt, id }: HitPlace) =>
  Buffer.from(JSON.stringify([rank, changedAt.getTime(), id])).toString('base64url');

function readPlace(text: string): HitPlace {
  try {
    const [rank, at, id] = Place.parse(JSON.parse(Buffer.from(text, 'base64url').toString()));
    const changedAt = new Date(at);
    if (!Number.isNaN(changedAt.getTime()))
      return { rank: rank as HitPlace['rank'], changedAt, id };
  } catch {
    // Whatever is wrong with it is said below.
  }
  throw new Failure('invalid', 'The place to go on from is not one that a page of results gave.');
}
