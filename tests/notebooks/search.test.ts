import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { makeAllSearchable } from '@/db/seeds/searchable';
import type { Person } from '@/lib/accounts';
import {
  SearchRequest,
  changeNotebook,
  restoreVersion,
  saveVersion,
  search,
} from '@/lib/notebooks';
import { contentWith, give, newNotebook, newPerson, newWorkshop } from './support/shelf';

afterAll(closeDatabase);

let person: Person;
let workshop: string;

const find = (q: string, who = person, more: object = {}) =>
  search(who, SearchRequest.parse({ q, ...more }));
const titlesFor = async (q: string, who = person, more: object = {}) =>
  (await find(q, who, more)).hits.map(({ title }) => title);
const make = (title: string, ...cells: string[]) => newNotebook(person, workshop, title, ...cells);

beforeAll(async () => {
  person = await newPerson();
  workshop = await newWorkshop(person);
  await make('Oriel', 'R = 1200 mm\ns = R sqrt(2 - sqrt(2)) # side of the octagon');
  await make(
    'Staircase',
    'note: The string is housed, the winders are *kerfed*.',
    'going = 240 mm',
  );
  await make('Façade à Étretat', 'note: Größe der Öffnung', 'α = turn/17\nR_out = 3 m');
  await make(
    'Quatrefoil',
    'section: Mullions',
    'rise = 300 mm',
    "note: the mason's templet, 5' long",
  );
});

describe('what is found', () => {
  it.each([
    ['a word of a title', 'staircase', ['Staircase']],
    ['a word of a note', 'kerfed', ['Staircase']],
    ['a heading', 'mullions', ['Quatrefoil']],
    ['a remark beside a dimension', 'octagon', ['Oriel']],
    ['a figure of a source', '1200', ['Oriel']],
    ['the beginning of a word', 'mull', ['Quatrefoil']],
    ['words in any order, in title and text together', 'kerfed staircase', ['Staircase']],
    ['capital letters alike', 'OCTAGON', ['Oriel']],
    ['words without their accents', 'facade etretat', ['Façade à Étretat']],
    ['accents where the text has none', 'wínders', ['Staircase']],
    ['a German word', 'öffnung', ['Façade à Étretat']],
    ['a word beside an apostrophe', 'mason', ['Quatrefoil']],
    ['a word with an apostrophe', "mason's", ['Quatrefoil']],
    ['a common word beside a longer one', 'the templet', ['Quatrefoil']],
    ['nothing where one word is missing', 'kerfed octagon', []],
    ['nothing in the middle of a word', 'ctagon', []],
  ])('%s: %s', async (_, q, titles) => {
    expect(await titlesFor(q)).toEqual(titles);
  });

  it('is a mark of one letter as it is written, before a longer one that begins so', async () => {
    expect(await titlesFor('R')).toEqual(['Oriel', 'Façade à Étretat']);
    expect(await titlesFor('R_out')).toEqual(['Façade à Étretat']);
    // `r` begins `rise`, and is another mark than R.
    expect(await titlesFor('r')).toEqual(['Quatrefoil']);
    const { hits } = await find('R');
    expect(hits[0]?.marks).toEqual([{ cell: 'c1', line: 1, mark: 'R', definition: 'R = 1200 mm' }]);
  });

  it('is a Greek mark', async () => {
    const { hits } = await find('α');
    expect(hits.map(({ title }) => title)).toEqual(['Façade à Étretat']);
    expect(hits[0]?.marks).toMatchObject([{ mark: 'α', definition: 'α = turn/17' }]);
  });

  it('shows the cell and the words that were found in it', async () => {
    const [hit] = (await find('kerfed string')).hits;
    expect(hit?.snippet?.cell).toBe('c1');
    expect(hit?.snippet?.pieces.filter(({ found }) => found).map(({ text }) => text)).toEqual([
      'string',
      'kerfed',
    ]);
    expect(hit?.snippet?.pieces.map(({ text }) => text).join('')).toBe(
      'The string is housed, the winders are *kerfed*.',
    );
  });
});

describe('bad input', () => {
  it.each([
    ['nothing', ''],
    ['blanks', '   '],
    ['operators alone', '+-*"()@~<>'],
    ['an open quotation', '"unclosed'],
    ['a distance operator', '"rose window" @8'],
    ['a stray bracket', ')))(('],
    ['wild cards of LIKE', '%_\\'],
    ['a regular expression', '.*[a-'],
    ['a NUL', 'a\0b'],
    ['half of a character', '\ud800'],
    ['a very long word', 'x'.repeat(200)],
    ['SQL', "'; drop table notebooks; --"],
  ])('%s finds nothing and breaks nothing', async (_, q) => {
    expect(await titlesFor(q)).toEqual([]);
  });

  it('signs that mean something to the database fall away around a word', async () => {
    for (const q of [
      '+octagon',
      '-octagon',
      '"octagon"',
      'octagon*',
      '~octagon',
      '(octagon',
      '@octagon',
    ])
      expect(await titlesFor(q), q).toEqual(['Oriel']);
  });

  it('common words by themselves are looked for in titles', async () => {
    expect(await titlesFor('the')).toEqual([]);
    await make('The long wall', 'w = 1 m');
    expect(await titlesFor('the')).toEqual(['The long wall']);
    expect(await titlesFor('à')).toEqual(['Façade à Étretat']);
  });

  it('a query that is too long, given twice or with an unknown field is refused', () => {
    expect(SearchRequest.safeParse({ q: 'x'.repeat(201) }).success).toBe(false);
    expect(SearchRequest.safeParse({ q: ['a', 'b'] }).success).toBe(false);
    expect(SearchRequest.safeParse({ q: 'a', role: 'owner' }).success).toBe(false);
  });

  it.each(['x', 'W10', Buffer.from('[9,0,"x"]').toString('base64url')])(
    'a place that no page gave is refused: %s',
    async (after) => {
      await expect(find('octagon', person, { after })).rejects.toMatchObject({ code: 'invalid' });
    },
  );
});

