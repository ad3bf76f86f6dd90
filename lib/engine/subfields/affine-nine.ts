/**
 * Is the Galois group of a polynomial of degree 9 without a proper subfield affine, hence of an order 2^a·3^b?
 *
 * The primitive groups of degree 9 are subgroups of AGL(2, 3), of order 432, and PSL(2,8), PΓL(2,8), A9 and S9, which carry any
 * three roots to any other three. An affine group leaves the 12 lines of a plane of 9 points invariant. All
 * 840 sets of lines are looked through, those that the Frobenius of one prime leaves invariant are tried, and a set is
 * proven: the products of (α + s) over its lines are the roots of a factor of degree 12 of the exact resolvent of all 84
 * triples. So both answers are exact.
 */
import { fromPowerSums, powerSums } from '../algebraic/composed';
import { rootBits } from '../algebraic/all-roots';
import type { Charge } from '../polynomials/factor';
import { isSquarefreeMod } from '../polynomials/factor-mod';
import { symmetricMod } from '../polynomials/hensel';
import { divideExactly, type IntegerPoly } from '../polynomials/integer-poly';
import { reduceMod } from '../polynomials/mod-poly';
import { PadicRoots, type Padic } from './padic-roots';
import { shiftBy } from './integral';
import type { Splitting } from './splitting';

const POINTS = 9;
const TRIPLES = 84;
const LINES = 12;

type Line = readonly [number, number, number];

/** All ways to cover every pair of 9 points by one line of 3: 840 of them. */
function* planes(lines: readonly Line[] = []): Generator<readonly Line[]> {
  if (lines.length === LINES) {
    yield lines;
    return;
  }
  const isCovered = (a: number, b: number): boolean =>
    lines.some((line) => line.includes(a) && line.includes(b));
  for (let a = 0; a < POINTS; a++) {
    for (let b = a + 1; b < POINTS; b++) {
      if (isCovered(a, b)) continue;
      for (let c = 0; c < POINTS; c++) {
        if (c === a || c === b || isCovered(a, c) || isCovered(b, c)) continue;
        yield* planes([...lines, [a, b, c]]);
      }
      return;
    }
  }
}

/** ∏ (x − αβγ) over all sets of three roots of f: the k-th power sum is the third elementary function of the k-th powers. */
function tripleResolvent(f: IntegerPoly): IntegerPoly {
  const p = powerSums(f, 3 * TRIPLES);
  const at = (k: number): bigint => p[k] as bigint;
  const sums = Array.from({ length: TRIPLES + 1 }, (_, k) =>
    k === 0 ? BigInt(TRIPLES) : (at(k) ** 3n - 3n * at(k) * at(2 * k) + 2n * at(3 * k)) / 6n,
  );
  return fromPowerSums(sums);
}

const keyOf = (line: Line): string => [...line].sort((a, b) => a - b).join();

/** f is monic and irreducible of degree 9, and its field has no proper subfield but the rationals. */
export function hasAffineGroup(
  f: IntegerPoly,
  splittings: readonly Splitting[],
  charge: Charge,
): boolean {
  const [first] = splittings;
  if (first === undefined) throw new RangeError('no splitting to work with');
  for (let shift = 0n; ; shift++) {
    charge(200_000);
    const moved = shiftBy(f, shift);
    const resolvent = tripleResolvent(moved);
    const good = splittings.find(({ prime }) =>
      isSquarefreeMod(reduceMod(resolvent, prime), prime),
    );
    // Triples with the same product, or none of the primes tells them apart: another shift.
    if (good !== undefined) return hasInvariantLines(moved, resolvent, good.prime, charge);
  }
}

function hasInvariantLines(
  f: IntegerPoly,
  resolvent: IntegerPoly,
  prime: number,
  charge: Charge,
): boolean {
  const size = 1n << BigInt(3 * Math.max(1, rootBits(f)));
  const bound = 2n * (2n * size) ** BigInt(LINES) + 1n;
  const roots = new PadicRoots(f, prime, bound, charge);
  const points = roots.roots.flat();
  const moves = roots.lengths.flatMap((length, cycle) => {
    const start = roots.lengths.slice(0, cycle).reduce((a, b) => a + b, 0);
    return Array.from({ length }, (_, place) => start + ((place + 1) % length));
  });
  const products = new Map<string, Padic>();
  const productOf = (line: Line): Padic => {
    let product = products.get(keyOf(line));
    if (product === undefined) {
      const [a, b, c] = line.map((k) => points[k] as Padic) as [Padic, Padic, Padic];
      charge(2 * roots.productWork);
      product = roots.multiply(roots.multiply(a, b), c);
      products.set(keyOf(line), product);
    }
    return product;
  };
  for (const lines of planes()) {
    charge(60);
    const keys = new Set(lines.map(keyOf));
    const image = lines.map((line) => line.map((k) => moves[k] as number) as unknown as Line);
    if (!image.every((line) => keys.has(keyOf(line)))) continue;
    const sum = lines.reduce<Padic>((total, line) => roots.add(total, productOf(line)), []);
    const value = symmetricMod(sum.slice(0, 1), roots.modulus)[0] ?? 0n;
    if (value > 12n * size || -value > 12n * size) continue;
    charge(LINES * LINES * roots.productWork);
    if (isFactor(lines.map(productOf), roots, resolvent)) return true;
  }
  return false;
}

function isFactor(values: readonly Padic[], roots: PadicRoots, resolvent: IntegerPoly): boolean {
  let f: Padic[] = [[1n]];
  for (const value of values) {
    const minus = roots.scale(value, -1n);
    f = Array.from({ length: f.length + 1 }, (_, k) =>
      roots.add(k > 0 ? (f[k - 1] as Padic) : [], roots.multiply(f[k] ?? [], minus)),
    );
  }
  if (f.some((c) => c.length > 1)) return false;
  return (
    divideExactly(
      resolvent,
      f.map((c) => c[0] ?? 0n),
    ) !== null
  );
}
