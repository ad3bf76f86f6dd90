/**
 * Numbers as plain data, to be kept without the engine that made them and brought into another.
 *
 * What is kept of a real number is what the tower says: the radicands of its roots, each in the roots before it, and the
 * coordinates. Bringing it in takes each root anew, so the engine that takes it in proves its tower for itself and need not
 * trust where the data come from; where a root turns out to be known there by other roots, these replace it.
 */

import type { Cyclotomic } from './algebraic/cyclotomic';
import type { Box } from './algebraic/box';
import type { Origin } from './algebraic/algebraic';
import type { Verdict } from './algebraic/beyond';
import type { PackedSum } from './algebraic/packed-name';
import type { Int } from './int';
import {
  addEl,
  equalEl,
  finishSparse,
  integerEl,
  mulEl,
  rationalEl,
  rootOf,
  toSparse,
} from './element';
import { join } from './join';
import { rootOfInteger, sqrtReal } from './real-root';
import type { El, Field, Gen, Tower } from './tower';

/** Coordinates over one denominator; a mask names roots by their place in the list of the number. */
export interface PackedElement {
  readonly masks: readonly bigint[];
  readonly coefs: readonly Int[];
  readonly den: Int;
}

/** A root by the integer under it, or by its radicand in the roots before it. */
export type PackedRoot = { readonly int: Int } | { readonly rad: PackedElement };

/** A real element, or both parts of a complex number, with the roots that they are written in. */
export interface PackedTower {
  readonly roots: readonly PackedRoot[];
  readonly parts: readonly PackedElement[];
}

/** A number that square roots do not reach: its polynomial and a box that holds only this one of its roots. */
export interface PackedAlgebraic {
  readonly poly: readonly bigint[];
  readonly isReal: boolean;
  readonly box: Box;
  readonly precision: number;
  readonly origin: Origin;
  readonly verdict: Verdict;
  readonly name: PackedSum | null;
}

export interface PackedCosine {
  readonly k: bigint;
  readonly n: bigint;
  readonly scale: { readonly n: bigint; readonly d: bigint };
}

/** What `Engine.pack` gives. Opaque to callers, immutable, and free of any engine. */
export class PackedNum {
  constructor(
    readonly tower: PackedTower | null,
    readonly algebraic: PackedAlgebraic | null,
    /** A rational multiple of the cosine of k/n of a turn that is known as such. */
    readonly cosine: PackedCosine | null,
    readonly cyclotomic: Cyclotomic | null,
  ) {}

  /** About how many integers it holds, to bound what is kept. */
  get size(): number {
    const { tower, algebraic } = this;
    let size = 4 + (algebraic?.poly.length ?? 0) + 20 * (algebraic?.name?.length ?? 0);
    for (const part of tower?.parts ?? []) size += part.coefs.length;
    for (const root of tower?.roots ?? []) size += 'rad' in root ? root.rad.coefs.length : 1;
    return size;
  }
}

export function packElements(elements: readonly El[]): PackedTower {
  const gens: Gen[] = [];
  for (const { t } of elements) for (const g of t.gens) if (!gens.includes(g)) gens.push(g);
  gens.sort((a, b) => a.depth - b.depth || a.id - b.id);
  const place = new Map(gens.map((g, i) => [g, BigInt(i)]));
  const pack = (e: El): PackedElement => {
    const { m, c, den } = toSparse(e);
    const bits = e.t.gens.map((g) => 1n << (place.get(g) as bigint));
    const masks = (m as readonly bigint[]).map((mask) => {
      let out = 0n;
      for (let i = 0, rest = mask; rest !== 0n; i++, rest >>= 1n)
        if (rest & 1n) out |= bits[i] as bigint;
      return out;
    });
    return { masks, coefs: c, den };
  };
  const roots = gens.map((g): PackedRoot => (g.int !== 0 ? { int: g.int } : { rad: pack(g.rad) }));
  return { roots, parts: elements.map(pack) };
}

export function unpackElements(f: Field, { roots, parts }: PackedTower): El[] {
  const images: El[] = [];
  for (const root of roots) {
    images.push(
      'int' in root ? rootOfInteger(f, root.int) : sqrtReal(unpackElement(f, root.rad, images)),
    );
  }
  return parts.map((part) => unpackElement(f, part, images));
}

function unpackElement(f: Field, { masks, coefs, den }: PackedElement, images: readonly El[]): El {
  if (masks.length === 0) return integerEl(f, 0);
  if (masks.length === 1 && masks[0] === 0n) return rationalEl(f, coefs[0] as Int, den);
  const used = images.flatMap((_, i) => (masks.some((m) => (m >> BigInt(i)) & 1n) ? [i] : []));
  const tower = towerOfRoots(
    f,
    used.map((i) => images[i] as El),
  );
  if (tower === null) return combine(f, masks, coefs, den, images);
  const table = new Map<bigint, Int>();
  masks.forEach((mask, j) => {
    let moved = 0n;
    for (const i of used)
      if ((mask >> BigInt(i)) & 1n)
        moved |= 1n << BigInt(tower.position((images[i] as El).t.top as Gen));
    table.set(moved, coefs[j] as Int);
  });
  return finishSparse(tower, table, den);
}

/** The tower in which all the given elements are generators; null where one of them is not, or depends on the others. */
function towerOfRoots(f: Field, images: readonly El[]): Tower | null {
  let tower = f.base;
  for (const image of images) {
    if (image.t.top === null || !equalEl(image, rootOf(image.t.top))) return null;
    const { t, left, right } = join(tower, image.t);
    if (left.images !== null || right.images !== null) return null;
    tower = t;
  }
  return tower;
}

/** The sum worked out term by term. */
function combine(
  f: Field,
  masks: readonly bigint[],
  coefs: readonly Int[],
  den: Int,
  images: readonly El[],
): El {
  let sum = integerEl(f, 0);
  masks.forEach((mask, j) => {
    let term = rationalEl(f, coefs[j] as Int, den);
    images.forEach((image, i) => {
      if ((mask >> BigInt(i)) & 1n) term = mulEl(term, image);
    });
    sum = addEl(sum, term);
  });
  return sum;
}
