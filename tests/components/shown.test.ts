import { describe, expect, it } from 'vitest';
import { foldAnswer, type Shown } from '@/components/sheet/state/shown';
import { errorResult, numberResult } from './sample-results';

const good = numberResult();
const bad = { ...errorResult(1, 'R = 500 mm +', 12, 12), mark: 'R' };
const fold = (shown: Shown, ...results: Parameters<typeof foldAnswer>[1][number]['results']) =>
  foldAnswer(shown, [{ id: 'a', results }]);

describe('a new answer', () => {
  it('keeps the very lines of a cell whose results are the same', () => {
    const first = fold(new Map(), good);
    expect(fold(first, structuredClone(good)).get('a')).toBe(first.get('a'));
    expect(fold(first, numberResult({ degree: 2 })).get('a')).not.toBe(first.get('a'));
  });

  it('remembers what a line last said while it fails, and forgets it once it is well', () => {
    const failing = fold(fold(new Map(), good), bad);
    expect(failing.get('a')?.[0]).toEqual({ result: bad, before: good });
    const stillFailing = fold(failing, { ...bad, source: 'R = 500 mm + 2 *' });
    expect(stillFailing.get('a')?.[0]?.before).toEqual(good);
    expect(fold(stillFailing, good).get('a')?.[0]?.before).toBeNull();
  });

  it('finds the line again by its mark when lines were added above it', () => {
    const failing = fold(fold(new Map(), good), numberResult({ mark: 'S' }), { ...bad, line: 2 });
    expect(failing.get('a')?.[1]?.before).toEqual(good);
  });

  it('never gives one line the value of another', () => {
    const failing = fold(
      fold(new Map(), good, numberResult({ mark: 'S' })),
      errorResult(1, 'x', 0, 1),
    );
    expect(failing.get('a')?.[0]?.before).toBeNull();
  });

  it('lets go of cells that are gone', () => {
    expect(foldAnswer(fold(new Map(), good), []).size).toBe(0);
  });
});
