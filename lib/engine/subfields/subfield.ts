/**
 * Subfields of Q(α), found p-adically as block systems and proven by substitution.
 *
 * The subfields F of Q(α) with [Q(α):F] = m correspond to the block systems of the Galois group on the roots of f with
 * blocks of m roots (Dixon 1990; Klüners & Pohst 1997). At a prime p that keeps f squarefree the Frobenius is
 * in the group, so that it permutes the blocks. All partitions that it leaves invariant are looked through; a
 * true one gives the integer Σ_B ∏_{i∈B} (α_i² + 3α_i + 5), of known size, which few others do. What passes
 * is proven: with θ_B symmetric in the roots of B, g = ∏ (x − θ_B) has integer coefficients and g(θ) = 0 for
 * the θ of Q(α) that takes the values θ_B. So a found subfield is exact, and so is the answer that there is none.
 */
import type { Charge } from '../polynomials/factor';
import { isSquarefreeMod } from '../polynomials/factor-mod';
import { symmetricMod } from '../polynomials/hensel';
import {
  addPoly,
  degreeOf,
  derivativeOf,
  maxBits,
  multiplyPoly,
  restByMonic,
  trim,
  type IntegerPoly,
} from '../polynomials/integer-poly';
import { reduceMod } from '../polynomials/mod-poly';
import { leastCommonMultiple } from '../integers';
import { rootBits } from '../algebraic/all-roots';
import { centre } from './integral';
import { PadicRoots, type Padic } from './padic-roots';
import { countPartitions, searchPartitions, type BlockOrbit } from './invariant-partitions';
import type { Splitting } from './splitting';

/** A field one step below Q(α): θ = theta(α)/f′(α), a root of `lower`. f and `lower` are monic. */
export interface Subfield {
  readonly polynomial: IntegerPoly;
  /** [Q(α) : Q(θ)]. */
  readonly index: number;
  readonly theta: IntegerPoly;
  readonly lower: IntegerPoly;
  /** For index 2: α is a root of x² − (sum(θ)/lower′(θ))·x + product(θ)/lower′(θ). */
  readonly relation: { readonly sum: IntegerPoly; readonly product: IntegerPoly } | null;
}

/** The search for a subfield was too long to be made; nothing is known. */
export class TooManyPartitions extends Error {}

/** Partitions that are looked through at most; more than a few thousand are rare. */
const PARTITION_LIMIT = 60_000;

interface Blocks {
  readonly orbits: readonly BlockOrbit[];
  readonly roots: PadicRoots;
}

/** Roots of each block of an orbit that the orbit is named by. */
const rootsOf = (roots: PadicRoots, { length, parts }: BlockOrbit): Padic[] =>
  parts.flatMap(({ cycle, shift }) =>
    (roots.roots[cycle] as readonly Padic[]).filter((_, place) => place % length === shift),
  );

const one: Padic = [1n];
const productOf = (roots: PadicRoots, factors: readonly Padic[]): Padic =>
  factors.reduce((product, a) => roots.multiply(product, a), one);

/** The monic polynomial with the given power sums, modulo p^k. */
function fromSums(sums: readonly bigint[], roots: PadicRoots): IntegerPoly {
  const n = sums.length;
  const f: bigint[] = new Array<bigint>(n + 1).fill(0n);
  f[n] = 1n;
  for (let k = 1; k <= n; k++) {
    let sum = 0n;
    for (let j = 1; j <= k; j++) sum += (f[n - k + j] as bigint) * (sums[j - 1] as bigint);
    f[n - k] = roots.divide(-sum, BigInt(k));
  }
  return f;
}

/** Coordinates Σ c_k α^k of f′(α)·β from the traces w_t of β·α^t (Euler's dual basis). */
function dualCoordinates(f: IntegerPoly, traces: readonly bigint[]): IntegerPoly {
  return trim(
    traces.map((_, k) => {
      let c = 0n;
      for (let j = k + 1; j < f.length; j++) c += (f[j] as bigint) * (traces[j - k - 1] as bigint);
      return c;
    }),
  );
}

