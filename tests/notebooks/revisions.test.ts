import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { findRevision, insertRevision } from '@/db/queries/revisions';
import { Failure } from '@/lib/access';
import { closePool } from '@/lib/evaluation';
import { IssueRequest, checkVersion, issueRevision, prospectOfIssue } from '@/lib/notebooks';
import { listRevisions, readRevision, reevaluateRevision, revisionTag } from '@/lib/notebooks';
import { letterOf } from '@/lib/notebooks/letters';
import { addVersion, contentOf, newScene, type Scene } from './support/scene';

afterAll(closePool);
afterAll(closeDatabase);

const asking = (version = 1, more: object = {}) =>
  IssueRequest.parse({ version, purpose: 'for manufacture', ...more });

/** Refused by nothing before the arithmetic starts, and far beyond any time: a value with some 57 000 coordinates. */
const ENDLESS = `(${Array.from({ length: 15 }, (_, index) => `sqrt(1+sqrt(${index + 2}))`).join('+')})^99`;

async function failureOf(work: Promise<unknown>): Promise<Failure> {
  const fault: unknown = await work.then(
    () => null,
    (error: unknown) => error,
  );
  if (fault instanceof Failure) return fault;
  throw new Error(`Expected a failure; met ${String(fault)}`);
}

describe('letters', () => {
  it('run from A to Z and then with two letters, none twice', () => {
    expect([1, 2, 26, 27, 28, 52, 53, 702, 703].map(letterOf)).toEqual([
      'A',
      'B',
      'Z',
      'AA',
      'AB',
      'AZ',
      'BA',
      'ZZ',
      'AAA',
    ]);
    const many = Array.from({ length: 3000 }, (_, index) => letterOf(index + 1));
    expect(new Set(many).size).toBe(3000);
  });
});

