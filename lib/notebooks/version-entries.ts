import { z } from 'zod';
import { database } from '@/db/client';
import { listVersions, type VersionEntry } from '@/db/queries/versions';
import type { Person } from '@/lib/accounts';
import { wordsFor, type Pair } from './changes';
import { sayChanges } from './changes-in-words';
import { openFor } from './guard';
import type { HistoryEntry } from './types';
import { lineOf } from './versions';

/** Entries on a page, and versions that are read to make them; a quarter of an hour holds fewer saves than that. */
const ENTRIES = 25;
const READ = 400;
/** Versions within an entry whose words are worked out at once. */
const INNER = 40;
/** Minutes within which one person's autosaves are one entry: the quarters of the clock, so that entries stay as they are. */
const QUARTER = 15 * 60_000;

export const EntriesQuery = z.strictObject({
  before: z
    .string()
    .regex(/^[1-9]\d{0,9}$/, { error: 'A version is given by its number.' })
    .transform(Number)
    .optional(),
});
export type EntriesQuery = z.infer<typeof EntriesQuery>;

/**
 * The history to read, newest first: each version with what changed in it, in words; what one person's sheet saved by
 * itself within a quarter of an hour is one entry. `next` reads on when it is given as `before`.
 */
export async function listHistory(
  person: Person,
  id: string,
  { before }: EntriesQuery = {},
): Promise<{ entries: HistoryEntry[]; next: number | null }> {
  await openFor(person, 'versions.list', id);
  const below = before === undefined ? {} : { below: before };
  const read = await listVersions(database(), id, { ...below, limit: READ });
  const runs = runsOf(read);
  // The last run may go on beyond what was read.
  if (read.length === READ && runs.length > 1) runs.pop();
  const shown = runs.slice(0, ENTRIES);

  const pairs: Pair[] = shown.flatMap((run) => pairOf(run.at(-1), run[0]) ?? []);
  const inner = shown.flatMap((run) =>
    run.length < 2 ? [] : run.flatMap((version) => pairOf(version, version) ?? []),
  );
  const words = await wordsFor(id, [...pairs, ...inner.slice(0, INNER)]);
  const say = (oldest: VersionEntry | undefined, newest: VersionEntry | undefined) => {
    const pair = pairOf(oldest, newest);
    const known = pair === null ? null : words.get(`${pair.from}-${pair.to}`);
    return known ? sayChanges(known) : null;
  };
  const last = shown.at(-1)?.at(-1)?.number ?? 1;
  return {
    entries: shown.map((run) => ({
      words: say(run.at(-1), run[0]),
      versions: run.map((version) => ({ ...lineOf(version), words: say(version, version) })),
    })),
    next: last > 1 ? last : null,
  };
}

/** From the version before the oldest to the newest; the first version has none before it. */
function pairOf(oldest: VersionEntry | undefined, newest: VersionEntry | undefined): Pair | null {
  if (oldest === undefined || newest === undefined || oldest.number === 1) return null;
  return { from: oldest.number - 1, to: newest.number };
}

function runsOf(versions: readonly VersionEntry[]): VersionEntry[][] {
  const runs: VersionEntry[][] = [];
  for (const version of versions) {
    const run = runs.at(-1);
    const newer = run?.at(-1);
    if (run !== undefined && newer !== undefined && isOneRun(newer, version)) run.push(version);
    else runs.push([version]);
  }
  return runs;
}

const quarterOf = ({ savedAt }: VersionEntry) => Math.floor(savedAt.getTime() / QUARTER);

/** Kept by hand, restored or with a note, a version stands by itself. */
function isOneRun(newer: VersionEntry, older: VersionEntry): boolean {
  return (
    [newer, older].every(({ byItself, note }) => byItself && note === null) &&
    newer.author.id === older.author.id &&
    quarterOf(newer) === quarterOf(older)
  );
}
