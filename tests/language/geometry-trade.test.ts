import { describe, expect, it } from 'vitest';
import { evaluateCells, evaluateExpression } from '@/lib/language/index';

/** The decimal of the last line of a cell, to so many significant digits. */
function figure(source: string, digits: number): string {
  const [cell] = evaluateCells([{ id: 'a', source }], { digits });
  const result = cell?.results.at(-1);
  if (result?.kind !== 'number') throw new Error(`${source}: ${JSON.stringify(result)}`);
  expect(result.reach.straightedgeAndCompass).toBe(true);
  return result.decimal.re;
}

function holds(source: string): boolean {
  const [cell] = evaluateCells([{ id: 'a', source }]);
  const result = cell?.results.at(-1);
  if (result?.kind !== 'truth') throw new Error(`${source}: ${JSON.stringify(result)}`);
  return result.truth.value;
}

/** Computed once with 60-digit arithmetic from the sines; 12 significant digits. Common practice of setting-out. */
describe('the window of seventeen lights', () => {
  const window = 'O = point(0, 0)\nT = point(0, 1500 mm)\n';

  it.each([
    [1, '551.248553450'],
    [2, '1083.72499856'],
    [3, '1579.29648863'],
    [4, '2021.08693094'],
    [5, '2394.05168184'],
    [6, '2685.48987407'],
    [7, '2885.47692952'],
    [8, '2987.20252889'],
  ])('point %i lies %s mm from the top', (k, expected) => {
    expect(figure(`${window}dist(T, rotate(T, ${k} turn/17, O))`, 12)).toBe(expected);
  });

  it('all chords from the top stand in one list, and the ring closes', () => {
    const ring = 'W = ring(point(0, 0), 1500 mm, 17)\n';
    expect(figure(`${ring}dist(W[1], W)[9]`, 12)).toBe('2987.20252889');
    const sides = 'sum(each(k, 1, 16, dist(W[k], W[k + 1]))) + dist(W[17], W[1])';
    expect(holds(`${ring}${sides} == 17 chord(1500 mm, turn/17)`)).toBe(true);
  });

  it('the foils leave room for a mullion of 60', () => {
    const foil = `${window}M = mid(T, rotate(T, turn/17))\ndist(M, T) - 30 mm`;
    expect(figure(foil, 12)).toBe('245.624276725');
  });

  it('the first point to the left is the second to the right, mirrored', () => {
    const same = 'rotate(T, 3 turn/17) == reflect(rotate(T, -3 turn/17), line(O, T))';
    expect(holds(window + same)).toBe(true);
  });
});

/** As above. */
describe('the decagonal stair', () => {
  const stair = 'O = point(0, 0)\nA = polar(2400 mm, turn/20)\nB = polar(2400 mm, -turn/20)\n';

  it('has the side and the inradius of a decagon', () => {
    expect(figure(`${stair}dist(A, B)`, 12)).toBe('1483.28157300');
    expect(figure(`${stair}dist(O, line(A, B))`, 12)).toBe('2282.53563911');
    expect(holds(`${stair}dist(O, line(A, B)) == 600 mm sqrt(10 + 2 sqrt(5))`)).toBe(true);
  });

  it('has riser lines that cut the side into unequal treads', () => {
    const riser = (name: string, by: string) =>
      `${name} = meet(line(A, B), line(O, polar(1 mm, ${by})))\n`;
    const treads = `${stair}${riser('P', '6 deg')}${riser('Q', '-6 deg')}`;
    expect(figure(`${treads}dist(P, Q)`, 12)).toBe('479.808325630');
    expect(figure(`${treads}dist(A, P)`, 12)).toBe('501.736623685');
  });
});

/** Machinery's Handbook 31, p. 82: side of the polygon in a circle of radius 1, four places. */
describe('sides of polygons', () => {
  it.each([
    [3, '1.7321'],
    [4, '1.4142'],
    [5, '1.1756'],
    [6, '1.0000'],
    [8, '0.7654'],
    [10, '0.6180'],
    [12, '0.5176'],
    [16, '0.3902'],
    [20, '0.3129'],
  ])('with %i corners the side is %s', (n, side) => {
    const length = `dist(polar(1, 0), polar(1, turn/${n}))`;
    expect(evaluateExpression(`round(${length}, 0.0001) == ${side}`)).toMatchObject({
      truth: { value: true },
    });
  });
});

/** Ptolemy's table of chords, diameter 120, in sixtieths; his last place is off by at most 1. */
describe('chords of Ptolemy', () => {
  it.each([
    [36, 37, 4, 55],
    [72, 70, 32, 3],
    [90, 84, 51, 10],
    [120, 103, 55, 23],
  ])('%i degrees subtend %i;%i,%i', (degrees, whole, minutes, seconds) => {
    const chord = `dist(polar(60, 0), polar(60, ${degrees} deg))`;
    const table = `(${whole} + ${minutes}/60 + ${seconds}/3600)`;
    expect(evaluateExpression(`abs(${chord} - ${table}) <= 1/3600`)).toMatchObject({
      truth: { value: true },
    });
  });
});

describe('classical figures', () => {
  it('the pointed arch on its span is struck from both springings', () => {
    // Equilateral arch: the apex stands √3/2 of the span above its middle.
    const arch =
      'A = point(-600 mm, 0)\nB = point(600 mm, 0)\nS = meet(circle(A, B), circle(B, A), 2)\n';
    expect(holds(`${arch}S == point(0, 600 mm sqrt(3))`)).toBe(true);
    expect(holds(`${arch}angle(S, A, B) == 60 deg`)).toBe(true);
  });

  it('by Ptolemy the diagonals of a quadrilateral in a circle times each other are the sums of products of sides', () => {
    const corners = [0, 1, 4, 7].map((k, index) => `P_${index} = polar(2, ${k} turn/12)`);
    const [a, b, c, d] = ['P_0', 'P_1', 'P_2', 'P_3'];
    const law = `dist(${a}, ${c}) dist(${b}, ${d}) == dist(${a}, ${b}) dist(${c}, ${d}) + dist(${b}, ${c}) dist(${d}, ${a})`;
    expect(holds(`${corners.join('\n')}\n${law}`)).toBe(true);
  });

  it('an angle in a half circle is right (Thales)', () => {
    expect(holds('angle(point(-5, 0), point(3, 4), point(5, 0)) == turn/4')).toBe(true);
  });
});