describe('issuing', () => {
  it('freezes results, settings and title block under the next letter', async () => {
    const scene = await newScene(undefined, {
      titleBlock: {
        legalOwner: 'Quarrymoor Limited',
        identificationPrefix: 'QY-',
        approvalPerson: 'Maud Ash',
      },
    });
    const { owner, notebook } = scene;
    const issued = await issueRevision(owner, notebook, asking(1, { note: 'First.' }));
    expect(issued).toMatchObject({ letter: 'A', version: 1, letters: 0 });
    const open = await readRevision(owner, notebook, 'A');
    expect(open.revision).toMatchObject({
      letter: 'A',
      purpose: 'for manufacture',
      note: 'First.',
      issuedBy: 'Owain',
      checkedBy: null,
      supersededBy: null,
      checkCode: issued.checkCode,
    });
    expect(open.titleBlock).toMatchObject({
      legalOwner: 'Quarrymoor Limited',
      title: 'Rose window',
      creator: 'Owain',
      approvalPerson: 'Maud Ash',
    });
    expect(open.results.flatMap((cell) => cell.results)).toMatchObject([
      { mark: 'R', decimal: { re: '1200' } },
      // 1200·√2 to twelve digits, from memory of √2 = 1.41421356237310.
      { mark: 's', decimal: { re: '1697.05627485' }, cut: { value: '1697' } },
    ]);
    expect(issued.checkCode).toMatch(/^[0-9A-F]{4}-[0-9A-F]{4}$/);
  });

  it('keeps what it issued whatever becomes of the notebook, the workshop and the people', async () => {
    const { owner, notebook, workshop } = await newScene();
    await issueRevision(owner, notebook, asking());
    const before = await readRevision(owner, notebook, 'A');
    const db = database();
    await db('notebooks').where({ id: notebook }).update({ title: 'Another title' });
    await db('workshops').where({ id: workshop }).update({ name: 'Another yard' });
    await db('users').where({ id: owner.id }).update({ name: 'Another name' });
    expect(await readRevision(owner, notebook, 'A')).toEqual(before);
  });

  it('says of an older one what superseded it, and gives its reader another tag', async () => {
    const scene = await newScene();
    const { owner, notebook } = scene;
    await issueRevision(owner, notebook, asking());
    const tag = await revisionTag(owner, notebook, 'A');
    expect(await revisionTag(owner, notebook, 'A')).toBe(tag);
    await addVersion(scene, 2, owner, contentOf('R = 1150 mm'));
    expect(await revisionTag(owner, notebook, 'A')).toBe(tag);
    await issueRevision(owner, notebook, asking(2));
    expect(await revisionTag(owner, notebook, 'A')).not.toBe(tag);
    const list = await listRevisions(owner, notebook);
    expect(list.map(({ letter, supersededBy }) => [letter, supersededBy])).toEqual([
      ['B', null],
      ['A', 'B'],
    ]);
    expect(new Set(list.map(({ checkCode }) => checkCode)).size).toBe(2);
  });

  it('gives two that are issued at once a letter each', async () => {
    const { owner, notebook } = await newScene();
    const issued = await Promise.all([
      issueRevision(owner, notebook, asking()),
      issueRevision(owner, notebook, asking()),
      issueRevision(owner, notebook, asking()),
    ]);
    expect(issued.map(({ letter }) => letter).sort()).toEqual(['A', 'B', 'C']);
  });

  it('is for owners, and for editors where the workshop lets them', async () => {
    const scene = await newScene();
    const open = await newScene(undefined, { issuing: { editorsIssue: true } });
    expect((await failureOf(issueRevision(scene.editor, scene.notebook, asking()))).code).toBe(
      'forbidden',
    );
    expect((await issueRevision(open.editor, open.notebook, asking())).letter).toBe('A');
    for (const { viewer, stranger, notebook } of [scene, open]) {
      expect((await failureOf(issueRevision(viewer, notebook, asking()))).code).toBe('forbidden');
      expect((await failureOf(issueRevision(stranger, notebook, asking()))).code).toBe('not-found');
    }
  });

  it('is refused for an archived notebook and a version it has not', async () => {
    const { owner, notebook } = await newScene();
    expect((await failureOf(issueRevision(owner, notebook, asking(7)))).code).toBe('not-found');
    await database()('notebooks').where({ id: notebook }).update({ archived_at: new Date() });
    expect((await failureOf(issueRevision(owner, notebook, asking()))).code).toBe('archived');
  });

  it('issues lines with faults only when they are known of', async () => {
    const { owner, notebook } = await newScene(['R = 1200 mm', 'a = 1/0\nb = 2 + 3 mm', 'c = 3']);
    expect(await prospectOfIssue(owner, notebook, 1)).toMatchObject({ faults: 2, letter: 'A' });
    const unawares = await failureOf(issueRevision(owner, notebook, asking()));
    expect(unawares.code).toBe('faulty-lines');
    expect(unawares.message).toContain('2 lines have faults');
    expect((await failureOf(issueRevision(owner, notebook, asking(1, { faults: 1 })))).code).toBe(
      'faulty-lines',
    );
    expect((await issueRevision(owner, notebook, asking(1, { faults: 2 }))).letter).toBe('A');
  });

  it('freezes nothing that the clock cut short, and says which line it was', async () => {
    const { owner, notebook } = await newScene(['R = 1200 mm', `late = ${ENDLESS}`]);
    const refused = await failureOf(issueRevision(owner, notebook, asking(1, { faults: 1 })));
    expect(refused.code).toBe('not-settled');
    expect(refused.message).toContain('late = ');
    expect(refused.extra.retryAfter).toBeGreaterThan(0);
    expect(await listRevisions(owner, notebook)).toEqual([]);
  });

  it('leaves a line in the activity record that names no person', async () => {
    const { owner, notebook } = await newScene();
    await issueRevision(owner, notebook, asking());
    const lines = (await database()('activity').where({ notebook_id: notebook })) as {
      deed: string;
      actor_id: string;
      details: string;
    }[];
    expect(lines).toMatchObject([{ deed: 'revision.issued', actor_id: owner.id }]);
    expect(JSON.parse(lines[0]?.details ?? '')).toMatchObject({ letter: 'A', version: 1 });
    expect(JSON.stringify(lines)).not.toMatch(/Owain|@/);
  });
});

describe('checks', () => {
  it('may be named without being demanded, but only such as were made', async () => {
    const { owner, editor, notebook } = await newScene();
    const unmade = await failureOf(
      issueRevision(owner, notebook, asking(1, { checkedBy: editor.id })),
    );
    expect(unmade.code).toBe('invalid');
    await checkVersion(owner, notebook, 1, { remark: 'Mine own' });
    await issueRevision(owner, notebook, asking(1, { checkedBy: owner.id }));
    expect((await readRevision(owner, notebook, 'A')).revision.checkedBy).toBe('Owain');
  });

  it('are demanded of somebody other than the author where the workshop says so, and it is said who could', async () => {
    const { owner, editor, viewer, notebook } = await newScene(undefined, {
      issuing: { checkNeeded: true },
    });
    await checkVersion(owner, notebook, 1, {});
    const refused = await failureOf(issueRevision(owner, notebook, asking()));
    expect(refused.code).toBe('check-needed');
    expect(refused.message).toContain('Edda could');
    expect(refused.message).not.toContain(viewer.name);
    const own = await failureOf(issueRevision(owner, notebook, asking(1, { checkedBy: owner.id })));
    expect(own.code).toBe('check-needed');
    expect(await prospectOfIssue(owner, notebook, 1)).toMatchObject({
      checkNeeded: true,
      hindrance: refused.message,
    });
    await checkVersion(editor, notebook, 1, {});
    expect(await prospectOfIssue(owner, notebook, 1)).toMatchObject({ hindrance: null });
    await issueRevision(owner, notebook, asking());
    expect((await readRevision(owner, notebook, 'A')).revision.checkedBy).toBe('Edda');
  });

  it('of one version say nothing of another', async () => {
    const scene = await newScene(undefined, { issuing: { checkNeeded: true } });
    const { owner, editor, notebook } = scene;
    await checkVersion(editor, notebook, 1, {});
    await addVersion(scene, 2, owner, contentOf('R = 1150 mm'));
    expect((await failureOf(issueRevision(owner, notebook, asking(2)))).code).toBe('check-needed');
  });

  it('are made once by a person, and not by a viewer', async () => {
    const { editor, viewer, stranger, notebook } = await newScene();
    expect(await checkVersion(editor, notebook, 1, { remark: 'All chords.' })).toMatchObject({
      person: { name: 'Edda' },
      remark: 'All chords.',
    });
    expect((await failureOf(checkVersion(editor, notebook, 1, {}))).code).toBe('already-added');
    expect((await failureOf(checkVersion(viewer, notebook, 1, {}))).code).toBe('forbidden');
    expect((await failureOf(checkVersion(stranger, notebook, 1, {}))).code).toBe('not-found');
  });
});

