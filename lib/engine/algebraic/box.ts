/**
 * Rectangles of the complex plane with integer corners over 2^P, rounded outwards: the ball arithmetic of numbers
 * beyond square roots. Every operation encloses every result that its arguments allow.
 */
import type { Enclosure } from '../enclosure';
import type { IntegerPoly } from '../polynomials/integer-poly';

export interface Box {
  readonly re: Enclosure;
  readonly im: Enclosure;
}

const ZERO: Enclosure = { low: 0n, high: 0n };

export const pointBox = (n: bigint, P: number): Box => ({
  re: { low: n << BigInt(P), high: n << BigInt(P) },
  im: ZERO,
});

export const realBox = (re: Enclosure): Box => ({ re, im: ZERO });

const add = (a: Enclosure, b: Enclosure): Enclosure => ({
  low: a.low + b.low,
  high: a.high + b.high,
});
const negate = (a: Enclosure): Enclosure => ({ low: -a.high, high: -a.low });
const subtract = (a: Enclosure, b: Enclosure): Enclosure => ({
  low: a.low - b.high,
  high: a.high - b.low,
});

function multiply(a: Enclosure, b: Enclosure, p: bigint): Enclosure {
  if (a.low >= 0n && b.low >= 0n) {
    return { low: (a.low * b.low) >> p, high: -(-(a.high * b.high) >> p) };
  }
  const products = [a.low * b.low, a.low * b.high, a.high * b.low, a.high * b.high];
  let [low, high] = [products[0] as bigint, products[0] as bigint];
  for (const x of products) {
    if (x < low) low = x;
    if (x > high) high = x;
  }
  return { low: low >> p, high: -(-high >> p) };
}

export const addBox = (a: Box, b: Box): Box => ({ re: add(a.re, b.re), im: add(a.im, b.im) });
export const negateBox = (a: Box): Box => ({ re: negate(a.re), im: negate(a.im) });
export const subtractBox = (a: Box, b: Box): Box => ({
  re: subtract(a.re, b.re),
  im: subtract(a.im, b.im),
});
export const conjugateBox = (a: Box): Box => ({ re: a.re, im: negate(a.im) });

const isZeroPart = (a: Enclosure): boolean => a.low === 0n && a.high === 0n;

export function multiplyBox(a: Box, b: Box, P: number): Box {
  const p = BigInt(P);
  if (isZeroPart(a.im) && isZeroPart(b.im)) return realBox(multiply(a.re, b.re, p));
  return {
    re: subtract(multiply(a.re, b.re, p), multiply(a.im, b.im, p)),
    im: add(multiply(a.re, b.im, p), multiply(a.im, b.re, p)),
  };
}

const straddles = (a: Enclosure): boolean => a.low <= 0n && a.high >= 0n;
export const holdsZero = (a: Box): boolean => straddles(a.re) && straddles(a.im);

function square(a: Enclosure, p: bigint): Enclosure {
  const s = multiply(a, a, p);
  if (straddles(a)) return { low: 0n, high: s.high };
  const least = a.low > 0n ? a.low : -a.high;
  return { low: (least * least) >> p, high: s.high };
}

/** 1/a, or null where the box comes too near to zero for this precision. */
export function invertBox(a: Box, P: number): Box | null {
  const p = BigInt(P);
  const size = add(square(a.re, p), square(a.im, p));
  if (size.low <= 0n) return null;
  const one = 1n << (2n * p);
  const scale: Enclosure = { low: one / size.high, high: one / size.low + 1n };
  return { re: multiply(a.re, scale, p), im: negate(multiply(a.im, scale, p)) };
}

/** An integer polynomial at a box, by Horner's rule. */
export function evaluateBox(f: IntegerPoly, at: Box, P: number): Box {
  const p = BigInt(P);
  let value: Box = { re: ZERO, im: ZERO };
  for (let k = f.length - 1; k >= 0; k--) {
    const c = (f[k] as bigint) << p;
    value = multiplyBox(value, at, P);
    value = { re: { low: value.re.low + c, high: value.re.high + c }, im: value.im };
  }
  return value;
}

const inside = (a: Enclosure, b: Enclosure): boolean => a.low > b.low && a.high < b.high;
/** Whether a lies in the interior of b. */
export const isInside = (a: Box, b: Box): boolean => inside(a.re, b.re) && inside(a.im, b.im);

const apart = (a: Enclosure, b: Enclosure): boolean => a.high < b.low || b.high < a.low;
export const areApart = (a: Box, b: Box): boolean => apart(a.re, b.re) || apart(a.im, b.im);

const hull = (a: Enclosure, b: Enclosure): Enclosure => ({
  low: a.low < b.low ? a.low : b.low,
  high: a.high > b.high ? a.high : b.high,
});
export const hullBox = (a: Box, b: Box): Box => ({ re: hull(a.re, b.re), im: hull(a.im, b.im) });

const meet = (a: Enclosure, b: Enclosure): Enclosure => ({
  low: a.low > b.low ? a.low : b.low,
  high: a.high < b.high ? a.high : b.high,
});
export const meetBox = (a: Box, b: Box): Box => ({ re: meet(a.re, b.re), im: meet(a.im, b.im) });

const middle = (a: Enclosure): Enclosure => {
  const m = (a.low + a.high) >> 1n;
  return { low: m, high: m };
};
export const middleBox = (a: Box): Box => ({ re: middle(a.re), im: middle(a.im) });

/** The box widened by its own width and `units` on every side. */
export function widenBox(a: Box, units: bigint): Box {
  const by = (e: Enclosure): Enclosure => {
    const w = e.high - e.low + units;
    return { low: e.low - w, high: e.high + w };
  };
  return { re: by(a.re), im: by(a.im) };
}

/** The same box over 2^to. */
export function rescaleBox(a: Box, from: number, to: number): Box {
  const shift = BigInt(Math.abs(to - from));
  const by = (e: Enclosure): Enclosure =>
    to >= from
      ? { low: e.low << shift, high: e.high << shift }
      : { low: e.low >> shift, high: -(-e.high >> shift) };
  return { re: by(a.re), im: by(a.im) };
}

export const widthOf = (a: Box): bigint => {
  const w = a.re.high - a.re.low;
  const h = a.im.high - a.im.low;
  return w > h ? w : h;
};
