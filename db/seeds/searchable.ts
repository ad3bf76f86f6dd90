import { inTransaction, type Database } from '../client';
import { lockHead } from '../queries/notebooks';
import { listUnsearchable } from '../queries/notebook-search';
import { NotebookContent } from '@/lib/notebooks/content';
import { keepSearchable } from '@/lib/notebooks/search-text';

const BATCH = 50;

/**
 * Fills the search for notebooks of before there was one, and for any whose newest version it does not have. Every
 * version that is stored later brings its own text; this costs one query where nothing is missing.
 */
export async function makeAllSearchable(db: Database): Promise<void> {
  for (;;) {
    const missing = await listUnsearchable(db, BATCH);
    for (const { id, title, version, content } of missing) {
      await inTransaction(async (trx) => {
        // Whoever saved meanwhile has stored a newer text already.
        if ((await lockHead(trx, id)) !== version) return;
        await keepSearchable(trx, { id, title, version }, NotebookContent.parse(content));
      }, db);
    }
    if (missing.length < BATCH) return;
  }
}
