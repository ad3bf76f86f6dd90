import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findUser } from '@/db/queries/users';
import { insertMembership, insertWorkshop } from '@/db/queries/workshops';
import { putNotebookRole } from '@/db/queries/notebook-roles';
import { Failure } from '@/lib/access';
import {
  KeyRequest,
  createKey,
  deleteAccount,
  exportAccount,
  forgotPassword,
  holderOfKey,
  signIn,
  signUp,
  workshopsOf,
  type Person,
} from '@/lib/accounts';
import { beginSession, personOfSession } from '@/lib/accounts/sessions';
import { closePool } from '@/lib/evaluation';
import {
  IssueRequest,
  LinkRequest,
  addComment,
  createLink,
  createNotebook,
  issueRevision,
  listLinks,
  listPeople,
  listVersions,
  readComments,
  restoreVersion,
  saveVersion,
} from '@/lib/notebooks';
import { newestLink } from '../setup/letters';
import { PASSWORD, newPerson } from '../accounts/support/person';
import { contentOf, dimension } from './people';

afterAll(closePool);
afterAll(closeDatabase);

const first = contentOf(dimension('c1', 'R = 1200 mm'));
const second = contentOf(dimension('c1', 'R = 1150 mm'));
const password = PASSWORD;

async function failureOf(work: Promise<unknown>): Promise<Failure> {
  const fault: unknown = await work.then(
    () => null,
    (error: unknown) => error,
  );
  if (fault instanceof Failure) return fault;
  throw new Error(`Expected a failure; met ${String(fault)}`);
}

/** A notebook with three versions, the last one restored, an issued revision and two client links. */
async function newNotebook(owner: Person): Promise<string> {
  const { id } = await createNotebook(owner, { title: 'Rose window', content: first });
  await saveVersion(owner, id, { base: 1, content: second });
  await restoreVersion(owner, id, 1, { base: 2 });
  const issue = IssueRequest.parse({ version: 3, purpose: 'for manufacture' });
  await issueRevision(owner, id, issue);
  await createLink(owner, id, LinkRequest.parse({ label: 'Latest' }));
  await createLink(owner, id, LinkRequest.parse({ label: 'Fixed', revision: 'A' }));
  await addComment(owner, id, { cell: 'c1', text: 'Is this the clear width?' });
  return id;
}

const countOf = async (table: string, where: object) =>
  (await database()(table).where(where)).length;