/** Values at the blocks, one for each orbit. */
type Values = readonly Padic[];

function symmetricValues({ orbits, roots }: Blocks, reach: number): Values[] {
  const sets = orbits.map((orbit) => rootsOf(roots, orbit));
  const values: Values[] = [sets.map((set) => set.reduce((sum, a) => roots.add(sum, a), []))];
  for (let t = 0n; t <= BigInt(reach); t++) {
    for (const s of t === 0n ? [t] : [t, -t]) {
      values.push(
        sets.map((set) =>
          productOf(
            roots,
            set.map((a) => roots.add(a, [s])),
          ),
        ),
      );
    }
  }
  return values;
}

/** g of the values, or null where two blocks have the same one modulo p. */
function lowerPolynomial({ orbits, roots }: Blocks, values: Values): IntegerPoly | null {
  const count = orbits.reduce((sum, { length }) => sum + length, 0);
  const sums = new Array<bigint>(count).fill(0n);
  orbits.forEach(({ length }, index) => {
    let power: Padic = one;
    for (let k = 0; k < count; k++) {
      power = roots.multiply(power, values[index] as Padic);
      sums[k] = (sums[k] as bigint) + roots.traceOf(power, length);
    }
  });
  const g = fromSums(sums, roots);
  return isSquarefreeMod(reduceMod(g, roots.p), roots.p) ? g : null;
}

/** Σ over all blocks of value·θ^t for t below `count`. */
function tracesBelow(
  { orbits, roots }: Blocks,
  values: Values,
  theta: Values,
  count: number,
): bigint[] {
  const traces = new Array<bigint>(count).fill(0n);
  orbits.forEach(({ length }, index) => {
    let power = values[index] as Padic;
    for (let t = 0; t < count; t++) {
      traces[t] = (traces[t] as bigint) + roots.traceOf(power, length);
      power = roots.multiply(power, theta[index] as Padic);
    }
  });
  return symmetric(traces, roots);
}

const symmetric = (list: readonly bigint[], { modulus }: PadicRoots): bigint[] =>
  list.map((c) => symmetricMod([c], modulus)[0] ?? 0n);

/** Σ over all roots of θ·α^t for t below the degree. */
function tracesAbove({ orbits, roots }: Blocks, theta: Values): bigint[] {
  const n = degreeOf(roots.f);
  const traces = new Array<bigint>(n).fill(0n);
  orbits.forEach(({ parts }, index) => {
    for (const { cycle, shift } of parts) {
      const root = (roots.roots[cycle] as readonly Padic[])[shift] as Padic;
      let power = theta[index] as Padic;
      for (let t = 0; t < n; t++) {
        traces[t] = (traces[t] as bigint) + roots.traceOf(power, roots.lengths[cycle] as number);
        power = roots.multiply(power, root);
      }
    }
  });
  return symmetric(traces, roots);
}

/** Σ_k terms_k·c^k·d^(N−k) modulo f for N + 1 terms: d^N·Σ terms_k·(c/d)^k, zero exactly when that is. */
function isZeroAt(
  terms: readonly IntegerPoly[],
  c: IntegerPoly,
  d: IntegerPoly,
  f: IntegerPoly,
): boolean {
  const times = (a: IntegerPoly, b: IntegerPoly): IntegerPoly => restByMonic(multiplyPoly(a, b), f);
  let value: IntegerPoly = [];
  let power: IntegerPoly = [1n];
  for (let k = terms.length - 1; k >= 0; k--) {
    value = addPoly(times(value, c), times(terms[k] as IntegerPoly, power));
    power = times(power, d);
  }
  return value.length === 0;
}

