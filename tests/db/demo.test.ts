import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { listNotebooksOf } from '@/db/queries/notebooks';
import { insertSession, listSessionsOf } from '@/db/queries/sessions';
import { findRevision, listRevisions } from '@/db/queries/revisions';
import { findUserByEmail } from '@/db/queries/users';
import { findVersion, listVersions } from '@/db/queries/versions';
import { DEMO_PASSWORD, seedDemo, withdrawDemo } from '@/db/seeds/demo';
import { verifyPassword } from '@/lib/accounts/passwords';
import { evaluateCells, type Result } from '@/lib/language';
import { readByToken } from '@/lib/notebooks';
import { compareResults } from '@/lib/notebooks/compare-results';
import { NotebookContent } from '@/lib/notebooks/content';
import { tokenOf } from '@/lib/notebooks/link-tokens';

afterAll(closeDatabase);

const people = ['ida', 'tam', 'wren'].map((name) => `${name}@ferrowick.example`);

/** The newest content of a demo notebook, as the database holds it. */
async function storedContent(title: string): Promise<NotebookContent> {
  const owner = await findUserByEmail(database(), 'ida@ferrowick.example');
  const entries = await listNotebooksOf(database(), owner?.id ?? '', { archived: false });
  const entry = entries.find((line) => line.title === title);
  const version = await findVersion(database(), entry?.id ?? '', entry?.head ?? 0);
  return NotebookContent.parse(version?.content);
}

async function evaluated(title: string): Promise<Result[]> {
  const { cells, settings } = await storedContent(title);
  const dimensions = cells.filter(({ kind }) => kind === 'dimension');
  return evaluateCells(dimensions, settings).flatMap(({ results }) => results);
}

/**
 * Twelve significant digits, from 60-digit arithmetic on the values' radical forms, each compared
 * with its sine or cosine to 50 digits, apart from this engine. Lines without a mark stand under
 * their source.
 */
const checks: Record<string, Record<string, string>> = {
  'Seventeen-light window': {
    p: '551.248553450',
    c: '0.932472229404',
    f: '245.624276725',
    k2: '1083.72499856',
    k3: '1579.29648863',
    k4: '2021.08693094',
    k5: '2394.05168184',
    k6: '2685.48987407',
    k7: '2885.47692952',
    k8: '2987.20252889',
    v_in: '749.440772113',
    v_out: '878.065486872',
    round_trip: '9371.22540865',
  },
  'Fifteen-fold paved court': {
    a1: '623.735072453',
    a2: '1247.47014491',
    a3: '1871.20521736',
    a4: '2494.94028981',
    h4: '131.114395597',
    '15 a4': '37424.1043472',
    s7: '390.495365206',
    q: '390.512483795',
    rule: '389.711431703',
  },
  'Decagonal lantern stair': {
    side: '1483.28157300',
    a: '2282.53563911',
    middle: '479.808325630',
    end: '501.736623685',
    going: '261.321158169',
    pace: '607.987824836',
    rake: '1571.79013383',
  },
};

describe.each(Object.entries(checks))('%s', (title, values) => {
  test('its figures are the ones computed outside, and none is an error', async () => {
    const results = await evaluated(title);
    const found = new Map<string, string>();
    for (const result of results) {
      expect(result).not.toMatchObject({ kind: 'error' });
      if (result.kind === 'number') found.set(result.mark ?? result.source, result.decimal.re);
    }
    expect(Object.fromEntries(found)).toMatchObject(values);
  });

  test('every statement to decide is true', async () => {
    const decided = (await evaluated(title)).filter((result) => result.kind === 'truth');
    expect(decided.length).toBeGreaterThan(0);
    expect(decided.filter(({ truth }) => !truth.value)).toEqual([]);
  });

  test('every figure is reached by straightedge and compass, but for the true side of the seven-part inlay', async () => {
    const numbers = (await evaluated(title)).filter((result) => result.kind === 'number');
    const beyond = numbers.filter(({ reach }) => reach.straightedgeAndCompass !== true);
    expect(beyond.map(({ mark }) => mark)).toEqual(
      title === 'Fifteen-fold paved court' ? ['s7'] : [],
    );
  });
});

