/**
 * Towers of real square roots.
 *
 * A *generator* is a positive real square root √d. Either d is a positive integer > 1, squarefree and coprime to the other
 * integers in use (so that all roots of integers are independent without any test), or d is an element, with integer
 * coordinates, of the field below. A *tower* is a list of generators, ordered by depth and then by age, that contains with
 * each generator those of its radicand, and in which each radicand is proven not to be a square in the field below.
 * The products of its k generators are then a basis of a field of degree 2^k over the rationals.
 *
 * Towers are interned in a tree: a tower is its parent plus one generator. That a child exists means that its
 * independence is proven.
 */

import { Budget } from './limits';
import type { Int } from './int';

/** A real number: coordinates over `den` (> 0) in the products of the generators of `t`. */
export interface El {
  readonly t: Tower;
  /** Dense: c[mask] for every mask below 2^k, `m` null. Sparse: c[j] belongs to the mask m[j], masks ascending, no zeros. */
  readonly c: readonly Int[];
  readonly m: readonly bigint[] | null;
  readonly den: Int;
}

export interface Gen {
  readonly id: number;
  /** Nesting depth of the root: 1 for the root of an integer. */
  readonly depth: number;
  /** The integer under the root, or 0 when the radicand is nested. */
  readonly int: Int;
  /** The radicand; integer coordinates. */
  readonly rad: El;
  /** Set when a later gcd has split the integer: the root is the product of the roots of these. */
  parts: bigint[] | null;
  /** The root as an element of the tower that it needs; made on first use. */
  el: El | null;
}

/** How elements of one tower are written in another: by moving positions, or (rarely) by replacing generators. */
export interface Placing {
  positions: readonly number[] | null;
  images: readonly El[] | null;
}

/** A part of a tower, and the positions of its generators in the whole. */
export interface Subset {
  t: Tower;
  kept: number[];
}

/** Largest number of generators for which all coordinates may be listed. */
export const DENSE_MAX = 14;
/** Up to this many generators all coordinates are always listed. */
export const DENSE_ALWAYS = 7;

export class Tower {
  readonly k: number;
  readonly gens: readonly Gen[];
  readonly depth: number;
  /** All radicands are integers. */
  readonly flat: boolean;
  readonly nested: number;
  readonly children = new Map<number, Tower>();
  private positionOf: Map<number, number> | null = null;
  private supports: bigint[] | null = null;
  private smallSupports: number[] | null = null;
  private subsets: Map<bigint, Subset> | null = null;
  private smallSubsets: Map<number, Subset> | null = null;
  private products: Int[] | null = null;
  private spreads: Map<number, Int32Array> | null = null;
  /** Filled in by the modules that own them. */
  radicand: Int[] | null = null;
  inverseRadicand: { c: Int[]; den: Int } | null = null;
  homs: unknown = null;
  roots: Gen[] | null = null;
  joins: Map<number, { t: Tower; left: Placing; right: Placing }> | null = null;

  constructor(
    readonly field: Field,
    readonly parent: Tower | null,
    readonly top: Gen | null,
    readonly id: number,
  ) {
    this.gens = parent && top ? [...parent.gens, top] : [];
    this.k = this.gens.length;
    this.depth = Math.max(parent?.depth ?? 0, top?.depth ?? 0);
    this.flat = top === null || ((parent?.flat ?? true) && top.int !== 0);
    this.nested = (parent?.nested ?? 0) + (top !== null && top.int === 0 ? 1 : 0);
  }

  /** Position of a generator, or −1. */
  position(g: Gen): number {
    if (this.positionOf === null) {
      this.positionOf = new Map(this.gens.map((h, i) => [h.id, i]));
    }
    return this.positionOf.get(g.id) ?? -1;
  }

  /** The tower with one generator more, whose independence the caller has proven. */
  child(g: Gen): Tower {
    let t = this.children.get(g.id);
    if (t === undefined) {
      t = new Tower(this.field, this, g, this.field.nextTower++);
      this.children.set(g.id, t);
    }
    return t;
  }

  /** For each generator the mask of all generators that it needs, itself included. */
  support(i: number): bigint {
    if (this.supports === null) {
      this.supports = this.gens.map(() => 0n);
      for (let j = 0; j < this.k; j++) {
        let mask = 1n << BigInt(j);
        for (const g of (this.gens[j] as Gen).rad.t.gens)
          mask |= this.supports[this.position(g)] as bigint;
        this.supports[j] = mask;
      }
    }
    return this.supports[i] as bigint;
  }

