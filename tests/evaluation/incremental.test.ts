import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  type CellAnswer,
  type EvaluateRequest,
  closePool,
  evaluate,
  forgetOutcomes,
} from '@/lib/evaluation/index';
import { ensureBundles } from '@/lib/evaluation/bundles.mjs';
import { type Settings, evaluateCells } from '@/lib/language/index';

beforeAll(async () => {
  await ensureBundles();
});
afterAll(closePool);

type Cell = NonNullable<EvaluateRequest['cells']>[number];
type Edit =
  | { kind: 'source'; at: number; source: string }
  | { kind: 'insert'; at: number; source: string }
  | { kind: 'settings'; at: number; settings: Partial<Settings> }
  | { kind: 'delete'; at: number }
  | { kind: 'to the end'; at: number }
  /** Another instance, or this one after a long time: only the children still know something. */
  | { kind: 'forget' };

/** So few that duplicates, cycles and unknown marks come up often. */
const mark = fc.constantFrom('a', 'b', 'c', 'd', 'e', 'f', 'g', 'h');
const number = fc.constantFrom('0', '1', '2', '3', '5', '6', '7/4', '0.5');
const part = fc.oneof(mark, mark, number);
const expression = fc.oneof(
  number,
  part,
  fc.tuple(part, fc.constantFrom('+', '-', '*', '/'), part).map((parts) => parts.join(' ')),
  fc.tuple(part, mark).map(([x, y]) => `sqrt(${x}^2 + 2 ${y})`),
  fc.tuple(number, number).map(([x, y]) => `sqrt(${x} + sqrt(${y}))`),
  fc.tuple(part, fc.constantFrom(5, 7, 8, 12)).map(([x, n]) => `${x} * cos(turn/${n})`),
  fc.tuple(mark, number).map(([x, y]) => `cbrt(${y}) + ${x}`),
  fc.tuple(number, number).map(([x, y]) => `${x} mm + ${y} in`),
  fc.tuple(mark, mark).map(([x, y]) => `chord(${x}, turn/10) ${y}`),
  fc
    .tuple(mark, mark)
    .map(([x, y]) => `meet(line(point(0, 0), point(1, ${x})), circle(point(${y}, 1), 2))`),
  fc.tuple(mark, mark).map(([x, y]) => `dist(point(${x}, 1), point(2, ${y}))`),
  fc.tuple(mark, part).map(([f, x]) => `${f}(${x}) + 1`),
  fc.tuple(mark, mark).map(([x, y]) => `[${x}, ${y}, 1] + x where x = ${y}`),
  fc.constantFrom('point(a, b)', 'a + point(1, 1)', '2 pi a', 'turn/9', 'a +', ')', 'i a'),
);
const line = fc.oneof(
  { weight: 6, arbitrary: fc.tuple(mark, expression).map(([name, what]) => `${name} = ${what}`) },
  {
    weight: 1,
    arbitrary: fc.tuple(mark, part, part).map(([f, x, y]) => `${f}(t) = ${x} t + ${y}`),
  },
  { weight: 2, arbitrary: expression },
  { weight: 1, arbitrary: fc.tuple(part, part).map(([x, y]) => `${x} <= ${y}`) },
  { weight: 1, arbitrary: fc.constantFrom('', '# remark') },
);
const source = fc.array(line, { minLength: 1, maxLength: 3 }).map((lines) => lines.join('\n'));
const settings: fc.Arbitrary<Partial<Settings>> = fc.constantFrom(
  {},
  { digits: 5 },
  { unit: 'in' },
  { step: '0.5 mm' },
  { step: '1 mm', rounding: 'up' },
  { unit: 'in', step: '1/16 in' },
);
const cell = fc.record({ source, settings });
const at = fc.nat({ max: 7 });
const edit: fc.Arbitrary<Edit> = fc.oneof(
  {
    weight: 5,
    arbitrary: fc.record({
      kind: fc.constantFrom('source' as const, 'insert' as const),
      at,
      source,
    }),
  },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('settings'), at, settings }) },
  {
    weight: 2,
    arbitrary: fc.record({ kind: fc.constantFrom('delete' as const, 'to the end' as const), at }),
  },
  { weight: 1, arbitrary: fc.constant({ kind: 'forget' } as const) },
);

