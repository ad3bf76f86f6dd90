import type { Knex } from 'knex';
import { listNotebooksOf, type Notebook } from '../queries/notebooks';
import { findLatestRevision } from '../queries/revisions';
import { findUserByEmail } from '../queries/users';
import { insertVersionCheck } from '../queries/version-checks';
import { findVersion } from '../queries/versions';
import { ENGINE_VERSION } from '@/lib/engine/index';
import { evaluateCells } from '@/lib/language/index';
import { questionOf } from '@/lib/notebooks/answers';
import { NotebookContent } from '@/lib/notebooks/content';
import { storeRevision } from '@/lib/notebooks/issue';
import { demoNotebooks, type DemoPerson, type DemoRevision } from './demo-notebooks';

const DAY_MS = 24 * 3600 * 1000;
const daysBefore = (days: number) => new Date(Date.now() - days * DAY_MS);

/**
 * Checks and issues the demo's revisions, on those of its notebooks of which nothing has been issued:
 * fresh ones, and those of a database from before there were revisions.
 */
export async function issueDemo(trx: Knex.Transaction): Promise<void> {
  const ida = await findUserByEmail(trx, emailOf('ida'));
  if (ida === null) return;
  const entries = await listNotebooksOf(trx, ida.id, { archived: false });
  for (const { title, revisions } of demoNotebooks) {
    const notebook = entries.find((entry) => entry.title === title && entry.role === 'owner');
    if (notebook === undefined || (await findLatestRevision(trx, notebook.id)) !== null) continue;
    for (const revision of revisions) await issueOne(trx, notebook, revision);
  }
}

async function issueOne(
  trx: Knex.Transaction,
  notebook: Notebook,
  given: DemoRevision,
): Promise<void> {
  const version = await findVersion(trx, notebook.id, given.version);
  const issuedBy = await findUserByEmail(trx, emailOf(given.issuedBy));
  const checkedBy = await findUserByEmail(trx, emailOf(given.checkedBy));
  if (version === null || issuedBy === null || checkedBy === null) return;
  await insertVersionCheck(trx, {
    notebookId: notebook.id,
    version: version.number,
    personId: checkedBy.id,
    remark: given.remark ?? null,
    checkedAt: daysBefore(given.daysAgo + 0.5),
  });
  const { cells = [], settings } = questionOf(NotebookContent.parse(version.content));
  await storeRevision(trx, {
    notebook,
    version,
    // The demo's lines are light and known, so no child process is needed for them.
    settled: { engine: ENGINE_VERSION, results: evaluateCells(cells, settings) },
    purpose: given.purpose,
    note: given.note,
    issuedBy: { id: issuedBy.id, name: issuedBy.name },
    issuedAt: daysBefore(given.daysAgo),
    checkedBy: { id: checkedBy.id, name: checkedBy.name },
  });
}

const emailOf = (person: DemoPerson): string => `${person}@ferrowick.example`;