  /** Smallest mask that contains `mask` and all that its generators need. */
  closure(mask: bigint): bigint {
    if (this.flat) return mask;
    let out = mask;
    for (let i = this.k - 1; i >= 0; i--) {
      if ((out >> BigInt(i)) & 1n && (this.gens[i] as Gen).int === 0) out |= this.support(i);
    }
    return out;
  }

  /** `closure` for dense coordinates (at most 30 generators). */
  smallClosure(mask: number): number {
    if (this.flat) return mask;
    this.smallSupports ??= this.gens.map((g, i) => (g.int === 0 ? Number(this.support(i)) : 0));
    let out = mask;
    for (let i = this.k - 1; i >= 0; i--)
      if ((out >> i) & 1) out |= this.smallSupports[i] as number;
    return out;
  }

  /** `subset` for dense coordinates. */
  smallSubset(mask: number): Subset {
    this.smallSubsets ??= new Map();
    let s = this.smallSubsets.get(mask);
    if (s === undefined) {
      s = this.subset(BigInt(mask));
      this.smallSubsets.set(mask, s);
    }
    return s;
  }

  /** The tower of the generators in a closed mask, and their positions here. */
  subset(mask: bigint): Subset {
    this.subsets ??= new Map();
    let s = this.subsets.get(mask);
    if (s === undefined) {
      let t = this.field.base;
      const kept: number[] = [];
      for (let i = 0; i < this.k; i++) {
        if (!((mask >> BigInt(i)) & 1n)) continue;
        t = t.child(this.gens[i] as Gen);
        kept.push(i);
      }
      s = { t, kept };
      this.subsets.set(mask, s);
    }
    return s;
  }

  /** For a flat tower: the product of the radicands of each mask. */
  product(mask: number): Int {
    if (this.products === null) {
      const table: Int[] = [1];
      for (let i = 0; i < this.k; i++) {
        const r = (this.gens[i] as Gen).int;
        for (let j = 0; j < 1 << i; j++) table.push(this.field.times(table[j] as Int, r));
      }
      this.products = table;
    }
    return this.products[mask] as Int;
  }

  /** Index table that carries dense coordinates into a larger tower. */
  spread(target: Tower, positions: readonly number[]): Int32Array {
    this.spreads ??= new Map();
    let s = this.spreads.get(target.id);
    if (s === undefined) {
      s = new Int32Array(1 << this.k);
      for (let i = 0; i < this.k; i++) {
        for (let j = 0; j < 1 << i; j++)
          s[j | (1 << i)] = (s[j] as number) | (1 << (positions[i] as number));
      }
      this.spreads.set(target.id, s);
    }
    return s;
  }

  /** Positions of this tower's generators in a larger one, or null when one is missing. */
  positionsIn(target: Tower): number[] | null {
    const out: number[] = [];
    for (const g of this.gens) {
      const p = target.position(g);
      if (p < 0) return null;
      out.push(p);
    }
    return out;
  }
}

/** What one engine holds: its generators, its tree of towers, its budget. */
export class Field {
  nextTower = 1;
  readonly base: Tower;
  readonly zero: El;
  readonly gens: Gen[] = [];
  /** Roots of integers by their radicand. */
  readonly integerRoots = new Map<Int, Gen>();
  /** Integers that could not be factored fully; later numbers are compared with them by gcd. */
  readonly unsplit: Gen[] = [];
  /** Nested roots by tower and radicand. */
  readonly nestedRoots = new Map<string, Gen>();
  /** Roots found, by radicand. */
  readonly rootCache = new Map<string | Int, El>();
  readonly caches = new Map<string, unknown>();

  constructor(
    readonly budget: Budget,
    readonly times: (a: Int, b: Int) => Int,
  ) {
    this.base = new Tower(this, null, null, 0);
    this.zero = { t: this.base, c: [0], m: null, den: 1 };
  }

  addGen(depth: number, int: Int, rad: El): Gen {
    const g: Gen = { id: this.gens.length, depth, int, rad, parts: null, el: null };
    this.gens.push(g);
    return g;
  }
}

/** Order of generators in every tower. */
export function before(a: Gen, b: Gen): boolean {
  return a.depth !== b.depth ? a.depth < b.depth : a.id < b.id;
}