describe('rights', () => {
  it('nothing of a notebook without a role is found, not by an admin of its workshop either', async () => {
    const other = await newPerson('Somebody Else');
    const theirs = await newWorkshop(other, 'Their yard', person);
    const id = await newNotebook(other, theirs, 'Secret nave', 'Zeta = 1 m # hidden clerestory');
    for (const q of ['Secret', 'clerestory', 'Zeta', 'Z'])
      expect(await find(q), q).toEqual({ hits: [], next: null });
    await give(id, person, 'viewer');
    for (const q of ['Secret', 'clerestory', 'Zeta', 'Z'])
      expect(await titlesFor(q), q).toEqual(['Secret nave']);
    await database()('notebook_roles').where({ notebook_id: id, user_id: person.id }).delete();
    expect(await titlesFor('Zeta')).toEqual([]);
  });

  it('archived notebooks are found only when they are asked for', async () => {
    const id = await make('Lychgate', 'ridge = 2 m');
    await changeNotebook(person, id, { archived: true });
    expect(await titlesFor('ridge')).toEqual([]);
    expect(await titlesFor('ridge', person, { archived: '1' })).toEqual(['Lychgate']);
    await changeNotebook(person, id, { archived: false });
    expect(await titlesFor('ridge')).toEqual(['Lychgate']);
  });
});

describe('the newest version alone is found', () => {
  it('after a save, a restore and a new title', async () => {
    const id = await make('Baptistery', 'lantern = 2 m');
    await saveVersion(person, id, {
      base: 1,
      content: contentWith('squinch = 2 m\nlantern2 = 1 m'),
    });
    expect(await titlesFor('squinch')).toEqual(['Baptistery']);
    expect((await find('lantern')).hits[0]?.marks.map(({ mark }) => mark)).toEqual(['lantern2']);
    await restoreVersion(person, id, 1, { base: 2 });
    expect(await titlesFor('squinch')).toEqual([]);
    expect((await find('lantern')).hits[0]?.marks.map(({ mark }) => mark)).toEqual(['lantern']);
    await changeNotebook(person, id, { title: 'Campanile' });
    expect(await titlesFor('baptistery')).toEqual([]);
    expect(await titlesFor('campanile')).toEqual(['Campanile']);
  });

  it('notebooks of before there was a search are filled in at the next start', async () => {
    const id = await make('Undercroft', 'pier = 600 mm');
    await database()('notebook_search').where({ notebook_id: id }).delete();
    await database()('notebook_marks').where({ notebook_id: id }).delete();
    expect(await titlesFor('pier')).toEqual([]);
    await makeAllSearchable(database());
    expect(await titlesFor('pier')).toEqual(['Undercroft']);
    expect(await titlesFor('undercroft')).toEqual(['Undercroft']);
  });
});

describe('many notebooks', () => {
  const COUNT = 2_000;
  let rich: Person;

  beforeAll(async () => {
    rich = await newPerson('Rich');
    const yard = await newWorkshop(rich);
    const db = database();
    const ids = Array.from(
      { length: COUNT },
      (_, k) => `00000000-0000-4000-8000-${String(k).padStart(12, '0')}`,
    );
    const rows = <T extends object>(row: (id: string, k: number) => T) => ids.map(row);
    // Put in directly: what is tested is the finding.
    await db.batchInsert(
      'notebooks',
      rows((id, k) => ({
        id,
        workshop_id: yard,
        title: `Bay ${k}`,
        head: 1,
        changed_at: new Date(1e12 + (k % 7) * 1000),
      })),
      500,
    );
    await db.batchInsert(
      'notebook_roles',
      rows((id) => ({ notebook_id: id, user_id: rich.id, role: 'owner' })),
      500,
    );
    await db.batchInsert(
      'notebook_search',
      rows((id, k) => ({
        notebook_id: id,
        version: 1,
        title: `Bay ${k}`,
        body: `H = ${k} mm # springing`,
        cells: 'c1',
      })),
      500,
    );
    await db.batchInsert(
      'notebook_marks',
      rows((id, k) => ({
        notebook_id: id,
        cell_id: 'c1',
        line: 1,
        mark: 'H',
        definition: `H = ${k} mm`,
      })),
      500,
    );
  });

  it.each(['springing', 'H', 'bay'])('are given a page at a time, each once: %s', async (q) => {
    const seen: string[] = [];
    let after: string | null = null;
    for (let page = 0; page < 5; page += 1) {
      const answer: Awaited<ReturnType<typeof find>> = await find(
        q,
        rich,
        after === null ? {} : { after },
      );
      expect(answer.hits).toHaveLength(20);
      seen.push(...answer.hits.map(({ id }) => id));
      after = answer.next;
      expect(after).not.toBeNull();
    }
    expect(new Set(seen).size).toBe(100);
  });

  it('every one of them is reached, and the last page says that it is the last', async () => {
    const seen = new Set<string>();
    let after: string | null = null;
    do {
      const answer: Awaited<ReturnType<typeof find>> = await find(
        'bay 19',
        rich,
        after === null ? {} : { after },
      );
      for (const { id } of answer.hits) seen.add(id);
      after = answer.next;
    } while (after !== null);
    // 19, 190 to 199, 1900 to 1999.
    expect(seen.size).toBe(111);
  });
});
