import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { insertVersion } from '@/db/queries/versions';
import type { Person } from '@/lib/accounts';
import { describeChanges, sayChanges } from '@/lib/notebooks/changes-in-words';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { listHistory, readChanges, saveVersion } from '@/lib/notebooks';
import { contentOf, dimension, newNotebook, newPerson } from './people';

let owner: Person;
let editor: Person;
beforeAll(async () => {
  [owner, editor] = await Promise.all([newPerson('Owain'), newPerson('Edda')]);
});
afterAll(closeDatabase);

const note = (id: string, source: string): NotebookCell => ({ id, kind: 'note', source });
const section = (id: string, source: string): NotebookCell => ({ id, kind: 'section', source });

const base = contentOf(
  section('h', 'Ring'),
  dimension('a', 'R = 1200 mm # outer\nn = 8'),
  dimension('b', 's = R/n\nt = s/2\nR == 2 s'),
  note('c', 'Stones of the ring'),
);
const written = (id: string, source: string): NotebookContent => ({
  ...base,
  cells: base.cells.map((cell) => (cell.id === id ? { ...cell, source } : cell)),
});
const say = (to: NotebookContent, from: NotebookContent = base) =>
  sayChanges(describeChanges(from, to));

describe('a change in words', () => {
  test.each([
    [
      written('a', 'R = 1150 mm # outer\nn = 8'),
      'changed `R` from `1200 mm` to `1150 mm`; 3 values follow',
    ],
    [written('a', 'R = 1200 mm # inner\nn = 8'), 'left everything as it was'],
    [written('b', 's = R/n\nt = s/3\nR == 2 s'), 'changed `t` from `s/2` to `s/3`'],
    [written('b', 's = R/n\nt = s/2\nu = 1\nR == 2 s'), 'added `u`'],
    [written('b', 's = R/n\nv = s/2\nR == 2 s'), 'renamed `t` to `v`'],
    [written('b', 's = R/n\nR == 2 s'), 'took out `t`'],
    [written('b', 's = R/n\nt = s/2\nR == 3 s'), 'changed `R == 2 s` to `R == 3 s`'],
    [written('b', 's = R/n\nt = s/2\nR == 2 s\nR/7\nR/9'), 'added 2 lines'],
    [written('h', 'Arch'), 'renamed the section “Ring” to “Arch”'],
    [written('c', 'Stones'), 'changed a note'],
    [{ ...base, cells: base.cells.toReversed() }, 'moved 3 cells'],
    [{ ...base, cells: base.cells.slice(1) }, 'took out the section “Ring”'],
    [
      { ...base, settings: { ...base.settings, step: '1 mm' } },
      'set the cutting step from none to 1 mm',
    ],
    [base, 'left everything as it was'],
  ])('is said as it was made', (to, words) => {
    expect(say(to)).toBe(words);
  });

  test('names at most three things, the marks first, and counts the rest', () => {
    const to = contentOf(
      dimension('a', 'R = 1 mm\nn = 9'),
      dimension('b', 's = R/n\nt = s/4'),
      note('c', 'Other'),
    );
    expect(say(to)).toBe(
      'changed `R` from `1200 mm` to `1 mm`, changed `n` from `8` to `9`, changed `t` from `s/2` to `s/4` and 3 more; 1 value follows',
    );
  });

  test('counts what follows at any remove, through functions too, and each line once', () => {
    const chain = (first: string) =>
      contentOf(
        dimension('a', first),
        dimension('b', 'b = a + 1\nc = b + a\nd = 7'),
        dimension('f', 'f(x) = a x\ng = f(2)\nc == 3'),
      );
    expect(describeChanges(chain('a = 1'), chain('a = 2')).follow).toBe(5);
  });

  test('cuts a long source, and keeps a backtick from ending the quotation', () => {
    const long = written('a', `R = ${'1 mm + '.repeat(30)}1 mm\nn = 8`);
    expect(say(long)).toMatch(/^changed `R` from `1200 mm` to `(1 mm \+ ){5}1 mm …`; 3/);
    expect(say(written('b', 's = R/n\nt = s/2\nR == 2 s\n`x`'))).toBe('added `′x′`');
  });
});

describe('the history to read', () => {
  test('says of each version what changed, and gathers what one sheet saved by itself', async () => {
    const id = await newNotebook(owner, base, [editor]);
    const noon = Date.UTC(2026, 0, 2, 12);
    const add = (number: number, by: Person, minute: number, byItself: boolean, note_?: string) =>
      database().transaction((trx) =>
        insertVersion(trx, {
          notebookId: id,
          number,
          authorId: by.id,
          content: written('a', `R = ${1200 + number} mm\nn = 8`),
          byItself,
          note: note_ ?? null,
          savedAt: new Date(noon + minute * 60_000),
        }),
      );
    await add(2, editor, 1, true);
    await add(3, editor, 3, true);
    await add(4, editor, 14, true);
    await add(5, editor, 16, true);
    await add(6, owner, 17, true);
    await add(7, owner, 18, false, 'as built');
    const { entries, next } = await listHistory(owner, id);
    expect(entries.map(({ versions }) => versions.map(({ number }) => number))).toEqual([
      [7],
      [6],
      [5],
      [4, 3, 2],
      [1],
    ]);
    expect(entries.map(({ words }) => words)).toEqual([
      'changed `R` from `1206 mm` to `1207 mm`; 3 values follow',
      'changed `R` from `1205 mm` to `1206 mm`; 3 values follow',
      'changed `R` from `1204 mm` to `1205 mm`; 3 values follow',
      'changed `R` from `1200 mm` to `1204 mm`; 3 values follow',
      null,
    ]);
    expect(entries[3]?.versions[1]?.words).toContain('from `1202 mm` to `1203 mm`');
    expect(next).toBeNull();
    expect(await listHistory(owner, id)).toEqual({ entries, next });
    expect((await listHistory(owner, id, { before: 5 })).entries).toHaveLength(2);
  });

  test('of hundreds of versions is read page by page, none twice and none left out', async () => {
    const id = await newNotebook(owner, base);
    for (let number = 2; number <= 60; number += 1) {
      const content = written('c', `Stone ${number}`);
      await saveVersion(owner, id, { base: number - 1, content });
    }
    const seen: number[] = [];
    let before: number | null = 61;
    while (before !== null) {
      const page = await listHistory(owner, id, { before });
      seen.push(...page.entries.flatMap(({ versions }) => versions.map(({ number }) => number)));
      before = page.next;
    }
    expect(seen).toEqual(Array.from({ length: 60 }, (_, at) => 60 - at));
  });

  test('since one looked names the others who saved, and not oneself', async () => {
    const id = await newNotebook(owner, base, [editor]);
    await saveVersion(editor, id, { base: 1, content: written('c', 'Stones') });
    const changes = await readChanges(owner, id, { from: 1, to: 2 });
    expect(changes).toEqual({ from: 1, to: 2, by: ['Edda'], words: 'changed a note' });
    expect((await readChanges(editor, id, { from: 1, to: 2 })).by).toEqual([]);
    await expect(readChanges(owner, id, { from: 1, to: 9 })).rejects.toMatchObject({
      code: 'not-found',
    });
  });
});
