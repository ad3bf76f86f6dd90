import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction } from '@/db/client';
import type { Notebook } from '@/db/queries/notebooks';
import { findLatestRevision, insertRevision, type NewRevision } from '@/db/queries/revisions';
import { listVersionChecks, type VersionCheck } from '@/db/queries/version-checks';
import type { Version } from '@/db/queries/versions';
import { Failure } from '@/lib/access';
import { isId, oneLine, readWorkshopSettings, type Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { announceRevision, linksToTell } from './announce';
import { checkLine, sayWhoCould, settleCheck } from './checks';
import {
  checkCodeOf,
  countFaults,
  frozenHashOf,
  sayFaults,
  settledResults,
  type Settled,
} from './freeze';
import { holdFor, openFor } from './guard';
import { letterOf } from './letters';
import { titleBlockIn } from './title-block';
import type { Issued, IssueProspect } from './types';
import { contentOf, getVersion } from './versions';

export const IssueRequest = z.strictObject({
  version: z
    .int({ error: 'The version must be the number of the version to issue.' })
    .min(1, { error: 'Versions count from 1.' }),
  purpose: oneLine('The purpose', 120),
  note: z
    .string()
    .trim()
    .max(1000, { error: 'The note is longer than 1000 characters.' })
    .regex(/^\P{Cs}*$/u, { error: 'The note contains half of a character.' })
    .nullish(),
  /** Id of somebody who has said that the version is checked. */
  checkedBy: z
    .string()
    .refine(isId, { error: 'The checker is given by the id of a person.' })
    .nullish(),
  /** How many lines with faults the issuing person knows of. */
  faults: z.int().min(0).default(0),
});
export type IssueRequest = z.infer<typeof IssueRequest>;

/**
 * What issuing this version would meet, so that it is known before: faults, checks, letters to clients.
 * @throws Failure `not-found`, `not-settled`, `busy`
 */
export async function prospectOfIssue(
  person: Person,
  id: string,
  number: number,
): Promise<IssueProspect> {
  const { notebook } = await openFor(person, 'revisions.issue', id);
  const db = database();
  const version = await getVersion(db, id, number);
  const { results } = await settledResults(contentOf(version));
  const latest = await findLatestRevision(db, id);
  const checks = await listVersionChecks(db, id, number);
  const { checkNeeded } = readWorkshopSettings(notebook.workshopSettings).issuing;
  const isChecked = checks.some((check) => check.person.id !== version.author.id);
  return {
    version: number,
    letter: letterOf((latest?.ordinal ?? 0) + 1),
    faults: countFaults(results),
    checks: checks.map(checkLine),
    checkNeeded,
    hindrance: checkNeeded && !isChecked ? await sayWhoCould(db, id, version) : null,
    letters: (await linksToTell(db, id)).length,
  };
}

/**
 * Issues a version under the next letter, for good: its results, settings and title block are frozen
 * as they are now. Of two at once each gets a letter of its own.
 * @throws Failure `check-needed`, `faulty-lines` when it has more or fewer lines with faults than the
 *   person knows of, `not-settled`, `archived`, `not-found`, `invalid`
 */
export async function issueRevision(
  person: Person,
  id: string,
  request: IssueRequest,
): Promise<Issued> {
  const { notebook } = await openFor(person, 'revisions.issue', id);
  demandInUse(notebook);
  const version = await getVersion(database(), id, request.version);
  // Outside the transaction: evaluating takes its time, and a version never changes.
  const settled = await settledResults(contentOf(version));
  demandFaultsKnown(countFaults(settled.results), request);
  return inTransaction(async (trx) => {
    const held = await holdFor(trx, person, 'revisions.issue', id);
    demandInUse(held.notebook);
    const { checkNeeded } = readWorkshopSettings(held.notebook.workshopSettings).issuing;
    const asked = { checkedBy: request.checkedBy ?? null, isNeeded: checkNeeded };
    const checkedBy = await settleCheck(trx, held.notebook, version, asked);
    return storeRevision(trx, {
      notebook: held.notebook,
      version,
      settled,
      purpose: request.purpose,
      note: request.note ? request.note : null,
      issuedBy: { id: person.id, name: person.name },
      issuedAt: new Date(),
      checkedBy,
    });
  });
}

interface Issue {
  notebook: Notebook;
  version: Version;
  settled: Settled;
  purpose: string;
  note: string | null;
  issuedBy: NewRevision['issuedBy'];
  issuedAt: Date;
  checkedBy: VersionCheck['person'] | null;
}

/**
 * Freezes what was worked out under the next letter, records it and tells the clients. The caller
 * holds the notebook and has seen to rights and checks.
 */
export async function storeRevision(trx: Knex.Transaction, issue: Issue): Promise<Issued> {
  const { notebook, version, settled, purpose, note } = issue;
  const before = await findLatestRevision(trx, notebook.id);
  const ordinal = (before?.ordinal ?? 0) + 1;
  const frozen = {
    notebookId: notebook.id,
    ordinal,
    letter: letterOf(ordinal),
    version: version.number,
    purpose,
    note,
    issuedBy: issue.issuedBy,
    issuedAt: issue.issuedAt,
    checkedBy: issue.checkedBy,
    engine: settled.engine,
    contentHash: version.contentHash,
    titleBlock: titleBlockIn(notebook, version.author.name).block,
    results: settled.results,
  };
  const frozenHash = frozenHashOf(frozen);
  await insertRevision(trx, { ...frozen, frozenHash });
  const { letter, titleBlock } = frozen;
  await record(trx, {
    deed: 'revision.issued',
    by: issue.issuedBy.id,
    workshopId: notebook.workshop.id,
    notebookId: notebook.id,
    subject: notebook.title,
    details: { letter, version: version.number, purpose },
  });
  const letters = await announceRevision(trx, {
    notebookId: notebook.id,
    ordinal,
    letter,
    replaces: before?.letter ?? null,
    title: titleBlock.title,
    legalOwner: titleBlock.legalOwner,
    purpose,
    note,
  });
  return { letter, version: version.number, checkCode: checkCodeOf(frozenHash), letters };
}

function demandInUse(notebook: Notebook): void {
  if (notebook.archivedAt === null) return;
  throw new Failure(
    'archived',
    'This notebook is archived, so nothing was issued. An owner can bring it back.',
  );
}

/** A fault on the sheet is allowed, but nobody issues one unawares. */
function demandFaultsKnown(met: number, { faults, version }: IssueRequest): void {
  if (met === faults) return;
  const told = faults === 0 ? 'none was known of' : `${faults} were known of`;
  const how = met === 0 ? 'Send no faults' : `Send faults: ${met}`;
  throw new Failure(
    'faulty-lines',
    `In version ${version} ${met === 0 ? 'no line has a fault' : sayFaults(met)}, and ${told}. ` +
      `${how} to issue it all the same.`,
  );
}
