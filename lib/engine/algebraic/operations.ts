/** Field operations, roots and conjugates of algebraic numbers; results are in lowest terms, rationals apart. */
import type { Budget } from '../limits';
import { squarefreeParts } from '../polynomials/gcd';
import { degreeOf, gcdOf, type IntegerPoly } from '../polynomials/integer-poly';
import {
  identify,
  identifyRoot,
  isFraction,
  isSame,
  Algebraic,
  type Fraction,
  type Root,
} from './algebraic';
import { addBox, conjugateBox, invertBox, multiplyBox, negateBox, pointBox, type Box } from './box';
import {
  composedProduct,
  composedSum,
  invertRoots,
  multiplyRoots,
  negateRoots,
  powerRoots,
  rootsOfRoots,
  shiftRoots,
} from './composed';

/** The largest degree of a polynomial that is factored on the way to a result. */
export const COMPOSED_DEGREE = 300;

export function fraction(n: bigint, d: bigint): Fraction {
  const g = gcdOf(n, d) * (d < 0n ? -1n : 1n);
  return { n: n / g, d: d / g };
}

function fractionBox(a: Fraction, P: number): Box {
  const scaled = a.n << BigInt(P);
  const low = scaled >= 0n || scaled % a.d === 0n ? scaled / a.d : scaled / a.d - 1n;
  const high = low * a.d === scaled ? low : low + 1n;
  return { re: { low, high }, im: { low: 0n, high: 0n } };
}

export const boxOf = (a: Root, P: number): Box => (isFraction(a) ? fractionBox(a, P) : a.box(P));

export function negate(a: Root): Root {
  if (isFraction(a)) return { n: -a.n, d: a.d };
  return new Algebraic(negateRoots(a.poly), a.isReal, (P) => negateBox(a.box(P)), a.origin);
}

export function conjugate(a: Root): Root {
  if (isFraction(a) || a.isReal) return a;
  return new Algebraic(a.poly, false, (P) => conjugateBox(a.box(P)));
}

/** 1/a for a ≠ 0. */
export function invert(a: Root): Root {
  if (isFraction(a)) return fraction(a.d, a.n);
  return new Algebraic(invertRoots(a.poly), a.isReal, (P) => {
    for (let Q = P + 32; ; Q *= 2) {
      const inverse = invertBox(a.box(Q), Q);
      if (inverse !== null) return shrink(inverse, Q, P);
    }
  });
}

function shrink(a: Box, from: number, to: number): Box {
  const s = BigInt(from - to);
  const part = (e: { low: bigint; high: bigint }): { low: bigint; high: bigint } => ({
    low: e.low >> s,
    high: -(-e.high >> s),
  });
  return { re: part(a.re), im: part(a.im) };
}

function checkComposed(a: Algebraic, b: Algebraic, budget: Budget): void {
  const degree = a.degree * b.degree;
  if (degree > COMPOSED_DEGREE) budget.within('degree', degree);
  budget.charge(degree * degree * 8);
}

export function add(a: Root, b: Root, budget: Budget): Root {
  if (isFraction(a)) {
    if (isFraction(b)) return fraction(a.n * b.d + b.n * a.d, a.d * b.d);
    return add(b, a, budget);
  }
  if (isFraction(b)) {
    if (b.n === 0n) return a;
    return new Algebraic(
      shiftRoots(a.poly, b.n, b.d),
      a.isReal,
      (P) => addBox(a.box(P), fractionBox(b, P)),
      a.origin,
    );
  }
  checkComposed(a, b, budget);
  return identifyRoot(composedSum(a.poly, b.poly), (P) => addBox(a.box(P), b.box(P)), budget);
}

export function multiply(a: Root, b: Root, budget: Budget): Root {
  if (isFraction(a)) {
    if (isFraction(b)) return fraction(a.n * b.n, a.d * b.d);
    return multiply(b, a, budget);
  }
  if (isFraction(b)) {
    if (b.n === 0n) return b;
    return new Algebraic(
      multiplyRoots(a.poly, b.n, b.d),
      a.isReal,
      (P) => multiplyBox(a.box(P), fractionBox(b, P), P),
      a.origin,
    );
  }
  if (a === b) return power(a, 2, budget);
  checkComposed(a, b, budget);
  return identifyRoot(
    composedProduct(a.poly, b.poly),
    (P) => multiplyBox(a.box(P), b.box(P), P),
    budget,
  );
}

/** a^e for e ≥ 1. The polynomial of all conjugates' powers is a power of the minimal one: nothing is factored. */
export function power(a: Root, e: number, budget: Budget): Root {
  if (isFraction(a)) return fraction(a.n ** BigInt(e), a.d ** BigInt(e));
  if (e === 1) return a;
  budget.charge(a.degree * a.degree * e * e);
  const [part] = squarefreeParts(powerRoots(a.poly, e));
  if (part === undefined) throw new RangeError('a power has no polynomial');
  return identify(
    [part.part],
    (P) => {
      let value = pointBox(1n, P);
      const base = a.box(P);
      for (const bit of e.toString(2)) {
        value = multiplyBox(value, value, P);
        if (bit === '1') value = multiplyBox(value, base, P);
      }
      return value;
    },
    budget,
  );
}

/** The e-th root that `enclose` closes in on. */
export function rootOf(
  a: Root,
  e: number,
  enclose: (P: number) => Box | null,
  budget: Budget,
): Root {
  const poly: IntegerPoly = isFraction(a) ? [-a.n, a.d] : a.poly;
  const degree = degreeOf(poly) * e;
  if (degree > COMPOSED_DEGREE) budget.within('degree', degree);
  budget.charge(degree * degree * 8);
  return identifyRoot(rootsOfRoots(poly, e), enclose, budget);
}

export function equal(a: Root, b: Root, budget: Budget): boolean {
  if (isFraction(a)) return isFraction(b) && a.n === b.n && a.d === b.d;
  return !isFraction(b) && isSame(a, b, budget);
}

/** Order of two real numbers. */
export function compare(a: Root, b: Root, budget: Budget): -1 | 0 | 1 {
  if (equal(a, b, budget)) return 0;
  for (let P = 64; ; P *= 2) {
    budget.charge(P);
    const [x, y] = [boxOf(a, P).re, boxOf(b, P).re];
    if (x.high < y.low) return -1;
    if (y.high < x.low) return 1;
  }
}
