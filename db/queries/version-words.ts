import type { Database } from '../client';

interface WordsRow {
  from_number: number;
  to_number: number;
  words: string;
}

/** The words known for pairs of versions, by `from-to`; the service checks their shape. */
export async function findWords(
  db: Database,
  notebookId: string,
  form: number,
  pairs: readonly { from: number; to: number }[],
): Promise<Map<string, unknown>> {
  if (pairs.length === 0) return new Map();
  const rows = await db('version_words')
    .where({ notebook_id: notebookId, form })
    .whereIn(
      ['from_number', 'to_number'],
      pairs.map(({ from, to }) => [from, to]),
    )
    .select<WordsRow[]>(['from_number', 'to_number', 'words']);
  return new Map(
    rows.map((row) => [`${row.from_number}-${row.to_number}`, JSON.parse(row.words) as unknown]),
  );
}

export async function putWords(
  db: Database,
  notebookId: string,
  form: number,
  known: readonly { from: number; to: number; words: unknown }[],
): Promise<void> {
  if (known.length === 0) return;
  await db('version_words')
    .insert(
      known.map(({ from, to, words }) => ({
        notebook_id: notebookId,
        from_number: from,
        to_number: to,
        form,
        words: JSON.stringify(words),
      })),
    )
    .onConflict(['notebook_id', 'to_number', 'from_number'])
    .merge(['form', 'words']);
}
