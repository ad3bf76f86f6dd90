import type { Knex } from 'knex';
import { z } from 'zod';
import { database, inTransaction, isDuplicate } from '@/db/client';
import { listNotebookPeople } from '@/db/queries/notebook-roles';
import type { Version } from '@/db/queries/versions';
import {
  insertVersionCheck,
  listVersionChecks,
  type VersionCheck,
} from '@/db/queries/version-checks';
import { Failure, can, type Guarded } from '@/lib/access';
import type { Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { holdFor, openFor } from './guard';
import type { CheckLine } from './types';
import { getVersion } from './versions';

export const CheckRequest = z.strictObject({
  remark: z
    .string()
    .trim()
    .max(500, { error: 'The remark is longer than 500 characters.' })
    .regex(/^\P{Cs}*$/u, { error: 'The remark contains half of a character.' })
    .nullish(),
});
export type CheckRequest = z.infer<typeof CheckRequest>;

/** Who has checked which version of the notebook, oldest first. */
export async function listChecks(person: Person, id: string): Promise<CheckLine[]> {
  await openFor(person, 'versions.list', id);
  return (await listVersionChecks(database(), id)).map(checkLine);
}

/**
 * Says that the person has checked a version. It stays said: what was checked never changes.
 * @throws Failure `not-found`, `archived`; `already-added` when the person has said so before
 */
export function checkVersion(
  person: Person,
  id: string,
  number: number,
  { remark }: CheckRequest,
): Promise<CheckLine> {
  return inTransaction(async (trx) => {
    const { notebook } = await holdFor(trx, person, 'versions.check', id);
    if (notebook.archivedAt !== null) {
      throw new Failure('archived', 'This notebook is archived, so its versions are not checked.');
    }
    const version = await getVersion(trx, id, number);
    const said = remark ? remark : null;
    const checkedAt = await addCheck(trx, id, version.number, person.id, said);
    await record(trx, {
      deed: 'version.checked',
      by: person.id,
      workshopId: notebook.workshop.id,
      notebookId: id,
      subject: notebook.title,
      details: { version: version.number },
    });
    return {
      version: version.number,
      person: { id: person.id, name: person.name },
      checkedAt: checkedAt.toISOString(),
      remark: said,
    };
  });
}

async function addCheck(
  trx: Knex.Transaction,
  notebookId: string,
  version: number,
  personId: string,
  remark: string | null,
): Promise<Date> {
  try {
    return await insertVersionCheck(trx, { notebookId, version, personId, remark });
  } catch (error) {
    if (!isDuplicate(error)) throw error;
    throw new Failure(
      'already-added',
      `You have checked version ${version} already; that stays said.`,
    );
  }
}

/**
 * The check that a revision names. Where the workshop demands one, it is that of somebody other than
 * whoever saved the version; the named one, or else the latest that will do.
 * @throws Failure `check-needed` with a sentence that says who could; `invalid` for somebody who has
 *   not checked this version
 */
export async function settleCheck(
  trx: Knex.Transaction,
  guarded: Pick<Guarded, 'id'>,
  version: Version,
  asked: { checkedBy: string | null; isNeeded: boolean },
): Promise<VersionCheck['person'] | null> {
  const checks = await listVersionChecks(trx, guarded.id, version.number);
  const named = checks.find(({ person }) => person.id === asked.checkedBy) ?? null;
  if (asked.checkedBy !== null && named === null) {
    const message = `This person has not said that version ${version.number} is checked.`;
    throw new Failure('invalid', message, { fields: [{ field: 'checkedBy', message }] });
  }
  if (!asked.isNeeded) return named?.person ?? null;
  const byOthers = checks.filter(({ person }) => person.id !== version.author.id);
  const chosen = named === null ? byOthers.at(-1) : byOthers.find((check) => check === named);
  if (chosen !== undefined) return chosen.person;
  throw new Failure('check-needed', await sayWhoCould(trx, guarded.id, version));
}

/** Why the version cannot be issued yet, and who could change that. */
export async function sayWhoCould(
  trx: Knex | Knex.Transaction,
  id: string,
  version: Version,
): Promise<string> {
  const people = await listNotebookPeople(trx, id);
  const able = people.filter(({ id: one, role }) => {
    const guarded = { id, roles: new Map([[one, role]]) };
    return one !== version.author.id && can({ kind: 'person', id: one }, 'versions.check', guarded);
  });
  const names = able.slice(0, 5).map(({ name }) => name);
  const who =
    names.length === 0
      ? 'nobody else on this notebook may; give somebody a role as editor or owner first'
      : `${names.join(', ')}${able.length > names.length ? ' and others' : ''} could`;
  return (
    `This workshop issues only what somebody other than its author has checked, and nobody has ` +
    `checked version ${version.number} by ${version.author.name}: ${who}.`
  );
}

export const checkLine = ({ version, person, checkedAt, remark }: VersionCheck): CheckLine => ({
  version,
  person,
  checkedAt: checkedAt.toISOString(),
  remark,
});
