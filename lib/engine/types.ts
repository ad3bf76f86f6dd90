/**
 * The interface of the exact engine: every exported name another part may bind to.
 *
 * A value of the engine is a constructible number, real or complex, held exactly. Everything that is
 * asked of it (zero, sign, order, degree, digits) is decided exactly; a limit that is met is reported
 * by name and never turned into a guess.
 */

import type { PackedNum } from './packed';

/**
 * What the engine is willing to spend. All limits are counted in steps, bits and counts, never in time, so
 * that every machine stops at the same place.
 */
export interface Limits {
  /** Largest size in bits of any integer that stands in a value (numerator, coordinate, denominator). */
  integerBits: number;
  /** Largest number of square roots of non-rational numbers in the tower of one value. */
  towerHeight: number;
  /** Deepest nesting of square roots. */
  nesting: number;
  /** Largest number of terms (coordinates that are not zero) of one value. */
  terms: number;
  /** Largest degree for which the degree of a nested value and a minimal polynomial are worked out. */
  degree: number;
  /** Most significant digits of a decimal. */
  digits: number;
  /** Work of one `attempt`, in units of about a tenth of a microsecond of a machine of 2020. */
  steps: number;
}

/** The one shape in which work inside the engine ends. Programmer mistakes throw instead. */
export type Outcome<T> =
  | { kind: 'value'; value: T }
  | { kind: 'outside-domain'; code: 'division-by-zero' | 'domain' | 'not-exact'; message: string }
  | {
      kind: 'over-limit';
      code: 'limit-size' | 'limit-tower' | 'limit-digits' | 'limit-time';
      limit: keyof Limits;
      allowed: number;
      met: number;
      message: string;
    };

declare const opaque: unique symbol;

/** An exact number. Opaque and immutable; it belongs to the engine that made it. */
export interface Num {
  readonly [opaque]: 'exact number';
}

/** A correctly rounded decimal (half to even), `digits` significant digits for each part. */
export interface Decimal {
  re: string;
  im: string | null;
  digits: number;
  terminates: boolean;
}

/** Rounding to a multiple of a step. `up` is towards +∞, `down` towards −∞. */
export type Rounding = 'half-even' | 'half-up' | 'up' | 'down';

/** A multiple of a step, and on which side of the value it lies. */
export interface Multiple {
  multiple: bigint;
  direction: 'up' | 'down' | 'exact';
}

/** A value in writing. `staged` is true when it is a chain of named quadratics. */
export interface Written {
  text: string;
  tex: string;
  staged: boolean;
}

/** One square root of a tower, lowest first. */
export interface TowerStep {
  name: string;
  radicand: string;
  tex: string;
}

/**
 * A proof on paper of what a value is. Coordinates are listed as `[set, integer]` where the set names the roots
 * whose product the integer multiplies; every element is its coordinates over one common denominator.
 */
export interface CertificateElement {
  denominator: string;
  terms: [number[], string][];
}

/** An interval low/2^bits … high/2^bits. */
export interface CertificateEnclosure {
  low: string;
  high: string;
  bits: number;
}

/**
 * Why a radicand is no square in the field below: the prime factors of an integer radicand, or a prime and residues of
 * the lower roots under which a nested radicand becomes a quadratic non-residue.
 */
export type CertificateWitness = { factors: string[] } | { prime: number; residues: number[] };

/** One root of the certificate's tower, lowest first: the positive root of its radicand. */
export interface CertificateRoot {
  name: string;
  radicand: CertificateElement;
  enclosure: CertificateEnclosure;
  witness: CertificateWitness;
}

/** See lib/engine/README.md for the format and for what its verifier checks. */
export interface Certificate {
  format: 'surdwork-certificate';
  version: 1;
  roots: CertificateRoot[];
  value: { re: CertificateElement; im: CertificateElement };
  degree: number;
  /** Highest power first, primitive, leading one positive. */
  minimalPolynomial: string[];
  enclosure: { re: CertificateEnclosure; im: CertificateEnclosure };
}

/**
 * Which tools reach a number. The kinds other than `constructible` say why square roots do not reach it: its degree is
 * no power of two; or its polynomial splits modulo a prime into factors whose degrees show an element of the Galois
 * group of an order that is no power of two (Dedekind); or a field on the way down to the rationals has no quadratic
 * step below it; or the question went over a limit. `division` is n for values that go with the division of a turn into n parts.
 */
export type Reach =
  | { kind: 'constructible' }
  | ((
      | { kind: 'degree'; degree: number }
      | {
          kind: 'splitting';
          degree: number;
          splitting: { prime: number; degrees: readonly number[] };
        }
      | { kind: 'stuck'; degree: number }
      | { kind: 'undecided'; degree: number }
    ) & {
      /**
       * Whether an angle trisector helps, and what tells: the division, an order in the Galois group, real roots of cubics.
       * Not decided where a cubic has coefficients that are not real (in a degree above 9), where a step of degree 16 or more, or of 9 over
       * a larger field, has no fields between, and where the search for subfields is too long.
       */
      trisector:
        | { reaches: boolean; by: 'division' | 'order' | 'cubic' }
        | { reaches: null; by: 'open'; why: 'coefficients' | 'step' | 'limit' };
      division: bigint | null;
    });