let ids = 0;
function change(cells: readonly Cell[], edit: Edit): Cell[] {
  if (edit.kind === 'forget') {
    forgetOutcomes();
    return [...cells];
  }
  const place = Math.min(edit.at, Math.max(0, cells.length - 1));
  if (edit.kind === 'insert') {
    ids += 1;
    return cells.toSpliced(place, 0, { id: `new ${ids}`, source: edit.source });
  }
  const old = cells[place];
  if (old === undefined) return [];
  if (edit.kind === 'settings') return cells.with(place, { ...old, settings: edit.settings });
  if (edit.kind === 'delete') return cells.toSpliced(place, 1);
  if (edit.kind === 'to the end') return [...cells.toSpliced(place, 1), old];
  return cells.with(place, { ...old, source: edit.source });
}

/** What a client shows that keeps what it has and takes in what is sent. */
class Client {
  private readonly cells = new Map<string, CellAnswer>();

  async show(cells: readonly Cell[]): Promise<{ shown: CellAnswer[]; sent: number }> {
    const have = Object.fromEntries(
      [...this.cells.values()].map(({ id, digest = '' }) => [id, digest]),
    );
    const answer = await evaluate({ cells: [...cells], settings: BASE, have });
    for (const one of answer.cells ?? []) this.cells.set(one.id, one);
    const shown = cells.map(({ id }) => this.cells.get(id) ?? { id, results: [] });
    return { shown, sent: answer.cells?.length ?? 0 };
  }
}

const BASE = { digits: 12, step: '0.1 mm' } as const;
const asText = (cells: readonly CellAnswer[] | undefined): string[] =>
  (cells ?? []).map(({ id, results }) => JSON.stringify([id, results]));

describe('an answer to an edited notebook', () => {
  it('is, byte for byte, what a full evaluation says, and so is what a client puts together from parts', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(cell, { minLength: 1, maxLength: 8 }),
        fc.array(edit, { minLength: 1, maxLength: 5 }),
        async (first, edits) => {
          let cells: Cell[] = first.map((one, index) => ({ id: `c${index}`, ...one }));
          const client = new Client();
          for (const next of [{ kind: 'forget' } as const, ...edits]) {
            cells = change(cells, next);
            const full = asText(evaluateCells(cells, BASE));
            expect(asText((await evaluate({ cells, settings: BASE })).cells)).toEqual(full);
            expect(asText((await client.show(cells)).shown)).toEqual(full);
          }
        },
      ),
      { numRuns: 60 },
    );
  }, 240_000);

  it('of one mark brings only the cells that read it, at any remove', async () => {
    const sources = ['R = 1', 'S = 2', 'x = R + S', 'y = x^2', 'z = S^2', 'y < z', 'R'];
    const cells = sources.map((source, index) => ({ id: String(index), source }));
    const client = new Client();
    expect((await client.show(cells)).sent).toBe(cells.length);
    expect((await client.show(cells)).sent).toBe(0);
    const edited = cells.with(0, { id: '0', source: 'R = 1 + 1/3' });
    expect((await client.show(edited)).sent).toBe(5);
  });

  it('brings a cell again whose message names another place now, although nothing else of it changed', async () => {
    const cells = [
      { id: 'a', source: 'a = 1/0' },
      { id: 'b', source: 'a + 1' },
    ];
    const client = new Client();
    await client.show(cells);
    const { shown, sent } = await client.show(cells.with(0, { id: 'a', source: '# why\na = 1/0' }));
    expect(sent).toBe(2);
    expect(shown[1]?.results).toMatchObject([
      { error: { code: 'depends-on-error', message: expect.stringContaining('line 2') as string } },
    ]);
  });

  it('of a large notebook is the same from several children as from one evaluation', async () => {
    const lines = Array.from({ length: 150 }, (_, k) =>
      k % 3 === 0 ? `m${k} = sqrt(${k + 2}) mm` : `m${k} = ${k} m${k - 1} / ${k + 1} + 1 mm`,
    );
    const cells = lines.map((source, index) => ({ id: String(index), source })).reverse();
    forgetOutcomes();
    const answer = await evaluate({ cells, settings: BASE });
    expect(asText(answer.cells)).toEqual(asText(evaluateCells(cells, BASE)));
  });
});
