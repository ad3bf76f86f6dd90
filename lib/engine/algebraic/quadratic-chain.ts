/**
 * Is a number with this minimal polynomial a nested square root over the rationals, and of what?
 *
 * α is constructible iff Q(α) is reached by quadratic steps. The Galois group is then a 2-group, in which every
 * proper subgroup is properly contained in its normaliser; so Q(α) ≠ Q has an involution, and its fixed
 * field is one step lower (Rotman, Galois Theory; Landau & Miller 1985 for the tower of subfields). Going down
 * involution by involution therefore decides, and gives α = β/2 ± √(β²/4 − γ) with β = α+σ(α) and
 * γ = α·σ(α) one step lower.
 */
import type { Charge } from '../polynomials/factor';
import { squarefreeParts } from '../polynomials/gcd';
import { degreeOf, leadingOf, type IntegerPoly } from '../polynomials/integer-poly';
import { findInvolution, linearSplitting, oddSplitting, type Splitting } from './automorphisms';
import { NumberField, type FieldElement } from './number-field';

/** A rational combination Σ c_k θ^k over one denominator. */
export interface Combination {
  readonly numerator: readonly bigint[];
  readonly denominator: bigint;
}

/** One step: α/scale… is a root of x² − β x + γ, β and γ combinations of the powers of θ, θ one step lower. */
export interface QuadraticStep {
  /** Monic minimal polynomial of the integral multiple scale·α that the step speaks of. */
  readonly polynomial: IntegerPoly;
  readonly scale: bigint;
  /** θ as a combination of powers of scale·α. */
  readonly theta: Combination;
  readonly beta: Combination;
  readonly gamma: Combination;
}

export type Chain =
  | {
      readonly kind: 'chain';
      readonly steps: readonly QuadraticStep[];
      readonly bottom: IntegerPoly;
    }
  | { readonly kind: 'degree'; readonly degree: number }
  | { readonly kind: 'splitting'; readonly splitting: Splitting; readonly degree: number }
  | { readonly kind: 'stuck'; readonly degree: number };

const isPowerOfTwo = (n: number): boolean => (n & (n - 1)) === 0;

/** The least s > 0, among products of small primes and one cofactor, with s·α integral, and that number's polynomial. */
function makeMonic(f: IntegerPoly): { monic: IntegerPoly; scale: bigint } {
  const lead = leadingOf(f);
  const n = degreeOf(f);
  const fits = (s: bigint): boolean => {
    let power = 1n;
    for (let k = n; k >= 0; k--) {
      if (((f[k] as bigint) * power) % lead !== 0n) return false;
      power *= s;
    }
    return true;
  };
  // s = lead always fits; every small prime is taken out of it as long as that still fits.
  let scale = lead;
  for (const p of [2n, 3n, 5n, 7n, 11n, 13n, 17n, 19n, 23n, 29n, 31n, 37n, 41n, 43n, 47n]) {
    while (scale % p === 0n && fits(scale / p)) scale /= p;
  }
  let power = 1n;
  const monic: bigint[] = new Array<bigint>(n + 1).fill(0n);
  for (let k = n; k >= 0; k--) {
    monic[k] = ((f[k] as bigint) * power) / lead;
    power *= scale;
  }
  return { monic, scale };
}

/** Generators of the fixed field tried in turn: symmetric in α and σ(α). */
function* symmetricElements(field: NumberField, image: FieldElement): Generator<FieldElement> {
  const a = field.generator;
  const sum = field.add(a, image);
  const product = field.multiply(a, image);
  yield sum;
  yield product;
  for (let k = 1n; ; k++) {
    yield field.add(product, field.scale(sum, k, 1n));
    yield field.add(product, field.scale(sum, -k, 1n));
  }
}

function stepBelow(
  field: NumberField,
  image: FieldElement,
): Omit<QuadraticStep, 'scale'> & { lower: IntegerPoly } {
  const half = field.degree / 2;
  for (const candidate of symmetricElements(field, image)) {
    const [part, ...more] = squarefreeParts(field.characteristicPolynomial(candidate));
    if (part === undefined || more.length > 0 || degreeOf(part.part) !== half) continue;
    const theta: FieldElement = { numerator: candidate.numerator, denominator: 1n };
    const powers: FieldElement[] = [field.element([1n], 1n)];
    for (let k = 1; k < half; k++) {
      powers.push(field.multiply(powers[k - 1] as FieldElement, theta));
    }
    const express = (a: FieldElement): Combination => {
      const solution = field.combination(powers, a);
      if (solution === null)
        throw new RangeError('a symmetric element lies outside the fixed field');
      return { numerator: solution.map(({ n }) => n), denominator: solution[0]?.d ?? 1n };
    };
    return {
      polynomial: field.modulus,
      theta,
      beta: express(field.add(field.generator, image)),
      gamma: express(field.multiply(field.generator, image)),
      lower: part.part,
    };
  }
  throw new RangeError('the search for a generator of the fixed field does not end');
}

/** The minimal polynomial of a generator of the field one quadratic step below, or null when no involution was found. */
export function fieldBelow(f: IntegerPoly, charge: Charge): IntegerPoly | null {
  const { monic } = makeMonic(f);
  const linear = linearSplitting(monic, charge);
  if (linear === null) return null;
  const field = new NumberField(monic);
  const image = findInvolution(field, linear, charge);
  return image === null ? null : stepBelow(field, image).lower;
}

/**
 * Decides for an irreducible integer polynomial. The steps come top first; the last one rests on the rationals.
 */
export function quadraticChain(f: IntegerPoly, charge: Charge): Chain {
  const degree = degreeOf(f);
  if (!isPowerOfTwo(degree)) return { kind: 'degree', degree };
  const steps: QuadraticStep[] = [];
  let current = f;
  while (degreeOf(current) > 1) {
    const { monic, scale } = makeMonic(current);
    const odd = oddSplitting(monic, charge);
    if (odd !== null) return { kind: 'splitting', splitting: odd, degree: degreeOf(current) };
    const linear = linearSplitting(monic, charge);
    if (linear === null) throw new RangeError('no prime below 2^15 has a linear factor');
    const field = new NumberField(monic);
    const image = findInvolution(field, linear, charge);
    if (image === null) return { kind: 'stuck', degree: degreeOf(current) };
    const { lower, ...step } = stepBelow(field, image);
    steps.push({ ...step, scale });
    current = lower;
  }
  return { kind: 'chain', steps, bottom: current };
}
