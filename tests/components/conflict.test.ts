import { describe, expect, it } from 'vitest';
import { bringTogether, findDifferences, type Side } from '@/components/sheet/state/conflict';
import {
  dropDraft,
  findDraft,
  keepDraft,
  takeUpDraft,
  type DraftPlace,
} from '@/components/sheet/state/draft';
import { contentOf, dimension, memoryStore, note } from './sample';

const base = contentOf(dimension('a', 'R = 1'), dimension('b', 'R/2'), note('c', 'Ring'));

describe('two texts that began from one version', () => {
  const mine = contentOf(
    dimension('a', 'R = 2'),
    dimension('b', 'R/2'),
    dimension('m', 'new of mine'),
  );
  const theirs = contentOf(
    dimension('a', 'R = 3'),
    dimension('t', 'new of theirs'),
    dimension('b', 'R/4'),
    note('c', 'Ring'),
  );
  const texts = { base, mine, theirs };
  const differences = findDifferences(texts);

  it('differ cell by cell, and it is known who changed what', () => {
    expect(Object.fromEntries(differences.map((d) => [d.id, [d.changed, d.proposed]]))).toEqual({
      a: ['both', 'mine'],
      b: ['theirs', 'theirs'],
      m: ['mine', 'mine'],
      t: ['theirs', 'theirs'],
      c: ['mine', 'mine'],
    });
  });

  it('come together as proposed: each change stands, a clash goes to mine', () => {
    const together = bringTogether(texts, new Map(differences.map((d) => [d.id, d.proposed])));
    expect(together.cells.map(({ id, source }) => [id, source])).toEqual([
      ['a', 'R = 2'],
      ['t', 'new of theirs'],
      ['b', 'R/4'],
      ['m', 'new of mine'],
    ]);
  });

  it('give mine or theirs exactly when every choice says so', () => {
    const all = (side: Side) => new Map(differences.map((d) => [d.id, side] as const));
    expect(bringTogether(texts, all('mine')).cells).toEqual(mine.cells);
    const taken = bringTogether(texts, all('theirs')).cells;
    expect(new Set(taken)).toEqual(new Set(theirs.cells));
  });

  it('keep the settings of the side that changed them', () => {
    const inches = { ...theirs, settings: { ...theirs.settings, unit: 'in' as const } };
    expect(bringTogether({ base, mine, theirs: inches }, new Map()).settings.unit).toBe('in');
    const feet = { ...mine, settings: { ...mine.settings, unit: 'ft' as const } };
    expect(bringTogether({ base, mine: feet, theirs: inches }, new Map()).settings.unit).toBe('ft');
  });

  it('show no difference where both made the same change', () => {
    expect(findDifferences({ base, mine, theirs: mine })).toEqual([]);
  });
});

describe('the draft in this browser', () => {
  const draft = {
    base: 4,
    from: base,
    content: contentOf(note('n', 'kept')),
    at: '2026-01-02T03:04:05Z',
  };

  const one: DraftPlace = { notebook: 'one', shelf: 'typing', tab: 'a' };
  const later = { ...draft, content: contentOf(note('n', 'later')), at: '2026-01-03T03:04:05Z' };

  it('of a tab that is open is never taken by another, nor overwritten or dropped by it', () => {
    const store = memoryStore();
    keepDraft(store, one, draft);
    expect(takeUpDraft(store, 'one', 'b', new Set(['a', 'b']))).toBeNull();
    keepDraft(store, { ...one, tab: 'b' }, later);
    dropDraft(store, { ...one, tab: 'b' });
    expect(findDraft(store, one)).toEqual(draft);
  });

  it('of a closed tab is taken up, the latest first, and one after the other none is lost', () => {
    const store = memoryStore();
    keepDraft(store, one, draft);
    keepDraft(store, { ...one, tab: 'b' }, later);
    keepDraft(store, { ...one, notebook: 'one-more' }, draft);
    expect(takeUpDraft(store, 'one', 'c', new Set(['c']))).toEqual(later);
    expect(takeUpDraft(store, 'one', 'c', new Set(['c']))).toEqual(later);
    dropDraft(store, { ...one, tab: 'c' });
    expect(takeUpDraft(store, 'one', 'd', new Set(['d']))).toEqual(draft);
    dropDraft(store, { ...one, tab: 'd' });
    expect(takeUpDraft(store, 'one', 'e', new Set(['e']))).toBeNull();
  });

  it('of before tabs had names is taken up as well', () => {
    const store = memoryStore();
    keepDraft(store, { ...one, tab: '' }, draft);
    expect(takeUpDraft(store, 'one', 'a', new Set(['a']))).toEqual(draft);
  });

  it('comes back as it was kept, on its own shelf and for its own notebook', () => {
    const store = memoryStore();
    expect(keepDraft(store, one, draft)).toBe(true);
    expect(findDraft(store, one)).toEqual(draft);
    expect(findDraft(store, { ...one, notebook: 'two' })).toBeNull();
    expect(findDraft(store, { ...one, shelf: 'aside' })).toBeNull();
    expect(findDraft(store, { ...one, tab: 'b' })).toBeNull();
    dropDraft(store, one);
    expect(findDraft(store, one)).toBeNull();
  });

  it('says so when the browser has no room, and does not throw', () => {
    expect(keepDraft(memoryStore(true), one, draft)).toBe(false);
  });

  it.each(['{', '{"form":1}', '{"form":2,"base":1}', 'null', '[]'])(
    'is no draft when the store holds %s',
    (text) => {
      const store = memoryStore();
      store.setItem('surdwork:typing:one', text);
      expect(findDraft(store, { ...one, tab: '' })).toBeNull();
    },
  );
});
