import { describe, expect, it } from 'vitest';
import { digestsOf, mergeAnswer } from '@/components/sheet/state/merge-answer';
import { foldAnswer } from '@/components/sheet/state/shown';
import type { CellAnswer } from '@/components/sheet/state/shown';
import { evaluateCells } from '@/lib/language/index';

const answer = (id: string, source: string, digest?: string): CellAnswer => {
  const [cell] = evaluateCells([{ id, source }]);
  return { id, results: cell?.results ?? [], ...(digest === undefined ? {} : { digest }) };
};

describe('an answer of which only the changed cells are sent', () => {
  const had = [answer('a', '1', 'one'), answer('b', '2', 'two'), answer('c', '3', 'three')];

  it('is whole again, in the order of what was asked, without cells that are gone', () => {
    const sent = [answer('b', '4', 'four'), answer('d', '5', 'five')];
    const merged = mergeAnswer([{ id: 'd' }, { id: 'c' }, { id: 'b' }], had, sent);
    expect(merged).toEqual([sent[1], had[2], sent[0]]);
  });

  it('leaves the cells that were not sent the very objects that they were, and so what is shown of them', () => {
    const before = foldAnswer(new Map(), had);
    const merged = mergeAnswer(had, had, [answer('b', '4', 'four')]);
    const after = foldAnswer(before, merged);
    expect(merged[0]).toBe(had[0]);
    expect(after.get('a')).toBe(before.get('a'));
    expect(after.get('b')).not.toBe(before.get('b'));
  });

  it('is asked for by the digests of what is had; a cell without one is sent again', () => {
    expect(digestsOf([...had, answer('e', '6')])).toEqual({ a: 'one', b: 'two', c: 'three' });
  });
});
