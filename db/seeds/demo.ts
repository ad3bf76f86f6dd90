import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { inTransaction, type Database } from '../client';
import { insertClientLink } from '../queries/client-links';
import { insertNotebook, type NotebookRole } from '../queries/notebooks';
import { putNotebookRole } from '../queries/notebook-roles';
import { deleteSessionsOf } from '../queries/sessions';
import { changePasswordHash, findUserByEmail, insertUser } from '../queries/users';
import { insertVersion } from '../queries/versions';
import { insertMembership, insertWorkshop } from '../queries/workshops';
import { hashPassword, verifyPassword } from '@/lib/accounts/passwords';
import { hashOf, newSecret } from '@/lib/accounts/secrets';
import { tokenOf } from '@/lib/notebooks/link-tokens';
import { issueDemo } from './demo-revisions';
import { demoNotebooks, type DemoNotebook, type DemoPerson } from './demo-notebooks';

/** Published on purpose: it lets nobody in unless the demo is wanted on this copy. */
export const DEMO_PASSWORD = 'limestone-and-lime';
export const DEMO_WORKSHOP = 'Ferrowick Yard';
const DEMO_SETTINGS = {
  issuing: { editorsIssue: false, checkNeeded: false },
  titleBlock: {
    legalOwner: 'Ferrowick Yard',
    identificationPrefix: 'FY-',
    approvalPerson: 'Ida Quellby',
  },
};

const people: { key: DemoPerson; email: string; name: string; role: NotebookRole }[] = [
  { key: 'ida', email: 'ida@ferrowick.example', name: 'Ida Quellby', role: 'owner' },
  { key: 'tam', email: 'tam@ferrowick.example', name: 'Tam Orrowdale', role: 'editor' },
  { key: 'wren', email: 'wren@ferrowick.example', name: 'Wren Saltholm', role: 'viewer' },
];

export interface DemoReport {
  workshop: string;
  password: string;
  people: { email: string; role: NotebookRole }[];
  /** Token of the demo's client link, known only when it was made just now. */
  linkToken?: string;
}

/**
 * Puts the demo workshop in, once. On a later start it only sees to it that the published password
 * works again if it had been withdrawn.
 */
export async function seedDemo(db: Database): Promise<DemoReport> {
  const report: DemoReport = {
    workshop: DEMO_WORKSHOP,
    password: DEMO_PASSWORD,
    people: people.map(({ email, role }) => ({ email, role })),
  };
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const found = await Promise.all(people.map(({ email }) => findUserByEmail(db, email)));
  if (found.every((user) => user === null)) {
    const linkId = randomUUID();
    await inTransaction((trx) => insertDemo(trx, passwordHash, linkId), db);
    return { ...report, linkToken: tokenOf(linkId) };
  }
  for (const user of found) {
    // One who has deleted the account does not come back.
    if (user === null || (await verifyPassword(user.passwordHash, DEMO_PASSWORD))) continue;
    await changePassword(db, user.id, passwordHash);
  }
  await inTransaction(issueDemo, db);
  return report;
}

/**
 * Takes the published password away from demo people who are in the database although the demo is
 * not wanted, and ends their sessions. What they saved stays.
 */
export async function withdrawDemo(db: Database): Promise<null> {
  for (const { email } of people) {
    const user = await findUserByEmail(db, email);
    if (user !== null && (await verifyPassword(user.passwordHash, DEMO_PASSWORD))) {
      await changePassword(db, user.id, await hashPassword(newSecret()));
    }
  }
  return null;
}

async function changePassword(db: Database, userId: string, passwordHash: string): Promise<void> {
  await changePasswordHash(db, userId, passwordHash);
  await deleteSessionsOf(db, userId);
}

async function insertDemo(
  trx: Knex.Transaction,
  passwordHash: string,
  linkId: string,
): Promise<void> {
  const workshopId = await insertWorkshop(trx, { name: DEMO_WORKSHOP, defaults: DEMO_SETTINGS });
  const ids = new Map<DemoPerson, string>();
  for (const { key, email, name, role } of people) {
    const id = await insertUser(trx, { email, name, passwordHash });
    await insertMembership(trx, workshopId, id, role === 'owner' ? 'admin' : 'member');
    ids.set(key, id);
  }
  for (const notebook of demoNotebooks) {
    await insertDemoNotebook(trx, { notebook, workshopId, ids, linkId });
  }
  await issueDemo(trx);
}

async function insertDemoNotebook(
  trx: Knex.Transaction,
  given: {
    notebook: DemoNotebook;
    workshopId: string;
    ids: Map<DemoPerson, string>;
    linkId: string;
  },
): Promise<void> {
  const { notebook, workshopId, ids, linkId } = given;
  const idOf = (key: DemoPerson): string => {
    const id = ids.get(key);
    if (id === undefined) throw new Error(`The demo has nobody called ${key}.`);
    return id;
  };
  const notebookId = await insertNotebook(trx, { workshopId, title: notebook.title });
  for (const { key, role } of people) await putNotebookRole(trx, notebookId, idOf(key), role);
  let number = 0;
  for (const { author, daysAgo, note, content } of notebook.versions) {
    number += 1;
    const savedAt = new Date(Date.now() - daysAgo * 24 * 3600 * 1000);
    const authorId = idOf(author);
    await insertVersion(trx, { notebookId, number, authorId, content, note, savedAt });
  }
  await trx('notebooks')
    .where({ id: notebookId })
    .update({ title_block: JSON.stringify(notebook.block) });
  if (notebook.link === undefined) return;
  const { label, name, email } = notebook.link;
  await insertClientLink(trx, {
    id: linkId,
    notebookId,
    tokenHash: hashOf(tokenOf(linkId)),
    label,
    createdBy: idOf('ida'),
    clientName: name,
    clientEmail: email,
  });
}