/** The subfield that a block system stands for, proven, or null where it stands for none. */
function proveSubfield(blocks: Blocks, reach: number, charge: Charge): Subfield | null {
  const { orbits, roots } = blocks;
  const { f } = roots;
  const n = degreeOf(f);
  const N = orbits.reduce((sum, { length }) => sum + length, 0);
  charge(roots.productWork * (orbits.length * (2 * reach + 4) * N + roots.lengths.length * n));
  let best: { values: Values; g: IntegerPoly } | null = null;
  for (const values of symmetricValues(blocks, reach)) {
    const g = lowerPolynomial(blocks, values);
    if (g !== null && (best === null || maxBits(g) < maxBits(best.g))) best = { values, g };
  }
  if (best === null) return null;
  const { poly: lower, shift, divisor } = centre(best.g);
  const inverse = roots.divide(1n, divisor);
  const values = best.values.map((a) => roots.scale(roots.add(a, [-shift]), inverse));
  const theta = dualCoordinates(f, tracesAbove(blocks, values));
  const slope = derivativeOf(f);
  charge(N * n * (n + 20) * (4 + ((N * maxBits(theta)) >> 7)));
  const constants = lower.map((c): IntegerPoly => trim([c]));
  if (!isZeroAt(constants, theta, slope, f)) return null;
  const index = n / N;
  const found = { polynomial: f, index, theta, lower };
  if (index !== 2) return { ...found, relation: null };
  const sets = orbits.map((orbit) => rootsOf(roots, orbit));
  const express = (list: Values): IntegerPoly =>
    dualCoordinates(lower, tracesBelow(blocks, list, values, N));
  const sum = express(sets.map(([a, b]) => roots.add(a as Padic, b as Padic)));
  const product = express(sets.map((set) => productOf(roots, set)));
  const lowerSlope = derivativeOf(lower);
  const quadratics = lowerSlope.map((c, k) => trim([product[k] ?? 0n, -(sum[k] ?? 0n), c]));
  const reduced = quadratics.map((q) => restByMonic(q, f));
  return isZeroAt(reduced, theta, slope, f) ? { ...found, relation: { sum, product } } : null;
}

/** Shifts s of the products ∏ (α + s) over a block that are tried as generators. */
const SHIFTS = 3;
/** From this size on a block is weighed by the square of a sum, which is cheaper than a product. */
const LARGE_BLOCK = 8;

/** Bounds for the weight of a true block system, and for every integer that is read off p-adically, twice. */
function sizes(f: IntegerPoly, index: number): { weight: bigint; all: bigint } {
  const n = degreeOf(f);
  const N = n / index;
  const R = 1n << BigInt(Math.max(1, rootBits(f)));
  const gamma = R * R + 3n * R + 5n;
  const block = index < LARGE_BLOCK ? gamma ** BigInt(index) : (BigInt(index) * gamma) ** 2n;
  const weight = BigInt(N) * block;
  // |θ| before and after it is centred; the sum of a block is at most index·R.
  const theta = 2n * BigInt(index) * (R + BigInt(SHIFTS)) ** BigInt(index) + 1n;
  const candidates = [
    // Room for a partition that stands for nothing to give a large residue.
    weight << 64n,
    (2n * theta) ** BigInt(N),
    BigInt(n) * theta * R ** BigInt(n - 1),
    BigInt(N) * R * R * theta ** BigInt(N - 1),
  ];
  return { weight, all: 2n * candidates.reduce((a, b) => (a > b ? a : b)) + 1n };
}

/** The splitting with the least work for blocks of this size. */
function choose(splittings: readonly Splitting[], index: number): { prime: number; count: number } {
  let best: { prime: number; count: number; cost: number } | null = null;
  for (const { prime, degrees } of splittings) {
    const count = countPartitions(degrees, index);
    const cost = count + 8 * leastCommonMultiple(degrees) ** 2;
    if (best === null || cost < best.cost) best = { prime, count, cost };
  }
  if (best === null) throw new RangeError('no splitting to choose from');
  return best;
}

type Label = (cycle: number, place: number) => number;
const everywhere: Label = () => 0;

