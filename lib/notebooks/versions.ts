import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction, type Database } from '@/db/client';
import type { Notebook } from '@/db/queries/notebooks';
import {
  findVersion,
  insertVersion,
  listVersions as listEntries,
  type Version,
  type VersionEntry,
} from '@/db/queries/versions';
import { Failure, type Action } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { NotebookContent, canonicalContent } from './content';
import { holdFor, openFor } from './guard';
import { SavableContent } from './savable';
import { keepSearchable } from './search-text';
import type { OpenNotebook, OpenVersion, Saved, StaleHead, VersionLine } from './types';

/** Versions count in steps of one from 1; the column holds no more than this. */
const LARGEST = 4_294_967_295;

const Base = z
  .int({ error: 'The base must be the number of the version the change was made on.' })
  .min(1, { error: 'The base must be at least 1; every notebook begins with version 1.' })
  .max(LARGEST, { error: 'There is no version of that number.' });

export const SaveRequest = z.strictObject({
  base: Base,
  content: SavableContent,
  note: z
    .string()
    .trim()
    .max(500, { error: 'The note is longer than 500 characters.' })
    .refine((text) => !/\p{Cs}/u.test(text), { error: 'The note contains half of a character.' })
    .nullish(),
});
export type SaveRequest = z.infer<typeof SaveRequest>;

export const RestoreRequest = z.strictObject({ base: Base });
export type RestoreRequest = z.infer<typeof RestoreRequest>;

/** All versions of the notebook, newest first. */
export async function listVersions(person: Person, id: string): Promise<VersionLine[]> {
  await openFor(person, 'versions.list', id);
  return (await listEntries(database(), id)).map(lineOf);
}

/** One version, whether the head or an old one. @throws Failure `not-found` */
export async function readVersion(
  person: Person,
  id: string,
  number: number,
): Promise<OpenVersion> {
  await openFor(person, 'versions.read', id);
  const version = await getVersion(database(), id, number);
  return { version: lineOf(version), content: contentOf(version) };
}

/**
 * Stores the content as a new version on top of `base`. Content equal to the head's makes no
 * version and says so, whatever its base: a save sent twice because the answer was lost succeeds.
 * @throws Failure `stale-version` with the head when the head is not `base` any more: nothing is
 *   stored, and the caller holds both texts; `archived`
 */
export function saveVersion(person: Person, id: string, request: SaveRequest): Promise<Saved> {
  return addVersion(person, 'versions.save', id, request.base, () =>
    Promise.resolve({ content: request.content, note: request.note ?? null, restoredFrom: null }),
  );
}

/**
 * Stores an old version's content as a new version, so that nothing between them is lost.
 * @throws Failure `not-found`, `stale-version`, `archived`
 */
export function restoreVersion(
  person: Person,
  id: string,
  number: number,
  { base }: RestoreRequest,
): Promise<Saved> {
  return addVersion(person, 'versions.restore', id, base, async (trx) => {
    const old = await getVersion(trx, id, number);
    return { content: contentOf(old), note: null, restoredFrom: number };
  });
}

interface Addition {
  content: NotebookContent;
  note: string | null;
  restoredFrom: number | null;
}

function addVersion(
  person: Person,
  action: Action,
  id: string,
  base: number,
  addition: (trx: Knex.Transaction) => Promise<Addition>,
): Promise<Saved> {
  return inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, action, id);
    if (notebook.archivedAt !== null) {
      throw new Failure(
        'archived',
        'This notebook is archived, so nothing was saved. An owner can bring it back.',
      );
    }
    const added = await addition(trx);
    const head = await getVersion(trx, id, notebook.head);
    const content = canonicalContent(added.content);
    if (hashOfContent(content) === head.contentHash) {
      return { number: head.number, savedAt: head.savedAt.toISOString(), unchanged: true };
    }
    if (base !== head.number) throw stale(base, head);
    const number = head.number + 1;
    const savedAt = await insertVersion(trx, {
      notebookId: id,
      number,
      authorId: person.id,
      content,
      note: added.note === '' ? null : added.note,
      restoredFrom: added.restoredFrom,
    });
    await keepSearchable(trx, { id, title: notebook.title, version: number }, content);
    return { number, savedAt: savedAt.toISOString(), unchanged: false };
  });
}

function stale(base: number, head: Version): Failure {
  const body: StaleHead = {
    number: head.number,
    author: head.author.name,
    savedAt: head.savedAt.toISOString(),
    content: contentOf(head),
  };
  return new Failure(
    'stale-version',
    `This change was made on version ${base}, but the newest is version ${head.number} by ` +
      `${head.author.name}. Nothing was saved; the newest version comes with this answer.`,
    { head: body },
  );
}

/** @throws Failure `not-found` */
export async function getVersion(db: Database, id: string, number: number): Promise<Version> {
  const possible = Number.isInteger(number) && number > 0 && number <= LARGEST;
  const version = possible ? await findVersion(db, id, number) : null;
  if (version === null) throw new Failure('not-found', 'This notebook has no such version.');
  return version;
}

/** The content of a stored version; it was checked when it went in. */
export function contentOf(version: Version): NotebookContent {
  return NotebookContent.parse(version.content);
}

/** What an export needs: the notebook's identity and the content of one version, by default the head. */
export async function readForExport(
  person: Person,
  id: string,
  number?: number,
): Promise<{ notebook: Notebook; version: VersionLine; content: OpenNotebook['content'] }> {
  const { notebook } = await openFor(person, 'notebook.export', id);
  const version = await getVersion(database(), id, number ?? notebook.head);
  return { notebook, version: lineOf(version), content: contentOf(version) };
}

export function lineOf(entry: VersionEntry): VersionLine {
  return {
    number: entry.number,
    author: entry.author.name,
    savedAt: entry.savedAt.toISOString(),
    note: entry.note,
    restoredFrom: entry.restoredFrom,
  };
}

function hashOfContent(content: NotebookContent): string {
  return createHash('sha256').update(JSON.stringify(content)).digest('hex');
}