describe('an issued revision', () => {
  let scene: Scene;
  beforeAll(async () => {
    scene = await newScene();
    await issueRevision(scene.owner, scene.notebook, asking());
  });

  it('is neither changed nor deleted, whoever asks the database', async () => {
    const row = () => database()('revisions').where({ notebook_id: scene.notebook, ordinal: 1 });
    const before: unknown = await row().first();
    /** SQLSTATE 45000, which the triggers signal. */
    const refused = { errno: 1644 };
    for (const column of ['purpose', 'note', 'letter', 'results', 'checked_by_name']) {
      await expect(row().update({ [column]: '{}' })).rejects.toMatchObject(refused);
    }
    await expect(row().delete()).rejects.toMatchObject(refused);
    await expect(database()('revisions').delete()).rejects.toMatchObject(refused);
    expect(await row().first()).toEqual(before);
  });

  it('is equal to what the engine says today', async () => {
    const again = await reevaluateRevision(scene.owner, scene.notebook, 'A');
    expect(again).toMatchObject({ letter: 'A', lines: 2, differences: [] });
    expect(again.engineNow).toBe(again.engineThen);
  });

  it('tells line by line where the engine says something else', async () => {
    const db = database();
    const frozen = await findRevision(db, scene.notebook, 1);
    if (frozen === null) throw new Error('There is a revision A.');
    const altered = JSON.parse(
      JSON.stringify(frozen.results)
        .replaceAll('1697.05627485', '1697.05627486')
        .replaceAll('"value":"1697"', '"value":"1696.5"'),
    ) as unknown;
    await insertRevision(db, {
      ...frozen,
      ordinal: 2,
      letter: 'B',
      issuedBy: scene.owner,
      checkedBy: null,
      engine: '0.0.1-old',
      results: altered,
    });
    const again = await reevaluateRevision(scene.owner, scene.notebook, 'B');
    expect(again.engineThen).toBe('0.0.1-old');
    expect(again.engineNow).not.toBe('0.0.1-old');
    expect(again.differences).toMatchObject([
      {
        cell: 'c2',
        line: 1,
        mark: 's',
        field: 'decimal',
        frozen: '1697.05627486 mm',
        now: '1697.05627485 mm',
      },
      {
        cell: 'c2',
        line: 1,
        mark: 's',
        field: 'cut size',
        frozen: '1696.5 mm, down',
        now: '1697 mm, down',
      },
    ]);
  });

  it.each(['B1', 'a', '', 'AAAAA', '../A', 'ZZ'])('named “%s” is not found', async (letter) => {
    const { owner, notebook } = scene;
    expect((await failureOf(readRevision(owner, notebook, letter))).code).toBe('not-found');
  });
});

describe('a key', () => {
  it('reads revisions with the scope for it, while its maker has a role, and nothing else', async () => {
    const { owner, viewer, stranger, notebook } = await newScene();
    await issueRevision(owner, notebook, asking());
    const keyOf = (person: typeof owner, scopes: ('evaluate' | 'revisions')[]) => ({
      keyId: 'k',
      person,
      scopes,
    });
    for (const person of [owner, viewer]) {
      const key = keyOf(person, ['revisions']);
      expect(await listRevisions(key, notebook)).toHaveLength(1);
      expect((await readRevision(key, notebook, 'A')).revision.letter).toBe('A');
      expect((await failureOf(listRevisions(keyOf(person, ['evaluate']), notebook))).code).toBe(
        'not-found',
      );
    }
    expect((await failureOf(listRevisions(keyOf(stranger, ['revisions']), notebook))).code).toBe(
      'not-found',
    );
    await database()('notebook_roles')
      .where({ notebook_id: notebook, user_id: viewer.id })
      .delete();
    expect((await failureOf(listRevisions(keyOf(viewer, ['revisions']), notebook))).code).toBe(
      'not-found',
    );
  });
});