describe('deleting an account', () => {
  it('takes with it the notebooks and workshops that only the person is in', async () => {
    const person = await newPerson();
    const notebook = await newNotebook(person);
    const [workshop] = await workshopsOf(person);
    await deleteAccount(person, { password });
    for (const table of ['versions', 'revisions', 'client_links', 'comments', 'notebook_roles']) {
      expect([table, await countOf(table, { notebook_id: notebook })]).toEqual([table, 0]);
    }
    expect(await countOf('notebooks', { id: notebook })).toBe(0);
    expect(await countOf('workshops', { id: workshop?.id })).toBe(0);
  });

  it('leaves nothing by which the person could be known or come in again', async () => {
    const person = await newPerson('Maren Oldacre');
    const { id, email } = person;
    const session = await beginSession(id, 'Firefox on Linux');
    const { key } = await createKey(person, KeyRequest.parse({ label: 'Saw' }));
    await forgotPassword(email, randomUUID());
    await deleteAccount(person, { password });
    expect(await personOfSession(session)).toBeNull();
    expect(await holderOfKey(key)).toBeNull();
    expect(
      await signIn({ email, password }, { address: randomUUID(), device: 'A browser' }),
    ).toBeNull();
    const row = await findUser(database(), id);
    expect(row).toMatchObject({ name: 'former member', passwordHash: null });
    expect(row?.email).toMatch(/@left\.invalid$/);
    for (const table of ['sessions', 'api_keys', 'password_resets', 'memberships']) {
      expect([table, await countOf(table, { user_id: id })]).toEqual([table, 0]);
    }
  });

  it('tells the person by mail, in the last letter that is sent', async () => {
    const person = await newPerson();
    await deleteAccount(person, { password });
    const subjects: unknown = await database()('outgoing_mail')
      .where({ recipient: person.email })
      .pluck('subject');
    expect(subjects).toEqual(['Your account was deleted']);
  });

  it('leaves what the person wrote elsewhere, under “former member”, and the links they made', async () => {
    const [person, other] = [await newPerson('Maren Oldacre'), await newPerson('Orla Finch')];
    const notebook = await newNotebook(person);
    await putNotebookRole(database(), notebook, other.id, 'owner');
    await deleteAccount(person, { password });
    const { versions } = await listVersions(other, notebook);
    expect(versions.map(({ author }) => author)).toEqual(Array(3).fill('former member'));
    const links = await listLinks(other, notebook);
    expect(links.map(({ label, madeBy, revokedAt }) => [label, madeBy, revokedAt])).toEqual(
      expect.arrayContaining([
        ['Latest', 'former member', null],
        ['Fixed', 'former member', null],
      ]),
    );
    const said = JSON.stringify(await readComments(other, notebook));
    expect(said).toContain('Is this the clear width?');
    expect(said).toContain('former member');
    expect(said).not.toContain('Maren');
    expect((await listPeople(other, notebook)).map(({ id }) => id)).toEqual([other.id]);
  });

  it('is refused, with all that is in the way, while others would be left without owner or admin', async () => {
    const [person, other] = [await newPerson(), await newPerson()];
    const notebook = await newNotebook(person);
    const alone = await newNotebook(person);
    await putNotebookRole(database(), notebook, other.id, 'viewer');
    const [workshop] = await workshopsOf(person);
    await insertMembership(database(), workshop?.id ?? '', other.id, 'member');
    const fault = await failureOf(deleteAccount(person, { password }));
    expect(fault.code).toBe('still-needed');
    expect(fault.extra.fields?.map(({ field }) => field)).toEqual([
      `notebook ${notebook}`,
      `workshop ${workshop?.id}`,
    ]);
    expect(fault.message).toContain('Rose window');
    expect(await countOf('notebooks', { id: alone })).toBe(1);
    expect((await findUser(database(), person.id))?.name).toBe(person.name);

    await putNotebookRole(database(), notebook, other.id, 'owner');
    await database()('memberships')
      .where({ workshop_id: workshop?.id, user_id: other.id })
      .update({ role: 'admin' });
    await deleteAccount(person, { password });
    expect(await countOf('notebooks', { id: notebook })).toBe(1);
    expect(await countOf('notebooks', { id: alone })).toBe(0);
    expect(await countOf('workshops', { id: workshop?.id })).toBe(1);
  });

  it('leaves a workshop that still holds a notebook of others', async () => {
    const [person, other] = [await newPerson(), await newPerson()];
    const notebook = await newNotebook(person);
    await putNotebookRole(database(), notebook, other.id, 'owner');
    const [workshop] = await workshopsOf(person);
    await deleteAccount(person, { password });
    expect(await countOf('workshops', { id: workshop?.id })).toBe(1);
    expect((await listVersions(other, notebook)).versions).toHaveLength(3);
  });

  it('lets one of two last owners go who leave at the same moment, not both', async () => {
    const [one, two, viewer] = [await newPerson(), await newPerson(), await newPerson()];
    const notebook = await newNotebook(one);
    await putNotebookRole(database(), notebook, two.id, 'owner');
    await putNotebookRole(database(), notebook, viewer.id, 'viewer');
    const answers = await Promise.allSettled(
      [one, two].map((person) => deleteAccount(person, { password })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await countOf('notebook_roles', { notebook_id: notebook, role: 'owner' })).toBe(1);
  });

  it('wants the password, or the address typed where there is none', async () => {
    const person = await newPerson();
    for (const sent of [{}, { password: 'wrong' }, { email: person.email }]) {
      const fault = await failureOf(deleteAccount(person, sent));
      expect([fault.code, fault.extra.fields?.[0]?.field]).toEqual(['invalid', 'password']);
    }
    const without = await newPerson('Maren Oldacre', { password: false });
    for (const sent of [{}, { password: '' }, { email: person.email }]) {
      const fault = await failureOf(deleteAccount(without, sent));
      expect([fault.code, fault.extra.fields?.[0]?.field]).toEqual(['invalid', 'email']);
    }
    await deleteAccount(without, { email: without.email });
    expect((await findUser(database(), without.id))?.name).toBe('former member');
  });

  it('stands in the record of the workshop, without a name', async () => {
    const [person, other] = [await newPerson(), await newPerson()];
    const workshop = await insertWorkshop(database(), { name: 'Shared yard' });
    await insertMembership(database(), workshop, other.id, 'admin');
    await insertMembership(database(), workshop, person.id, 'member');
    await deleteAccount(person, { password });
    const lines: Record<string, unknown>[] = await database()('activity').where({
      workshop_id: workshop,
      deed: 'account.deleted',
    });
    expect(lines).toMatchObject([{ actor_id: person.id, subject: 'their account' }]);
    expect(JSON.stringify(lines)).not.toContain(person.email);
  });
});

describe('exporting an account', () => {
  it('gives all that is the person’s, with the content of owned notebooks, and no secret', async () => {
    const [person, other] = [await newPerson('Maren Oldacre'), await newPerson('Orla Finch')];
    const own = await newNotebook(person);
    const foreign = await newNotebook(other);
    await putNotebookRole(database(), foreign, person.id, 'viewer');
    const { key } = await createKey(person, KeyRequest.parse({ label: 'Saw' }));
    const session = await beginSession(person.id, 'Firefox on Linux');
    const exported = (await exportAccount(person)) as {
      notebooks: { id: string; role: string; content?: unknown }[];
    };
    expect(exported).toMatchObject({
      format: 1,
      account: { id: person.id, name: 'Maren Oldacre', email: person.email, hasPassword: true },
      workshops: [{ name: 'Oldacre Joinery', role: 'admin' }],
      comments: [{ notebookId: own, body: 'Is this the clear width?' }],
      keys: [{ label: 'Saw' }],
      sessions: [{ device: 'Firefox on Linux' }],
    });
    const of = (id: string) => exported.notebooks.find((notebook) => notebook.id === id);
    expect(of(own)).toMatchObject({ role: 'owner', version: 3, content: first });
    expect(of(foreign)).toMatchObject({ role: 'viewer' });
    expect(of(foreign)).not.toHaveProperty('content');
    const text = JSON.stringify(exported);
    const hash = (await findUser(database(), person.id))?.passwordHash ?? 'missing';
    for (const secret of [key, session, hash, other.email]) expect(text).not.toContain(secret);
  });

  it('is limited', async () => {
    const person = await newPerson();
    for (let time = 0; time < 10; time += 1) await exportAccount(person);
    expect((await failureOf(exportAccount(person))).code).toBe('too-many');
  });
});

describe('a letter to a person who left', () => {
  it('is not written when the address signs up anew: it is like any other', async () => {
    const person = await newPerson();
    await deleteAccount(person, { password });
    const { email } = person;
    await signUp({ name: 'Maren', email, password, workshop: 'Again' }, randomUUID());
    const link = await newestLink(database(), email, 'Confirm your e-mail address');
    expect(new URL(link).pathname).toMatch(/^\/confirm\//);
  });
});
