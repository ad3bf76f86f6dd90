import { z } from 'zod';
import { database, type Database } from '@/db/client';
import type { Notebook } from '@/db/queries/notebooks';
import {
  findVersion,
  listVersions as listEntries,
  type Version,
  type VersionEntry,
} from '@/db/queries/versions';
import { Failure } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { NotebookContent } from './content';
import { openFor } from './guard';
import type { OpenNotebook, OpenVersion, VersionLine } from './types';

/** Versions count in steps of one from 1; the column holds no more than this. */
export const LARGEST_VERSION = 4_294_967_295;

/** Versions listed at once; a long history is read on from the last one. */
const LISTED = 500;

export const ListQuery = z.strictObject({
  /** Lists versions before this one. */
  before: z
    .string()
    .regex(/^[1-9]\d{0,9}$/, { error: 'A version is given by its number.' })
    .transform(Number)
    .optional(),
});
export type ListQuery = z.infer<typeof ListQuery>;

/** The versions of the notebook, newest first; `next` lists the rest when it is given as `before`. */
export async function listVersions(
  person: Person,
  id: string,
  { before }: ListQuery = {},
): Promise<{ versions: VersionLine[]; next: number | null }> {
  await openFor(person, 'versions.list', id);
  const limit = LISTED + 1;
  const below = before === undefined ? {} : { below: before };
  const entries = await listEntries(database(), id, { ...below, limit });
  const versions = entries.slice(0, LISTED).map(lineOf);
  return { versions, next: entries.length > LISTED ? (versions.at(-1)?.number ?? null) : null };
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

/** @throws Failure `not-found` */
export async function getVersion(db: Database, id: string, number: number): Promise<Version> {
  const possible = Number.isInteger(number) && number > 0 && number <= LARGEST_VERSION;
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
    mergedWith: entry.mergedWith,
    byItself: entry.byItself,
  };
}
