import { z } from 'zod';
import { database } from '@/db/client';
import {
  findNames,
  listActivity,
  listActors,
  type ActivityFilter,
  type ActivityLine,
} from '@/db/queries/activity';
import { Failure } from '@/lib/access';
import { isId, type Person } from '@/lib/accounts';
import { DEEDS, DEED_GROUPS, deedsOf, type Deed } from '@/lib/activity';
import { writeCsv } from './csv';
import { openWorkshop } from './guard';
import type { ActivityEntry } from './types';

/** Lines on one page of the record. */
const PAGE = 50;
/** Lines in one file; more are refused, since a file that lacks some would pass for the whole record. */
export const CSV_LINES = 50_000;
const CSV_STEP = 1_000;
const DAY_MS = 24 * 3600 * 1000;

const Day = z.iso.date({ error: 'The day must be written like 2026-03-31.' });
const empty = (value: unknown) => (value === '' ? undefined : value);

export const ActivityQuery = z.strictObject({
  person: z.preprocess(
    empty,
    z.string().refine(isId, { error: 'The person is not given by their id.' }).optional(),
  ),
  group: z.preprocess(
    empty,
    z.enum(DEED_GROUPS, { error: 'There is no such group of deeds.' }).optional(),
  ),
  from: z.preprocess(empty, Day.optional()),
  to: z.preprocess(empty, Day.optional()),
  /** Lines older than the one of this number. */
  before: z.preprocess(
    empty,
    z
      .string()
      .regex(/^[1-9]\d{0,14}$/, { error: 'The number must be a whole number from 1.' })
      .transform(Number)
      .optional(),
  ),
});
export type ActivityQuery = z.infer<typeof ActivityQuery>;

export interface ActivityPage {
  workshop: { id: string; name: string };
  entries: ActivityEntry[];
  /** Where the next page begins; null at the end of the record. */
  before: number | null;
  /** Everybody who is on the record. */
  people: { id: string; name: string }[];
}

/** The workshop's record, newest first, 50 lines at a time. @throws Failure `not-found`, `forbidden` */
export async function readActivity(
  person: Person,
  id: string,
  query: ActivityQuery,
): Promise<ActivityPage> {
  const { workshop } = await openWorkshop(person, 'activity.read', id);
  const db = database();
  const [lines, people] = await Promise.all([
    listActivity(db, id, filterOf(query), PAGE + 1),
    listActors(db, id),
  ]);
  const shown = lines.slice(0, PAGE);
  return {
    workshop: { id, name: workshop.name },
    entries: await inWords(shown),
    before: lines.length > PAGE ? (shown.at(-1)?.number ?? null) : null,
    people,
  };
}

/**
 * The same as a CSV file, all lines of it.
 * @throws Failure `too-large` above 50 000 lines
 */
export async function exportActivity(
  person: Person,
  id: string,
  query: ActivityQuery,
): Promise<{ name: string; text: string }> {
  const { workshop } = await openWorkshop(person, 'activity.read', id);
  const db = database();
  const lines: ActivityLine[] = [];
  for (let before = query.before; ; before = lines.at(-1)?.number) {
    const more = await listActivity(db, id, { ...filterOf(query), before }, CSV_STEP);
    lines.push(...more);
    if (lines.length > CSV_LINES) {
      throw new Failure(
        'too-large',
        `The record has more than ${CSV_LINES} lines of that kind; choose a shorter time.`,
      );
    }
    if (more.length < CSV_STEP) break;
  }
  const entries = await inWords(lines);
  const heads = ['number', 'time', 'person', 'deed', 'words', 'subject', 'notebook', 'more'];
  const rows = entries.map((entry, index) => [
    String(entry.number),
    entry.at,
    entry.who,
    lines[index]?.deed ?? '',
    entry.did,
    entry.subject,
    entry.notebookId ?? '',
    entry.more,
  ]);
  return { name: `${workshop.name}, activity.csv`, text: writeCsv(heads, rows) };
}

/** Days are those of UTC, both included. */
function filterOf({ person, group, from, to, before }: ActivityQuery): ActivityFilter {
  return {
    actorId: person,
    deeds: group && deedsOf(group),
    from: from === undefined ? undefined : new Date(from),
    until: to === undefined ? undefined : new Date(Date.parse(to) + DAY_MS),
    before,
  };
}

/** Names are put in when the record is read: whoever is renamed or leaves is so in the whole of it. */
async function inWords(lines: readonly ActivityLine[]): Promise<ActivityEntry[]> {
  const ids = lines.flatMap(({ details: { person } }) =>
    typeof person === 'string' ? [person] : [],
  );
  const names = await findNames(database(), [...new Set(ids)]);
  return lines.map((line) => ({
    number: line.number,
    at: line.at.toISOString(),
    who: line.actor?.name ?? 'Somebody unknown',
    did: line.deed in DEEDS ? DEEDS[line.deed as Deed] : line.deed,
    subject: line.subject,
    notebookId: line.notebookId,
    more: sayDetails(line.details, names),
  }));
}

/** What a reader has no use for. */
const UNSAID = ['invitation'];

function sayDetails(details: ActivityLine['details'], names: Map<string, string>): string {
  return Object.entries(details)
    .filter(([key, value]) => !UNSAID.includes(key) && value !== null && value !== '')
    .map(([key, value]) => {
      if (key === 'person') return names.get(String(value)) ?? 'somebody gone';
      if (key === 'role') return `as ${value}`;
      return `${key} ${value}`;
    })
    .join(', ');
}