/**
 * One engine serves one request: it holds the towers and caches of that request and nothing outside it.
 * The same calls in the same order give the same answers on every machine.
 *
 * All operations are meant to be called inside `attempt`; outside it a failure is thrown.
 */
export interface Engine {
  /** Runs `work` with a fresh step budget and turns the engine's own failures into data. Nested calls share the outer budget. */
  attempt<T>(work: () => T): Outcome<T>;

  /** The integer n. A number must be a safe integer. */
  integer(n: bigint | number): Num;
  /** n/d; `division-by-zero` when d is 0. */
  rational(n: bigint, d: bigint): Num;
  /** The imaginary unit. */
  readonly i: Num;

  add(a: Num, b: Num): Num;
  sub(a: Num, b: Num): Num;
  mul(a: Num, b: Num): Num;
  /** a/b; `division-by-zero` when b is exactly 0. */
  div(a: Num, b: Num): Num;
  neg(a: Num): Num;
  /** 1/a; `division-by-zero` when a is exactly 0. */
  inverse(a: Num): Num;
  /** aⁿ for an integer n; 0⁰ = 1; `division-by-zero` for 0 to a negative power. */
  pow(a: Num, n: bigint): Num;
  /** The principal square root: real part ≥ 0, and imaginary part ≥ 0 where the real part is 0. Denested where it can be. */
  sqrt(a: Num): Num;

  /** The real root of this index of a real number, in square roots where they reach it; `domain` for an even root of a negative number. */
  realRoot(a: Num, index: number): Num;
  /** The principal root of this index of any number: its argument is that part of the number's own argument in (−π, π]. */
  principalRoot(a: Num, index: number): Num;
  /** The root nearest to `near` of a polynomial of positive degree, highest power first; `domain` when two are equally near. */
  nearestRoot(polynomial: readonly bigint[], near: Num): Num;
  /** The same for a polynomial with any coefficients, highest power first, the first one not 0. */
  nearestRootOf(coefficients: readonly Num[], near: Num): Num;
  /** All roots of a polynomial of positive degree, highest power first, each once; those reached by square roots as such. */
  roots(coefficients: readonly Num[]): Num[];

  re(a: Num): Num;
  im(a: Num): Num;
  conj(a: Num): Num;
  /** |a| = √(a·ā). */
  abs(a: Num): Num;

  isZero(a: Num): boolean;
  isReal(a: Num): boolean;
  isRational(a: Num): boolean;
  isInteger(a: Num): boolean;
  equal(a: Num, b: Num): boolean;
  /** Sign of a real number; `domain` for a non-real one. */
  sign(a: Num): -1 | 0 | 1;
  /** Order of two real numbers; `domain` when either is not real. */
  compare(a: Num, b: Num): -1 | 0 | 1;
  /** Numerator and positive denominator in lowest terms, or null when a is not rational. */
  asRational(a: Num): { n: bigint; d: bigint } | null;
  /** Largest integer not above a; `domain` for a non-real number. */
  floor(a: Num): bigint;
  /** Nearest integer, ties to the even one; `domain` for a non-real number. */
  round(a: Num): bigint;

  /** cos of k/n of a turn, in square roots where they reach it; other divisions up to 2000. */
  cosTurn(k: bigint, n: bigint): Num;
  /** sin of k/n of a turn; as `cosTurn`. */
  sinTurn(k: bigint, n: bigint): Num;
  /** e^(2πik/n); as `cosTurn`. */
  rootOfUnity(k: bigint, n: bigint): Num;

  /** k and n in lowest terms, 0 ≤ k < n, when the number is e^(2πik/n) of degree up to 64; null when it is no root of unity. */
  partOfTurn(a: Num): { k: bigint; n: bigint } | null;

  /** Degree of the minimal polynomial over the rationals. */
  degree(a: Num): number;
  /** Minimal polynomial over the integers: highest power first, primitive, leading coefficient positive. */
  minimalPolynomial(a: Num): bigint[];

  /** Correctly rounded significant digits, half to even. */
  decimal(a: Num, digits: number): Decimal;
  /** The multiple of n/d that a real number rounds to, with the side it lies on. */
  roundToMultiple(a: Num, step: { n: bigint; d: bigint }, rounding: Rounding): Multiple;

  /** Text that parses back to the same value, and TeX. Equal values are written alike within one engine. */
  write(a: Num): Written;
  /** The square roots that the value needs, lowest first; null when square roots do not reach it. */
  tower(a: Num): TowerStep[] | null;
  /** Which tools reach the value, and why not. */
  reach(a: Num): Reach;
  /** Whether something is a number of this engine. Never fails. */
  holds(x: unknown): x is Num;
  /** A number as plain data that outlives the engine. Cost: the length of its coordinates. */
  pack(a: Num): PackedNum;
  /** A packed number as one of this engine. Each of its roots is taken anew, and so proven here; a limit may be met. */
  unpack(packed: PackedNum): Num;

  /** A certificate that an independent program can check. */
  certificate(a: Num): Certificate;
}
