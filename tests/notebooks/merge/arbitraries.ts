import fc from 'fast-check';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { settingsField } from '@/lib/notebooks/content-values';

/** Few different lines, so that equal ones, clashes and near misses are common. */
const line = fc.oneof(
  fc
    .tuple(fc.constantFrom('R', 's', 'n'), fc.nat(4))
    .map(([mark, size]) => `${mark} = ${1200 + size} mm`),
  fc.constantFrom('', 'R/2', 'R == s', '# Ring', 'sqrt(2) + sqrt(3)'),
);
export const source = fc.array(line, { maxLength: 6 }).map((lines) => lines.join('\n'));

const own = fc.record(
  { digits: fc.constantFrom(8, 12), step: fc.constantFrom(null, '1 mm', '0.5 mm') },
  { requiredKeys: [] },
);
const settings = fc.record({
  digits: fc.constantFrom(12, 30),
  unit: fc.constantFrom('mm' as const, 'in' as const),
  step: fc.constantFrom(null, '0.5 mm'),
  rounding: fc.constantFrom('half-even' as const, 'up' as const),
});

const cellWith = (id: string) =>
  fc
    .record({ kind: fc.constantFrom('dimension', 'dimension', 'note', 'section'), source, own })
    .map(({ kind, source: text, own: set }): NotebookCell => {
      if (kind === 'section') return { id, kind, source: text.split('\n')[0] ?? '' };
      if (kind === 'note') return { id, kind, source: text };
      return { id, kind: 'dimension', source: text, ...settingsField(set) };
    });

const IDS = ['a', 'b', 'c', 'd', 'e', 'f'];

/** A content of some of few cells, in any order. */
export const anyContent: fc.Arbitrary<NotebookContent> = fc
  .tuple(settings, fc.shuffledSubarray(IDS))
  .chain(([set, ids]) =>
    fc
      .tuple(...ids.map(cellWith))
      .map((cells): NotebookContent => ({ format: 1, settings: set, cells })),
  );

/** One edit as a person makes it; ids of new cells are the side's own. */
const edit = (side: string): fc.Arbitrary<(content: NotebookContent) => NotebookContent> =>
  fc.oneof(
    fc.tuple(fc.nat(9), fc.nat(9), line).map(
      ([at, row, text]) =>
        (content: NotebookContent) =>
          rewrite(content, at, (lines) =>
            lines.length === 0 ? [text] : lines.with(row % lines.length, text),
          ),
    ),
    fc.tuple(fc.nat(9), fc.nat(9), line).map(
      ([at, row, text]) =>
        (content: NotebookContent) =>
          rewrite(content, at, (lines) => lines.toSpliced(row % (lines.length + 1), 0, text)),
    ),
    fc.tuple(fc.nat(9), fc.nat(9)).map(
      ([at, row]) =>
        (content: NotebookContent) =>
          rewrite(content, at, (lines) =>
            lines.length === 0 ? lines : lines.toSpliced(row % lines.length, 1),
          ),
    ),
    fc.nat(9).map((at) => (content: NotebookContent) => ({
      ...content,
      cells: content.cells.filter((_, place) => place !== at % content.cells.length),
    })),
    fc
      .tuple(fc.nat(9), fc.nat(3), source)
      .map(([at, number, text]) => (content: NotebookContent) => {
        const id = `${side}${number}`;
        if (content.cells.some((cell) => cell.id === id)) return content;
        const place = at % (content.cells.length + 1);
        const cell: NotebookCell = { id, kind: 'dimension', source: text };
        return { ...content, cells: content.cells.toSpliced(place, 0, cell) };
      }),
    fc.tuple(fc.nat(9), fc.nat(9)).map(([from, to]) => (content: NotebookContent) => {
      const cell = content.cells[from % content.cells.length];
      if (!cell) return content;
      const others = content.cells.filter((one) => one !== cell);
      return { ...content, cells: others.toSpliced(to % (others.length + 1), 0, cell) };
    }),
    settings.map((set) => (content: NotebookContent) => ({
      ...content,
      settings: { ...content.settings, unit: set.unit },
    })),
  );

function rewrite(content: NotebookContent, at: number, make: (lines: string[]) => string[]) {
  const place = at % content.cells.length;
  const cell = content.cells[place];
  if (!cell) return content;
  const lines = make(cell.source === '' ? [] : cell.source.split('\n'));
  const text = cell.kind === 'section' ? (lines[0] ?? '') : lines.join('\n');
  return { ...content, cells: content.cells.with(place, { ...cell, source: text }) };
}

/** A base and what two people made of it. */
export const threeContents = anyContent.chain((base) =>
  fc
    .tuple(fc.array(edit('m'), { maxLength: 6 }), fc.array(edit('t'), { maxLength: 6 }))
    .map(([mine, theirs]) => ({
      base,
      mine: mine.reduce((content, made) => made(content), base),
      theirs: theirs.reduce((content, made) => made(content), base),
    })),
);
