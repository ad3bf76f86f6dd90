import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { z } from 'zod';
import { inTransaction } from '@/db/client';
import { insertVersion, keepByHand, type Version } from '@/db/queries/versions';
import { Failure, type Action } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { canonicalContent, type NotebookContent } from './content';
import { holdFor } from './guard';
import { mergeContents, type Conflict } from './merge';
import { SavableContent } from './savable';
import { keepSearchable } from './search-text';
import type { Saved, StaleHead } from './types';
import { LARGEST_VERSION, contentOf, getVersion } from './versions';

const Base = z
  .int({ error: 'The base must be the number of the version the change was made on.' })
  .min(1, { error: 'The base must be at least 1; every notebook begins with version 1.' })
  .max(LARGEST_VERSION, { error: 'There is no version of that number.' });

export const SaveRequest = z.strictObject({
  base: Base,
  content: SavableContent,
  note: z
    .string()
    .trim()
    .max(500, { error: 'The note is longer than 500 characters.' })
    .refine((text) => !/\p{Cs}/u.test(text), { error: 'The note contains half of a character.' })
    .nullish(),
  /** Brings the content together with the head when that is newer than the base. */
  merge: z.boolean({ error: 'Whether to merge is said by true or false.' }).optional(),
  /** Saved by the sheet after a pause, not kept by hand. */
  byItself: z.boolean({ error: 'Whether it was saved by itself is true or false.' }).optional(),
});
export type SaveRequest = z.infer<typeof SaveRequest>;

export const RestoreRequest = z.strictObject({ base: Base });
export type RestoreRequest = z.infer<typeof RestoreRequest>;

/**
 * Stores the content as a new version on top of `base`. Content equal to the head's makes no version and says so,
 * whatever its base: a save sent twice because the answer was lost succeeds. Keeping by hand what the sheet saved by
 * itself makes that version one kept by hand, with the note; what somebody else's sheet saved, a version of its own. With `merge`, content made on an older base is brought together with
 * the head, and what comes of it is stored.
 * @throws Failure `stale-version` with the head when the head is not `base` any more, or with `merge` when both changed
 *   the same, then with the conflicts too: nothing is stored, and the caller holds both texts; `archived`; `invalid`
 *   for a base that there is not, and for a merge that is too large
 */
export function saveVersion(person: Person, id: string, request: SaveRequest): Promise<Saved> {
  const { base, content, merge = false, byItself = false } = request;
  const note = request.note ?? null;
  return addVersion(person, 'versions.save', id, { base, merge }, () =>
    Promise.resolve({ content, note, restoredFrom: null, byItself }),
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
  return addVersion(person, 'versions.restore', id, { base, merge: false }, async (trx) => {
    const old = await getVersion(trx, id, number);
    return { content: contentOf(old), note: null, restoredFrom: number, byItself: false };
  });
}

interface Addition {
  content: NotebookContent;
  note: string | null;
  restoredFrom: number | null;
  byItself: boolean;
}

interface Onto {
  base: number;
  merge: boolean;
}

function addVersion(
  person: Person,
  action: Action,
  id: string,
  onto: Onto,
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
    const sent = canonicalContent(added.content);
    const isHead = hashOfContent(sent) === head.contentHash;
    const byHand = head.byItself && !added.byItself && added.restoredFrom === null;
    if (isHead && byHand && head.author.id === person.id) {
      await keepByHand(trx, id, head.number, added.note === '' ? null : added.note);
      return asSaved(head, true, null);
    }
    if (isHead && (!byHand || added.note === null)) return asSaved(head, true, null);
    const merged = isHead ? null : await broughtOnto(trx, id, onto, sent, head);
    const content = merged ?? sent;
    if (merged !== null && hashOfContent(merged) === head.contentHash) {
      return asSaved(head, true, merged);
    }
    const number = head.number + 1;
    const savedAt = await insertVersion(trx, {
      notebookId: id,
      number,
      authorId: person.id,
      content,
      note: added.note === '' ? null : added.note,
      restoredFrom: added.restoredFrom,
      mergedWith: merged === null ? null : head.number,
      byItself: added.byItself,
    });
    await keepSearchable(trx, { id, title: notebook.title, version: number }, content);
    if (added.restoredFrom !== null) {
      await record(trx, {
        deed: 'version.restored',
        by: person.id,
        workshopId: notebook.workshop.id,
        notebookId: id,
        subject: notebook.title,
        details: { version: added.restoredFrom, as: number },
      });
    }
    return asSaved({ number, savedAt, author: person }, false, merged);
  });
}

function asSaved(
  { number, savedAt, author }: Pick<Version, 'number' | 'savedAt' | 'author'>,
  unchanged: boolean,
  merged: NotebookContent | null,
): Saved {
  const answer = { number, author: author.name, savedAt: savedAt.toISOString(), unchanged };
  return merged === null
    ? { ...answer, merged: false }
    : { ...answer, merged: true, content: merged };
}

/** The content brought together with the head; null when it was made on the head itself. */
async function broughtOnto(
  trx: Knex.Transaction,
  id: string,
  { base, merge }: Onto,
  sent: NotebookContent,
  head: Version,
): Promise<NotebookContent | null> {
  if (base === head.number) return null;
  if (!merge) throw stale(base, head);
  if (base > head.number) {
    throw new Failure(
      'invalid',
      `The change is said to be made on version ${base}, which this notebook does not have; its newest is version ${head.number}.`,
    );
  }
  const old = await getVersion(trx, id, base);
  const { content, conflicts } = mergeContents(contentOf(old), sent, contentOf(head));
  if (conflicts.length > 0) throw stale(base, head, conflicts);
  const checked = SavableContent.safeParse(content);
  if (!checked.success) {
    const [issue] = checked.error.issues;
    throw new Failure(
      'invalid',
      `Brought together with version ${head.number} the notebook cannot be saved: ${issue?.message ?? 'it is not as expected.'}`,
    );
  }
  return canonicalContent(content);
}

function stale(base: number, head: Version, conflicts?: readonly Conflict[]): Failure {
  const body: StaleHead = {
    number: head.number,
    author: head.author.name,
    savedAt: head.savedAt.toISOString(),
    content: contentOf(head),
  };
  const made = `This change was made on version ${base}, but the newest is version ${head.number} by ${head.author.name}`;
  if (conflicts === undefined) {
    return new Failure(
      'stale-version',
      `${made}. Nothing was saved; the newest version comes with this answer.`,
      { head: body },
    );
  }
  return new Failure(
    'stale-version',
    `${made}, and both changed the same. Nothing was saved; the newest version and what both changed come with this answer.`,
    { head: body, conflicts },
  );
}

function hashOfContent(content: NotebookContent): string {
  return createHash('sha256').update(JSON.stringify(content)).digest('hex');
}
