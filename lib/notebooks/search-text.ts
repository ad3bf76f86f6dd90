import type { Database } from '@/db/client';
import { putMarks, putSearchText } from '@/db/queries/notebook-search';
import { marksDefinedIn } from '@/lib/evaluation/marks';
import type { NotebookContent } from './content';

/** What the columns hold. A longer mark is found by the text alone. */
const LONGEST_MARK = 100;
const LONGEST_DEFINITION = 200;

/**
 * Makes a notebook found by its newest version: by the text of its cells, and by the marks they define. Called inside
 * the transaction that stores the version. An apostrophe joins two words for the database's reader and not for people,
 * so it is stored as the typographic one, which does not.
 */
export async function keepSearchable(
  db: Database,
  notebook: { id: string; title: string; version: number },
  { cells }: NotebookContent,
): Promise<void> {
  const { id, title, version } = notebook;
  await putSearchText(db, id, {
    version,
    title: title.normalize('NFC'),
    cells: cells.map((cell) => ({
      id: cell.id,
      text: cell.source.normalize('NFC').replaceAll("'", '’').replaceAll('\u001e', ' '),
    })),
  });
  const dimensions = cells.filter(({ kind }) => kind === 'dimension');
  const marks = marksDefinedIn(dimensions).filter(({ mark }) => [...mark].length <= LONGEST_MARK);
  await putMarks(
    db,
    id,
    marks.map(({ cell, line, mark, source }) => ({
      cellId: cell,
      line,
      mark: mark.normalize('NFC'),
      definition: [...source].slice(0, LONGEST_DEFINITION).join(''),
    })),
  );
}
