import { describe, expect, test } from 'vitest';
import {
  atOnce,
  chainDocument,
  checkChain,
  DETEMPLE_CARLYLE_CIRCLES,
  lastLevel,
  quadraticChain,
  type Chain,
  type Combination,
  type FermatPrime,
} from '@/lib/divisions';
import { floorSqrt } from '@/lib/divisions/carlyle';
import { isProductExact, valueOf } from '@/lib/divisions/check-chain';
import { cosineFixed } from '@/lib/divisions/fixed-point';
import { periodValues, siblingProduct } from '@/lib/divisions/periods';
import periods from '../reference/divisions-periods.json';
import sequences from '../reference/divisions-sequences.json';

const PRIMES = [3, 5, 17, 257, 65537] as const;
const chains = new Map<FermatPrime, Chain>(PRIMES.map((p) => [p, quadraticChain(p)]));
const chainOf = (p: FermatPrime) => chains.get(p) as Chain;

const indicesOf = ({ prime, quadratics }: Chain) =>
  Array.from({ length: lastLevel(prime) }, (_, level) =>
    quadratics.filter(({ parent }) => parent.level === level).map(({ parent }) => parent.index),
  );

/** A combination spread out over the periods of one level, the constant as multiples of −Σ η. */
function spread({ constant, terms }: Combination, level: number): number[] {
  const all = Array.from({ length: 2 ** level }, () => 0 - constant);
  for (const term of terms) {
    for (let i = term.index; i < all.length; i += 2 ** term.level) {
      all[i] = (all[i] ?? 0) + term.coefficient;
    }
  }
  return all;
}

describe('the quadratics of a Fermat prime', () => {
  test('are as many as DeTemple counts Carlyle circles for 257, and 191 fewer than his bound for 65537', () => {
    const counts = PRIMES.map((p) => chainOf(p).quadratics.length);
    expect(counts).toEqual([0, 1, 4, 24, 1141]);
    expect(DETEMPLE_CARLYLE_CIRCLES).toEqual({
      257: sequences.carlyle['257'],
      65537: sequences.carlyle['65537'],
    });
    expect(sequences.carlyle['65537'] - 1141).toBe(191);
  });

  test.each([17, 257] as const)('for %i are those that another program needs', (p) => {
    const { needed, larger, values } = periods.primes[p];
    const chain = chainOf(p);
    expect(indicesOf(chain)).toEqual(needed.slice(0, lastLevel(p)));
    const largerBelow = new Map(larger.map(([level, j, index]) => [`${level},${j}`, index]));
    for (const { parent, larger: root } of chain.quadratics) {
      expect(root.index).toBe(largerBelow.get(`${parent.level},${parent.index}`));
    }
    const table = atOnce(periodValues(p, 128));
    for (const [level, row] of Object.entries(values).slice(0, lastLevel(p) + 1)) {
      row.forEach((decimal, index) => {
        const off = table.of({ level: Number(level), index }) - fixed(decimal, 128);
        expect(off < 1n << 58n && off > -(1n << 58n)).toBe(true);
      });
    }
  });

  test('for 65537 are those that another program needs', () => {
    const { perLevel, total, level10, level13, values } = periods.primes65537;
    const indices = indicesOf(chainOf(65537));
    expect(indices.map((row) => row.length)).toEqual(perLevel);
    expect(indices[10]).toEqual(level10);
    expect(indices[13]).toEqual(level13);
    expect(chainOf(65537).quadratics).toHaveLength(total);
    const table = atOnce(periodValues(65537, 192));
    for (const [level, index, decimal] of values as [number, number, string][]) {
      const off = table.of({ level, index }) - fixed(decimal, 192);
      expect(off < 1n << 30n && off > -(1n << 30n)).toBe(true);
    }
  });

  test.each([17, 257] as const)('for %i have the products that another program counted', (p) => {
    for (const { level, const: constant, c } of periods.primes[p].productVectors) {
      if (level === lastLevel(p)) continue;
      const product = siblingProduct(p, level);
      expect([product.constant, ...product.coefficients]).toEqual([constant, ...c]);
    }
  });

  test('for 65537 begin with x² + x − 16384 and the published coefficients below it', () => {
    const [first] = chainOf(65537).quadratics;
    expect(first).toMatchObject({
      sum: { constant: -1, terms: [] },
      product: { constant: -16384, terms: [] },
    });
    for (const [level, c] of Object.entries(periods.primes65537.products)) {
      expect([...siblingProduct(65537, Number(level)).coefficients]).toEqual(c);
    }
    expect(siblingProduct(65537, 2).coefficients).toEqual(Int32Array.of(992, 1040, 1024, 1040));
  });

  test('for 17 are those of Gauss 1801, art. 354', () => {
    const written = chainOf(17).quadratics.map(({ sum, product }) => ({ sum, product }));
    const eta = (level: number, index: number) => ({ level, index, coefficient: 1 });
    expect(written).toEqual([
      { sum: { constant: -1, terms: [] }, product: { constant: -4, terms: [] } },
      { sum: { constant: 0, terms: [eta(1, 0)] }, product: { constant: -1, terms: [] } },
      { sum: { constant: 0, terms: [eta(1, 1)] }, product: { constant: -1, terms: [] } },
      { sum: { constant: 0, terms: [eta(2, 0)] }, product: { constant: 0, terms: [eta(2, 1)] } },
    ]);
  });
});

