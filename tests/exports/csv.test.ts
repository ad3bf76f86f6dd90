import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { maximumError } from '@/lib/exports/error-bound';
import { writeNotebookCsv } from '@/lib/exports';
import { evaluateCells } from '@/lib/language/index';
import { evaluated, SAMPLE } from './sample';

/** Reads RFC 4180, quotes and all. */
function readCsv(text: string): string[][] {
  const rows = text.match(/(?:"(?:[^"]|"")*"|[^"\r])*\r\n/g) ?? [];
  return rows.map((row) =>
    [...row.slice(0, -2).matchAll(/(?:^|,)(?:"((?:[^"]|"")*)"|([^,]*))/g)].map(
      ([, quoted, plain]) => quoted?.replaceAll('""', '"') ?? plain ?? '',
    ),
  );
}

const csvOf = (...lines: string[]) => {
  const notebook = {
    ...SAMPLE,
    cells: [{ id: 'a', kind: 'dimension', source: lines.join('\n') }] as const,
  };
  return readCsv(writeNotebookCsv(notebook, evaluated(notebook)));
};

describe('marks as CSV', () => {
  it('have a head and one row for each mark, every row with as many fields', () => {
    const rows = readCsv(writeNotebookCsv(SAMPLE, evaluated(SAMPLE)));
    const [head, ...marks] = rows;
    expect(new Set(rows.map((row) => row.length))).toEqual(new Set([head?.length]));
    expect(marks.map(([id]) => id)).toEqual([
      'R',
      'pitch',
      'alpha',
      'alpha_1',
      'q',
      'R_1',
      'z',
      'big',
      'long',
      'w',
    ]);
  });

  it('say quantity, exact value, decimal, unit, cut size and how far it can be off', () => {
    expect(csvOf('R = 1200 mm', 's = R sqrt(2)').slice(1)).toEqual([
      ['R', 'length', '1200', '1200', 'mm', '1200', '0.5 mm', '0', '3', ''],
      // 1200·√2 = 1697.0562748477140585…, from memory of √2 to 19 places.
      [
        's',
        'length',
        '1200*sqrt(2)',
        '1697.05627484771405856202646905',
        'mm',
        '1697',
        '0.5 mm',
        '0.0563',
        '3',
        '',
      ],
    ]);
  });

  it('have a row for each number of a figure and of a list', () => {
    const rows = csvOf('P = point(1 mm, 2 mm)', 'l = [1 mm, 2 mm]').slice(1);
    expect(rows.map(([id]) => id)).toEqual(['P: x', 'P: y', 'l[1]', 'l[2]']);
  });

  it('tell of a mark that has a fault instead of leaving it out', () => {
    expect(csvOf('q = 1/0')[1]?.slice(0, 2)).toEqual(['q', 'fault: division-by-zero']);
  });
});

describe('the maximum error', () => {
  const lengths = fc.record({
    a: fc.integer({ min: 1, max: 99_999 }),
    b: fc.integer({ min: 2, max: 400 }),
    digits: fc.integer({ min: 3, max: 40 }),
    step: fc.constantFrom('0.5 mm', '0.1 mm', '1/64 in', '5 mm'),
    rounding: fc.constantFrom('half-even', 'half-up', 'up', 'down' as const),
  });

  it('is never less than the distance from the written size to the exact one', () => {
    fc.assert(
      fc.property(lengths, ({ a, b, digits, step, rounding }) => {
        const settings = { digits, unit: 'mm', step, rounding } as const;
        const [cell] = evaluateCells([{ id: 'a', source: `x = ${a}/7 mm sqrt(${b})` }], settings);
        const [line] = cell?.results ?? [];
        if (line?.kind !== 'number' || line.cut === undefined)
          throw new Error('A length has a cut.');
        for (const [size, bound] of [
          [line.cut.value, maximumError(line.decimal, line.cut)],
          [line.decimal.re, maximumError(line.decimal, undefined)],
        ]) {
          const source = `abs(${a}/7 mm sqrt(${b}) - ${plain(size ?? '')} mm) <= ${bound} mm`;
          const [decided] = evaluateCells([{ id: 'a', source }], settings);
          expect([source, decided?.results[0]]).toMatchObject([source, { truth: { value: true } }]);
        }
      }),
      { numRuns: 60 },
    );
  });

  it('is 0 exactly where the written size is the value itself', () => {
    const decimal = { re: '1200.5', im: null, digits: 12, terminates: true };
    const cut = {
      value: '1200.5',
      step: '0.5 mm',
      rounding: 'half-even',
      direction: 'exact',
    } as const;
    expect(maximumError(decimal, cut)).toBe('0');
    expect(maximumError(decimal, undefined)).toBe('0');
  });
});

/** A decimal with a power of ten, as the cell language reads it. */
const plain = (text: string) =>
  text.replace(/e([+-]?\d+)$/, (_, power: string) => `*10^(${power})`);
