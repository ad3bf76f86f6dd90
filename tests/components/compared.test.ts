import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareVersions, subtractDecimals } from '@/components/versions/compared';
import { markedPieces } from '@/components/versions/marked-source';
import { contentOf, dimension, note } from './sample';
import { numberResult } from './sample-results';

const result = (mark: string, text: string, cut: string) =>
  numberResult({
    mark,
    source: `${mark} = ${text}`,
    exact: { text, tex: text, staged: false },
    cut: { value: cut, step: '1 mm', rounding: 'half-even', direction: 'exact' },
  });

describe('two versions side by side', () => {
  const before = {
    content: contentOf(dimension('a', 'R = 600'), dimension('b', 's = R/2'), note('c', 'Ring')),
    answers: [
      { id: 'a', results: [result('R', '600', '600')] },
      { id: 'b', results: [result('s', '300', '300')] },
    ],
  };
  const after = {
    content: contentOf(
      dimension('a', 'R = 500'),
      dimension('b', 's = R/2'),
      dimension('d', 't = 1'),
    ),
    answers: [
      { id: 'a', results: [result('R', '500', '500')] },
      { id: 'b', results: [result('s', '250', '250.5')] },
    ],
  };
  const cells = compareVersions(before, after);

  it('tell what was changed, what follows from it, what came and what went at its place', () => {
    expect(cells.map(({ id, state }) => [id, state])).toEqual([
      ['a', 'changed'],
      ['b', 'follows'],
      ['c', 'gone'],
      ['d', 'added'],
    ]);
  });

  it('state by how much a cut size differs', () => {
    expect(cells.map(({ lines }) => lines.map(({ difference }) => difference))).toEqual([
      ['cut 100 mm less'],
      ['cut 49.5 mm less'],
      [],
      [],
    ]);
  });

  it('have no differing cell where they are one and the same', () => {
    expect(compareVersions(after, after).every(({ state }) => state === 'same')).toBe(true);
  });
});

describe('the difference of two decimals', () => {
  it('is exact', () => {
    fc.assert(
      fc.property(
        fc.bigInt(-(10n ** 30n), 10n ** 30n),
        fc.bigInt(-(10n ** 30n), 10n ** 30n),
        (a, b) => {
          expect(subtractDecimals(`${a}`, `${b}`)).toBe(`${a - b}`);
        },
      ),
    );
    expect(subtractDecimals('0.1', '0.3')).toBe('-0.2');
    expect(subtractDecimals('-0.05', '0.2')).toBe('-0.25');
    expect(subtractDecimals('12.50', '2.5')).toBe('10');
  });

  it.each(['1/3', '', '1e3', '0x1', ' 1', '1.'])('is none for %s, which is no decimal', (text) => {
    expect(subtractDecimals(text, '1')).toBeNull();
  });
});

describe('the marked words', () => {
  it('are all of the text, in order, and only what the other has not', () => {
    fc.assert(
      fc.property(fc.string(), fc.string(), (one, other) => {
        expect(
          markedPieces(one, other)
            .map(({ text }) => text)
            .join(''),
        ).toBe(one);
        expect(markedPieces(one, one).every(({ differs }) => !differs)).toBe(true);
      }),
    );
    expect(markedPieces('R = 1200 mm', 'R = 1150 mm')).toEqual([
      { text: 'R = ', differs: false },
      { text: '1200', differs: true },
      { text: ' mm', differs: false },
    ]);
  });
});