/** Numbers the blocks: equal for roots in one block. */
function labelOf({ orbits, roots }: Blocks): Label {
  const table = roots.lengths.map((length) => new Array<number>(length).fill(0));
  let next = 0;
  for (const { length, parts } of orbits) {
    for (const { cycle, shift } of parts) {
      const own = table[cycle] as number[];
      own.forEach((_, place) => {
        own[place] = next + ((((place - shift) % length) + length) % length);
      });
    }
    next += length;
  }
  return (cycle, place) => table[cycle]?.[place] as number;
}

interface Found {
  readonly blocks: Blocks;
  readonly subfield: Subfield;
}

/** The first true block system of the size inside the blocks that `label` tells apart. */
function searchBlocks(
  roots: PadicRoots,
  index: number,
  label: Label,
  charge: Charge,
): Found | null {
  const gamma = roots.roots.map((cycle) =>
    cycle.map((a) => roots.add(roots.multiply(a, a), roots.add(roots.scale(a, 3n), [5n]))),
  );
  let found: Found | null = null;
  const weightOf = ({ length, parts }: BlockOrbit): bigint => {
    charge(roots.productWork * (index < LARGE_BLOCK ? index : 1));
    const members = parts.flatMap(({ cycle, shift }) =>
      (gamma[cycle] as Padic[]).filter((_, place) => place % length === shift),
    );
    if (index < LARGE_BLOCK) return roots.traceOf(productOf(roots, members), length);
    const sum = members.reduce(addPoly);
    return roots.traceOf(roots.multiply(sum, sum), length);
  };
  const visit = (orbits: readonly BlockOrbit[]): boolean => {
    const blocks = { orbits, roots };
    const subfield = proveSubfield(blocks, SHIFTS, charge);
    if (subfield !== null) found = { blocks, subfield };
    return subfield !== null;
  };
  const { weight: bound } = sizes(roots.f, index);
  const { modulus, lengths } = roots;
  searchPartitions(lengths, index, label, weightOf, { modulus, bound }, visit, charge);
  return found;
}

/**
 * A subfield of index m in Q(α), or null when there is none.
 * Accepts: f monic irreducible, m a proper divisor of its degree greater than 1, splittings of f. Throws
 * TooManyPartitions where the search would be too long. Cost: the number of partitions that the best of the
 * primes leaves, and about degree² products of p-adic numbers of a few hundred bits.
 */
export function findSubfield(
  f: IntegerPoly,
  index: number,
  splittings: readonly Splitting[],
  charge: Charge,
): Subfield | null {
  const { prime, count } = choose(splittings, index);
  if (count > PARTITION_LIMIT) throw new TooManyPartitions();
  const roots = new PadicRoots(f, prime, sizes(f, index).all, charge);
  return searchBlocks(roots, index, everywhere, charge)?.subfield ?? null;
}

/**
 * A subfield of index 2 in Q(α), of degree a power of two, by halving blocks from the whole set of roots down. Null proves
 * the Galois group not to be a 2-group, and does not say whether there is a subfield of index 2. For groups whose elements
 * all have many short cycles, which leave too many partitions into pairs.
 */
export function findSubfieldByHalving(
  f: IntegerPoly,
  splittings: readonly Splitting[],
  charge: Charge,
): Subfield | null {
  const n = degreeOf(f);
  const { prime, count } = choose(splittings, n / 2);
  if (count > PARTITION_LIMIT) throw new TooManyPartitions();
  let bound = 1n;
  for (let index = n / 2; index >= 2; index /= 2) {
    const { all } = sizes(f, index);
    if (all > bound) bound = all;
  }
  const roots = new PadicRoots(f, prime, bound, charge);
  let found: Found | null = null;
  for (let index = n / 2; index >= 2; index /= 2) {
    found = searchBlocks(roots, index, found === null ? everywhere : labelOf(found.blocks), charge);
    if (found === null) return null;
  }
  return found?.subfield ?? null;
}
