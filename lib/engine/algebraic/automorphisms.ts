/**
 * Involutions of the field that one algebraic number generates, found p-adically and proven.
 *
 * Let f be monic, irreducible over the integers, of degree n, and α a root. An automorphism of Q(α) sends α to
 * another root h(α) of f. At a prime p where f stays squarefree and has a linear factor x − r, the field lies in
 * the p-adic numbers with α ↦ r, and h(α) ↦ another p-adic root of f, hence another linear factor. With Euler's
 * dual basis, f′(α)·h(α) = Σ c_k α^k has integer c_k of known size, so that c is the short vector of a class of
 * a lattice (Lenstra, Lenstra & Lovász 1982; Babai 1986); substitution then proves or refutes it.
 */
import type { Charge } from '../polynomials/factor';
import { splitByDegree, factorMod, isSquarefreeMod } from '../polynomials/factor-mod';
import {
  ceilingRoot,
  degreeOf,
  derivativeOf,
  evaluateAt,
  normSquared,
  type IntegerPoly,
} from '../polynomials/integer-poly';
import { inverseBig, symmetricMod } from '../polynomials/hensel';
import { reduceAgainst, reduceLattice, type Row } from '../polynomials/lattice';
import { monicMod, reduceMod } from '../polynomials/mod-poly';
import type { FieldElement, NumberField } from './number-field';
import { smallPrimes } from '../polynomials/primes';

/** How f splits modulo a prime that keeps it squarefree: the degrees of its factors, lowest first. */
export interface Splitting {
  readonly prime: number;
  readonly degrees: readonly number[];
}

const isPowerOfTwo = (n: number): boolean => (n & (n - 1)) === 0;

/** How many primes are looked at for a splitting that already decides; a count, so that machines agree. */
const PRIMES_LOOKED_AT = 60;

function splittingAt(f: IntegerPoly, p: number): Splitting | null {
  const image = reduceMod(f, p);
  if (!isSquarefreeMod(image, p)) return null;
  const degrees = splitByDegree(monicMod(image, p), p).flatMap(({ degree, product }) =>
    new Array<number>((product.length - 1) / degree).fill(degree),
  );
  return { prime: p, degrees };
}

/**
 * A splitting that no group of order 2^a allows, if one is met among the first primes. By Dedekind's theorem the
 * degrees are the cycle lengths of an element of the Galois group, so that one that is not a power of two proves
 * the group's order not to be one.
 */
export function oddSplitting(f: IntegerPoly, charge: Charge): Splitting | null {
  let looked = 0;
  for (const p of smallPrimes()) {
    charge(f.length * f.length * 16);
    const splitting = splittingAt(f, p);
    if (splitting === null) continue;
    if (!splitting.degrees.every(isPowerOfTwo)) return splitting;
    if (++looked >= PRIMES_LOOKED_AT) break;
  }
  return null;
}

/** A splitting with a linear factor among the first primes looked at, with as few linear factors as can be. */
export function linearSplitting(f: IntegerPoly, charge: Charge): Splitting | null {
  let best: Splitting | null = null;
  let fewest = Infinity;
  let looked = 0;
  for (const p of smallPrimes()) {
    charge(f.length * f.length * 16);
    const splitting = splittingAt(f, p);
    if (splitting === null) continue;
    const ones = splitting.degrees.filter((degree) => degree === 1).length;
    if (ones > 0 && ones < fewest) {
      best = splitting;
      fewest = ones;
    }
    if (++looked >= PRIMES_LOOKED_AT && best !== null) break;
  }
  return best;
}

/** Lifts a simple root of f modulo p to p^(2^k) ≥ bound by Newton's iteration. */
function liftRoot(
  f: IntegerPoly,
  r: bigint,
  p: bigint,
  bound: bigint,
): { root: bigint; modulus: bigint } {
  let root = r;
  let modulus = p;
  const slope = derivativeOf(f);
  while (modulus < bound) {
    modulus *= modulus;
    const correction = evaluateAt(f, root) * inverseBig(evaluateAt(slope, root), modulus);
    root = (((root - correction) % modulus) + modulus) % modulus;
  }
  return { root, modulus };
}

