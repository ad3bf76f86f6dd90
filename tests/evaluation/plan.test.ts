import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { planCells } from '@/lib/evaluation/plan';
import type { Settings } from '@/lib/language/index';

type Cells = { source: string; settings?: Partial<Settings> }[];

/** The names of the outcomes of all lines, in order of the page. */
function names(cells: Cells, settings: Partial<Settings> = {}, program = 'p') {
  const asked = cells.map((cell, index) => ({ id: String(index), ...cell }));
  return planCells(program, asked, settings).lines.map((line) => line?.outcome);
}
const ofSources = (...sources: string[]) => names(sources.map((source) => ({ source })));

describe('names of outcomes', () => {
  it('are the same for the same text that reads the same, wherever it stands', () => {
    const [, chord] = ofSources('R = 2 mm', '2 R');
    const moved = ofSources('# first\n\n1 + 1\n2 R', 'x = 3\nR = 2 mm');
    expect(moved[1]).toBe(chord);
    expect(chord).toMatch(/^[0-9a-f]{64}$/);
  });

  it('change with the program, the settings, the text, and anything read at any remove', () => {
    const cells = [{ source: 'a = 1' }, { source: 'b = a + 1' }, { source: 'b + 1' }];
    const last = (...of: Parameters<typeof names>) => names(...of)[2];
    const all = [
      last(cells),
      last(cells, {}, 'q'),
      last(cells, { digits: 31 }),
      last([{ source: 'a = 2' }, ...cells.slice(1)]),
      last([...cells.slice(0, 2), { source: 'b + 2' }]),
      last([...cells.slice(0, 2), { source: 'b + 1', settings: { unit: 'in' } }]),
    ];
    expect(new Set(all).size).toBe(all.length);
  });

  it('do not change with the settings of a cell that is read: a value has none', () => {
    const plain = names([{ source: 'a = 1' }, { source: 'a + 1' }]);
    const own = names([{ source: 'a = 1', settings: { digits: 5 } }, { source: 'a + 1' }]);
    expect(own[0]).not.toBe(plain[0]);
    expect(own[1]).toBe(plain[1]);
  });

  it('settings that say what holds anyway make no difference', () => {
    const own = names([{ source: '1', settings: { unit: 'mm', digits: 30 } }]);
    expect(own).toEqual(names([{ source: '1' }]));
  });

  it('a mark without a value is the same whatever the reason, and not the same as one with a value', () => {
    const [, unknown] = ofSources('1', 'a + 1');
    const [, , twice] = ofSources('a = 1', 'a = 1', 'a + 1');
    const [, circle] = ofSources('a = a', 'a + 1');
    const [, valued] = ofSources('a = 1', 'a + 1');
    expect(twice).toBe(unknown);
    expect(circle).toBe(unknown);
    expect(valued).not.toBe(unknown);
  });

  it('change with what a function reads that is called, and with a name that becomes a function', () => {
    const call = (...sources: string[]) => ofSources(...sources).at(-1);
    const all = [
      call('b = 1', 'f(x) = x + b', 'f(2)'),
      call('b = 2', 'f(x) = x + b', 'f(2)'),
      call('b = 1', 'f(x) = x + 2 b', 'f(2)'),
      call('b = 1', 'f = b', 'f(2)'),
      call('f(x) = ', 'f(2)'),
      call('f(2)'),
    ];
    expect(new Set(all).size).toBe(all.length);
  });

  it('lines that no arithmetic is needed for have none', () => {
    expect(ofSources('a = ', 'b = 1', 'b = 2', 'c = c')).toEqual([
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
  });
});

describe('a plan', () => {
  /** So few that one text comes up with other reads, as a function and with other settings. */
  const source = fc.constantFrom(
    'a = 1',
    'a = 2',
    'b = a + 1',
    'b = a(2)',
    'a(t) = t + c',
    'c = 3',
    'c = b + 1',
    'a + b\nb < c',
    'a(2) + c',
    'x where x = a(c)',
    '# remark',
    'a +',
  );
  const settings = fc.constantFrom({}, { digits: 5 }, { unit: 'in' as const });
  const notebook = fc.array(fc.record({ source, settings }), { maxLength: 8 });
  const withIds = (cells: Cells) => cells.map((cell, index) => ({ id: String(index), ...cell }));

  it('is the same whatever was planned before', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(notebook, { minLength: 2, maxLength: 12 }), async (notebooks) => {
        const plans = notebooks.map((cells) => planCells('p', withIds(cells), {}));
        vi.resetModules();
        const fresh = await import('@/lib/evaluation/plan');
        // From the last to the first, so that each was planned after others than here.
        for (const [index, cells] of [...notebooks.entries()].reverse())
          expect(plans[index]).toEqual(fresh.planCells('p', withIds(cells), {}));
      }),
      { numRuns: 25 },
    );
  }, 120_000);
});
