/** The root of an integer polynomial nearest to a given place, and the place that names a root among its fellows. */
import { OutsideDomain, type Budget } from '../limits';
import { factorOverIntegers } from '../polynomials/factor';
import { degreeOf, type IntegerPoly } from '../polynomials/integer-poly';
import { isolateRoots } from './all-roots';
import { Algebraic, refining, type Root } from './algebraic';
import { rescaleBox, subtractBox, type Box } from './box';
import { refine } from './newton';

export interface Isolated {
  readonly poly: IntegerPoly;
  readonly box: Box;
  readonly precision: number;
}

/** Bits to which two distances are told apart before a nearer place is asked for. */
const TIE_BITS = 512;

/** Square of the distance between two boxes, as an enclosure over 2^(2P). */
function distance(a: Box, b: Box): { low: bigint; high: bigint } {
  const d = subtractBox(a, b);
  const square = (low: bigint, high: bigint): { low: bigint; high: bigint } => {
    const [l, h] = [low * low, high * high];
    const most = l > h ? l : h;
    if (low <= 0n && high >= 0n) return { low: 0n, high: most };
    return { low: l < h ? l : h, high: most };
  };
  const x = square(d.re.low, d.re.high);
  const y = square(d.im.low, d.im.high);
  return { low: x.low + y.low, high: x.high + y.high };
}

/** Boxes of all roots of an irreducible polynomial. */
export function isolatedRoots(poly: IntegerPoly, budget: Budget): Isolated[] {
  const { boxes, precision } = isolateRoots(poly, budget);
  return boxes.map((box) => ({ poly, box, precision }));
}

/** Boxes of all different roots of an integer polynomial of positive degree. */
export function rootsOf(f: IntegerPoly, budget: Budget): Isolated[] {
  return factorOverIntegers(f, (work) => budget.charge(work)).flatMap(({ poly }) =>
    isolatedRoots(poly, budget),
  );
}

/** A box of the root over 2^P, a few units wide. */
export function refinedBox(root: Isolated, P: number, budget: Budget): Box {
  return root.precision >= P && root.box.re.high - root.box.re.low <= 4n
    ? rescaleBox(root.box, root.precision, P)
    : refine(root.poly, root.box, root.precision, P, (work) => budget.charge(work));
}

/**
 * The nearest of some roots to the place that `near` encloses, by its own minimal polynomial. Two roots as near as each
 * other to 512 bits are refused.
 */
export function nearestOf(
  roots: readonly Isolated[],
  near: (P: number) => Box,
  budget: Budget,
): Root {
  let left = roots;
  for (let P = 64; left.length > 1; P *= 2) {
    if (P > TIE_BITS) {
      throw new OutsideDomain(
        'domain',
        'Two roots of this polynomial lie equally near; a place nearer to one of them was expected.',
      );
    }
    const place = near(P);
    const measured = left.map((root) => ({
      root,
      gap: distance(refinedBox(root, P, budget), place),
    }));
    const least = measured.reduce(
      (best, { gap }) => (gap.high < best ? gap.high : best),
      measured[0]?.gap.high ?? 0n,
    );
    left = measured.filter(({ gap }) => gap.low <= least).map(({ root }) => root);
  }
  const [only] = left;
  if (only === undefined) throw new RangeError('the polynomial has no root');
  return rootOf(only, budget);
}

/** An isolated root as a number of its own. */
export function rootOf({ poly, box, precision }: Isolated, budget: Budget): Root {
  if (degreeOf(poly) === 1) return { n: -(poly[0] as bigint), d: poly[1] as bigint };
  const isReal = box.im.low === 0n && box.im.high === 0n;
  return new Algebraic(poly, isReal, refining(poly, box, precision, budget));
}

/** Decimal text of n/2^P to `digits` places, cut towards zero. */
function cutDecimal(n: bigint, P: number, digits: number): string {
  const size = n < 0n ? -n : n;
  const scaled = ((size * 10n ** BigInt(digits)) >> BigInt(P)).toString().padStart(digits + 1, '0');
  const whole = scaled.slice(0, scaled.length - digits);
  const text = `${whole}.${scaled.slice(scaled.length - digits)}`.replace(/\.?0+$/, '');
  return n < 0n && /[1-9]/.test(text) ? `-${text}` : text;
}

/**
 * A short decimal place to which this root of its polynomial is nearer than any other, for `root(p, place)`.
 * Cost: all roots are isolated once.
 */
export function placeOf(a: Algebraic, budget: Budget): { re: string; im: string | null } {
  const roots = isolatedRoots(a.poly, budget);
  for (let digits = 2; ; digits += 2) {
    const P = 64 + 4 * digits;
    const own = a.box(P);
    const re = cutDecimal(own.re.low, P, digits);
    const im = a.isReal ? null : cutDecimal(own.im.low, P, digits);
    const place = (Q: number): Box => ({ re: parse(re, Q), im: im === null ? ZERO : parse(im, Q) });
    const here = place(P);
    const reach = distance(own, here).high;
    const others = roots.filter(
      ({ box, precision }) => !touches(rescaleBox(box, precision, P), own),
    );
    const isNearest = others.every(
      ({ box, precision }) => distance(rescaleBox(box, precision, P), here).low > 4n * reach,
    );
    if (isNearest && others.length === roots.length - 1) return { re, im };
  }
}

const ZERO = { low: 0n, high: 0n };

const touches = (a: Box, b: Box): boolean =>
  a.re.low <= b.re.high && b.re.low <= a.re.high && a.im.low <= b.im.high && b.im.low <= a.im.high;

function parse(text: string, P: number): { low: bigint; high: bigint } {
  const [whole, part = ''] = text.split('.') as [string, string?];
  const n = BigInt(whole.replace('-', '') + part);
  const scaled = (n << BigInt(P)) / 10n ** BigInt(part.length);
  return text.startsWith('-')
    ? { low: -scaled - 1n, high: -scaled }
    : { low: scaled, high: scaled + 1n };
}
