/** Principal and real roots of algebraic numbers: the enclosures that pick one root of f(x^e). */
import { bitLength, isqrt } from '../integers';
import { OutsideDomain, type Budget } from '../limits';
import { isFraction, type Algebraic, type Root } from './algebraic';
import { holdsZero, multiplyBox, realBox, rescaleBox, type Box } from './box';
import { boxOf, negate, rootOf } from './operations';
import { wholeRoot } from './whole-root';

const rootDown = (n: bigint): bigint => (n <= 0n ? 0n : isqrt(n));
const rootUp = (n: bigint): bigint => (n <= 0n ? 0n : isqrt(n) + 1n);

/** The principal root of every number in the box, or null where the box meets the negative axis or zero. */
function squareRootBox(a: Box, P: number): Box | null {
  const p = BigInt(P);
  const flat = a.im.low === 0n && a.im.high === 0n;
  if (flat) {
    if (a.re.low >= 0n) {
      return realBox({ low: rootDown(a.re.low << p), high: rootUp(a.re.high << p) });
    }
    if (a.re.high <= 0n) {
      return {
        re: { low: 0n, high: 0n },
        im: { low: rootDown(-a.re.high << p), high: rootUp(-a.re.low << p) },
      };
    }
    return null;
  }
  if (a.re.low <= 0n && a.im.low <= 0n && a.im.high >= 0n) return null;
  // |z| between roots of squares, then √((|z| + x)/2) for the real part and y/(2·re) for the other.
  const square = (low: bigint, high: bigint): { low: bigint; high: bigint } => {
    const [l, h] = [low * low, high * high];
    if (low <= 0n && high >= 0n) return { low: 0n, high: l > h ? l : h };
    return l < h ? { low: l, high: h } : { low: h, high: l };
  };
  const x2 = square(a.re.low, a.re.high);
  const y2 = square(a.im.low, a.im.high);
  const size = { low: rootDown(x2.low + y2.low), high: rootUp(x2.high + y2.high) };
  const twice = { low: size.low + a.re.low, high: size.high + a.re.high };
  if (twice.low <= 0n) return null;
  const re = { low: rootDown((twice.low << p) >> 1n), high: rootUp((twice.high << p) >> 1n) + 1n };
  if (re.low <= 0n) return null;
  const inverse = {
    low: (1n << (2n * p)) / (2n * re.high),
    high: (1n << (2n * p)) / (2n * re.low) + 1n,
  };
  return { re, im: multiplyBox(realBox(a.im), realBox(inverse), P).re };
}

export function principalSquareRoot(a: Algebraic, budget: Budget): Root {
  return rootOf(a, 2, (P) => squareRootBox(a.box(P), P), budget);
}

/** A whole number above |ln z| for every z of a box that leaves zero out: |ln|z|| + π at the most. */
function logarithmBound(a: Box, P: number): number {
  const least = ({ low, high }: Box['re']): bigint => (low > 0n ? low : high < 0n ? -high : 0n);
  const most = ({ low, high }: Box['re']): bigint => (-low > high ? -low : high);
  const above = bitLength(most(a.re) > most(a.im) ? most(a.re) : most(a.im)) + 1 - P;
  const below = bitLength(least(a.re) > least(a.im) ? least(a.re) : least(a.im)) - 1 - P;
  return Math.max(Math.abs(above), Math.abs(below)) + 4;
}

/**
 * The principal e-th root of every number in the box, or null where the box is too wide. 1/e is written to the base 2 and
 * a^(1/e) = ∏ a^(2^-k) over its digits 1: every factor is a principal square root of a principal square root, so the
 * arguments add up to arg(a)/e and no other root can come out. The digits left off, of the worth δ, give a factor a^δ
 * with |a^δ − 1| ≤ 2δ·|ln a|.
 */
function rootBox(box: (P: number) => Box, e: number, P: number, budget: Budget): Box | null {
  const W = P + 48;
  const w = BigInt(W);
  let halved: Box | null = box(W);
  if (holdsZero(halved)) return null;
  const bound = BigInt(logarithmBound(halved, W));
  const digits = P + 8 + bitLength(bound);
  budget.charge(digits * (40 + (W >> 3)));
  let root: Box = realBox({ low: 1n << w, high: 1n << w });
  let rest = 1;
  for (let k = 0; k < digits && rest !== 0; k++) {
    halved = squareRootBox(halved, W);
    if (halved === null) return null;
    rest *= 2;
    if (rest < e) continue;
    rest -= e;
    root = multiplyBox(root, halved, W);
  }
  if (rest !== 0) {
    const off = ((2n * bound) << w) >> BigInt(digits);
    const near = { low: -off - 1n, high: off + 1n };
    const one = 1n << w;
    root = multiplyBox(root, { re: { low: one + near.low, high: one + near.high }, im: near }, W);
  }
  return rescaleBox(root, W, P);
}

/** The principal e-th root of a number that is not a real one above or at zero: the root with its argument in (−π/e, π/e]. */
export function principalRoot(a: Root, e: number, budget: Budget): Root {
  return rootOf(a, e, (P) => rootBox((Q) => boxOf(a, Q), e, P, budget), budget);
}

/** The real e-th root of a real number; an even e needs a number that is not negative. */
export function realRoot(a: Root, e: number, budget: Budget): Root {
  if (!isFraction(a) && !a.isReal) {
    throw new OutsideDomain('domain', 'A real number was expected under this root.');
  }
  let negative = isFraction(a) ? a.n < 0n : false;
  for (let P = 64; !isFraction(a); P *= 2) {
    const { low, high } = a.box(P).re;
    if (low <= 0n && high >= 0n) continue;
    negative = high < 0n;
    break;
  }
  if (negative) {
    if (e % 2 === 0) {
      throw new OutsideDomain('domain', 'A negative number has no real root of an even index.');
    }
    return negate(realRoot(negate(a), e, budget));
  }
  return rootOf(
    a,
    e,
    (P) => {
      // r·2^P with r^e = x: the e-th root of x·2^(eP).
      const { low, high } = boxOf(a, P).re;
      const shift = BigInt((e - 1) * P);
      budget.charge(P * e);
      return realBox({
        low: wholeRoot((low < 0n ? 0n : low) << shift, e),
        high: wholeRoot(high << shift, e) + 1n,
      });
    },
    budget,
  );
}
