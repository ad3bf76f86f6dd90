import { describe, expect, it } from 'vitest';
import { createEngine, type Num, type Reach } from '../../lib/engine/index';
import { hasAffineGroup } from '../../lib/engine/subfields/affine-nine';
import { makeIntegral } from '../../lib/engine/subfields/integral';
import {
  countPartitions,
  searchPartitions,
  type BlockOrbit,
} from '../../lib/engine/subfields/invariant-partitions';
import { isMadeOf, surveySplittings } from '../../lib/engine/subfields/splitting';
import { findSubfield } from '../../lib/engine/subfields/subfield';
import reference from '../reference/engine-subfields.json';

interface Case {
  polynomial: string[];
  subfieldDegrees: number[];
  realRoots: number;
  constructible?: boolean;
  groupOrder?: number;
}

const cases = (reference.cases as Case[]).map((entry) => ({
  ...entry,
  text: entry.polynomial.join(' '),
  coefficients: entry.polynomial.map(BigInt),
  degree: entry.polynomial.length - 1,
}));

const free = (): void => undefined;
const ALL_PRIMES = [2, 3, 5, 7, 11, 13];

/** The verdicts on the roots nearest to a few places; places halfway between two roots are passed over. */
function verdicts(coefficients: readonly bigint[]): { isReal: boolean; reach: Reach }[] {
  const places = [
    [60n, 0n],
    [-60n, 0n],
    [2n, 0n],
    [4n, 21n],
  ] as const;
  return places.flatMap(([re, im]) => {
    const engine = createEngine();
    const outcome = engine.attempt(() => {
      const place = engine.add(
        engine.rational(re, 7n),
        engine.mul(engine.i, engine.rational(im, 7n)),
      );
      const root: Num = engine.nearestRoot(coefficients, place);
      return { isReal: engine.isReal(root), reach: engine.reach(root) };
    });
    if (outcome.kind === 'outside-domain') return [];
    if (outcome.kind !== 'value') throw new Error(outcome.message);
    return [outcome.value];
  });
}

describe('against PARI/GP', () => {
  it.each(cases)('the subfields of a root of $text have the degrees listed', (entry) => {
    const { monic } = makeIntegral([...entry.coefficients].reverse());
    const survey = surveySplittings(monic, ALL_PRIMES, 24, free);
    if (survey.kind !== 'splittings') throw new Error('a degree above 16 was met');
    const found: number[] = [];
    for (let degree = 2; degree < entry.degree; degree++) {
      if (entry.degree % degree !== 0) continue;
      const subfield = findSubfield(monic, entry.degree / degree, survey.splittings, free);
      if (subfield === null) continue;
      expect(subfield.lower.length - 1).toBe(degree);
      found.push(degree);
    }
    expect(found).toEqual(entry.subfieldDegrees);
  });

  it.each(cases.filter(({ constructible }) => constructible !== undefined))(
    'square roots reach the roots of $text exactly when steps of degree 2 lead down',
    ({ coefficients, constructible }) => {
      for (const { reach } of verdicts(coefficients)) {
        expect(reach.kind === 'constructible').toBe(constructible);
      }
    },
  );

  it.each(
    cases.filter(
      ({ groupOrder, degree, realRoots }) => groupOrder !== undefined && degree === realRoots,
    ),
  )(
    'a trisector reaches the roots of $text, all real, exactly when 2 and 3 make up the order of the group',
    ({ coefficients, groupOrder }) => {
      for (const { reach } of verdicts(coefficients)) {
        const reaches = reach.kind === 'constructible' || reach.trisector.reaches;
        expect(reaches).toBe(isMadeOf(groupOrder as number, [2, 3]));
      }
    },
  );
});

const trisectors = (coefficients: readonly bigint[]) =>
  verdicts(coefficients).map(({ isReal, reach }) => {
    if (reach.kind === 'constructible') throw new Error('a cubic was left out');
    return { isReal, trisector: reach.trisector };
  });

describe('the trisector chain', () => {
  it('tells conjugates apart: x³ − 3x + 1 ± √2 has three real roots for one sign and one for the other', () => {
    // (x³ − 3x + 1)² − 2; the discriminant 108 − 27·(1 ± √2)² is positive for the lower sign only.
    const engine = createEngine();
    const f = [1n, 0n, -6n, 2n, 9n, -6n, -1n];
    const reached = (place: Num): boolean | null => {
      const reach = engine.reach(engine.nearestRoot(f, place));
      if (reach.kind === 'constructible') throw new Error('a cubic was left out');
      return reach.trisector.reaches;
    };
    expect(reached(engine.rational(18n, 10n))).toBe(true);
    expect(reached(engine.rational(14n, 100n))).toBe(true);
    expect(reached(engine.integer(-3))).toBe(false);
  });

  it('refuses what a cube root is needed for, at whatever level it stands', () => {
    // √(∛2), √2 + ∛3 times itself, ∛(1 + √2).
    for (const f of [
      [1n, 0n, 0n, 0n, 0n, 0n, -2n],
      [1n, 0n, -6n, -6n, 12n, -36n, 1n],
      [1n, 0n, 0n, -2n, 0n, 0n, -1n],
    ]) {
      for (const { trisector } of trisectors(f)) {
        expect(trisector).toEqual({ reaches: false, by: 'cubic' });
      }
    }
  });

  it('refuses a field of degree 8 without a field between, whose group has elements of order 7', () => {
    // No subfields by PARI/GP, see the reference.
    for (const { trisector } of trisectors([1n, -4n, 7n, -7n, 7n, -7n, 7n, 5n, 1n])) {
      expect(trisector).toEqual({ reaches: false, by: 'order' });
    }
  });
});

