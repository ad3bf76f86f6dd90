import { describe, expect, it } from 'vitest';
import {
  dropDraft,
  findDraft,
  keepDraft,
  takeUpDraft,
  type DraftPlace,
} from '@/components/sheet/state/draft';
import { contentOf, dimension, memoryStore, note } from './sample';

const base = contentOf(dimension('a', 'R = 1'), dimension('b', 'R/2'), note('c', 'Ring'));

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

  it('comes back with what was sent without an answer, and with the questions that were open', () => {
    const store = memoryStore();
    const asked = {
      author: 'Tam',
      number: 5,
      savedAt: '2026-01-02T03:04:05Z',
      conflicts: [{ kind: 'setting', name: 'unit', mine: 'mm', theirs: 'in' } as const],
    };
    keepDraft(store, one, { ...draft, sent: base, asked });
    expect(findDraft(store, one)).toEqual({ ...draft, sent: base, asked });
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
