/**
 * Partitions of the roots of a polynomial into blocks of one size that a given permutation φ leaves invariant.
 *
 * The permutation is given by its cycles; a root is [cycle, place], and φ adds 1 to the place. A block B that φ moves
 * through L different blocks takes from each cycle that it meets, of length ℓ, one class of places modulo L, ℓ/L roots;
 * L divides ℓ. So a partition is a grouping of the cycles, with shifts.
 */
import type { Charge } from '../polynomials/factor';

/** One block of an orbit of blocks under φ: L blocks; the roots [c, s + j·L] for every [c, s] of `parts`. */
export interface BlockOrbit {
  readonly length: number;
  readonly parts: readonly { readonly cycle: number; readonly shift: number }[];
}

const divisorsOf = (n: number): number[] =>
  Array.from({ length: n }, (_, k) => k + 1).filter((d) => n % d === 0);

function binomial(n: number, k: number): number {
  let value = 1;
  for (let j = 1; j <= k; j++) value = (value * (n - k + j)) / j;
  return value;
}

/** How many invariant partitions there are, as a double: an estimate of work and nothing else. */
export function countPartitions(lengths: readonly number[], size: number): number {
  const known = new Map<string, number>();
  const count = (left: ReadonlyMap<number, number>): number => {
    const classes = [...left].filter(([, many]) => many > 0).sort(([a], [b]) => b - a);
    const [first] = classes;
    if (first === undefined) return 1;
    const key = classes.join(';');
    const before = known.get(key);
    if (before !== undefined) return before;
    const [length, many] = first;
    let total = 0;
    for (const L of divisorsOf(length)) {
      const taken = new Map(left).set(length, many - 1);
      const choose = (index: number, missing: number, rest: Map<number, number>): number => {
        if (missing === 0) return count(rest);
        const entry = classes[index];
        if (entry === undefined || missing < 0) return 0;
        const [other] = entry;
        const available = rest.get(other) ?? 0;
        let sum = 0;
        for (let k = 0; k <= available; k++) {
          if (k > 0 && (other % L !== 0 || (k * other) / L > missing)) break;
          const ways = binomial(available, k) * L ** k;
          sum +=
            ways *
            choose(index + 1, missing - (k * other) / L, new Map(rest).set(other, available - k));
        }
        return sum;
      };
      if (length / L <= size) total += choose(0, size - length / L, taken);
    }
    known.set(key, total);
    return total;
  };
  const start = new Map<number, number>();
  for (const length of lengths) start.set(length, (start.get(length) ?? 0) + 1);
  return count(start);
}

/**
 * Visits the orbits of blocks that hold the first of the free cycles at shift 0, until a visit answers true. `label` keeps
 * blocks inside a coarser partition.
 */
function visitOrbits(
  lengths: readonly number[],
  free: readonly number[],
  size: number,
  label: (cycle: number, place: number) => number,
  visit: (orbit: BlockOrbit) => boolean,
): boolean {
  const [first, ...others] = free as [number, ...number[]];
  const home = label(first, 0);
  const isHome = (cycle: number, shift: number, L: number): boolean => {
    for (let place = shift; place < (lengths[cycle] as number); place += L) {
      if (label(cycle, place) !== home) return false;
    }
    return true;
  };
  for (const L of divisorsOf(lengths[first] as number)) {
    const own = (lengths[first] as number) / L;
    if (own > size || !isHome(first, 0, L)) continue;
    const choices = others
      .filter((cycle) => (lengths[cycle] as number) % L === 0)
      .map((cycle) => ({
        cycle,
        weight: (lengths[cycle] as number) / L,
        shifts: Array.from({ length: L }, (_, shift) => shift).filter((shift) =>
          isHome(cycle, shift, L),
        ),
      }))
      .filter(({ shifts }) => shifts.length > 0);
    // What the choices from an index on can add at most.
    const room = choices.map((_, k) => choices.slice(k).reduce((sum, c) => sum + c.weight, 0));
    const extend = (parts: BlockOrbit['parts'], missing: number, from: number): boolean => {
      if (missing === 0) return visit({ length: L, parts });
      for (let k = from; k < choices.length && (room[k] as number) >= missing; k++) {
        const { cycle, weight, shifts } = choices[k] as (typeof choices)[number];
        if (weight > missing) continue;
        for (const shift of shifts) {
          if (extend([...parts, { cycle, shift }], missing - weight, k + 1)) return true;
        }
      }
      return false;
    };
    if (extend([{ cycle: first, shift: 0 }], size - own, 0)) return true;
  }
  return false;
}

/**
 * Looks through the invariant partitions into blocks of the size. Every orbit of blocks has a weight; `visit` sees the partitions
 * whose weights add up, modulo `modulus`, to an integer of at most `bound` in absolute value, and ends the search by answering true.
 * Complete: when it answers false every such partition was seen.
 */
export function searchPartitions(
  lengths: readonly number[],
  size: number,
  label: (cycle: number, place: number) => number,
  weightOf: (orbit: BlockOrbit) => bigint,
  { modulus, bound }: { modulus: bigint; bound: bigint },
  visit: (orbits: readonly BlockOrbit[]) => boolean,
  charge: Charge,
): boolean {
  const weights = new Map<string, bigint>();
  const weigh = (orbit: BlockOrbit): bigint => {
    const key = `${orbit.length}:${orbit.parts.map(({ cycle, shift }) => `${cycle},${shift}`).join(' ')}`;
    let weight = weights.get(key);
    if (weight === undefined) {
      weight = weightOf(orbit);
      weights.set(key, weight);
    }
    return weight;
  };
  const chosen: BlockOrbit[] = [];
  const search = (free: readonly number[], sum: bigint): boolean => {
    if (free.length === 0) {
      const rest = ((sum % modulus) + modulus) % modulus;
      return (rest <= bound || modulus - rest <= bound) && visit([...chosen]);
    }
    return visitOrbits(lengths, free, size, label, (orbit) => {
      charge(6);
      chosen.push(orbit);
      const used = new Set(orbit.parts.map(({ cycle }) => cycle));
      const rest = free.filter((cycle) => !used.has(cycle));
      if (search(rest, sum + weigh(orbit))) return true;
      chosen.pop();
      return false;
    });
  };
  return search(
    lengths.map((_, cycle) => cycle),
    0n,
  );
}