describe('a number that is not real', () => {
  it('is reached by a trisector exactly when its parts are: cube roots on the unit circle, and no others', () => {
    // ∛((3+4i)/5) is a third of an angle; ∛(1+2i) has the absolute value ∛√5.
    const verdict = (f: bigint[]): boolean | null => {
      const engine = createEngine();
      const reach = engine.reach(engine.nearestRoot(f, engine.add(engine.integer(1), engine.i)));
      if (reach.kind === 'constructible') throw new Error('a cubic was left out');
      return reach.trisector.reaches;
    };
    expect(verdict([5n, 0n, 0n, -6n, 0n, 0n, 5n])).toBe(true);
    expect(verdict([1n, 0n, 0n, -2n, 0n, 0n, 5n])).toBe(false);
  });
});

describe('polynomials of degree 9 without subfields', () => {
  const isAffine = (f: readonly bigint[]): boolean => {
    const { monic } = makeIntegral([...f].reverse());
    const survey = surveySplittings(monic, [2, 3, 5, 7], 24, free);
    if (survey.kind !== 'splittings') throw new Error('a degree above 9 was met');
    return hasAffineGroup(monic, survey.splittings, free);
  };

  it('have an affine group when they divide a point of an elliptic curve by 3, and not when it is S9', () => {
    // First coordinates of the points R with 3R = (0, 0) on y² + y = x³ − x, and 3R = (1, 2) on y² = x³ − 7x + 10
    // (division polynomials of PARI/GP 2.15.2, ellxn); xⁿ − x − 1 has the group S_n (Selmer 1956 with Jordan's theorem).
    expect(isAffine([1n, 0n, 12n, -24n, 30n, 6n, -33n, 12n, 3n, -1n])).toBe(true);
    expect(isAffine([1n, -9n, 84n, -708n, 750n, 210n, 2532n, 5004n, -33831n, 34159n])).toBe(true);
    expect(isAffine([1n, 0n, 0n, 0n, 0n, 0n, 0n, 0n, -1n, -1n])).toBe(false);
  });

  it('are refused to a trisector when the group is affine and some of the roots are not real', () => {
    for (const { trisector } of trisectors([1n, 0n, 12n, -24n, 30n, 6n, -33n, 12n, 3n, -1n])) {
      expect(trisector).toEqual({ reaches: false, by: 'cubic' });
    }
  });
});

describe('partitions that a permutation leaves invariant', () => {
  const seen = (lengths: readonly number[], size: number): string[] => {
    const list: string[] = [];
    const visit = (orbits: readonly BlockOrbit[]): boolean => {
      const blocks = orbits.flatMap(({ length, parts }) =>
        Array.from({ length }, (_, move) =>
          parts
            .flatMap(({ cycle, shift }) =>
              Array.from({ length: lengths[cycle] as number }, (_unused, place) => place)
                .filter((place) => place % length === (shift + move) % length)
                .map((place) => `${cycle}.${place}`),
            )
            .sort()
            .join(' '),
        ),
      );
      list.push(blocks.sort().join(' | '));
      return false;
    };
    searchPartitions(
      lengths,
      size,
      () => 0,
      () => 0n,
      { modulus: 2n, bound: 0n },
      visit,
      free,
    );
    return list;
  };

  it.each([
    [[4, 2, 1, 1], 2],
    [[2, 2, 2, 2], 2],
    [[3, 3, 3], 3],
    [[1, 1, 1, 1, 1, 1], 3],
    [[2, 2, 2, 2], 4],
    [[6, 3, 2, 1], 3],
  ])(
    'are those found among all partitions of the roots: cycles %j, blocks of %i',
    (lengths, size) => {
      const roots = lengths.flatMap((length, cycle) =>
        Array.from({ length }, (_, place) => ({ cycle, place })),
      );
      const name = ({ cycle, place }: { cycle: number; place: number }): string =>
        `${cycle}.${place}`;
      const moved = new Map(
        roots.map(({ cycle, place }) => [
          name({ cycle, place }),
          name({ cycle, place: (place + 1) % (lengths[cycle] as number) }),
        ]),
      );
      const all: string[][][] = [];
      const split = (free_: readonly string[], blocks: string[][]): void => {
        const [first, ...others] = free_;
        if (first === undefined) {
          all.push(blocks);
          return;
        }
        const choose = (block: string[], from: number): void => {
          if (block.length === size) {
            split(
              free_.filter((root) => !block.includes(root)),
              [...blocks, block],
            );
            return;
          }
          for (let k = from; k < others.length; k++) choose([...block, others[k] as string], k + 1);
        };
        choose([first], 0);
      };
      split(roots.map(name), []);
      const text = (blocks: readonly (readonly string[])[]): string =>
        blocks
          .map((block) => [...block].sort().join(' '))
          .sort()
          .join(' | ');
      const invariant = all.filter(
        (blocks) =>
          text(blocks) === text(blocks.map((b) => b.map((root) => moved.get(root) as string))),
      );
      expect(seen(lengths, size).sort()).toEqual(invariant.map(text).sort());
      expect(countPartitions(lengths, size)).toBe(invariant.length);
    },
  );
});
