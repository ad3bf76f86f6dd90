import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyChange, newCellId, type Change } from '@/components/sheet/state/changes';
import { beginHistory, historyReducer, type History } from '@/components/sheet/state/history';
import { mergeContents, sameContent } from '@/lib/notebooks/merge';
import { contentOf, dimension, note } from './sample';

const start = contentOf(dimension('a', 'R = 1200 mm'), note('b', '# Ring'), dimension('c', 'R/2'));
const ids = ['a', 'b', 'c', 'd', 'e'];

const anyChange: fc.Arbitrary<Change> = fc.oneof(
  fc.record({
    kind: fc.constant('write' as const),
    id: fc.constantFrom(...ids),
    source: fc.string(),
  }),
  fc.record({
    kind: fc.constant('insert' as const),
    cells: fc.uniqueArray(
      fc.constantFrom(...ids).map((id) => dimension(id, 'x')),
      {
        selector: ({ id }) => id,
        maxLength: 3,
      },
    ),
    at: fc.nat(4),
  }),
  fc.record({ kind: fc.constant('delete' as const), ids: fc.subarray(ids) }),
  fc.record({
    kind: fc.constant('move' as const),
    ids: fc.subarray(ids, { maxLength: 2 }),
    at: fc.nat(5),
  }),
  fc.record({
    kind: fc.constant('set-cell' as const),
    id: fc.constantFrom(...ids),
    settings: fc.record(
      { digits: fc.integer({ min: 1, max: 50 }), step: fc.constantFrom(null, '1 mm') },
      { requiredKeys: [] },
    ),
  }),
  fc.record({
    kind: fc.constant('set' as const),
    settings: fc.record({ digits: fc.integer({ min: 1, max: 50 }) }),
  }),
);

/** Each change a long pause after the one before, so each is a step of its own. */
const play = (changes: Change[], pause = 10_000): History =>
  changes.reduce(
    (history, change, index) =>
      historyReducer(history, { kind: 'change', change, at: index * pause }),
    beginHistory(start),
  );
const times = (history: History, kind: 'undo' | 'redo', count: number) =>
  Array.from({ length: count }).reduce<History>((h) => historyReducer(h, { kind }), history);