describe('laws of a chain', () => {
  test.each(PRIMES)('for %i each quadratic uses only roots of earlier ones', (p) => {
    const known = new Set<string>();
    const name = ({ level, index }: { level: number; index: number }) => `${level},${index}`;
    for (const { sum, product, larger, smaller } of chainOf(p).quadratics) {
      expect([...sum.terms, ...product.terms].filter((term) => !known.has(name(term)))).toEqual([]);
      known.add(name(larger)).add(name(smaller));
    }
    if (p !== 3) expect(known).toContain(name(chainOf(p).target));
  });

  test.each(PRIMES)('for %i products keep their sum when every root of unity becomes 1', (p) => {
    for (const { parent, product } of chainOf(p).quadratics) {
      // Sibling by sibling ((p−1)/2^(k+1))², and each period of level k counts (p−1)/2^k.
      const terms = spread(product, parent.level).reduce((sum, c) => sum + c, 0);
      expect(2 ** (parent.level + 2) * terms).toBe(p - 1);
    }
  });

  test.each([5, 17, 257] as const)('for %i every product is exact over Z[x]/(xᵖ − 1)', (p) => {
    const levels = Array.from({ length: lastLevel(p) }, (_, level) => level);
    expect(levels.filter((level) => !isProductExact(p, level))).toEqual([]);
  });

  test('shifting a product shifts its combination', () => {
    for (const { parent, product } of chainOf(257).quadratics) {
      const { coefficients } = siblingProduct(257, parent.level);
      const shifted = spread(product, parent.level).map(
        (_, i, all) => all[(i + parent.index) % all.length],
      );
      expect(shifted).toEqual([...coefficients]);
    }
  });

  test.each(PRIMES)('for %i all hold exactly and to 1 000 digits', (p) => {
    const chain = chainOf(p);
    expect(atOnce(checkChain(chain, 1000))).toEqual({
      quadratics: chain.quadratics.length,
      exactProducts: lastLevel(p),
      digits: 1000,
    });
  });

  test.each([17, 257, 65537] as const)(
    'for %i square roots alone, from integers on, end at 2cos(2π/p) to 1 000 digits',
    (p) => {
      const bits = 4200;
      const found = solve(chainOf(p), bits);
      const off = found - 2n * cosineFixed(1n, BigInt(p), bits);
      expect((off < 0n ? -off : off) * 10n ** 1000n < 1n << BigInt(bits)).toBe(true);
    },
  );

  test('a chain with a wrong coefficient, or with its roots exchanged for others, is refused', () => {
    const chain = chainOf(257);
    const [first, second, ...rest] = chain.quadratics;
    if (!first || !second) throw new Error('no quadratics');
    const wrong = { ...first, product: { ...first.product, constant: -63 } };
    const exchanged = { ...second, larger: first.larger };
    for (const one of [wrong, exchanged]) {
      expect(() => atOnce(checkChain({ ...chain, quadratics: [one, ...rest] }, 50))).toThrow(
        /does not satisfy its quadratic/,
      );
    }
  });
});

describe('the file of a chain', () => {
  test('is plain JSON from which the quadratics can be taken up again', () => {
    const chain = chainOf(257);
    const check = atOnce(checkChain(chain, 30));
    const read = JSON.parse(JSON.stringify(chainDocument(chain, check))) as ReturnType<
      typeof chainDocument
    >;
    expect(read).toMatchObject({
      format: 'surdwork-quadratic-chain',
      version: 1,
      prime: 257,
      primitiveRoot: 3,
      target: [7, 0],
      count: 24,
      check: { quadratics: 24, exactProducts: 7, digits: 30 },
    });
    read.quadratics.forEach(({ product, larger, smaller }, index) => {
      const quadratic = chain.quadratics[index];
      expect(product.constant).toBe(quadratic?.product.constant);
      expect(product.terms).toEqual(
        quadratic?.product.terms.map((t) => [t.level, t.index, t.coefficient]),
      );
      expect([larger, smaller]).toEqual(
        [quadratic?.larger, quadratic?.smaller].map((r) => [r?.level, r?.index]),
      );
    });
  });
});

/** Solves a chain from the top by square roots of integers in units of 2^−bits, without a cosine. */
function solve({ target, quadratics }: Chain, bits: number): bigint {
  const known = new Map<string, bigint>();
  const of = ({ level, index }: { level: number; index: number }) => {
    const value = known.get(`${level},${index}`);
    if (value === undefined) throw new Error(`the period (${level}, ${index}) is not known yet`);
    return value;
  };
  const values = { bits, of, error: () => 0n };
  for (const { sum, product, larger, smaller } of quadratics) {
    const s = valueOf(sum, values);
    const root = floorSqrt(s * s - ((4n * valueOf(product, values)) << BigInt(bits)));
    known.set(`${larger.level},${larger.index}`, (s + root) >> 1n);
    known.set(`${smaller.level},${smaller.index}`, (s - root) >> 1n);
  }
  return of(target);
}

function fixed(decimal: string, bits: number): bigint {
  const [whole = '', fraction = ''] = decimal.split('.');
  return (BigInt(whole + fraction) << BigInt(bits)) / 10n ** BigInt(fraction.length);
}
