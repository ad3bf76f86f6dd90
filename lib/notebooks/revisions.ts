import type { Knex } from 'knex';
import { database } from '@/db/client';
import {
  findLatestRevision,
  findRevision,
  findRevisionEntry,
  listRevisions as listEntries,
  type Revision,
  type RevisionEntry,
} from '@/db/queries/revisions';
import { Failure } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { compareResults } from './compare-results';
import { checkCodeOf, settledResults } from './freeze';
import { openFor, type Asker } from './guard';
import { isLetter } from './letters';
import type { TitleBlock } from './title-block';
import type { OpenRevision, Reevaluation, RevisionLine } from './types';
import { contentOf, getVersion } from './versions';

/** All revisions of the notebook, newest first. */
export async function listRevisions(asker: Asker, id: string): Promise<RevisionLine[]> {
  await openFor(asker, 'revisions.list', id);
  const entries = await listEntries(database(), id);
  return entries.map((entry) => revisionLine(entry, entries[0] ?? entry));
}

/**
 * What tells whether a revision has changed for its reader since: it never does itself, but a newer
 * one may have taken its place. Cheap: nothing that is frozen is read.
 * @throws Failure `not-found`
 */
export async function revisionTag(asker: Asker, id: string, letter: string): Promise<string> {
  await openFor(asker, 'revisions.read', id);
  const [entry, newest] = await getEntry(database(), id, letter);
  return tagOf(entry, newest);
}

/** One revision as it was issued. @throws Failure `not-found` */
export async function readRevision(
  asker: Asker,
  id: string,
  letter: string,
): Promise<OpenRevision> {
  const { notebook } = await openFor(asker, 'revisions.read', id);
  const [entry, newest] = await getEntry(database(), id, letter);
  return openRevision(database(), notebook, entry, newest);
}

/**
 * Works a revision's content out again with the engine of today and compares with what was issued.
 * Nothing is changed by it. @throws Failure `not-found`, `not-settled`, `busy`
 */
export async function reevaluateRevision(
  person: Person,
  id: string,
  letter: string,
): Promise<Reevaluation> {
  const { content, results, revision } = await readRevision(person, id, letter);
  const now = await settledResults(content);
  return {
    letter,
    engineThen: revision.engine,
    engineNow: now.engine,
    lines: results.reduce((sum, cell) => sum + cell.results.length, 0),
    differences: compareResults(results, now.results),
  };
}

async function getEntry(
  db: Knex,
  id: string,
  letter: string,
): Promise<[entry: RevisionEntry, newest: RevisionEntry]> {
  const entry = isLetter(letter) ? await findRevisionEntry(db, id, { letter }) : null;
  const newest = entry === null ? null : await findLatestRevision(db, id);
  if (entry === null || newest === null) {
    throw new Failure('not-found', 'This notebook has no such revision.');
  }
  return [entry, newest];
}

export const tagOf = (entry: RevisionEntry, newest: RevisionEntry): string =>
  `${entry.letter}-${entry.frozenHash.slice(0, 20)}-${newest.letter}`;

/** An entry with all that is frozen in it. */
export async function openRevision(
  db: Knex,
  notebook: { id: string; title: string },
  entry: RevisionEntry,
  newest: RevisionEntry,
): Promise<OpenRevision> {
  const revision = await findRevision(db, notebook.id, entry.ordinal);
  const version = await getVersion(db, notebook.id, entry.version);
  if (revision?.contentHash !== version.contentHash) {
    throw new Error(`Revision ${entry.letter} does not belong to its version any more.`);
  }
  const titleBlock = titleBlockFrom(revision);
  return {
    // As it was called when it was issued.
    notebook: { id: notebook.id, title: titleBlock.title },
    version: { number: version.number, savedAt: version.savedAt.toISOString() },
    revision: revisionLine(entry, newest),
    titleBlock,
    content: contentOf(version),
    results: revision.results as OpenRevision['results'],
  };
}

const titleBlockFrom = (revision: Revision): TitleBlock => revision.titleBlock as TitleBlock;

export function revisionLine(entry: RevisionEntry, newest: RevisionEntry): RevisionLine {
  return {
    letter: entry.letter,
    version: entry.version,
    purpose: entry.purpose,
    note: entry.note,
    issuedBy: entry.issuedBy,
    issuedAt: entry.issuedAt.toISOString(),
    checkedBy: entry.checkedBy,
    engine: entry.engine,
    checkCode: checkCodeOf(entry.frozenHash),
    supersededBy: newest.ordinal > entry.ordinal ? newest.letter : null,
  };
}