describe('the history of a notebook', () => {
  it('goes all the way back and all the way forward again, whatever was done', () => {
    fc.assert(
      fc.property(fc.array(anyChange, { maxLength: 30 }), (changes) => {
        const end = play(changes);
        const back = times(end, 'undo', end.past.length);
        expect(sameContent(back.present, start)).toBe(true);
        const forward = times(back, 'redo', end.past.length);
        expect(forward.present).toEqual(end.present);
      }),
    );
  });

  it('never has two cells with one id', () => {
    fc.assert(
      fc.property(fc.array(anyChange, { maxLength: 30 }), (changes) => {
        const { cells } = play(changes).present;
        expect(new Set(cells.map((cell) => cell.id)).size).toBe(cells.length);
      }),
    );
  });

  it('takes a burst of typing in one cell back in one step, and a pause divides it', () => {
    const write = (source: string): Change => ({ kind: 'write', id: 'a', source });
    const burst = play([write('R'), write('R='), write('R=1')], 100);
    expect(burst.past).toHaveLength(1);
    expect(times(burst, 'undo', 1).present).toBe(start);
    expect(play([write('R'), write('R=')], 5000).past).toHaveLength(2);
  });

  it('takes a joined or broken line back by itself, however fast it was typed', () => {
    const write = (source: string): Change => ({ kind: 'write', id: 'a', source });
    const typed = play([write('R'), write('R = 1'), write('R = 1\n'), write('R = 1\ns')], 10);
    expect(typed.past.map(({ content }) => content.cells[0]?.source)).toEqual([
      'R = 1200 mm',
      'R = 1',
    ]);
  });

  it('does not join typing in two cells', () => {
    const changes: Change[] = [
      { kind: 'write', id: 'a', source: '1' },
      { kind: 'write', id: 'c', source: '2' },
      { kind: 'write', id: 'a', source: '3' },
    ];
    expect(play(changes, 10).past).toHaveLength(3);
  });

  it('brings a deleted cell back at its place', () => {
    const gone = play([{ kind: 'delete', ids: ['b'] }]);
    expect(gone.present.cells.map((cell) => cell.id)).toEqual(['a', 'c']);
    expect(times(gone, 'undo', 1).present.cells.map((cell) => cell.id)).toEqual(['a', 'b', 'c']);
  });

  it('says how many cells the last step took away, and no longer once another is done', () => {
    const gone = play([{ kind: 'delete', ids: ['a', 'b'] }]);
    expect(gone.removed).toBe(2);
    expect(times(gone, 'undo', 1).removed).toBe(0);
    const more = { kind: 'write', id: 'c', source: 'R/4' } as const;
    expect(historyReducer(gone, { kind: 'change', change: more, at: 1e6 }).removed).toBe(0);
  });

  it('forgets what was undone once something new is done', () => {
    const undone = times(play([{ kind: 'delete', ids: ['b'] }]), 'undo', 1);
    const anew = historyReducer(undone, {
      kind: 'change',
      change: { kind: 'write', id: 'a', source: 'R = 1' },
      at: 0,
    });
    expect(anew.future).toEqual([]);
  });

  it('takes in what others made beneath every step, so that undo takes back one’s own alone', () => {
    const cells = start.cells.map((cell) => (cell.id === 'c' ? { ...cell, source: 'R/8' } : cell));
    const theirs = { ...start, cells: [...cells, dimension('t', 'new of theirs')] };
    const own = play([
      { kind: 'write', id: 'a', source: 'R = 1' },
      { kind: 'delete', ids: ['b'] },
    ]);
    const taken = historyReducer(own, { kind: 'shift', from: start, to: theirs });
    expect(taken.past).toHaveLength(2);
    expect(taken.present).toEqual(mergeContents(start, own.present, theirs).content);
    expect(times(taken, 'undo', 2).present).toEqual(theirs);
    const again = times(times(taken, 'undo', 2), 'redo', 2);
    expect(again.present).toEqual(taken.present);
  });

  it('goes on with a burst of typing over what came in meanwhile', () => {
    const write = (source: string): Change => ({ kind: 'write', id: 'a', source });
    const theirs = { ...start, cells: [...start.cells, dimension('t', '1')] };
    const first = historyReducer(beginHistory(start), {
      kind: 'change',
      change: write('R'),
      at: 0,
    });
    const between = historyReducer(first, { kind: 'shift', from: start, to: theirs });
    const last = historyReducer(between, { kind: 'change', change: write('R ='), at: 100 });
    expect(last.past).toHaveLength(1);
    expect(times(last, 'undo', 1).present).toEqual(theirs);
  });

  it('forgets steps that lie behind hundreds of newer versions, and is right about the others', () => {
    let history = play([{ kind: 'write', id: 'a', source: 'first' }]);
    let head = start;
    for (let version = 0; version < 250; version += 1) {
      const next = {
        ...head,
        cells: head.cells.map((cell) =>
          cell.id === 'c' ? { ...cell, source: `R/${version}` } : cell,
        ),
      };
      history = historyReducer(history, { kind: 'shift', from: head, to: next });
      head = next;
      if (version !== 150) continue;
      const change: Change = { kind: 'write', id: 'a', source: 'second' };
      history = historyReducer(history, { kind: 'change', change, at: 1e6 });
    }
    expect(history.past).toHaveLength(1);
    const { cells } = times(history, 'undo', 1).present;
    expect(cells.map(({ source }) => source)).toEqual(['first', '# Ring', 'R/249']);
  });

  it('is untouched by a change that changes nothing', () => {
    const history = beginHistory(start);
    for (const change of [
      { kind: 'write', id: 'a', source: 'R = 1200 mm' },
      { kind: 'write', id: 'nowhere', source: 'x' },
      { kind: 'move', ids: ['a'], at: 0 },
      { kind: 'move', ids: ['b', 'c'], at: 2 },
      { kind: 'set-cell', id: 'a', settings: {} },
      { kind: 'delete', ids: ['nowhere'] },
    ] satisfies Change[]) {
      expect(historyReducer(history, { kind: 'change', change, at: 0 })).toBe(history);
    }
    expect(historyReducer(history, { kind: 'undo' })).toBe(history);
    expect(historyReducer(history, { kind: 'redo' })).toBe(history);
  });
});

describe('a change', () => {
  it('leaves every other cell the same object, so that only one is drawn again', () => {
    const after = applyChange(start, { kind: 'write', id: 'c', source: 'R/3' });
    expect(after.cells[0]).toBe(start.cells[0]);
    expect(after.cells[1]).toBe(start.cells[1]);
    expect(after.cells[2]).not.toBe(start.cells[2]);
  });

  it('moves cells to a place counted before they are taken out', () => {
    const order = (moved: string[], at: number) =>
      applyChange(start, { kind: 'move', ids: moved, at })
        .cells.map(({ id }) => id)
        .join('');
    expect(order(['a'], 2)).toBe('bac');
    expect(order(['a'], 3)).toBe('bca');
    expect(order(['b', 'c'], 0)).toBe('bca');
    expect(order(['c'], 1)).toBe('acb');
  });

  it('gives a cell settings of its own, and takes them away where they set nothing', () => {
    const set = applyChange(start, { kind: 'set-cell', id: 'c', settings: { digits: 3 } });
    expect(set.cells[2]).toEqual({ ...start.cells[2], settings: { digits: 3 } });
    const plain = applyChange(set, { kind: 'set-cell', id: 'c', settings: {} });
    expect(sameContent(plain, start)).toBe(true);
    expect(sameContent(set, start)).toBe(false);
  });

  it('gives new cells ids that the server accepts', () => {
    expect(newCellId()).toMatch(/^[0-9a-f]{24}$/);
    expect(newCellId()).not.toBe(newCellId());
  });
});
