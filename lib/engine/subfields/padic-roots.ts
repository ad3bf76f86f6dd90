/**
 * All roots of a monic integer polynomial in an unramified extension of the p-adic numbers, to a finite precision.
 *
 * The ring is Z[y]/(m, p^k), m irreducible modulo p of the least common degree of the factors of f there. A root modulo p of each
 * factor is lifted by Newton's iteration; its conjugates come from the Frobenius φ, which is fixed by φ(y), the
 * root of m near y^p.
 */
import type { Charge } from '../polynomials/factor';
import { factorMod } from '../polynomials/factor-mod';
import { divideByMonic, inverseBig, symmetricMod } from '../polynomials/hensel';
import {
  addPoly,
  degreeOf,
  derivativeOf,
  multiplyPoly,
  scalePoly,
  subtractPoly,
  type IntegerPoly,
} from '../polynomials/integer-poly';
import { reduceMod, type ModPoly } from '../polynomials/mod-poly';
import { leastCommonMultiple } from '../integers';
import { powerSums } from '../algebraic/composed';
import { ResidueField, irreducibleOfDegree } from './residue-field';

const widen = (a: ModPoly): IntegerPoly => a.map(BigInt);

/** An element of the ring: coordinates in 1, y, y², …, symmetric residues. */
export type Padic = IntegerPoly;

export class PadicRoots {
  /** p^(2^j), at least the bound that was asked for. */
  readonly modulus: bigint;
  /** Lengths of the cycles of φ on the roots. */
  readonly lengths: readonly number[];
  /** roots[c][s] = φ^s of the first root of cycle c. */
  readonly roots: readonly (readonly Padic[])[];
  /** What one product in the ring costs, in the units of a charge. */
  readonly productWork: number;
  private readonly ring: IntegerPoly;
  private readonly images: readonly Padic[];
  private readonly traces: readonly bigint[];
  private readonly inverses = new Map<bigint, bigint>();

  /** f monic and squarefree modulo p. */
  constructor(
    readonly f: IntegerPoly,
    readonly p: number,
    bound: bigint,
    charge: Charge,
  ) {
    const factors = factorMod(reduceMod(f, p), p);
    this.lengths = factors.map((factor) => factor.length - 1);
    const degree = leastCommonMultiple(this.lengths);
    const whole = factors.find((factor) => factor.length - 1 === degree);
    const field = new ResidueField(whole ?? irreducibleOfDegree(degree, p), p);
    this.ring = widen(field.modulus);
    let modulus = BigInt(p);
    while (modulus < bound) modulus *= modulus;
    this.modulus = modulus;
    this.productWork = 20 + ((degree * degree * (1 + (modulus.toString(16).length >> 4))) >> 1);
    // Two evaluations for each lift at the last precision, and half as much for all before it.
    charge(this.productWork * (3 * (f.length + 2) * factors.length + 3 * degree));
    const slope = derivativeOf(f);
    const first = factors.map((factor) => {
      const residue = factor === whole ? field.generator : field.rootOf(factor);
      return this.lift(f, slope, residue, field);
    });
    const frobenius = this.lift(
      this.ring,
      derivativeOf(this.ring),
      field.frobenius(field.generator),
      field,
    );
    const images: Padic[] = [[1n]];
    for (let k = 1; k < degree; k++) {
      images.push(this.multiply(images[k - 1] as Padic, frobenius));
    }
    this.images = images;
    this.traces = powerSums(this.ring, degree - 1);
    this.roots = first.map((root, c) => {
      const cycle = [root];
      while (cycle.length < (this.lengths[c] as number)) {
        cycle.push(this.frobenius(cycle[cycle.length - 1] as Padic));
      }
      return cycle;
    });
  }

  /** The root of f near a simple one modulo p; the inverse of the slope is lifted along with it. */
  private lift(f: IntegerPoly, slope: IntegerPoly, residue: ModPoly, field: ResidueField): Padic {
    let root: Padic = widen(residue);
    let modulus = BigInt(this.p);
    const at = (g: IntegerPoly, m: bigint): Padic => {
      let value: Padic = [];
      for (let k = g.length - 1; k >= 0; k--) {
        value = addPoly(this.multiply(value, root, m), [g[k] as bigint]);
      }
      return value;
    };
    let inverse = widen(field.inverse(reduceMod(at(slope, modulus), this.p)));
    while (modulus < this.modulus) {
      modulus *= modulus;
      root = subtractPoly(root, this.multiply(at(f, modulus), inverse, modulus));
      const error = subtractPoly([2n], this.multiply(at(slope, modulus), inverse, modulus));
      inverse = this.multiply(inverse, error, modulus);
    }
    return symmetricMod(root, this.modulus);
  }

  multiply(a: Padic, b: Padic, modulus = this.modulus): Padic {
    if (a.length === 0 || b.length === 0) return [];
    return divideByMonic(symmetricMod(multiplyPoly(a, b), modulus), this.ring, modulus).rest;
  }

  add(a: Padic, b: Padic): Padic {
    return symmetricMod(addPoly(a, b), this.modulus);
  }

  scale(a: Padic, by: bigint): Padic {
    return symmetricMod(scalePoly(a, by), this.modulus);
  }

  frobenius(a: Padic): Padic {
    let sum: IntegerPoly = [];
    a.forEach((c, k) => {
      sum = addPoly(sum, scalePoly(this.images[k] as Padic, c));
    });
    return symmetricMod(sum, this.modulus);
  }

  get degree(): number {
    return degreeOf(this.ring);
  }

  /**
   * Σ of the first `length` conjugates of an element that φ^length leaves as it is: a p-adic integer. The trace of the whole
   * ring is that sum degree/length times, and the quotient is prime to p, as p exceeds every degree here.
   */
  traceOf(a: Padic, length: number): bigint {
    const whole = a.reduce((sum, c, k) => sum + c * (this.traces[k] as bigint), 0n);
    return this.divide(whole, BigInt(this.degree / length));
  }

  /** a/d modulo p^k, d prime to p, symmetric. */
  divide(a: bigint, d: bigint): bigint {
    return symmetricMod([d === 1n ? a : a * this.inverse(d)], this.modulus)[0] ?? 0n;
  }

  private inverse(d: bigint): bigint {
    let inverse = this.inverses.get(d);
    if (inverse === undefined) {
      inverse = inverseBig(d, this.modulus);
      this.inverses.set(d, inverse);
    }
    return inverse;
  }
}
