import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NotebookContent, canonicalContent, emptyContent } from '@/lib/notebooks/content';
import { CONTENT_LIMITS } from '@/lib/notebooks/content-values';
import { SavableContent } from '@/lib/notebooks/savable';

const cell = fc.record({
  id: fc.stringMatching(/^[A-Za-z0-9_-]{1,20}$/),
  kind: fc.constantFrom('dimension' as const, 'note' as const),
  source: fc.string({ unit: 'grapheme', maxLength: 60 }),
});
const section = cell.map((made) => ({
  ...made,
  kind: 'section' as const,
  source: made.source.replace(/[\r\n]/g, ' '),
}));
const tailored = fc.record({
  id: cell.map(({ id }) => id),
  kind: fc.constant('dimension' as const),
  source: fc.string({ maxLength: 20 }),
  settings: fc
    .record(
      {
        digits: fc.integer({ min: 1, max: CONTENT_LIMITS.digits }),
        unit: fc.constantFrom('mm' as const, 'in' as const),
        step: fc.constantFrom(null, '1 mm'),
        rounding: fc.constantFrom('up' as const, 'down' as const),
      },
      { requiredKeys: [] },
    )
    .filter((settings) => Object.keys(settings).length > 0),
});
const content = fc.record({
  format: fc.constant(1 as const),
  settings: fc.record({
    digits: fc.integer({ min: 1, max: CONTENT_LIMITS.digits }),
    unit: fc.constantFrom('mm' as const, 'cm' as const, 'm' as const, 'in' as const, 'ft' as const),
    step: fc.constantFrom(null, '0.5 mm', '1/64 in'),
    rounding: fc.constantFrom('half-even' as const, 'half-up' as const, 'up' as const),
  }),
  cells: fc.uniqueArray(fc.oneof(cell, section, tailored), {
    selector: ({ id }) => id,
    maxLength: 6,
  }),
});

const messagesOf = (sent: unknown): string[] => {
  const read = NotebookContent.safeParse(sent);
  return read.success ? [] : read.error.issues.map(({ message }) => message);
};

describe('content', () => {
  it('comes out as it went in', () => {
    fc.assert(
      fc.property(content, (made) => {
        expect(NotebookContent.parse(JSON.parse(JSON.stringify(made)))).toEqual(made);
      }),
    );
  });

  it('has one spelling, whatever the order of its fields', () => {
    const reversed = (value: object) => Object.fromEntries(Object.entries(value).reverse());
    fc.assert(
      fc.property(content, (made) => {
        const other = NotebookContent.parse({
          ...reversed(made),
          settings: reversed(made.settings),
          cells: made.cells.map(reversed),
        });
        expect(JSON.stringify(canonicalContent(other))).toBe(
          JSON.stringify(canonicalContent(made)),
        );
        expect(canonicalContent(made)).toEqual(made);
      }),
    );
  });

  it('of before sections and settings of cells has the spelling, and so the hash, that it had', () => {
    const old = {
      format: 1 as const,
      settings: { digits: 12, unit: 'mm' as const, step: null, rounding: 'up' as const },
      cells: [{ id: 'a', kind: 'note' as const, source: 'x' }],
    };
    expect(JSON.stringify(canonicalContent(NotebookContent.parse(old)))).toBe(
      '{"format":1,"settings":{"digits":12,"unit":"mm","step":null,"rounding":"up"},' +
        '"cells":[{"id":"a","kind":"note","source":"x"}]}',
    );
  });

  it('has the same spelling whether a cell sets nothing or has no settings', () => {
    const bare = { id: 'a', kind: 'dimension' as const, source: 'x' };
    const spell = (made: object) =>
      JSON.stringify(canonicalContent({ ...emptyContent(), cells: [{ ...bare, ...made }] }));
    expect(spell({ settings: {} })).toBe(spell({}));
    expect(spell({ settings: { step: null } })).not.toBe(spell({}));
  });

  it('may be savable only with cutting steps that can be read, its own and those of its cells', () => {
    const withStep = (step: string) => ({
      ...emptyContent(),
      cells: [{ id: 'a', kind: 'dimension', source: 'x', settings: { step } }],
    });
    expect(SavableContent.safeParse(withStep('1/64 in')).success).toBe(true);
    expect(
      SavableContent.safeParse(withStep('half')).error?.issues.map(({ path }) => path),
    ).toEqual([['cells', 0, 'settings', 'step']]);
  });

  it('is valid when empty', () => {
    expect(messagesOf(emptyContent())).toEqual([]);
  });

  it('at its limits is valid, and one above them is refused with the limit and the amount', () => {
    const { cells, source, total } = CONTENT_LIMITS;
    const withCells = (sources: string[]) => ({
      ...emptyContent(),
      cells: sources.map((text, index) => ({ id: `c${index}`, kind: 'note', source: text })),
    });
    const full = Array<string>(total / source).fill('x'.repeat(source));
    expect(messagesOf(withCells(full))).toEqual([]);
    expect(messagesOf(withCells([...full, 'x']))).toEqual([
      `The sources of all cells together are ${total + 1} characters long; at most ${total} are allowed.`,
    ]);
    expect(messagesOf(withCells(Array<string>(cells).fill('')))).toEqual([]);
    expect(messagesOf(withCells(Array<string>(cells + 1).fill('')))).toEqual([
      `The notebook has ${cells + 1} cells; at most ${cells} are allowed.`,
    ]);
    expect(messagesOf(withCells(['x'.repeat(source + 1)]))).toEqual([
      `The source of a cell is ${source + 1} characters long; at most ${source} are allowed.`,
    ]);
  });

  it.each([
    ['two cells of one id', { cells: [1, 2].map(() => ({ id: 'a', kind: 'note', source: '' })) }],
    ['half of a character', { cells: [{ id: 'a', kind: 'note', source: 'x \ud83d y' }] }],
    ['an id with a blank', { cells: [{ id: 'a b', kind: 'note', source: '' }] }],
    ['a kind nobody knows', { cells: [{ id: 'a', kind: 'figure', source: '' }] }],
    ['a heading of two lines', { cells: [{ id: 'a', kind: 'section', source: 'x\ny' }] }],
    ['too long a heading', { cells: [{ id: 'a', kind: 'section', source: 'x'.repeat(201) }] }],
    [
      'a note with settings',
      { cells: [{ id: 'a', kind: 'note', source: '', settings: { digits: 3 } }] },
    ],
    [
      'a cell with a foreign unit',
      { cells: [{ id: 'a', kind: 'dimension', source: '', settings: { unit: 'ell' } }] },
    ],
    ['a field nobody knows', { drawing: [] }],
    ['another format', { format: 2 }],
    ['no digits', { settings: { ...emptyContent().settings, digits: 0 } }],
    ['half a digit', { settings: { ...emptyContent().settings, digits: 0.5 } }],
    ['an empty step', { settings: { ...emptyContent().settings, step: ' ' } }],
  ])('with %s is refused', (_what, wrong) => {
    expect(messagesOf({ ...emptyContent(), ...wrong })).toHaveLength(1);
  });
});