test('the window says which way its pitch was cut, and that seventeen of them fall short', async () => {
  const results = await evaluated('Seventeen-light window');
  const lineOf = (mark: string) => results.find((result) => result.mark === mark);
  expect(lineOf('p')).toMatchObject({ cut: { value: '551', step: '0.5 mm', direction: 'down' } });
  expect(lineOf('short')).toMatchObject({ decimal: { re: '4.22540864509' }, degree: 16 });
});

describe('the revisions of the demo', () => {
  test('are A and B of each notebook, checked, with the results of this very engine', async () => {
    const owner = await findUserByEmail(database(), 'ida@ferrowick.example');
    const entries = await listNotebooksOf(database(), owner?.id ?? '', { archived: false });
    const demo = entries.filter(({ title }) => title in checks);
    for (const { id } of demo) {
      const revisions = await listRevisions(database(), id);
      expect(revisions.map(({ letter }) => letter)).toEqual(['B', 'A']);
      expect(revisions[0]?.purpose).toBe('for manufacture');
      for (const { ordinal, checkedBy, version } of revisions) {
        expect(checkedBy).not.toBeNull();
        const frozen = await findRevision(database(), id, ordinal);
        const content = await findVersion(database(), id, version);
        const { cells, settings } = NotebookContent.parse(content?.content);
        const now = evaluateCells(
          cells.filter(({ kind }) => kind === 'dimension'),
          settings,
        );
        expect(compareResults(frozen?.results as typeof now, now)).toEqual([]);
        expect(frozen?.titleBlock).toMatchObject({ legalOwner: 'Ferrowick Yard' });
      }
    }
  });

  test('are read through the link that the start prints', async () => {
    const link: { id: string } = await database()('client_links')
      .where({ label: 'Olvane Hall Trustees' })
      .first('id');
    const view = await readByToken(tokenOf(link.id), undefined);
    expect(view).toMatchObject({
      kind: 'revision',
      open: { revision: { letter: 'B' }, titleBlock: { title: 'Seventeen-light window' } },
    });
  });
});

describe('putting the demo in', () => {
  test('a second time changes nothing', async () => {
    const counts = async () =>
      Promise.all(
        [
          'users',
          'workshops',
          'notebooks',
          'versions',
          'client_links',
          'revisions',
          'version_checks',
        ].map((table) => database()(table).count({ n: '*' }).first()),
      );
    const before = await counts();
    expect(await seedDemo(database())).not.toHaveProperty('linkToken');
    expect(await counts()).toEqual(before);
  });

  test('each notebook has several versions, by more than one person', async () => {
    const owner = await findUserByEmail(database(), 'ida@ferrowick.example');
    const entries = await listNotebooksOf(database(), owner?.id ?? '', { archived: false });
    const demo = entries.filter(({ title }) => title in checks);
    expect(demo).toHaveLength(3);
    for (const { id } of demo) {
      const versions = await listVersions(database(), id);
      expect(versions.length).toBeGreaterThanOrEqual(2);
      expect(new Set(versions.map(({ author }) => author.id)).size).toBeGreaterThanOrEqual(2);
    }
  });

  test('where it is not wanted the published password is taken away and sessions end', async () => {
    const stateOf = async (email: string) => {
      const user = await findUserByEmail(database(), email);
      const opens = await verifyPassword(user?.passwordHash ?? null, DEMO_PASSWORD);
      return { opens, sessions: (await listSessionsOf(database(), user?.id ?? '')).length };
    };
    for (const email of people) {
      const user = await findUserByEmail(database(), email);
      await insertSession(database(), { userId: user?.id ?? '', device: 'Some browser' });
    }
    const before = await Promise.all(people.map(stateOf));
    expect(before.map(({ opens }) => opens)).toEqual([true, true, true]);
    expect(before.every(({ sessions }) => sessions > 0)).toBe(true);
    await withdrawDemo(database());
    const after = await Promise.all(people.map(stateOf));
    expect(after).toEqual(people.map(() => ({ opens: false, sessions: 0 })));
    await seedDemo(database());
    const again = await Promise.all(people.map(stateOf));
    expect(again.map(({ opens }) => opens)).toEqual([true, true, true]);
  });
});