/** A bound for every |c_k| in f′(α)·h(α) = Σ c_k α^k, h(α) a conjugate of α. */
function dualBound(f: IntegerPoly): bigint {
  const n = degreeOf(f);
  // c_k = Tr(h(α)·b_k), f(x)/(x−α) = Σ b_k x^k; |b_k| ≤ 2^(n−1)·‖f‖₂ (Mignotte), |h(α)| ≤ 1 + max |f_k| (Cauchy).
  const root = 1n + f.reduce((most, c) => (c > most ? c : -c > most ? -c : most), 0n);
  return (BigInt(n) << BigInt(n - 1)) * ceilingRoot(normSquared(f)) * root;
}

/** The class lattice {v : Σ v_k r^k ≡ 0 mod m}, reduced, with Gram–Schmidt vectors longer than 2·bound. */
function reducedClasses(
  f: IntegerPoly,
  r: bigint,
  p: bigint,
  bound: bigint,
  charge: Charge,
): { basis: Row[]; root: bigint; modulus: bigint } {
  const n = degreeOf(f);
  // First size tried: determinant (4·bound)^n with the loss 2^(n²/4) of the reduction.
  let size = ((4n * bound) ** BigInt(n)) << BigInt((n * n) >> 2);
  for (;;) {
    const { root, modulus } = liftRoot(f, r, p, size);
    const basis: Row[] = [];
    let power = 1n;
    for (let k = 0; k < n; k++) {
      const row: Row = new Array<bigint>(n).fill(0n);
      if (k === 0) row[0] = modulus;
      else {
        row[0] = symmetricMod([-power], modulus)[0] ?? 0n;
        row[k] = 1n;
      }
      basis.push(row);
      power = (power * root) % modulus;
    }
    charge(n ** 4 * modulus.toString(16).length);
    const d = reduceLattice(basis);
    const limit = 4n * bound * bound * BigInt(n);
    const wide = basis.every((_, k) => (d[k + 1] as bigint) > limit * (d[k] as bigint));
    if (wide) return { basis, root, modulus };
    size = modulus * modulus;
  }
}

/**
 * An involution of Q(α), as the image of α, or null when there is none.
 * Needs: f monic irreducible of degree ≥ 2, `linear` a splitting of it with a linear factor.
 * Cost: one lattice reduction of dimension n on numbers of O(n·log(bound)) bits.
 */
export function findInvolution(
  field: NumberField,
  linear: Splitting,
  charge: Charge,
): FieldElement | null {
  const f = field.modulus;
  const p = BigInt(linear.prime);
  const roots = factorMod(monicMod(reduceMod(f, linear.prime), linear.prime), linear.prime)
    .filter((factor) => factor.length === 2)
    .map((factor) => (p - BigInt(factor[0] as number)) % p);
  const [first, ...others] = roots;
  if (first === undefined || others.length === 0) return null;
  const bound = dualBound(f);
  const { basis, root, modulus } = reducedClasses(f, first, p, bound, charge);
  const slope: FieldElement = { numerator: derivativeOf(f), denominator: 1n };
  const inverse = field.inverse(slope);
  for (const other of others) {
    const image = liftRoot(f, other, p, modulus).root % modulus;
    const target: Row = new Array<bigint>(degreeOf(f)).fill(0n);
    target[0] = (evaluateAt(slope.numerator, root) * image) % modulus;
    const c = reduceAgainst(basis, target);
    if (c.some((entry) => entry > bound || -entry > bound)) continue;
    const h = field.multiply(field.element(c, 1n), inverse);
    const isRoot = field.isZero(field.substitute(f, h));
    if (isRoot && field.equal(field.substituteElement(h, h), field.generator)) return h;
  }
  return null;
}
